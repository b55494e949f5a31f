namespace CircuitTransient.Solutions.Curves;

/// <summary>A voltage, a current, or the rate of change of one.</summary>
public sealed class LinearPiece : CurvePiece
{
    private const int Beyond = TaylorModel.Degree + 1;
    private const double Reach = 4.1471; // x⁹/9! is 1 there: the series of a mode still ends below its size

    private readonly double[]?[] derivatives = new double[Beyond + 1][];
    private readonly double[]?[] amplitudes = new double[Beyond + 1][];

    /// <summary>Takes the coefficients of the segment's functions.</summary>
    public LinearPiece(SegmentTable table, double[] coefficients)
        : base(table)
    {
        derivatives[0] = coefficients;
        IsZero = Array.TrueForAll(coefficients, x => x == 0);
    }

    /// <summary>Whether it is zero throughout.</summary>
    public bool IsZero { get; }

    /// <summary>The coefficients.</summary>
    public ReadOnlySpan<double> Coefficients => derivatives[0];

    /// <summary>The size of the largest function in it over the segment.</summary>
    public double Scale
    {
        get
        {
            Span<double> envelope = new double[Segment.Basis.Width];
            Segment.Basis.Envelope(0, Segment.Length, envelope);
            double scale = 0;
            for (var k = 0; k < envelope.Length; k++)
            {
                scale = Math.Max(scale, Math.Abs(Coefficients[k]) * envelope[k]);
            }

            return scale;
        }
    }

    /// <inheritdoc/>
    public override (double Value, double Slope, double Bend) At(double tau, ReadOnlySpan<double> phi) =>
        (Dot(Derivative(0), phi), Dot(Derivative(1), phi), Dot(Derivative(2), phi));

    /// <inheritdoc/>
    public override double ValueAt(double tau, ReadOnlySpan<double> phi) => Dot(Derivative(0), phi);

    /// <inheritdoc/>
    public override double MagnitudeWithin(ReadOnlySpan<double> envelope) => Dot(Amplitude(0), envelope);

    /// <summary>Slow modes enter the polynomial with their derivatives; a mode so fast that its series would
    /// not end below its amplitude is bounded by that.</summary>
    public override TaylorModel Around(
        double tau, double half, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope)
    {
        var a = new double[TaylorModel.Degree + 1];
        if (IsZero)
        {
            return TaylorModel.Zero;
        }

        const double rounding = 4 * 1.1e-16; // of a coefficient, a function, their product and the sum
        var noise = rounding * MagnitudeWithin(envelope);
        if (Segment.Basis.Fastest * half <= Reach)
        {
            AddSeries(a, half, phi, 0, phi.Length);
            var left = Power(half, Beyond) * Dot(Amplitude(Beyond), envelope);
            return new TaylorModel(a, left, Beyond * left, Beyond * (Beyond - 1) * left, noise);
        }

        double remainder = 0, first = 0, second = 0;
        foreach (var (place, width, isSlow) in Runs(half))
        {
            var bounds = envelope.Slice(place, width);
            if (!isSlow)
            {
                remainder += Magnitude(0, place, bounds);
                first += half * Magnitude(1, place, bounds);
                second += half * half * Magnitude(2, place, bounds);
                continue;
            }

            AddSeries(a, half, phi, place, width);
            var left = Power(half, Beyond) * Magnitude(Beyond, place, bounds);
            remainder += left;
            first += Beyond * left;
            second += Beyond * (Beyond - 1) * left;
        }

        return new TaylorModel(a, remainder, first, second, noise);
    }

    /// <summary>Neighbouring modes that are all slow or all fast over half a width; a ladder's stand in the
    /// order of their speeds, and long sums are far cheaper than many short ones.</summary>
    private IEnumerable<(int Place, int Width, bool IsSlow)> Runs(double half)
    {
        var basis = Segment.Basis;
        var first = 0;
        for (var m = 1; m <= basis.Modes.Length; m++)
        {
            var isSlow = basis.Modes[first].Speed * half <= Reach;
            if (m == basis.Modes.Length || basis.Modes[m].Speed * half <= Reach != isSlow)
            {
                var end = m == basis.Modes.Length ? basis.Width : basis.Place(m);
                yield return (basis.Place(first), end - basis.Place(first), isSlow);
                first = m;
            }
        }
    }

    private void AddSeries(double[] a, double half, ReadOnlySpan<double> phi, int place, int width)
    {
        double weight = 1;
        for (var j = 0; j <= TaylorModel.Degree; j++)
        {
            a[j] += weight * Dot(Derivative(j).AsSpan(place, width), phi.Slice(place, width));
            weight *= half / (j + 1);
        }
    }

    /// <summary>xⁿ/n!.</summary>
    private static double Power(double x, int n)
    {
        double power = 1;
        for (var j = 1; j <= n; j++)
        {
            power *= x / j;
        }

        return power;
    }

    private double Magnitude(int order, int place, ReadOnlySpan<double> bounds) =>
        Dot(Amplitude(order).AsSpan(place, bounds.Length), bounds);

    /// <summary>The magnitudes of a derivative's coefficients: of a complex function in its first
    /// place.</summary>
    private double[] Amplitude(int order)
    {
        if (amplitudes[order] is { } known)
        {
            return known;
        }

        var c = Derivative(order);
        var magnitudes = new double[c.Length];
        for (var m = 0; m < Segment.Basis.Modes.Length; m++)
        {
            var (place, mode) = (Segment.Basis.Place(m), Segment.Basis.Modes[m]);
            for (var k = place; k < place + mode.Width; k += mode.IsReal ? 1 : 2)
            {
                magnitudes[k] = mode.IsReal
                    ? Math.Abs(c[k])
                    : Math.Sqrt((c[k] * c[k]) + (c[k + 1] * c[k + 1]));
            }
        }

        return amplitudes[order] = magnitudes;
    }

    private double[] Derivative(int order) =>
        derivatives[order] ??= IsZero ? derivatives[0]! : Segment.Basis.Differentiate(Derivative(order - 1));
}
