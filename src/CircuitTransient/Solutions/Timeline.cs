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

    /// <summary>The events that wait, one for each switch that has any left.</summary>
    public IEnumerable<(EventReference Reference, SwitchEvent Event)> Waiting()
    {
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            if (circuit.Parts[i] is Switch s && next[i] < s.Events.Length)
            {
                yield return (new EventReference(i, next[i]), s.Events[next[i]]);
            }
        }
    }

    /// <summary>Whether an event's instant does not depend on the answer.</summary>
    public static bool IsFixed(SwitchEvent declared) => declared is { Trigger: AtInstant, CutAtMost: null };

    /// <summary>The instant of a fixed event, or from which a conditional one is watched; infinity while it
    /// hangs on an event that has not taken place.</summary>
    public double Due(EventReference reference, SwitchEvent declared)
    {
        var previous = reference.Event == 0 ? 0 : acted[reference with { Event = reference.Event - 1 }];
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

    /// <summary>The instant in seconds; infinity while its event has not taken place.</summary>
    public double InstantOf(Instant instant) =>
        instant.After is null ? instant.Delay.Nominal
        : acted.TryGetValue(instant.After, out var time) ? time + instant.Delay.Nominal
        : double.PositiveInfinity;

    /// <summary>Turns switches at an instant.</summary>
    public ImmutableArray<Occurrence> Act(double time, IEnumerable<EventReference> events,
        bool isDecidedByAnswer)
    {
        var now = ImmutableArray.CreateBuilder<Occurrence>();
        var positions = IsClosed.ToBuilder();
        foreach (var reference in events)
        {
            var declared = ((Switch)circuit.Parts[reference.Part]).Events[reference.Event];
            positions[reference.Part] = declared.Closes;
            next[reference.Part]++;
            acted[reference] = time;
            now.Add(new Occurrence(time, reference, declared.Closes, isDecidedByAnswer));
        }

        IsClosed = positions.ToImmutable();
        occurrences.AddRange(now);
        return now.ToImmutable();
    }
}
