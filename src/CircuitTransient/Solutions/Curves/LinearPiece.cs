namespace CircuitTransient.Solutions.Curves;

/// <summary>A voltage, a current, or the rate of change of one.</summary>
public sealed class LinearPiece : CurvePiece
{
    private const int Beyond = TaylorModel.Degree + 1;

    private readonly double[]?[] derivatives = new double[Beyond + 1][];

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
    public override double MagnitudeWithin(ReadOnlySpan<double> envelope)
    {
        double sum = 0;
        for (var m = 0; m < Segment.Basis.Modes.Length; m++)
        {
            sum += Magnitude(0, m, envelope);
        }

        return sum;
    }

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

        double remainder = 0, first = 0, second = 0, size = 0;
        var modes = Segment.Basis.Modes;
        for (var m = 0; m < modes.Length; m++)
        {
            size += Magnitude(0, m, envelope);
            var last = Power(modes[m].Speed * half, Beyond);
            if (last > 1)
            {
                remainder += Magnitude(0, m, envelope);
                first += half * Magnitude(1, m, envelope);
                second += half * half * Magnitude(2, m, envelope);
                continue;
            }

            double weight = 1;
            for (var j = 0; j <= TaylorModel.Degree; j++)
            {
                a[j] += weight * Part(j, m, phi);
                weight *= half / (j + 1);
            }

            var left = weight * Magnitude(Beyond, m, envelope);
            remainder += left;
            first += Beyond * left;
            second += Beyond * (Beyond - 1) * left;
        }

        const double rounding = 4 * 1.1e-16; // of a coefficient, a function, their product and the sum
        return new TaylorModel(a, remainder, first, second, rounding * size);
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

    private double Part(int order, int mode, ReadOnlySpan<double> phi)
    {
        var c = Derivative(order);
        var place = Segment.Basis.Place(mode);
        double sum = 0;
        for (var k = place; k < place + Segment.Basis.Modes[mode].Width; k++)
        {
            sum += c[k] * phi[k];
        }

        return sum;
    }

    /// <summary>A bound of a mode's part in a derivative; a complex function counts by its
    /// magnitude.</summary>
    private double Magnitude(int order, int mode, ReadOnlySpan<double> envelope)
    {
        var c = Derivative(order);
        var place = Segment.Basis.Place(mode);
        var (isReal, width) = (Segment.Basis.Modes[mode].IsReal, Segment.Basis.Modes[mode].Width);
        double sum = 0;
        for (var k = place; k < place + width; k += isReal ? 1 : 2)
        {
            sum += envelope[k] * (isReal ? Math.Abs(c[k]) : Math.Sqrt((c[k] * c[k]) + (c[k + 1] * c[k + 1])));
        }

        return sum;
    }

    private double[] Derivative(int order) =>
        derivatives[order] ??= IsZero ? derivatives[0]! : Segment.Basis.Differentiate(Derivative(order - 1));
}
