namespace CircuitTransient.Syntax;

/// <summary>Reads what makes a switch act: <c>closes at …</c>, <c>opens when …</c>.</summary>
internal static class SwitchEventParser
{
    private static readonly string[] Starts = ["at", "when"];

    public static SwitchEventSyntax? Read(StatementCursor cursor)
    {
        cursor.Form =
            "write `closes at 1.8 s`, `opens at 5 ms after K1 opens`, `closes when voltage of bus …`";
        var start = cursor.Current.Start;
        var closes = cursor.IsWord("closes");
        cursor.Advance();
        if (cursor.IsWord("at") && cursor.IsWord("next", 1))
        {
            cursor.Error(cursor.SpanFrom(start),
                "from when the switch waits for the current zero is not said",
                "write `opens at 10 ms at next current zero`");
            return null;
        }

        var trigger = cursor.IsWord("when") ? ReadWhen(cursor) : ReadAt(cursor);
        if (trigger is null || !ReadCut(cursor, out var cut))
        {
            return null;
        }

        return new SwitchEventSyntax(cursor.SpanFrom(start), closes, trigger, cut);
    }

    private static AtInstantSyntax? ReadAt(StatementCursor cursor)
    {
        if (!cursor.Take("at"))
        {
            cursor.Unexpected("`at` or `when`", Starts);
            return null;
        }

        return TimeParser.Read(cursor) is { } time ? new AtInstantSyntax(time.Span, time) : null;
    }

    private static TriggerSyntax? ReadWhen(StatementCursor cursor)
    {
        if (TimeParser.ReadWhen(cursor) is { } action)
        {
            return new AtInstantSyntax(action.Span, action);
        }

        var start = cursor.Advance().Start;
        if (QuantityParser.Read(cursor) is not { } quantity)
        {
            return null;
        }

        var rises = cursor.Take("rises", "above");
        if (!rises && !cursor.Take("falls", "below"))
        {
            cursor.Unexpected("`rises above` or `falls below`", "rises", "falls");
            return null;
        }

        if (ExpressionParser.ReadInClause(cursor) is not { } level)
        {
            return null;
        }

        var inMagnitude = cursor.Take("in", "magnitude");
        return TimeParser.ReadOptional(cursor, "after", out var after)
            ? new WhenCrossesSyntax(cursor.SpanFrom(start), quantity, rises, level, inMagnitude, after)
            : null;
    }

    private static bool ReadCut(StatementCursor cursor, out CutSyntax? cut)
    {
        cut = null;
        var start = cursor.Current.Start;
        if (cursor.Take("at"))
        {
            cursor.Form = "write `at next current zero`";
            if (!cursor.Expect("next", "current", "zero"))
            {
                return false;
            }

            cut = new CutSyntax(cursor.SpanFrom(start), null);
            return true;
        }

        if (!cursor.Take("once"))
        {
            return true;
        }

        if (!cursor.Expect("its", "current", "is", "at", "most")
            || ExpressionParser.ReadInClause(cursor) is not { } limit)
        {
            return false;
        }

        cut = new CutSyntax(cursor.SpanFrom(start), limit);
        return true;
    }
}
