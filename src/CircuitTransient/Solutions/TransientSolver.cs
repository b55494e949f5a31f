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
    private const double SameInstant = 1e-12; // of the study: as finely as decided instants are found

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
    private int atOnce;

    private TransientSolver(Circuit circuit, ImmutableArray<Cause> causes, CancellationToken cancellation)
    {
        this.circuit = circuit;
        this.causes = causes;
        layout = new NetworkLayout(circuit);
        timeline = new Timeline(circuit);
        models = new IntervalModels(layout, cancellation);
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
        while (true)
        {
            ActDue();
            if (models.For(timeline.IsClosed) is not { } model)
            {
                return Failed(SingularDiagnosis.Describe(layout, timeline.IsClosed, now));
            }

            if (EndFor(model) is not { } end)
            {
                return Failed(StudyEnd.Unknown(circuit, now));
            }

            var horizon = Growth.Horizon(model, now, stored);
            var until = Math.Min(timeline.NextFixed().Due, Math.Min(end.Time, horizon));
            var solved = solver.Solve(model, Place(model), now, until, stored);
            var resolution = SameInstant * (double.IsFinite(end.Time) ? end.Time : until);
            if (new DecidedEvents(timeline, watched, resolution).FirstIn(solved) is { } decided
                && decided.Time < until)
            {
                if (!IsLater(decided.Time, resolution))
                {
                    return Failed(Chatter(decided.Events[0], now));
                }

                Advance(model, decided.Time, solved);
                startsWith = [.. startsWith, .. timeline.Act(now, decided.Events, isDecidedByAnswer: true)];
            }
            else if (until >= horizon)
            {
                return Failed(Growth.Describe(circuit, model, horizon));
            }
            else
            {
                Advance(model, until, solved);
                if (until >= end.Time)
                {
                    return Finish(end, initial);
                }
            }
        }
    }

    /// <summary>Whether time goes on to a decided switching, or at least has not stood still for too many of
    /// them.</summary>
    private bool IsLater(double decided, double resolution)
    {
        atOnce = decided - now <= resolution ? atOnce + 1 : 0;
        return atOnce <= MostAtOnce;
    }

    private void ActDue()
    {
        var (due, events) = timeline.NextFixed();
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

        return double.IsPositiveInfinity(timeline.NextFixed().Due)
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

        var place = Place(model);
        var kept = until < solved[^1].End ? solver.Solve(model, place, now, until, stored) : solved;
        if (place < intervals.Count)
        {
            var last = intervals[place];
            intervals[place] = last with { Until = until, SegmentCount = last.SegmentCount + kept.Length };
        }
        else
        {
            intervals.Add(new SolvedInterval(
                now, until, model, segments.Count, kept.Length, startsWith, momentary));
        }

        segments.AddRange(kept);
        stored = solver.StoredAtEnd(kept[^1]);
        watched.Gather(kept);
        startsWith = [];
        momentary = [];
        now = until;
    }

    /// <summary>The place of the interval that begins now; that of the last one where nothing switched and it
    /// goes on.</summary>
    private int Place(IntervalModel model) =>
        startsWith.IsEmpty && momentary.IsEmpty && intervals is [.., var last] && last.Model == model
            ? intervals.Count - 1
            : intervals.Count;

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

    private Outcome<TransientSolution> Finish((double Time, string? Reason) end, DoubleDouble[][] initial) =>
        LeftOpen() is { IsEmpty: false } open
            ? new(null, open)
            : new(
                new TransientSolution(
                    circuit,
                    layout,
                    end.Time,
                    end.Reason,
                    causes,
                    [.. intervals],
                    [.. segments],
                    [.. timeline.Occurrences],
                    [.. timeline.Left()],
                    [.. layout.Stores.Select((_, k) => initial.Sum(own => (double)own[k]))])
                { Lapsed = [.. timeline.Lapsed] },
                []);
}
