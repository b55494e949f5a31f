namespace CircuitTransient.Solutions.Curves;

/// <summary>The integral of a sum of products since some instant: an absorbed energy, a Joule
/// integral.</summary>
public sealed class AccumulatedPiece : CurvePiece
{
    private readonly QuadraticPiece rate;
    private readonly double[] sums;

    /// <summary>Integrates over a segment.</summary>
    /// <param name="rate">The integrand.</param>
    /// <param name="before">The integral up to the segment's start.</param>
    /// <param name="from">Where in the segment the integral sets in; nothing is gathered before.</param>
    public AccumulatedPiece(QuadraticPiece rate, double before, double from)
        : base(rate.Table)
    {
        this.rate = rate;
        sums = new double[Table.Instants.Length];
        sums[0] = before;
        From = from;
        for (var k = 0; k + 1 < sums.Length; k++)
        {
            var added = from <= Table.Instants[k]
                ? Table.IntegralBetween(rate, k)
                : PanelIntegral.Of(rate, from, Table.Instants[k + 1]);
            sums[k + 1] = sums[k] + added;
        }
    }

    /// <summary>Where in the segment the integral sets in.</summary>
    public double From { get; }

    /// <summary>The integrand.</summary>
    public QuadraticPiece Rate => rate;

    /// <summary>The integral up to the segment's end.</summary>
    public double AtEnd => sums[^1];

    /// <inheritdoc/>
    protected override double[] Tabulate() => sums;

    /// <inheritdoc/>
    public override (double Value, double Slope, double Bend) At(double tau, ReadOnlySpan<double> phi)
    {
        var (value, slope, _) = rate.At(tau, phi);
        return (ValueAt(tau, phi), value, slope);
    }

    /// <inheritdoc/>
    public override double ValueAt(double tau, ReadOnlySpan<double> phi)
    {
        var k = Array.BinarySearch(Table.Instants, tau);
        if (k >= 0)
        {
            return sums[k];
        }

        var before = ~k - 1;
        return sums[before] + PanelIntegral.Of(rate, Math.Max(From, Table.Instants[before]), tau);
    }

    /// <inheritdoc/>
    public override double MagnitudeWithin(ReadOnlySpan<double> envelope) => double.PositiveInfinity;

    /// <inheritdoc/>
    public override TaylorModel Around(
        double tau, double half, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope) =>
        rate.Around(tau, half, phi, envelope).Integrated(ValueAt(tau, phi), half);
}
