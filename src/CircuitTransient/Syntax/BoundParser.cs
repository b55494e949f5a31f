namespace CircuitTransient.Syntax;

/// <summary>Reads what is required of a quantity.</summary>
internal static class BoundParser
{
    private const string Forms = "bounds are `at most 1.1 kV`, `at least 48 V`, `between -5 A and 200 A`";

    /// <summary>A quantity and its limits.</summary>
    public static (QuantitySyntax, BoundSyntax)? Read(StatementCursor cursor)
    {
        if (QuantityParser.ReadWithFigures(cursor) is not { } quantity)
        {
            return null;
        }

        cursor.Form = Forms;
        return ReadLimits(cursor) is { } limits ? (quantity, limits) : null;
    }

    /// <summary><c>settling of Q to X within P by T</c>.</summary>
    public static (QuantitySyntax, BoundSyntax)? ReadSettling(StatementCursor cursor)
    {
        cursor.Form = "it is written `settling of voltage of bus to 540 V within 2 % by 600 ms`";
        cursor.Advance(2);
        if (QuantityParser.Read(cursor) is not { } quantity)
        {
            return null;
        }

        var start = cursor.Current.Start;
        return cursor.Expect("to") && ExpressionParser.ReadInClause(cursor) is { } target
            && cursor.Expect("within") && ExpressionParser.ReadInClause(cursor) is { } within
            && cursor.Expect("by") && TimeParser.Read(cursor) is { } by
            ? (quantity, new SettlingSyntax(cursor.SpanFrom(start), target, within, by))
            : null;
    }

    private static LimitsSyntax? ReadLimits(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (cursor.Take("between"))
        {
            return ExpressionParser.ReadInClause(cursor) is { } lower && cursor.Expect("and")
                && ReadUpper(cursor) is { } upper
                ? new LimitsSyntax(cursor.SpanFrom(start), lower, upper, InMagnitude: false)
                : null;
        }

        if (cursor.Take("at", "most"))
        {
            return ReadUpper(cursor) is { } upper
                ? new LimitsSyntax(cursor.SpanFrom(start), null, upper, cursor.Take("in", "magnitude"))
                : null;
        }

        if (cursor.Take("at", "least"))
        {
            return ReadUpper(cursor) is { } lower
                ? new LimitsSyntax(cursor.SpanFrom(start), lower, null, cursor.Take("in", "magnitude"))
                : null;
        }

        if (ReportComparison(cursor))
        {
            return null;
        }

        cursor.Unexpected("`at most`, `at least` or `between`", "at", "between");
        return null;
    }

    /// <summary><c>&lt;=</c> and its like, which are written in words.</summary>
    private static bool ReportComparison(StatementCursor cursor)
    {
        var token = cursor.Current;
        var words = cursor.TextOf(token) switch
        {
            "<" or "≤" => "at most",
            ">" or "≥" => "at least",
            _ => null,
        };
        if (words is null)
        {
            return false;
        }

        cursor.Advance(cursor.IsSign('=', 1) && cursor.IsJoined(1) ? 2 : 1);
        var span = cursor.SpanFrom(token.Start);
        var here = cursor.Here;
        var limit = ExpressionParser.ReadInClause(cursor) is { } value ? " " + cursor.Shown(value.Span) : "";
        cursor.Return(here);
        cursor.Error(span, $"`{cursor.Shown(span)}` is no bound", $"write `{words}{limit}`");
        return true;
    }

    private static ExpressionSyntax? ReadUpper(StatementCursor cursor) =>
        ExpressionParser.ReadInClause(cursor) is { } value
        && ToleranceParser.Refuse(cursor, "a bound has no tolerance", "state the bound that counts")
            ? value
            : null;
}
