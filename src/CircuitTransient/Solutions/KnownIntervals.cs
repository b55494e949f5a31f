using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>The intervals whose switch positions follow from the text alone.</summary>
public static class KnownIntervals
{
    private const int MostStores = 150; // poles of more take seconds, which are left to a solve

    /// <summary>An error for each set of positions, met at a known instant, whose equations have no unique
    /// solution; else one for a start that cannot settle, and one for an end that is not known.</summary>
    public static ImmutableArray<Diagnostic> FindUnsolvable(
        Circuit circuit, CancellationToken cancellation)
    {
        var layout = new NetworkLayout(circuit);
        var timeline = new Timeline(circuit);
        var models = new HashSet<string>();
        var found = ImmutableArray.CreateBuilder<Diagnostic>();
        var isSettled = circuit.StartsSettled ? timeline.IsClosed : [];
        double now = 0;
        while (true)
        {
            cancellation.ThrowIfCancellationRequested();
            var (next, events) = timeline.NextFixed();
            if (next <= now)
            {
                timeline.Act(now, events, isDecidedByAnswer: false);
                continue;
            }

            if (!timeline.MayHaveTurned(now)
                && models.Add(string.Concat(timeline.IsClosed.Select(c => c ? '1' : '0'))))
            {
                found.AddRange(Find(layout, timeline, now, Math.Min(next, circuit.Until ?? next)));
            }

            if (double.IsPositiveInfinity(next) || next >= circuit.Until)
            {
                if (found.Count == 0 && layout.Stores.Length <= MostStores)
                {
                    found.AddRange(FindUnsettled(layout, isSettled, cancellation));
                    found.AddRange(FindEndless(layout, timeline, now, cancellation));
                }

                return [.. found.DistinctBy(d => (d.Span, d.Message))];
            }

            now = next;
        }
    }

    private static IEnumerable<Diagnostic> Find(
        NetworkLayout layout, Timeline timeline, double from, double until)
    {
        var rows = NetworkEquations.Assemble(layout, timeline.IsClosed);
        var reduction = new DescriptorReduction(layout, rows);
        if (reduction.Singular is not null)
        {
            return [SingularDiagnosis.Describe(layout, timeline.IsClosed, from)];
        }

        // The normal form takes memory and time by the square and cube of the state: it is worth them only
        // where something is open.
        return reduction.LeavesOpen
            ? new AskedQuantities(layout.Circuit, timeline.InstantOf)
                .LeftOpenIn(reduction.Solve(), from, until)
            : [];
    }

    /// <summary>Why no settled state exists before the start, where one is asked for.</summary>
    private static IEnumerable<Diagnostic> FindUnsettled(
        NetworkLayout layout, ImmutableArray<bool> isClosed, CancellationToken cancellation)
    {
        if (!isClosed.IsEmpty && new IntervalModels(layout, cancellation).For(isClosed) is { } model
            && SettledStart.Find(model, layout, CauseList.FromStart(layout.Circuit).Causes) is
            { Problem: { } problem })
        {
            yield return problem;
        }
    }

    /// <summary>That nothing decays in the last positions, where these are known and no end is
    /// stated.</summary>
    private static IEnumerable<Diagnostic> FindEndless(
        NetworkLayout layout, Timeline timeline, double now, CancellationToken cancellation)
    {
        if (layout.Circuit.Until is null && !timeline.Waiting().Any()
            && new IntervalModels(layout, cancellation).For(timeline.IsClosed) is { } model
            && StudyEnd.Of(layout.Circuit, model, now) is null)
        {
            yield return StudyEnd.Unknown(layout.Circuit, now);
        }
    }
}
