using System.Collections.Immutable;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>An interval's switchings in words, and what other causes do from there on.</summary>
internal static class SwitchingWords
{
    /// <summary>The switchings at an interval's start: <c>Kmain closes</c>.</summary>
    public static string Of(TransientSolution solution, int interval) =>
        string.Join(" and ", solution.Intervals[interval].StartsWith.Select(o =>
            $"{solution.Circuit.Parts[o.Event.Part].Name} {(o.Closes ? "closes" : "opens")}"));

    /// <summary>The segments from an interval on with causes of its own; the switchings that follow keep the
    /// instants of the full answer.</summary>
    public static ImmutableArray<Segment> SegmentsFrom(
        TransientSolution solution, int first, ImmutableArray<Cause> causes, CancellationToken cancellation)
    {
        var solver = new IntervalSolver(solution.Layout, causes, cancellation);
        var stored = StatedStart.Of(solution.Layout, causes);
        var segments = ImmutableArray.CreateBuilder<Segment>();
        for (var i = first; i < solution.Intervals.Length; i++)
        {
            var interval = solution.Intervals[i];
            segments.AddRange(solver.Solve(interval.Model, i, interval.From, interval.Until, stored));
            stored = solver.StoredAtEnd(segments[^1]);
        }

        return segments.ToImmutable();
    }
}
