namespace CircuitTransient.Circuits;

/// <summary>What is known of instants before anything is solved.</summary>
public static class Schedule
{
    /// <summary>The instant in seconds where it follows from the text alone, with all parameters nominal;
    /// null where it waits for a condition or a current that the answer decides.</summary>
    /// <param name="instant">The instant.</param>
    /// <param name="parts">The parts by index; those not known yet may be null.</param>
    public static double? Resolve(Instant instant, IReadOnlyList<Part?> parts)
    {
        var seconds = 0.0;
        for (var steps = 0; ; steps++)
        {
            seconds += instant.Delay.Nominal;
            if (instant.After is not { } after)
            {
                return seconds;
            }

            if (steps > parts.Count || parts[after.Part] is not Switch waited
                || after.Event >= waited.Events.Length
                || waited.Events[after.Event] is not
                {
                    CutAtMost: null,
                    Trigger: AtInstant { Instant: var earlier }
                })
            {
                return null;
            }

            instant = earlier;
        }
    }

    /// <summary>The instant of an event in seconds, where it follows from the text alone.</summary>
    public static double? Resolve(SwitchEvent switchEvent, IReadOnlyList<Part?> parts) =>
        switchEvent is { CutAtMost: null, Trigger: AtInstant { Instant: var instant } }
            ? Resolve(instant, parts) : null;
}
