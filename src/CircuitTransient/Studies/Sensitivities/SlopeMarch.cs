using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>Carries the derivatives of a solution with respect to values from its start to its end, segment
/// by segment and through every switching: what is stored goes on with its own derivative, and an instant
/// that moves adds its rates just before and just after.</summary>
internal sealed class SlopeMarch
{
    private readonly TransientSolution solution;
    private readonly ImmutableArray<Variation> variations;
    private readonly DisturbedModels models;
    private readonly NetworkLayout layout;
    private readonly EventShifts[] shifts;
    private readonly SegmentFrame[] frames;
    private readonly SegmentSlopes?[][] slopes;
    private readonly Refusal?[] refusals;
    private readonly double[][] starts; // by interval and value: how its start moves
    private readonly SlopeReading reading;
    private readonly DoubleDouble[][] stored; // by value: the derivative of what every store holds

    private SlopeMarch(TransientSolution solution, ImmutableArray<Variation> variations)
    {
        this.solution = solution;
        this.variations = variations;
        var positions = solution.Intervals.Select(i => i.Model.IsClosed)
            .Concat(solution.Intervals.SelectMany(i => i.Momentary).Select(s => s.Model.IsClosed));
        layout = new NetworkLayout(solution.Circuit, [.. positions
            .SelectMany(p => variations.SelectMany(v => v.Terms(p))).Select(t => t.Part).Distinct().Order()]);
        models = new DisturbedModels(layout);
        shifts = [.. variations.Select(v => new EventShifts(solution, v))];
        frames = new SegmentFrame[solution.Segments.Length];
        slopes = [.. solution.Segments.Select(_ => new SegmentSlopes?[variations.Length])];
        refusals = [.. variations.Select(v => v.Hidden is { } reason ? new Refusal(0, reason) : null)];
        starts = [.. solution.Intervals.Select(_ => new double[variations.Length])];
        stored = new DoubleDouble[variations.Length][];
        reading = new SlopeReading(solution, variations, frames, slopes, starts);
    }

    /// <summary>Derives a solution.</summary>
    /// <returns>The derivatives; null where a value decides whether the equations have a solution at
    /// all.</returns>
    public static SlopeMarch? Of(
        TransientSolution solution, ImmutableArray<Variation> variations, CancellationToken cancellation)
    {
        var march = new SlopeMarch(solution, variations);
        return march.Run(cancellation) ? march : null;
    }

    /// <summary>Reads derivatives of quantities.</summary>
    public SlopeReading Reading => reading;

    /// <summary>The values.</summary>
    public ImmutableArray<Variation> Variations => variations;

    /// <summary>Why a value's derivatives end, by value.</summary>
    public IReadOnlyList<Refusal?> Refusals => refusals;

    /// <summary>How instants go with each value.</summary>
    public IReadOnlyList<EventShifts> Shifts => shifts;

    /// <summary>How the study's end goes with a value; null where that is not known.</summary>
    public double? EndShift(int value) => StudyEndSlope.Of(
        solution, ModelOf(solution.Intervals.Length - 1), variations[value], starts[^1][value]);

    /// <summary>An interval's network with its laws disturbed.</summary>
    public IntervalModel ModelOf(int interval) => models.For(solution.Intervals[interval].Model)!;

    private bool Run(CancellationToken cancellation)
    {
        var before = solution.Initial.Select(x => (DoubleDouble)x).ToArray();
        for (var q = 0; q < solution.Intervals.Length; q++)
        {
            cancellation.ThrowIfCancellationRequested();
            var interval = solution.Intervals[q];
            if (models.For(interval.Model) is not { } model
                || interval.Momentary.Any(s => models.For(s.Model) is null))
            {
                return false;
            }

            if (q == 0)
            {
                FindInitial();
            }

            for (var v = 0; v < variations.Length; v++)
            {
                MoveStart(q, v);
                RefuseWhatIsOpen(model, interval.From, v);
            }

            foreach (var segment in interval.Momentary)
            {
                PassMomentary(q, segment, before);
                before = Held(segment.ValueAtStart);
            }

            var start = SegmentStart.OfInterval(model, solution.Segments[interval.FirstSegment], before);
            for (var s = 0; s < interval.SegmentCount; s++)
            {
                var segment = solution.Segments[interval.FirstSegment + s];
                start = s == 0 ? start
                    : SegmentStart.OfCorner(model, solution.Segments[interval.FirstSegment + s - 1], segment);
                Pass(q, interval.FirstSegment + s, start);
            }

            before = Held(solution.Segments[interval.FirstSegment + interval.SegmentCount - 1].ValueAtEnd);
        }

        return true;
    }

    private DoubleDouble[] Held(Func<Measurand, int, DoubleDouble> value) =>
        [.. layout.Stores.Select(p => value(layout.Held(p), Segment.Total))];

