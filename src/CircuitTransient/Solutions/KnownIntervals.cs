using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>The intervals whose switch positions follow from the text alone.</summary>
public static class KnownIntervals
{
    /// <summary>An error for each set of positions, met at a known instant, whose equations have no unique
    /// solution.</summary>
    public static ImmutableArray<Diagnostic> FindUnsolvable(
        Circuit circuit, CancellationToken cancellation)
    {
        var layout = new NetworkLayout(circuit);
        var timeline = new Timeline(circuit);
        var models = new HashSet<string>();
        var found = ImmutableArray.CreateBuilder<Diagnostic>();
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
}
