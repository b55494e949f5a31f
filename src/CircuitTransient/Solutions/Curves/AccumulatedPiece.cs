using System.Diagnostics;

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
    public override (double Second, double Third) DerivativeBounds(ReadOnlySpan<double> envelope)
    {
        var (_, first, second, _) = rate.Bounds(envelope);
        return (first, second);
    }

    /// <inheritdoc/>
    public override double UpperBetween(
        double sign, double width, ReadOnlySpan<double> first, ReadOnlySpan<double> last,
        ReadOnlySpan<double> envelope) =>
        throw new UnreachableException("an integral is bounded around the middle of a stretch");

    /// <inheritdoc/>
    public override double UpperAround(
        double sign, double half, double tau, ReadOnlySpan<double> middle, ReadOnlySpan<double> envelope)
    {
        var growth = Math.Max(
            rate.UpperAround(1, half, tau, middle, envelope),
                rate.UpperAround(-1, half, tau, middle, envelope));
        return (sign * ValueAt(tau, middle)) + (half * growth);
    }

    /// <inheritdoc/>
    public override void Expand(
        double half, double tau, ReadOnlySpan<double> phi, ReadOnlySpan<double> envelope,
        ref Expansion expansion)
    {
        Span<double> terms = stackalloc double[Expansion.Order];
        terms.Clear();
        var growth = new Expansion(terms);
        rate.Expand(half, tau, phi, envelope, ref growth);
        var value = ValueAt(tau, phi);
        expansion.Add(0, value);
        for (var k = 0; k < terms.Length; k++)
        {
            expansion.Add(k + 1, half * terms[k] / (k + 1));
        }

        expansion.AddRest(half * growth.Rest, half * growth.Rest, half * growth.RestOfSlope);
        expansion.AddNoise((half * growth.Noise) + (1e-15 * Math.Abs(value)));
    }
}
