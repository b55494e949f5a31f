using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Solutions;

/// <summary>What each switch will do next: the declared events in order, and the instants of those that
/// acted.</summary>
internal sealed class Timeline
{
    private readonly Circuit circuit;
    private readonly int[] next;
    private readonly Dictionary<EventReference, double> acted = [];
    private readonly List<Occurrence> occurrences = [];
    private readonly List<Lapse> lapsed = [];

    public Timeline(Circuit circuit)
    {
        this.circuit = circuit;
        next = new int[circuit.Parts.Length];
        IsClosed = [.. circuit.Parts.Select(p => p is Switch { StartsClosed: true })];
    }

    /// <summary>For every part, whether it is a switch that is closed now.</summary>
    public ImmutableArray<bool> IsClosed { get; private set; }

    /// <summary>Every switching so far.</summary>
    public IReadOnlyList<Occurrence> Occurrences => occurrences;

    /// <summary>Every event that had not come when the next one of its switch was due.</summary>
    public IReadOnlyList<Lapse> Lapsed => lapsed;

    /// <summary>The events that may come next: the first that is left of each switch, and where its instant
    /// is not known, the first after it whose instant is.</summary>
    public IEnumerable<(EventReference Reference, SwitchEvent Event)> Waiting()
    {
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            if (circuit.Parts[i] is not Switch s)
            {
                continue;
            }

            for (var e = next[i]; e < s.Events.Length; e++)
            {
                var reference = new EventReference(i, e);
                var isKnown = IsFixed(s.Events[e]) && double.IsFinite(Due(reference, s.Events[e]));
                if (e == next[i] || isKnown)
                {
                    yield return (reference, s.Events[e]);
                }

                if (isKnown)
                {
                    break;
                }
            }
        }
    }

    /// <summary>The first event that is left of each switch.</summary>
    public IEnumerable<EventReference> Left() => Waiting().Select(w => w.Reference).DistinctBy(r => r.Part);

    /// <summary>Whether an event's instant does not depend on the answer.</summary>
    public static bool IsFixed(SwitchEvent declared) => declared is { Trigger: AtInstant, CutAtMost: null };

    /// <summary>The instant of a fixed event, or from which a conditional one is watched; infinity while it
    /// hangs on an event that has not taken place.</summary>
    public double Due(EventReference reference, SwitchEvent declared)
    {
        var previous = Enumerable.Range(0, reference.Event)
            .Max(e => acted.TryGetValue(reference with { Event = e }, out var time) ? time : (double?)0) ?? 0;
        var instant = declared.Trigger switch
        {
            AtInstant at => InstantOf(at.Instant),
            WhenCrosses { After: { } after } => InstantOf(after),
            _ => 0,
        };
        return Math.Max(previous, instant);
    }

    /// <summary>The next instant that does not depend on the answer, and the events that act then; infinity
    /// where nothing more is fixed to happen.</summary>
    public (double Due, ImmutableArray<EventReference> Events) NextFixed()
    {
        var due = double.PositiveInfinity;
        var events = ImmutableArray.CreateBuilder<EventReference>();
        foreach (var (reference, declared) in Waiting().Where(w => IsFixed(w.Event)))
        {
            var time = Due(reference, declared);
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

    /// <summary>Whether the answer may have turned a switch before an instant: one has been waiting for its
    /// condition.</summary>
    public bool MayHaveTurned(double time) =>
        Waiting().Any(w => !IsFixed(w.Event) && Due(w.Reference, w.Event) < time);

    /// <summary>The instant in seconds; infinity while its event has not taken place.</summary>
    public double InstantOf(Instant instant) =>
        instant.After is null ? instant.Delay.Nominal
        : acted.TryGetValue(instant.After, out var time) ? time + instant.Delay.Nominal
        : double.PositiveInfinity;

    /// <summary>Turns switches at an instant. What had to come before on the same switch lapses; then the
    /// switch may stand already as it is to turn, and nothing happens.</summary>
    public ImmutableArray<Occurrence> Act(double time, IEnumerable<EventReference> events,
        bool isDecidedByAnswer)
    {
        var now = ImmutableArray.CreateBuilder<Occurrence>();
        var positions = IsClosed.ToBuilder();
        foreach (var reference in events)
        {
            var declared = ((Switch)circuit.Parts[reference.Part]).Events[reference.Event];
            for (var e = next[reference.Part]; e < reference.Event; e++)
            {
                lapsed.Add(new Lapse(reference with { Event = e }, time));
            }

            next[reference.Part] = reference.Event + 1;
            acted[reference] = time;
            if (positions[reference.Part] != declared.Closes)
            {
                positions[reference.Part] = declared.Closes;
                now.Add(new Occurrence(time, reference, declared.Closes, isDecidedByAnswer));
            }
        }

        IsClosed = positions.ToImmutable();
        occurrences.AddRange(now);
        return now.ToImmutable();
    }
}
