using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns written instants into delays after t = 0 or after an event of a switch.</summary>
internal static class Instants
{
    /// <summary>An instant that may wait for an event; null means that an error has been reported.</summary>
    public static Instant? Lower(CheckState state, TimeSyntax syntax, Scope scope)
    {
        if (syntax is TimeValueSyntax value)
        {
            return Delay(state, value.Time, scope) is { } delay ? new Instant(delay, null) : null;
        }

        var after = (TimeAfterSyntax)syntax;
        var delayAfter = after.Delay is null ? 0 : Delay(state, after.Delay, scope);
        var reference = Event(state, after, scope);
        return delayAfter is { } d && reference is { } r ? new Instant(d, r) : null;
    }

    /// <summary>An instant that must be known beforehand, as in a wave; 0 s where none is written.</summary>
    public static double? Fixed(CheckState state, TimeSyntax? syntax, Scope scope)
    {
        if (syntax is null)
        {
            return 0;
        }

        if (Lower(state, syntax, scope) is not { } instant)
        {
            return null;
        }

        if (Schedule.Resolve(instant, state.Parts) is { } seconds)
        {
            WarnHeld(state, syntax, instant);
            return seconds;
        }

        state.Findings.Error(syntax.Span, "a wave cannot wait for an event whose instant the answer decides",
            "give the wave a time, or let the switch act at one");
        return null;
    }

    // A wave stays where it is though the switch it waits for is drawn.
    private static void WarnHeld(CheckState state, TimeSyntax syntax, Instant instant)
    {
        Expected.WarnHeld(state, syntax.Span, instant.Delay.Formula);
        while (instant.After is { } after
            && state.Parts[after.Part] is Switch waited
            && waited.Events[after.Event].Trigger is AtInstant { Instant: var earlier })
        {
            instant = earlier;
            Expected.WarnHeld(state, syntax.Span, instant.Delay.Formula);
        }
    }

    /// <summary>A fixed instant in words, or in the words of the event it waits for.</summary>
    public static string Words(CheckState state, Instant instant)
    {
        var delay = Amount.Of(instant.Delay.Nominal, "s");
        if (instant.After is not { } after)
        {
            return delay;
        }

        var declaration = state.Declared[after.Part];
        var acts = declaration.Events[after.Event].Closes ? "closes" : "opens";
        return instant.Delay.Nominal == 0
            ? $"when {declaration.Name} {acts}"
            : $"{delay} after {declaration.Name} {acts}";
    }

    private static Quantity? Delay(CheckState state, ExpressionSyntax expression, Scope scope)
    {
        if (Expected.Value(state, expression, scope, Dimension.Time) is not { } value)
        {
            return null;
        }

        if (value.Value >= 0)
        {
            return value.AsQuantity;
        }

        state.Findings.Error(expression.Span,
            $"`{state.Text(expression.Span)}` lies before the start of the study",
            "it starts at 0 s; `charged to`, `carrying` and `start settled` say what was before");
        return null;
    }

    private static EventReference? Event(CheckState state, TimeAfterSyntax syntax, Scope scope)
    {
        if (state.FindPart(syntax.Switch, scope) is not { } part)
        {
            return null;
        }

        var acts = syntax.Closes ? "closes" : "opens";
        if (part.Statement is not SwitchStatement)
        {
            state.Findings.Error(syntax.Switch.Span, $"`{part.Name}` is a {part.Kind}; only a switch {acts}",
                "name a switch");
            return null;
        }

        var events = part.Events;
        int[] matching =
            [.. Enumerable.Range(0, events.Length).Where(i => events[i].Closes == syntax.Closes)];
        if (matching is [var only])
        {
            return new EventReference(part.Index, only);
        }

        state.Findings.Error(syntax.Span, matching.Length == 0
            ? $"`{part.Name}` never {acts}"
            : $"`{part.Name}` {acts} {matching.Length} times, so `after {part.Name} {acts}` says no one "
                + $"instant",
            matching.Length == 0 ? $"add `{acts} at …` to `{part.Name}`, or give a time"
                : "give the time itself");
        return null;
    }
}
