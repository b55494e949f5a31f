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
    private const int MostAtOnce = 100; // switchings in no time: more is chatter

    private readonly Circuit circuit;
    private readonly NetworkLayout layout;
    private readonly ImmutableArray<Cause> causes;
    private readonly Timeline timeline;
    private readonly IntervalModels models;
    private readonly IntervalSolver solver;
    private readonly WatchedQuantities watched;
    private readonly List<Segment> segments = [];
    private readonly List<SolvedInterval> intervals = [];
    private ImmutableArray<Occurrence> startsWith = [];
    private ImmutableArray<Segment> momentary = [];
    private DoubleDouble[][] stored = [];
    private double now;

    private TransientSolver(Circuit circuit, ImmutableArray<Cause> causes, CancellationToken cancellation)
    {
        this.circuit = circuit;
        this.causes = causes;
        layout = new NetworkLayout(circuit);
        timeline = new Timeline(circuit);
        models = new IntervalModels(layout);
        solver = new IntervalSolver(layout, causes, cancellation);
        watched = new WatchedQuantities(circuit);
    }

    /// <summary>Solves a circuit.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="causes">The causes to be solved alone; their sum is the answer.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The solution, or why some interval has none.</returns>
    public static Outcome<TransientSolution> Solve(
        Circuit circuit, CauseList causes, CancellationToken cancellation = default) =>
        new TransientSolver(circuit, causes.Causes, cancellation).Run();

    private Outcome<TransientSolution> Run()
    {
        if (FindInitialQuantities() is { } unsettled)
        {
            return Failed(unsettled);
        }

        var initial = stored;
        var atOnce = 0;
        while (true)
        {
            ActDue();
            if (models.For(timeline.IsClosed) is not { } model)
            {
                return Failed(SingularDiagnosis.Describe(layout, timeline.IsClosed, now));
            }

            if (EndFor(model) is not { } end)
            {
                return Failed(StudyEnd.Unknown(circuit));
            }

            var horizon = Growth.Horizon(model, now, stored);
            var until = Math.Min(NextFixed().Due, Math.Min(end.Time, horizon));
            var solved = solver.Solve(model, intervals.Count, now, until, stored);
            if (new DecidedEvents(timeline, watched, 1e-12 * end.Time).FirstIn(solved) is { } decided
                && decided.Time < until)
            {
                atOnce = decided.Time - now <= 1e-12 * end.Time ? atOnce + 1 : 0;
                if (atOnce > MostAtOnce)
                {
                    return Failed(Chatter(decided.Events[0], now));
                }

                Advance(model, decided.Time, solved);
                startsWith = [.. startsWith, .. timeline.Act(now, decided.Events, isDecidedByAnswer: true)];
                continue;
            }

            if (until >= horizon)
            {
                return Failed(Growth.Describe(circuit, model, horizon));
            }

            Advance(model, until, solved);
            if (until >= end.Time)
            {
                var leftOpen = LeftOpen();
                return leftOpen.IsEmpty
                    ? new Outcome<TransientSolution>(Finish(end, initial), [])
                    : new Outcome<TransientSolution>(null, leftOpen);
            }
        }
    }

    private void ActDue()
    {
        var (due, events) = NextFixed();
        if (due <= now)
        {
            startsWith = [.. startsWith, .. timeline.Act(now, events, isDecidedByAnswer: false)];
        }
    }

    /// <summary>The stated end, or the one that follows from the slowest mode once nothing more is fixed to
    /// happen.</summary>
    private (double Time, string? Reason)? EndFor(IntervalModel model)
    {
        if (circuit.Until is { } stated)
        {
            return (stated, null);
        }

        return double.IsPositiveInfinity(NextFixed().Due)
            ? StudyEnd.Of(circuit, model, now)
            : (double.PositiveInfinity, null);
    }

    /// <summary>Ends the interval at an instant; one that had no time leaves what is stored just after it
    /// began.</summary>
    private void Advance(IntervalModel model, double until, ImmutableArray<Segment> solved)
    {
        if (until <= now)
        {
            stored = solver.StoredAtStart(solved[0]);
            momentary = [.. momentary, solved[0]];
            return;
        }

        var kept = until < solved[^1].End ? solver.Solve(model, intervals.Count, now, until, stored) : solved;
        intervals.Add(new SolvedInterval(now, until, model, segments.Count, kept.Length, startsWith,
            momentary));
        segments.AddRange(kept);
        stored = solver.StoredAtEnd(kept[^1]);
        watched.Gather(kept);
        startsWith = [];
        momentary = [];
        now = until;
    }

    private (double Due, ImmutableArray<EventReference> Events) NextFixed()
    {
        var due = double.PositiveInfinity;
        var events = ImmutableArray.CreateBuilder<EventReference>();
        foreach (var (reference, declared) in timeline.Waiting().Where(w => Timeline.IsFixed(w.Event)))
        {
            var time = timeline.Due(reference, declared);
            if (time < due)
            {
                due = time;
                events.Clear();
            }

            if (time == due && !double.IsPositiveInfinity(time))
            {
                events.Add(reference);
            }
        }

        return (due, events.ToImmutable());
    }

    /// <summary>Sets what every store holds at t = 0⁻, cause by cause; an error where no settled state
    /// exists.</summary>
    private Diagnostic? FindInitialQuantities()
    {
        if (circuit.StartsSettled)
        {
            if (models.For(timeline.IsClosed) is not { } model)
            {
                return SingularDiagnosis.Describe(layout, timeline.IsClosed, 0);
            }

            (stored, var problem) = SettledStart.Find(model, layout, causes);
            return problem;
        }

        stored = StatedStart.Of(layout, causes);
        return null;
    }

    /// <summary>What is asked for although some interval leaves it open, each once.</summary>
    private ImmutableArray<Diagnostic> LeftOpen()
    {
        var asked = new AskedQuantities(circuit, timeline.InstantOf);
        return [.. intervals
            .SelectMany(i => asked.LeftOpenIn(i.Model.Form, i.From, i.Until)).DistinctBy(d => d.Span)];
    }

    private Diagnostic Chatter(EventReference reference, double time)
    {
        var part = (Switch)circuit.Parts[reference.Part];
        return Diagnostic.Error(
            circuit.Source,
            part.Events[reference.Event].Span,
            $"`{part.Name}` chatters: over {MostAtOnce} switchings at {EngineeringNumber.Format(time, "s")}",
            "leave a gap between the level that opens a switch and the level that closes it");
    }

    private static Outcome<TransientSolution> Failed(Diagnostic diagnostic) => new(null, [diagnostic]);

    private TransientSolution Finish((double Time, string? Reason) end, DoubleDouble[][] initial) => new(
        circuit,
        layout,
        end.Time,
        end.Reason,
        causes,
        [.. intervals],
        [.. segments],
        [.. timeline.Occurrences],
        [.. timeline.Waiting().Select(w => w.Reference)],
        [.. Enumerable.Range(0, layout.Stores.Length).Select(k => initial.Sum(own => (double)own[k]))]);
}
