using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions.Curves;

/// <summary>A measured quantity on one segment: its value, its derivatives, and what bounds it between
/// instants.</summary>
public abstract class CurvePiece(SegmentTable table)
{
    private double[]? tabulated;

    /// <summary>The table of the segment's functions.</summary>
    public SegmentTable Table { get; } = table;

    /// <summary>The segment.</summary>
    public Segment Segment => Table.Segment;

    /// <summary>The values at the tabulated instants.</summary>
    public ReadOnlySpan<double> Tabulated => tabulated ??= Tabulate();

    /// <summary>Value, first and second derivative at τ, where the segment's functions are
    /// <paramref name="phi"/>.</summary>
    public abstract (double Value, double Slope, double Bend) At(double tau, ReadOnlySpan<double> phi);

    /// <summary>The value alone.</summary>
    public abstract double ValueAt(double tau, ReadOnlySpan<double> phi);

    /// <summary>A bound of the magnitude where the functions stay within an envelope.</summary>
    public abstract double MagnitudeWithin(ReadOnlySpan<double> envelope);

    /// <summary>The model around τ, half a width to either side.</summary>
    /// <param name="tau">The middle, in seconds from the segment's start.</param>
    /// <param name="half">Half the width in seconds.</param>
    /// <param name="phi">The segment's functions in the middle.</param>
    /// <param name="envelope">Their bounds over the width.</param>
    public abstract TaylorModel Around(
        double tau, double half, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope);

    /// <summary>The value at τ.</summary>
    public double ValueAt(double tau)
    {
        Span<double> phi = stackalloc double[256];
        phi = Segment.Basis.Width <= 256 ? phi[..Segment.Basis.Width] : new double[Segment.Basis.Width];
        Segment.Basis.Evaluate(tau, phi);
        return ValueAt(tau, phi);
    }

    /// <summary>The model of the stretch from one instant to another.</summary>
    public TaylorModel Between(double from, double until) => Between(from, until, out _);

    /// <summary>The model of the stretch from one instant to another, and the value half way.</summary>
    public TaylorModel Between(double from, double until, out double middle)
    {
        var half = (until - from) / 2;
        var (phi, envelope) = Table.Stretch(from, until);
        middle = ValueAt(from + half, phi.Span);
        return Around(from + half, half, phi.Span, envelope.Span);
    }

    /// <summary>Takes the values at the tabulated instants.</summary>
    protected virtual double[] Tabulate()
    {
        var values = new double[Table.Instants.Length];
        for (var k = 0; k < values.Length; k++)
        {
            values[k] = ValueAt(Table.Instants[k], Table.Values(k));
        }

        return values;
    }

    /// <summary>a · b.</summary>
    protected static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b) => DotProduct.Of(a, b);
}
