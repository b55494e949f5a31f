namespace CircuitTransient.Circuits;

/// <summary>Whether the events of switches come in an order that can happen.</summary>
internal static class SwitchOrder
{
    public static void Check(CheckState state, double? until)
    {
        var ringed = ReportRings(state);
        for (var index = 0; index < state.Parts.Length; index++)
        {
            if (state.Parts[index] is Switch part && !ringed.Contains(index))
            {
                Check(state, part, until);
            }
        }
    }

    // Events that wait for each other in a ring, or for a later event of their own switch.
    private static HashSet<int> ReportRings(CheckState state)
    {
        var reported = new HashSet<EventReference>();
        for (var index = 0; index < state.Parts.Length; index++)
        {
            for (var e = 0; state.Parts[index] is Switch s && e < s.Events.Length; e++)
            {
                ReportRing(state, new EventReference(index, e), reported);
            }
        }

        return [.. reported.Select(r => r.Part)];
    }

    private static void ReportRing(CheckState state, EventReference start, HashSet<EventReference> reported)
    {
        var path = new List<EventReference> { start };
        for (var next = Awaited(state, start); next is not null; next = Awaited(state, next))
        {
            var isLater = next.Part == start.Part && next.Event >= start.Event;
            if (isLater && !reported.Overlaps(path))
            {
                var names = string.Join(" → ", path.Append(next).Select(r => Words(state, r)));
                state.Findings.Error(((Switch)state.Parts[start.Part]!).Events[start.Event].Span,
                    next == start ? $"`{Words(state, start)}` waits for itself: {names}"
                        : $"`{Words(state, start)}` waits for its own later event: {names}",
                    "give one of these events a time");
                reported.UnionWith(path);
            }

            if (isLater || path.Contains(next))
            {
                return;
            }

            path.Add(next);
        }
    }

    private static EventReference? Awaited(CheckState state, EventReference of) =>
        state.Parts[of.Part] is Switch s && s.Events[of.Event]
            .Trigger is AtInstant { Instant.After: var after }
            ? after : null;

    private static string Words(CheckState state, EventReference of) =>
        Instants.Words(state, new Instant(0, of))["when ".Length..];

    private static void Check(CheckState state, Switch part, double? until)
    {
        double? last = null;
        foreach (var e in part.Events)
        {
            var known = e.Trigger is AtInstant { Instant: var instant }
                ? Schedule.Resolve(instant, state.Parts) : null;
            var acts = e.Closes ? "closes" : "opens";
            if (known is { } time)
            {
                if (last is { } before && time <= before)
                {
                    state.Findings.Error(e.Span,
                        $"`{part.Name}` {acts} at {Amount.Of(time, "s")}, which is not after its event "
                            + $"before at "
                        + Amount.Of(before, "s"), "put its events in the order of time");
                    return;
                }

                if (time > until)
                {
                    state.Findings.Warn(e.Span,
                        $"`{part.Name}` {acts} at {Amount.Of(time, "s")}, after the study ends at "
                            + $"{Amount.Of(until.Value, "s")}",
                        $"end the study later, such as `until {Amount.Of(2 * time, "s")}`");
                }

                last = time;
            }
        }
    }
}
