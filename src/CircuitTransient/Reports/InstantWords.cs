using CircuitTransient.Measurements;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <summary>Instants in words: when, and how long after the last switching before.</summary>
public static class InstantWords
{
    private const double RoundingOfTimes = 1e-14; // an extreme at a jump carries the event's own time

    /// <summary><c>at 1.801 s, 1.496 ms after Kmain closes</c>; empty where there is no instant.</summary>
    public static string At(TransientResult result, double time, InstantSide side = InstantSide.At)
    {
        if (!double.IsFinite(time))
        {
            return "";
        }

        var absolute = time == 0 ? "at the start" : $"at {EngineeringNumber.Format(time, "s")}";
        return SinceEvent(result, time, side) switch
        {
            null => absolute,
            var since when LastBefore(result, time) is { Time: 0 } => since,
            var since => $"{absolute}, {since}",
        };
    }

    /// <summary><c>1.496 ms after Kmain closes</c>, <c>just before KB opens</c>; null before the first
    /// switching.</summary>
    public static string? SinceEvent(TransientResult result, double time, InstantSide side = InstantSide.At)
    {
        if (LastBefore(result, time) is not { } last)
        {
            return null;
        }

        var names = Names(result, last.Time);
        if (time - last.Time <= RoundingOfTimes * time)
        {
            return side switch
            {
                InstantSide.Before => $"just before {names}",
                InstantSide.At => $"when {names}",
                _ => $"just after {names}",
            };
        }

        return $"{EngineeringNumber.Format(time - last.Time, "s")} after {names}";
    }

    /// <summary><c>Kmain closes</c>.</summary>
    public static string Name(EventResult switching) =>
        $"{switching.Switch} {(switching.Closes ? "closes" : "opens")}";

    private static EventResult? LastBefore(TransientResult result, double time) =>
        result.Events.LastOrDefault(e => e.Time <= time);

    private static string Names(TransientResult result, double time)
    {
        var names = result.Events.Where(e => e.Time == time).Select(Name).ToArray();
        return names.Length <= 2 ? string.Join(" and ", names) : $"{names[0]} (and {names.Length - 1} more)";
    }
}
