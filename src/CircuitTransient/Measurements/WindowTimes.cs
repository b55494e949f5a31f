using CircuitTransient.Circuits;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Instants of a solved study: what a declared instant came to.</summary>
public sealed class WindowTimes
{
    private const double Rounding = 1e-12; // an instant written out again means the same event

    private readonly TransientSolution solution;
    private readonly Dictionary<EventReference, double> acted;

    /// <summary>Looks up the events of a solution.</summary>
    public WindowTimes(TransientSolution solution)
    {
        this.solution = solution;
        acted = solution.Occurrences.ToDictionary(o => o.Event, o => o.Time);
    }

    /// <summary>Seconds; null where its event did not take place.</summary>
    public double? Of(Instant instant) =>
        instant.After is null ? instant.Delay.Nominal
        : acted.TryGetValue(instant.After, out var time) ? time + instant.Delay.Nominal
        : null;

    /// <summary>The interval that an event begins; null for the last one before each extreme.</summary>
    public int? IntervalOf(AfterEvent? after)
    {
        for (var i = solution.Intervals.Length - 1; i >= 0; i--)
        {
            var isMeant = after switch
            {
                AfterInstant t => solution.Intervals[i].From <= t.Time * (1 + Rounding)
                    && !solution.Intervals[i].StartsWith.IsEmpty,
                AfterSwitching s => solution.Intervals[i].StartsWith.Any(o =>
                    o.Closes == s.Closes && solution.Circuit.Parts[o.Event.Part].Name == s.Switch),
                _ => false,
            };
            if (isMeant)
            {
                return i;
            }
        }

        return null;
    }

    /// <summary>A window cut to the study; null where it holds nothing.</summary>
    public (double From, double To)? Of(Window window)
    {
        var from = window.From is null ? 0 : Of(window.From);
        var to = window.To is null ? solution.Until : Of(window.To);
        if (from is not { } start || to is not { } end)
        {
            return null;
        }

        (start, end) = (Math.Max(0, start), Math.Min(solution.Until, end));
        return start <= end ? (start, end) : null;
    }
}
