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

    // An event waits for the one it is counted from and for the one before it on its own switch. A ring of
    // such waits is found by walking each event once; the switches in rings are returned.
    private static HashSet<int> ReportRings(CheckState state)
    {
        var ringed = new HashSet<int>();
        var done = new HashSet<EventReference>();
        for (var index = 0; index < state.Parts.Length; index++)
        {
            for (var e = 0; state.Parts[index] is Switch s && e < s.Events.Length; e++)
            {
                Walk(state, new EventReference(index, e), done, ringed);
            }
        }

        return ringed;
    }

    private static void Walk(
        CheckState state, EventReference start, HashSet<EventReference> done, HashSet<int> ringed)
    {
        var path = new List<EventReference>();
        var places = new Dictionary<EventReference, int>();
        var waiting = new Stack<(EventReference Event, int Depth)>([(start, 0)]);
        while (waiting.TryPop(out var next))
        {
            foreach (var left in path.Skip(next.Depth))
            {
                places.Remove(left);
                done.Add(left);
            }

            path.RemoveRange(next.Depth, path.Count - next.Depth);
            if (places.TryGetValue(next.Event, out var at))
            {
                Report(state, path[at..]);
                ringed.UnionWith(path[at..].Select(r => r.Part));
            }
            else if (!done.Contains(next.Event))
            {
                places.Add(next.Event, path.Count);
                path.Add(next.Event);
                foreach (var awaited in Awaited(state, next.Event))
                {
                    waiting.Push((awaited, path.Count));
                }
            }
        }

        done.UnionWith(path);
    }

    private static void Report(CheckState state, List<EventReference> ring)
    {
        var names = string.Join(" → ", ring.Append(ring[0]).Select(r => Words(state, r)));
        state.Findings.Error(((Switch)state.Parts[ring[0].Part]!).Events[ring[0].Event].Span,
            $"a ring of waits: {names}", "give one of these events a time");
    }

    private static IEnumerable<EventReference> Awaited(CheckState state, EventReference of)
    {
        if (of.Event > 0)
        {
            yield return of with { Event = of.Event - 1 };
        }

        if (state.Parts[of.Part] is Switch s && of.Event < s.Events.Length
            && s.Events[of.Event].Trigger is AtInstant { Instant.After: { } after })
        {
            yield return after;
        }
    }

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

                if (time >= until)
                {
                    state.Findings.Warn(e.Span,
                        time > until
                            ? $"`{part.Name}` {acts} at {Amount.Of(time, "s")}, after the study ends at "
                                + Amount.Of(until.Value, "s")
                            : $"`{part.Name}` {acts} at {Amount.Of(time, "s")}, where the study ends: "
                                + "nothing is seen of it",
                        $"end the study later, such as `until {Amount.Of(2 * time, "s")}`");
                }

                last = time;
            }
        }
    }
}
