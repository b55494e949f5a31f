using System.Collections.Immutable;
using CircuitTransient.Studies.Sensitivities;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Goes on halving by the exact engine, and judges whether what is left is a jump of the figure, a
/// jump of its instant alone, or only something steep.</summary>
internal sealed class JumpConfirmation(PointBatch batch, Edges edges)
{
    private const int Halvings = 14;
    private const double Rounding = 1e-9; // what the exact engine owes, a hundred times
    private const double Kink = 1e-6; // of the steeper slope: less is none
    private const double Remains = 0.5; // of a step of an instant
    private const double NearPeriods = 0.12;
    private const int MostHalfPeriods = 8;

    private readonly ExactFigures exact = new(batch.Figures, batch.Cancellation);
    private long solves;

    /// <summary>How many solves it took.</summary>
    public long Solves => Interlocked.Read(ref solves);

    /// <summary>The jump; null where the exact engine sees none.</summary>
    public EdgeJump? Of(Halving seen)
    {
        var width = seen.High.Place - seen.Low.Place;
        var outer = seen with
        {
            Low = Exact(seen, Math.Max(0, seen.Low.Place - width)),
            High = Exact(seen, Math.Min(1, seen.High.Place + width)),
        };
        var inner = outer;
        for (var n = 0; n < Halvings; n++)
        {
            inner = inner.Half(Exact(inner, inner.Middle));
        }

        var (low, high) = (Derived(outer.Step, outer.Low), Derived(outer.Step, outer.High));
        var (before, after) = (low?.Slope, high?.Slope);
        var isOfValue = IsJump(outer, inner, before, after);
        return isOfValue || IsTakeover(outer, inner, before, after)
            ? Jump(inner, isOfValue, before, after, low?.Periods ?? [])
            : null;
    }

    private PlacedFigure Exact(Halving halving, double place)
    {
        Interlocked.Increment(ref solves);
        var edge = halving.Step.Edge;
        var circuit = batch.Varied.At(edges.At(edge.Corner, edge.Value, place)).Value;
        var (value, time) = circuit is null ? (null, null) : exact.At(circuit, halving.Step.Figure);
        return new PlacedFigure(place, value ?? double.NaN, time ?? double.NaN);
    }

    /// <summary>Whether the figure's values on both sides differ by more than its slopes there make of the
    /// bracket; where these are not known, whether halving left half of the step.</summary>
    private static bool IsJump(Halving outer, Halving inner, double? before, double? after)
    {
        var (from, to) = (inner.Low.Value, inner.High.Value);
        if (!double.IsFinite(from) || !double.IsFinite(to))
        {
            return double.IsFinite(from) != double.IsFinite(to);
        }

        var change = Math.Abs(to - from);
        var rounding = Rounding * Math.Max(Math.Abs(from), Math.Abs(to));
        var width = inner.High.Place - inner.Low.Place;
        return change > rounding && (before is { } b && after is { } a
            ? change > 2 * (Math.Abs(a) + Math.Abs(b)) * width
            : change > Remains * Math.Abs(outer.High.Value - outer.Low.Value));
    }

    /// <summary>Whether the instant jumps and the figure has a kink: where two crests are level for any
    /// value, its instant is a matter of rounding.</summary>
    private static bool IsTakeover(Halving outer, Halving inner, double? before, double? after)
    {
        var change = Math.Abs(inner.High.Time - inner.Low.Time);
        return change > Remains * Math.Abs(outer.High.Time - outer.Low.Time) && change > 0
            && before is { } b && after is { } a
            && Math.Abs(a - b) > Kink * Math.Max(Math.Abs(a), Math.Abs(b))
            && Math.Abs(a - b) > Rounding * Math.Abs(inner.Low.Value);
    }

    /// <summary>The exact slope for the whole edge, and the ring at the instant.</summary>
    private (double? Slope, ImmutableArray<RingPeriod> Periods)? Derived(EdgeStep step, PlacedFigure at)
    {
        Interlocked.Increment(ref solves);
        var point = edges.At(step.Edge.Corner, step.Edge.Value, at.Place);
        if (SensitivityAnalysis.Of(batch.Varied, point, batch.Cancellation).Value is not { } derived)
        {
            return null;
        }

        var interval = derived.Solution.Intervals.Count(i => i.From <= at.Time) - 1;
        return (
            derived.Of(batch.Figures[step.Figure])?.Slopes[step.Edge.Value] * edges.Width(step.Edge.Value),
            interval < 0 ? [] : [.. derived.Poles(interval).Where(p => p.Pole.Imaginary > 0)
                .Select(p => new RingPeriod(
                    p.Pole.Magnitude / (2 * Math.PI), 2 * Math.PI / p.Pole.Imaginary))]);
    }

    private EdgeJump Jump(
        Halving inner, bool isOfValue, double? before, double? after, ImmutableArray<RingPeriod> periods)
    {
        var edge = inner.Step.Edge;
        var width = edges.Width(edge.Value);
        return new EdgeJump(
            inner.Step.Figure, edge.Value, [.. edge.Corner],
            edges.At(edge.Corner, edge.Value, inner.Middle)[edge.Value],
            width * (inner.High.Place - inner.Low.Place), isOfValue, inner.Low.Value, inner.High.Value,
            inner.Low.Time, inner.High.Time)
        {
            SlopeBefore = before / width,
            SlopeAfter = after / width,
            Ring = Ring(Math.Abs(inner.High.Time - inner.Low.Time), periods),
        };
    }

    /// <summary>The ring of which a step in time is nearest to a few halves of its period.</summary>
    private static RingStep? Ring(double step, ImmutableArray<RingPeriod> periods) =>
        periods.Select(p => (p.Frequency, Exact: step / p.Period, Halves: Math.Round(2 * step / p.Period)))
            .Where(p => p.Halves is >= 1 and <= MostHalfPeriods
                && Math.Abs(p.Exact - (p.Halves / 2)) < NearPeriods)
            .OrderBy(p => p.Halves % 2).ThenBy(p => Math.Abs(p.Exact - (p.Halves / 2)))
            .Select(p => new RingStep(p.Frequency, p.Halves / 2))
            .FirstOrDefault();

    private sealed record RingPeriod(double Frequency, double Period);
}
