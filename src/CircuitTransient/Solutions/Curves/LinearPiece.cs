namespace CircuitTransient.Solutions.Curves;

/// <summary>A voltage, a current, or the rate of change of one.</summary>
public sealed class LinearPiece : CurvePiece
{
    private const double Rounding = 1.2e-16; // half a unit of a double's last place

    private readonly double[] c0;
    private readonly double[] c1;
    private readonly double[] c2;
    private readonly double[] c3;
    private double[][]? derivatives;

    /// <summary>Takes the coefficients of the segment's functions.</summary>
    public LinearPiece(SegmentTable table, double[] coefficients)
        : base(table)
    {
        c0 = coefficients;
        IsZero = Array.TrueForAll(c0, x => x == 0);
        c1 = IsZero ? c0 : Segment.Basis.Differentiate(c0);
        c2 = IsZero ? c0 : Segment.Basis.Differentiate(c1);
        c3 = IsZero ? c0 : Segment.Basis.Differentiate(c2);
    }

    /// <summary>Whether it is zero throughout.</summary>
    public bool IsZero { get; }

    /// <summary>The coefficients.</summary>
    public ReadOnlySpan<double> Coefficients => c0;

    /// <summary>The size of the largest function in it over the segment.</summary>
    public double Scale
    {
        get
        {
            Span<double> envelope = new double[c0.Length];
            Segment.Basis.Envelope(0, Segment.Length, envelope);
            double scale = 0;
            for (var k = 0; k < c0.Length; k++)
            {
                scale = Math.Max(scale, Math.Abs(c0[k]) * envelope[k]);
            }

            return scale;
        }
    }

    /// <inheritdoc/>
    public override (double Value, double Slope, double Bend) At(double tau, ReadOnlySpan<double> phi) =>
        (Dot(c0, phi), Dot(c1, phi), Dot(c2, phi));

    /// <inheritdoc/>
    public override double ValueAt(double tau, ReadOnlySpan<double> phi) => Dot(c0, phi);

    /// <inheritdoc/>
    public override (double Second, double Third) DerivativeBounds(ReadOnlySpan<double> envelope) =>
        (Magnitude(c2, envelope), Magnitude(c3, envelope));

    /// <summary>Bounds of the magnitudes of value, first, second and third derivative.</summary>
    public (double Value, double First, double Second, double Third) Bounds(ReadOnlySpan<double> envelope) =>
        (Magnitude(c0, envelope), Magnitude(c1, envelope), Magnitude(c2, envelope), Magnitude(c3, envelope));

    /// <inheritdoc/>
    public override double UpperBetween(
        double sign, double width, ReadOnlySpan<double> first, ReadOnlySpan<double> last,
        ReadOnlySpan<double> envelope)
    {
        var split = Split(width, first, last, envelope);
        return Math
            .Max(sign * split.First, sign * split.Last) + (width * width / 8 * split.Bend) + split.Fast;
    }

    /// <inheritdoc/>
    public override double UpperAround(
        double sign, double half, double tau, ReadOnlySpan<double> middle, ReadOnlySpan<double> envelope)
    {
        var split = Split(2 * half, middle, middle, envelope);
        return (sign * split.First) + (half * Math
            .Abs(split.Slope)) + (half * half / 2 * split.Bend) + split.Fast;
    }

    /// <summary>Parts the modes into slow ones, which a straight line follows better than their amplitude
    /// bounds them over the stretch, and fast ones.</summary>
    internal SlowAndFast Split(
        double width, ReadOnlySpan<double> first, ReadOnlySpan<double> last, ReadOnlySpan<double> envelope)
    {
        var sum = default(SlowAndFast);
        var modes = Segment.Basis.Modes;
        for (var m = 0; m < modes.Length; m++)
        {
            var place = Segment.Basis.Place(m);
            var isReal = modes[m].IsReal;
            double amplitude = 0, rate = 0, bend = 0, start = 0, end = 0, slope = 0;
            for (var k = place; k < place + modes[m].Width; k++)
            {
                amplitude += Pair(isReal, c0, k, place) * envelope[k];
                rate += Pair(isReal, c1, k, place) * envelope[k];
                bend += Pair(isReal, c2, k, place) * envelope[k];
                start += c0[k] * first[k];
                end += c0[k] * last[k];
                slope += c1[k] * first[k];
            }

            sum = width * width / 8 * bend <= amplitude
                ? sum.WithSlow(start, end, slope, amplitude, rate, bend)
                : sum with { Fast = sum.Fast + amplitude };
        }

        return sum;
    }

    /// <inheritdoc/>
    public override void Expand(
        double half, double tau, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope,
        ref Expansion expansion)
    {
        if (IsZero)
        {
            return;
        }

        var c = derivatives ??= Derivatives();
        var modes = Segment.Basis.Modes;
        for (var m = 0; m < modes.Length; m++)
        {
            var (place, width, isReal) = (Segment.Basis.Place(m), modes[m].Width, modes[m].IsReal);
            var amplitude = Magnitude(c0, envelope, isReal, place, width);
            expansion.AddNoise(4 * Rounding * amplitude);
            var rest = Magnitude(c[^1], envelope, isReal, place, width);
            for (var k = 1; k <= Expansion.Order; k++)
            {
                rest *= half / k;
            }

            if (!(rest <= amplitude))
            {
                // too fast for a polynomial: its amplitude is all that is said of it
                expansion.AddRest(
                    amplitude,
                    half * Magnitude(c1, envelope, isReal, place, width),
                    half * half * Magnitude(c2, envelope, isReal, place, width));
                continue;
            }

            double factor = 1;
            for (var k = 0; k < Expansion.Order; k++)
            {
                expansion.Add(k, factor * Dot(c[k].AsSpan(place, width), phi.Slice(place, width)));
                factor *= half / (k + 1);
            }

            expansion.AddRest(
                rest, Expansion.Order * rest, Expansion.Order * (Expansion.Order - 1) * rest);
        }
    }

    private double[][] Derivatives()
    {
        var c = new double[Expansion.Order + 1][];
        (c[0], c[1], c[2], c[3]) = (c0, c1, c2, c3);
        for (var k = 4; k < c.Length; k++)
        {
            c[k] = Segment.Basis.Differentiate(c[k - 1]);
        }

        return c;
    }

    private static double Magnitude(
        double[] c, ReadOnlySpan<double> envelope, bool isReal, int place, int width)
    {
        double sum = 0;
        for (var k = place; k < place + width; k++)
        {
            sum += Pair(isReal, c, k, place) * envelope[k];
        }

        return sum;
    }

    /// <summary>|Re c|, |Im c| of a complex function count together once, as the magnitude.</summary>
    private static double Pair(bool isReal, double[] c, int k, int place) =>
        isReal ? Math.Abs(c[k]) : (k - place) % 2 == 0 ? double.Hypot(c[k], c[k + 1]) : 0;

    private static double Magnitude(double[] c, ReadOnlySpan<double> envelope)
    {
        double sum = 0;
        for (var k = 0; k < c.Length; k++)
        {
            sum += Math.Abs(c[k]) * envelope[k];
        }

        return sum;
    }
}
