namespace CircuitTransient.Solutions.Curves;

/// <summary>A curve around an instant: f(τ + h x) = Σ aⱼ xʲ within a remainder, for −1 ≤ x ≤ 1, and likewise
/// its first and second derivative by x. Unlike a bound of a derivative alone it sees how the modes of a long
/// ladder cancel.</summary>
/// <remarks>K. Makino and M. Berz, "Taylor models and other validated functional inclusion methods", 2003
/// (from memory); remainders here come from the modes' envelopes, rounding is left out.</remarks>
public sealed class TaylorModel
{
    /// <summary>The highest power kept.</summary>
    public const int Degree = 8;

    private readonly double[] a;

    /// <summary>Takes the coefficients, the remainders and what rounding may blur the value by.</summary>
    public TaylorModel(
        double[] coefficients, double remainder, double firstRemainder, double secondRemainder, double noise)
    {
        a = coefficients;
        Remainder = remainder;
        FirstRemainder = firstRemainder;
        SecondRemainder = secondRemainder;
        Noise = noise;
    }

    /// <summary>The model of nothing.</summary>
    public static TaylorModel Zero => new(new double[Degree + 1], 0, 0, 0, 0);

    /// <summary>The value in the middle, within the remainder.</summary>
    public double Middle => a[0];

    /// <summary>A bound of what the polynomial leaves out.</summary>
    public double Remainder { get; }

    /// <summary>A bound of what its first derivative leaves out.</summary>
    public double FirstRemainder { get; }

    /// <summary>A bound of what its second derivative leaves out.</summary>
    public double SecondRemainder { get; }

    /// <summary>What rounding may blur the value by: modes that cancel leave it, and no halving helps against
    /// it.</summary>
    public double Noise { get; }

    /// <summary>Whether the curve rises or falls throughout.</summary>
    public bool IsMonotone => Math.Abs(a[1]) >= Sum(2, (j, c) => j * Math.Abs(c)) + FirstRemainder;

    /// <summary>An upper bound of sign × value.</summary>
    public double Upper(double sign) =>
        (sign * a[0]) + Sum(1, (j, c) => j % 2 == 0 ? Math.Max(0, sign * c) : Math.Abs(c)) + Remainder;

    /// <summary>Whether sign × value is bent downwards throughout.</summary>
    public bool IsBentDown(double sign) =>
        (2 * sign * a[2]) + Sum(3, (j, c) => j * (j - 1) * Math.Abs(c)) + SecondRemainder < 0;

    /// <summary>The sum of a model and a multiple of another.</summary>
    public TaylorModel Plus(double factor, TaylorModel other)
    {
        var sum = new double[Degree + 1];
        for (var j = 0; j <= Degree; j++)
        {
            sum[j] = a[j] + (factor * other.a[j]);
        }

        var weight = Math.Abs(factor);
        return new TaylorModel(
            sum, Remainder + (weight * other.Remainder), FirstRemainder + (weight * other.FirstRemainder),
            SecondRemainder + (weight * other.SecondRemainder), Noise + (weight * other.Noise));
    }

    /// <summary>The model of a product.</summary>
    public TaylorModel Times(TaylorModel other)
    {
        var product = new double[Degree + 1];
        double cut = 0, firstCut = 0, secondCut = 0;
        for (var i = 0; i <= Degree; i++)
        {
            for (var j = 0; j <= Degree; j++)
            {
                var term = a[i] * other.a[j];
                var power = i + j;
                if (power <= Degree)
                {
                    product[power] += term;
                    continue;
                }

                cut += Math.Abs(term);
                firstCut += power * Math.Abs(term);
                secondCut += power * (power - 1) * Math.Abs(term);
            }
        }

        var (p, q) = (Sizes(), other.Sizes());
        return new TaylorModel(
            product,
            cut + Cross(Remainder, q.Value, other.Remainder, p.Value),
            firstCut + Cross(FirstRemainder, q.Value, other.FirstRemainder, p.Value)
                + (p.First * other.Remainder) + (q.First * Remainder),
            secondCut + Cross(SecondRemainder, q.Value, other.SecondRemainder, p.Value)
                + (p.Second * other.Remainder) + (q.Second * Remainder)
                + (2 * Cross(FirstRemainder, q.First, other.FirstRemainder, p.First)),
            (Noise * q.Value) + (other.Noise * p.Value));
    }

    /// <summary>The model of an integral whose value in the middle is known and whose rate has this
    /// model.</summary>
    public TaylorModel Integrated(double middle, double half)
    {
        var integral = new double[Degree + 1];
        integral[0] = middle;
        for (var j = 1; j <= Degree; j++)
        {
            integral[j] = half * a[j - 1] / j;
        }

        var cut = half * Math.Abs(a[Degree]);
        return new TaylorModel(
            integral, (half * Remainder) + cut, (half * Remainder) + cut,
            (half * FirstRemainder) + (Degree * cut), (half * Noise) + (1e-15 * Math.Abs(middle)));
    }

    /// <summary>Bounds of the polynomial and its derivatives.</summary>
    private (double Value, double First, double Second) Sizes() => (
        Sum(0, (_, c) => Math.Abs(c)),
        Sum(1, (j, c) => j * Math.Abs(c)),
        Sum(2, (j, c) => j * (j - 1) * Math.Abs(c)));

    /// <summary>What is left of (p + r)(q + s) without p q, given sizes of all four.</summary>
    private static double Cross(double r, double q, double s, double p) => (r * q) + (s * p) + (r * s);

    private double Sum(int from, Func<int, double, double> part)
    {
        double sum = 0;
        for (var j = from; j <= Degree; j++)
        {
            sum += part(j, a[j]);
        }

        return sum;
    }
}
