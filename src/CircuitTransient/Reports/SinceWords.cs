using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <summary>Why an extreme is not broken down since the event that was asked for.</summary>
internal static class SinceWords
{
    /// <summary>The reason; null where no event was asked for.</summary>
    public static string? WhyNone(TransientResult result, WorstObservation worst)
    {
        if (EventOf(result, worst.Extreme.Time) is not { } since)
        {
            return null;
        }

        var name = (worst.Shown ?? worst.Observation).Name;
        var observed = result.Circuit.Observations.FirstOrDefault(o => o.Name == name);
        if (observed is not null
            && QuantityFactors.OfAny(result.Circuit, observed.Quantity) is { IsIntegrated: true })
        {
            return $"Since {since}: an integral over time is not broken down since an event, because what "
                + "gathered before it follows from causes before it; the causes from the start stand above.";
        }

        return worst.Extreme.Value is null
            ? null
            : $"Since {since}: the peak lies before it, at "
                + $"{EngineeringNumber.Format(worst.Extreme.Time, "s")}, so nothing of it follows from it.";
    }

    private static string? EventOf(TransientResult result, double peak) => result.After switch
    {
        AfterSwitching asked => Named(result.Events.LastOrDefault(e =>
            e.Switch == asked.Switch && e.Closes == asked.Closes)),
        AfterInstant { Time: var time } => Named(result.Events.LastOrDefault(e => e.Time <= time)),
        AfterLast => Named(
            result.Events.LastOrDefault(e => e.Time <= peak) ?? result.Events.FirstOrDefault()),
        _ => null,
    };

    private static string? Named(EventResult? switching) => switching is null
        ? null
        : $"{InstantWords.Name(switching)} at {EngineeringNumber.Format(switching.Time, "s")}";
}
