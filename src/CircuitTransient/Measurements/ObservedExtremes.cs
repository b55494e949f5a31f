using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>The global extremes of an observed quantity.</summary>
internal sealed class ObservedExtremes(Infinities infinities)
{
    private const int MostStretches = 3_000_000; // a million crests, three stretches each

    /// <summary>The greatest and the least value in a window; null where they are infinite.</summary>
    public (Extreme Max, Extreme Min) Of(Measurand quantity, Curve total, (double From, double To) window)
    {
        var max = ExtremeSearch.Greatest(total, window.From, window.To, MostStretches);
        var min = ExtremeSearch.Least(total, window.From, window.To, MostStretches);
        var (up, down) = infinities.Of(quantity, window.From, window.To);
        return (
            up is { } high ? new Extreme(null, high, InstantSide.After, null)
                : new Extreme(max.Value, max.Time, max.Side, max.Bound),
            down is { } low ? new Extreme(null, low, InstantSide.After, null)
                : new Extreme(min.Value, min.Time, min.Side, min.Bound));
    }
}
