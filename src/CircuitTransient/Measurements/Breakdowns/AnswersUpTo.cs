using System.Collections.Immutable;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>The answers a study would have had if its switches had stopped acting at some instant: up to
/// there the full answer, from there the same network on and on.</summary>
internal sealed class AnswersUpTo
{
    private readonly TransientSolution solution;
    private readonly CancellationToken cancellation;
    private readonly Dictionary<int, (TransientSolution? Answer, string? Reason)> known = [];

    /// <summary>Takes the full answer.</summary>
    public AnswersUpTo(TransientSolution solution, CancellationToken cancellation)
    {
        (this.solution, this.cancellation) = (solution, cancellation);
    }

    /// <summary>The answer without the switchings that begin an interval and all later ones; null with
    /// the reason where there is none.</summary>
    public (TransientSolution? Answer, string? Reason) Before(int interval)
    {
        if (!known.TryGetValue(interval, out var answer))
        {
            known.Add(interval, answer = Solve(interval));
        }

        return answer;
    }

    private (TransientSolution?, string?) Solve(int interval)
    {
        var from = solution.Intervals[interval].From;
        if (ModelBefore(interval) is not { } model)
        {
            return (null, "without it the network has no unique solution");
        }

        var causes = Causes();
        var held = HeldAt(interval);
        DoubleDouble[][] stored = [.. causes.Select((_, c) => c == causes.Length - 1 ? held : Nothing())];
        if (Growth.Horizon(model, from, stored) < solution.Until)
        {
            return (null, "without it a mode grows past every number");
        }

        var solver = new IntervalSolver(solution.Layout, causes, cancellation);
        var segments = solver.Solve(model, interval, from, solution.Until, stored);
        var first = solution.Intervals[interval].FirstSegment;
        var kept = new SolvedInterval(from, solution.Until, model, first, segments.Length, [], []);
        return (solution with
        {
            Segments = [.. solution.Segments.Take(first), .. segments],
            Intervals = [.. solution.Intervals.Take(interval), kept],
            Occurrences = [.. solution.Occurrences.Where(o => o.Time < from)],
        }, null);

        DoubleDouble[] Nothing() => new DoubleDouble[solution.Layout.Stores.Length];
    }

    private IntervalModel? ModelBefore(int interval) => interval > 0
        ? solution.Intervals[interval - 1].Model
        : new IntervalModels(solution.Layout, cancellation).For(new Timeline(solution.Circuit).IsClosed);

    /// <summary>Only their sum is asked for: the sources as they go on, and all
    /// that is held as one.</summary>
    private ImmutableArray<Cause> Causes() =>
    [
        .. CauseList.FromStart(solution.Circuit).Causes.Where(c => c.Source >= 0),
        new Cause("what is held", -1, [], -1, 0),
    ];

    private DoubleDouble[] HeldAt(int interval)
    {
        var layout = solution.Layout;
        return interval == 0
            ? [.. solution.Initial.Select(x => (DoubleDouble)x)]
            : [.. layout.Stores.Select(p => solution.Segments[solution.Intervals[interval].FirstSegment - 1]
                .ValueAtEnd(layout.Held(p), Segment.Total))];
    }
}
