using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Solutions;

/// <summary>Solves a circuit from t = 0 to the end of its study, interval by interval, each cause
/// alone.</summary>
public sealed class TransientSolver
{
    private readonly Circuit circuit;
    private readonly NetworkLayout layout;
    private readonly ImmutableArray<Cause> causes;
    private readonly Timeline timeline;
    private readonly IntervalModels models;
    private readonly CancellationToken cancellation;
    private readonly List<Segment> segments = [];
    private readonly List<SolvedInterval> intervals = [];

    private TransientSolver(Circuit circuit, ImmutableArray<Cause> causes, CancellationToken cancellation)
    {
        this.circuit = circuit;
        this.causes = causes;
        this.cancellation = cancellation;
        layout = new NetworkLayout(circuit);
        timeline = new Timeline(circuit);
        models = new IntervalModels(layout);
    }

    /// <summary>Solves a circuit.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="causes">The causes to be solved alone; their sum is the answer.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The solution, or why some interval has none.</returns>
    public static Outcome<TransientSolution> Solve(
        Circuit circuit, ImmutableArray<Cause> causes, CancellationToken cancellation = default) =>
        new TransientSolver(circuit, causes, cancellation).Run();

    private Outcome<TransientSolution> Run()
    {
        var stored = InitialQuantities();
        double now = 0;
        var end = circuit.Until ?? double.PositiveInfinity;
        string? endReason = null;
        while (true)
        {
            cancellation.ThrowIfCancellationRequested();
            var (due, events) = NextFixed();
            ImmutableArray<Occurrence> startsWith = [];
            if (due <= now)
            {
                startsWith = timeline.Act(now, events, isDecidedByAnswer: false);
                (due, events) = NextFixed();
            }

            if (models.For(timeline.IsClosed) is not { } model)
            {
                var diagnosis = SingularDiagnosis.Describe(layout, timeline.IsClosed, now);
                return new Outcome<TransientSolution>(null, [diagnosis]);
            }

            if (double.IsPositiveInfinity(end) && double.IsPositiveInfinity(due))
            {
                if (StudyEnd.Of(circuit, model, now) is not { } found)
                {
                    return new Outcome<TransientSolution>(null, [StudyEnd.Unknown(circuit)]);
                }

                (end, endReason) = found;
            }

            var until = Math.Min(due, end);
            stored = SolveInterval(model, now, until, stored, startsWith);
            if (until >= end)
            {
                return new Outcome<TransientSolution>(Finish(end, endReason), []);
            }

            now = until;
        }
    }

    private (double Due, ImmutableArray<EventReference> Events) NextFixed()
    {
        var due = double.PositiveInfinity;
        var events = ImmutableArray.CreateBuilder<EventReference>();
        foreach (var (reference, declared) in timeline.Waiting())
        {
            var time = timeline.Due(reference, declared);
            if (time < due)
            {
                due = time;
                events.Clear();
            }

            if (time == due)
            {
                events.Add(reference);
            }
        }

        return (due, events.ToImmutable());
    }

    /// <summary>What every store holds at t = 0⁻, cause by cause.</summary>
    private DoubleDouble[][] InitialQuantities()
    {
        var stored = new DoubleDouble[causes.Length][];
        for (var c = 0; c < causes.Length; c++)
        {
            stored[c] = new DoubleDouble[layout.Stores.Length];
            if (causes[c].Store >= 0)
            {
                stored[c][layout.Stores.IndexOf(causes[c].Store)] = causes[c].Stored;
            }
        }

        return stored;
    }

    private DoubleDouble[][] SolveInterval(
        IntervalModel model, double from, double until, DoubleDouble[][] stored,
            ImmutableArray<Occurrence> startsWith)
    {
        var first = segments.Count;
        var states = stored.Select(s => StateFrom(model, s)).ToArray();
        var corners = SourceCorners.Between(causes, from, until);
        for (var k = 0; k + 1 < corners.Length; k++)
        {
            cancellation.ThrowIfCancellationRequested();
            var motions = ImmutableArray.CreateBuilder<Motion>(causes.Length);
            for (var c = 0; c < causes.Length; c++)
            {
                motions.Add(new Motion(states[c], Forcings(causes[c], corners[k])));
            }

            var modes =
                new SegmentModes(model, corners[k], corners[k + 1], motions.SelectMany(m => m.Forcings));
            var onset = k == 0 ? Onset.OfInterval(layout, motions, stored)
                : Onset.OfCorner(layout, segments[^1], motions);
            var segment = new Segment(
                model, intervals.Count, corners[k], corners[k + 1], modes, motions.ToImmutable(), onset);
            segments.Add(segment);
            for (var c = 0; c < causes.Length && k + 2 < corners.Length; c++)
            {
                states[c] = segment.StateAtEnd(c);
            }
        }

        intervals.Add(new SolvedInterval(from, until, model, first, segments.Count - first, startsWith));
        return [.. Enumerable.Range(0, causes.Length).Select(c => StoredAtEnd(segments[^1], c))];
    }

    private ImmutableArray<Forcing> Forcings(Cause cause, double start) =>
        cause.Source < 0
            ? []
            : Forcing.Of(cause.Pieces, layout.Input(cause.Source), CauseList.ScaleOf(circuit, cause.Source),
                start);

    private DoubleDoubleComplex[][] StateFrom(IntervalModel model, DoubleDouble[] stored)
    {
        var state = new DoubleDoubleComplex[model.Blocks.Length][];
        for (var b = 0; b < state.Length; b++)
        {
            state[b] = new DoubleDoubleComplex[model.Blocks[b].Size];
            for (var k = 0; k < stored.Length; k++)
            {
                if (!stored[k].IsZero)
                {
                    var drive = model.Drive(b, layout.Sources.Length + k);
                    for (var i = 0; i < drive.Length; i++)
                    {
                        state[b][i] += drive[i] * stored[k];
                    }
                }
            }
        }

        return state;
    }

    private DoubleDouble[] StoredAtEnd(Segment segment, int cause) =>
        [.. layout.Stores.Select(p => segment.ValueAtEnd(Held(p), cause))];

    private Measurand Held(int part) =>
        circuit.Parts[part] is Capacitor ? new VoltageAcross(part) : new CurrentThrough(part);

    private TransientSolution Finish(double end, string? reason) => new(
        circuit,
        layout,
        end,
        reason,
        causes,
        [.. intervals],
        [.. segments],
        [.. timeline.Occurrences],
        [.. timeline.Waiting().Select(w => w.Reference)]);
}
