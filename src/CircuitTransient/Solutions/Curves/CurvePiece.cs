using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions.Curves;

/// <summary>A measured quantity on one segment: its value, its derivatives, and bounds that hold between
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

    /// <summary>Value, first and second derivative at τ, where the segment's functions are <paramref
    /// name="phi"/>.</summary>
    public abstract (double Value, double Slope, double Bend) At(double tau, ReadOnlySpan<double> phi);

    /// <summary>The value alone.</summary>
    public abstract double ValueAt(double tau, ReadOnlySpan<double> phi);

    /// <summary>Bounds of the magnitudes of the second and third derivative where the functions stay within
    /// an envelope.</summary>
    public abstract (double Second, double Third) DerivativeBounds(ReadOnlySpan<double> envelope);

    /// <summary>An upper bound of sign × value over a stretch whose ends are known: slow functions are nearly
    /// straight there, fast ones are at most their amplitude.</summary>
    public abstract double UpperBetween(
        double sign, double width, ReadOnlySpan<double> first, ReadOnlySpan<double> last,
        ReadOnlySpan<double> envelope);

    /// <summary>An upper bound of sign × value over a stretch that reaches half a width to either side of
    /// τ.</summary>
    public abstract double UpperAround(
        double sign, double half, double tau, ReadOnlySpan<double> middle, ReadOnlySpan<double> envelope);

    /// <summary>Expands the curve about τ, half a width to either side.</summary>
    /// <param name="half">Half the width of the stretch.</param>
    /// <param name="tau">Its middle.</param>
    /// <param name="phi">The functions there.</param>
    /// <param name="envelope">Bounds of the functions over the stretch.</param>
    /// <param name="expansion">What is added to.</param>
    public abstract void Expand(
        double half, double tau, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope,
        ref Expansion expansion);

    /// <summary>The value at τ.</summary>
    public double ValueAt(double tau)
    {
        Span<double> phi = stackalloc double[256];
        phi = Segment.Basis.Width <= 256 ? phi[..Segment.Basis.Width] : new double[Segment.Basis.Width];
        Segment.Basis.Evaluate(tau, phi);
        return ValueAt(tau, phi);
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
    protected static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b) =>
        DotProduct.Of(a, b);
}
