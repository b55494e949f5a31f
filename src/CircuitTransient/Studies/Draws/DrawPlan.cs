using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Draws;

/// <summary>An event whose instant follows from the text and the draw's values.</summary>
/// <param name="Reference">The event.</param>
/// <param name="Delay">Its delay in seconds.</param>
/// <param name="Value">Index of the varied value that is its delay; −1 for none.</param>
/// <param name="After">Index of the planned event it follows; −1 for t = 0.</param>
/// <param name="Previous">Index of its switch's event before; −1 for the first.</param>
internal sealed record PlannedEvent(
    EventReference Reference, Quantity Delay, int Value, int After, int Previous);

/// <summary>An interval between switchings.</summary>
/// <param name="Form">Index of its switch positions in <see cref="DrawPlan.Positions"/>.</param>
/// <param name="Events">The planned events that begin it.</param>
internal sealed record PlannedInterval(int Form, ImmutableArray<int> Events);

/// <summary>The order of events of the nominal circuit, which a draw must keep, and the switch positions met
/// in it.</summary>
/// <param name="Events">The events that act, in order, then those that come too late.</param>
/// <param name="Acting">How many act.</param>
/// <param name="Intervals">The intervals.</param>
/// <param name="Positions">For every set of positions, for every part, whether it is a closed switch.</param>
/// <param name="Initial">Index of the positions before any event.</param>
/// <param name="Corners">The instants at which a source's wave has a step or a corner, in order.</param>
internal sealed record DrawPlan(
    ImmutableArray<PlannedEvent> Events,
    int Acting,
    ImmutableArray<PlannedInterval> Intervals,
    ImmutableArray<ImmutableArray<bool>> Positions,
    int Initial,
    ImmutableArray<double> Corners)
{
    private const int MostCorners = 400; // segments cost a closed form each; more go the exact route

    /// <summary>Plans the nominal circuit; null, with the reason, where the answer itself decides what
    /// happens.</summary>
    public static (DrawPlan? Plan, string? Reason) Of(Circuit circuit, ImmutableArray<VariedValue> values)
    {
        foreach (var part in circuit.Parts.OfType<Switch>())
        {
            if (part.Events.Any(e => !Timeline.IsFixed(e)))
            {
                return (null, $"the answer decides when `{part.Name}` acts");
            }
        }

        var corners = Corners0(circuit);
        return corners.Length > MostCorners
            ? (null, $"the waves have {corners.Length} corners")
            : new Builder(circuit, values, corners).Build();
    }

    private static ImmutableArray<double> Corners0(Circuit circuit)
    {
        var pieces = circuit.Parts.SelectMany(p => p switch
        {
            VoltageSource s => s.Wave.Pieces,
            CurrentSource s => s.Wave.Pieces,
            _ => [],
        });
        return [.. new SortedSet<double>(pieces.SelectMany(p => new[] { p.Start, p.End }))
            .Where(double.IsFinite)];
    }

    private sealed class Builder(
        Circuit circuit, ImmutableArray<VariedValue> values, ImmutableArray<double> corners)
    {
        private readonly Timeline timeline = new(circuit);
        private readonly List<PlannedEvent> events = [];
        private readonly Dictionary<EventReference, int> places = [];
        private readonly List<ImmutableArray<bool>> positions = [];
        private readonly List<PlannedInterval> intervals = [];

        public (DrawPlan? Plan, string? Reason) Build()
        {
            var end = circuit.Until ?? double.PositiveInfinity;
            var initial = Place();
            var now = 0.0;
            ImmutableArray<int> begins = [];
            while (true)
            {
                var (due, references) = Next();
                if (due <= now)
                {
                    if (begins.Length > 0)
                    {
                        return (null, "a switch acts twice at one instant");
                    }

                    begins = [.. references.Select(Add)];
                    timeline.Act(now, references, isDecidedByAnswer: false);
                    continue;
                }

                intervals.Add(new PlannedInterval(Place(), begins));
                if (due >= end || double.IsPositiveInfinity(due))
                {
                    break;
                }

                begins = [];
                now = due;
            }

            var acting = events.Count;
            AddLate();
            return (new DrawPlan(
                [.. events], acting, [.. intervals], [.. positions], initial, corners), null);
        }

        /// <summary>The events that a draw must keep beyond the end.</summary>
        private void AddLate()
        {
            foreach (var (reference, declared) in timeline.Waiting().ToArray())
            {
                var at = ((AtInstant)declared.Trigger).Instant;
                if (at.After is null || places.ContainsKey(at.After))
                {
                    Add(reference);
                }
            }
        }

        private (double Due, EventReference[] Events) Next()
        {
            var waiting = timeline.Waiting()
                .Select(w => (w.Reference, Due: timeline.Due(w.Reference, w.Event))).ToArray();
            var due = waiting.Select(w => w.Due).DefaultIfEmpty(double.PositiveInfinity).Min();
            return (due, [.. waiting.Where(w => w.Due == due).Select(w => w.Reference)]);
        }

        private int Add(EventReference reference)
        {
            var declared = ((Switch)circuit.Parts[reference.Part]).Events[reference.Event];
            var instant = ((AtInstant)declared.Trigger).Instant;
            var value = Enumerable.Range(0, values.Length)
                .FirstOrDefault(i => values[i].Event == reference, -1);
            events.Add(new PlannedEvent(
                reference, instant.Delay, value,
                instant.After is { } after ? places[after] : -1,
                reference.Event == 0 ? -1 : places[reference with { Event = reference.Event - 1 }]));
            places.Add(reference, events.Count - 1);
            return events.Count - 1;
        }

        private int Place()
        {
            var known = positions.FindIndex(p => p.SequenceEqual(timeline.IsClosed));
            if (known < 0)
            {
                positions.Add(timeline.IsClosed);
                return positions.Count - 1;
            }

            return known;
        }
    }
}
