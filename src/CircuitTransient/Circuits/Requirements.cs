using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Turns <c>require</c> statements into requirements; null means that an error has been
/// reported.</summary>
internal static class Requirements
{
    public static Requirement? Lower(CheckState state, RequireStatement syntax, Scope scope, double? until)
    {
        var quantity = Measurands.Lower(state, syntax.Quantity, scope);
        var window = Windows.Lower(state, syntax.Window, scope, until, "this is never judged");
        if (quantity is null)
        {
            return null;
        }

        var bound = syntax.Bound switch
        {
            LimitsSyntax limits => Limits(state, limits, quantity, scope),
            SettlingSyntax settling => Settling(state, settling, quantity, scope, until),
            _ => throw new System.Diagnostics.UnreachableException($"no bound for {syntax.Bound}"),
        };
        if (bound is not { } b || window is null)
        {
            return null;
        }

        var requirement = new Requirement(
            "", syntax.Reason, quantity.Name, quantity.Unit, quantity.Quantity, b.Bound, window, syntax.Span);
        return requirement with
        {
            Statement = $"{requirement.Judged} {b.Words}{Windows.Words(state, window)}",
        };
    }

    private static (Bound Bound, string Words)? Limits(
        CheckState state, LimitsSyntax syntax, NamedMeasurand quantity, Scope scope)
    {
        var lower = Limit(state, syntax.Lower, quantity, scope);
        var upper = Limit(state, syntax.Upper, quantity, scope);
        if ((syntax.Lower is not null && lower is null) || (syntax.Upper is not null && upper is null))
        {
            return null;
        }

        if (syntax.InMagnitude && (syntax.Lower is not null || upper < 0))
        {
            state.Findings.Error(syntax.Span, upper < 0
                ? "a magnitude is never below zero" : "only an upper bound can be in magnitude",
                "write `at most X in magnitude` with X above zero");
            return null;
        }

        if (lower > upper)
        {
            state.Findings.Error(syntax.Span, "the lower bound lies above the upper one, so nothing can hold",
                $"write `between {state.Text(syntax.Upper!.Span)} and {state.Text(syntax.Lower!.Span)}`");
            return null;
        }

        string Say(double value) => quantity.Unit == "%" ? Amount.Of(value / 100, "%")
            : Amount.Of(value, quantity.Unit);
        return (lower, upper) switch
        {
            (null, { } most) when syntax.InMagnitude =>
                (new Limits(-most, most), $"at most {Say(most)} in magnitude"),
            (null, { } most) => (new Limits(null, most), $"at most {Say(most)}"),
            ({ } least, null) => (new Limits(least, null), $"at least {Say(least)}"),
            ({ } least, { } most) => (new Limits(least, most), $"between {Say(least)} and {Say(most)}"),
            _ => null,
        };
    }

    // A bound on a figure in per cent is kept in per cent, as its unit says.
    private static double? Limit(CheckState state, ExpressionSyntax? syntax, NamedMeasurand quantity,
        Scope scope) =>
        syntax is null ? null
        : quantity.Unit == "%" ? Expected.Fraction(state, syntax, scope, "an overshoot") * 100
        : Expected.Fixed(state, syntax, scope, quantity.Dimension);

    private static (Bound Bound, string Words)? Settling(
        CheckState state, SettlingSyntax syntax, NamedMeasurand quantity, Scope scope, double? until)
    {
        var target = Expected.Fixed(state, syntax.Target, scope, quantity.Dimension);
        var within = Expected.Fraction(state, syntax.Within, scope, "a band");
        var by = Instants.Lower(state, syntax.By, scope);
        if (target is not { } t || within is not { } w || by is null)
        {
            return null;
        }

        if (t == 0 || w <= 0)
        {
            state.Findings.Error(t == 0 ? syntax.Target.Span : syntax.Within.Span, t == 0
                ? "a band in per cent about zero has no width" : "a band is more than zero",
                t == 0 ? "write `require … between -X and X from T`" : null);
            return null;
        }

        if (Schedule.Resolve(by, state.Parts) > until)
        {
            state.Findings.Error(syntax.By.Span,
                $"this is never judged: the study ends at {Amount.Of(until!.Value, "s")}",
                "end the study later, or ask for an earlier time");
            return null;
        }

        return (new SettlesTo(t, w, by),
            $"to {Amount.Of(t, quantity.Unit)} within {Amount.Of(w, "%")} by {Instants.Words(state, by)}");
    }
}