    private void FindInitial()
    {
        // Switchings at t = 0 come after the settled start.
        var momentary = solution.Intervals[0].Momentary;
        var first = momentary.IsEmpty ? solution.Intervals[0].Model : momentary[0].Model;
        var settled = solution.Circuit.StartsSettled ? SettledModel() : null;
        var finder = settled is null ? null : new SettledSlopes(settled, solution);
        for (var v = 0; v < variations.Length; v++)
        {
            stored[v] = [.. layout.Stores.Select(p => (DoubleDouble)variations[v].StoredSlope(p))];
            if (finder?.Of(variations[v]) is { } found)
            {
                stored[v] = found;
            }
            else if (solution.Circuit.StartsSettled)
            {
                refusals[v] ??= new Refusal(
                    0, "the settled start has no derivative: the value drives what nothing limits");
            }
        }

        IntervalModel? SettledModel()
        {
            ImmutableArray<bool> positions =
                [.. solution.Circuit.Parts.Select(p => p is Switch { StartsClosed: true })];
            if (first.IsClosed.SequenceEqual(positions))
            {
                return models.For(first);
            }

            var form = DescriptorReduction.Reduce(
                layout, NetworkEquations.Assemble(layout, positions), out _);
            return form is null ? null : new IntervalModel(form, positions);
        }
    }

    /// <summary>A value that multiplies what the equations leave open decides it, and there is no
    /// derivative.</summary>
    private void RefuseWhatIsOpen(IntervalModel model, double from, int v)
    {
        if (refusals[v] is null && variations[v].Terms(model.IsClosed).Any(t =>
            !model.Project(t.Quantity is RateOfChange rate ? rate.Of : t.Quantity).Output.IsDetermined))
        {
            refusals[v] = new Refusal(from, "it multiplies a current that the equations leave open");
        }
    }

    /// <summary>Moves the start of an interval with a value: what is stored there goes on at its rate just
    /// before.</summary>
    private void MoveStart(int q, int v)
    {
        var interval = solution.Intervals[q];
        var last = interval.FirstSegment - 1;
        var (shift, reason) = shifts[v].Act(
            interval, quantity => Crossing(quantity, last, v), q == 0 ? 0 : solution.Intervals[q - 1].From);
        if (q == 0 && shift != 0)
        {
            reason ??= "a switching at the start of the study cannot move to an earlier instant";
        }

        if (reason is not null)
        {
            refusals[v] ??= new Refusal(interval.From, reason);
        }

        starts[q][v] = reason is null ? shift : 0;
        if (q == 0 || refusals[v] is not null)
        {
            return;
        }

        stored[v] = slopes[last][v]!.HeldAtEnd();
        for (var k = 0; k < stored[v].Length && shift != 0; k++)
        {
            var rate = new RateOfChange(layout.Held(layout.Stores[k]));
            stored[v][k] += solution.Segments[last].ValueAtEnd(rate, Segment.Total) * shift;
        }
    }

    /// <summary>Minus the derivative of a watched quantity over its rate, at the end of a segment.</summary>
    private double? Crossing(Measurand quantity, int segment, int v)
    {
        const double tangent = 1e-9; // of the quantity's size over the segment
        if (refusals[v] is not null)
        {
            return 0;
        }

        var length = solution.Segments[segment].Length;
        if (reading.At(quantity, segment, length) is not { } nominal
            || reading.ValueSlope(quantity, segment, length, v) is not { } derivative)
        {
            return null;
        }

        // Of an integral, its integrand was read.
        var isIntegral = QuantityFactors.OfAny(solution.Circuit, quantity) is { IsIntegrated: true };
        var rate = isIntegral ? nominal.Value : nominal.Slope;
        return rate == 0 || (!isIntegral && Math.Abs(rate) * length <= tangent * Math.Abs(nominal.Value))
            ? null : -derivative / rate;
    }

    /// <summary>An interval that ends as it begins: what is stored just after it began goes on.</summary>
    private void PassMomentary(int q, Segment segment, DoubleDouble[] before)
    {
        var start = SegmentStart.OfInterval(models.For(segment.Model)!, segment, before);
        var frame = new SegmentFrame(start.Model, segment, Changes(segment.Start));
        for (var v = 0; v < variations.Length; v++)
        {
            if (refusals[v] is null)
            {
                stored[v] = Slopes(start, frame, v, delay: 0).HeldAtStart(starts[q][v]);
            }
        }
    }

    private void Pass(int q, int s, SegmentStart start)
    {
        frames[s] = new SegmentFrame(start.Model, start.Segment, Changes(start.Segment.Start));
        for (var v = 0; v < variations.Length; v++)
        {
            if (refusals[v] is not null)
            {
                continue;
            }

            if (s == solution.Intervals[q].FirstSegment)
            {
                slopes[s][v] = Slopes(start, frames[s], v, starts[q][v]);
            }
            else
            {
                var state = slopes[s - 1][v]!.StateAtEnd();
                start.AddImpulses(state, variations[v].Terms(start.Model.IsClosed));
                slopes[s][v] = new SegmentSlopes(frames[s], variations[v], state);
            }
        }
    }

    private SegmentSlopes Slopes(SegmentStart start, SegmentFrame frame, int v, double delay)
    {
        var state = start.Model.Blocks.Select(b => new DoubleDoubleComplex[b.Size]).ToArray();
        start.AddStored(state, stored[v]);
        start.AddImpulses(state, variations[v].Terms(start.Model.IsClosed));
        if (delay != 0)
        {
            start.Delay(state, delay);
        }

        return new SegmentSlopes(frame, variations[v], state);
    }

    /// <summary>Every exponent that some source's derivative has.</summary>
    private Forcing[] Changes(double start) =>
        [.. variations.SelectMany(v => layout.Sources.SelectMany(s => v.Forcings(layout, s, start, false)))];
}
