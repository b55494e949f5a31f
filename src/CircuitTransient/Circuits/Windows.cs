using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Turns written windows of time into checked ones.</summary>
internal static class Windows
{
    /// <summary>The window, or null where an error was reported; one that is empty or lies past the end
    /// is.</summary>
    public static Window? Lower(CheckState state, WindowSyntax syntax, Scope scope, double? until,
        string consequence)
    {
        var from = syntax.From is null ? null : Instants.Lower(state, syntax.From, scope);
        var to = syntax.To is null ? null : Instants.Lower(state, syntax.To, scope);
        if ((syntax.From is not null && from is null) || (syntax.To is not null && to is null))
        {
            return null;
        }

        var start = from is null ? 0 : Schedule.Resolve(from, state.Parts);
        var end = to is null ? null : Schedule.Resolve(to, state.Parts);
        if (start > end)
        {
            state.Findings.Error(syntax.To!.Span,
                $"{consequence}: its window from {Amount.Of(start.Value, "s")} "
                + $"to {Amount.Of(end.Value, "s")} is empty",
                "give the earlier time first");
            return null;
        }

        if (start > until)
        {
            state.Findings.Error(syntax.From!.Span,
                $"{consequence}: it starts at {Amount.Of(start.Value, "s")}, the study ends at "
                + Amount.Of(until.Value, "s"),
                    $"write `until {Amount.Of(2 * start.Value, "s")}`, or an earlier window");
            return null;
        }

        return new Window(from, to);
    }

    public static string Words(CheckState state, Window window) =>
        (window.From is null ? "" : " from " + Instants.Words(state, window.From))
        + (window.To is null ? "" : " to " + Instants.Words(state, window.To));
}
