using CircuitTransient.Circuits;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Instants of a solved study: what a declared instant came to.</summary>
public sealed class WindowTimes
{
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
