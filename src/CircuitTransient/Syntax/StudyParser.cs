namespace CircuitTransient.Syntax;

/// <summary>Reads what is asked of a circuit: observations, requirements, the start and the end.</summary>
internal static class StudyParser
{
    public static ObserveStatement? ReadObserve(StatementCursor cursor, int start)
    {
        cursor.Form =
            "an observation is written `observe current through Ls as \"inrush\" from 1.8 s to 6 s`";
        if (QuantityParser.ReadWithFigures(cursor) is not { } quantity)
        {
            return null;
        }

        string? label = null;
        if (cursor.Take("as") && !ReadText(cursor, "the label in quotes", out label))
        {
            return null;
        }

        var place = cursor.Current.Start;
        return ReadWindow(cursor) is { } window && !ReportLateLabel(cursor, quantity, place)
            ? new ObserveStatement(cursor.SpanFrom(start), quantity, label, window)
            : null;
    }

    /// <summary>Says that a label stands behind the window; false where none does.</summary>
    private static bool ReportLateLabel(StatementCursor cursor, QuantitySyntax quantity, int place)
    {
        var word = cursor.Current;
        if (!cursor.IsWord("as") || cursor.Ahead(1).Kind != TokenKind.Quoted)
        {
            return false;
        }

        var window = cursor.TextOf(cursor.SpanFrom(place));
        var label = cursor.TextOf(cursor.Ahead(1));
        cursor.Error(word.Span, "the label stands before the window",
            $"write `observe {cursor.TextOf(quantity.Span)} as {label} {window}`");
        cursor.Advance(2);
        return true;
    }

    public static RequireStatement? ReadRequire(StatementCursor cursor, int start)
    {
        cursor.Form =
            "a requirement is written `require voltage of bus at most 1.1 kV because \"capacitor rating\"`";
        var quantityAndBound = cursor.IsWord("settling") && cursor.IsWord("of", 1)
            ? BoundParser.ReadSettling(cursor)
            : BoundParser.Read(cursor);
        if (quantityAndBound is not var (quantity, bound) || ReadWindow(cursor) is not { } window)
        {
            return null;
        }

        string? reason = null;
        return !cursor.Take("because") || ReadText(cursor, "the reason in quotes", out reason)
            ? new RequireStatement(cursor.SpanFrom(start), quantity, bound, window, reason)
            : null;
    }

    public static StartStatement? ReadStart(StatementCursor cursor, int start)
    {
        cursor.Form = "write `start as stated` or `start settled`";
        if (cursor.Take("settled"))
        {
            return new StartStatement(cursor.SpanFrom(start), IsSettled: true);
        }

        if (cursor.Take("as", "stated"))
        {
            return new StartStatement(cursor.SpanFrom(start), IsSettled: false);
        }

        cursor.Unexpected("`as stated` or `settled`", "as", "settled");
        return null;
    }

    public static UntilStatement? ReadUntil(StatementCursor cursor, int start)
    {
        cursor.Form = "the end of the study is written `until 14 s`";
        return ExpressionParser.ReadSum(cursor) is { } time
            ? new UntilStatement(cursor.SpanFrom(start), time)
            : null;
    }

    /// <summary>A text in quotes; false, and said, where something else stands.</summary>
    public static bool ReadText(StatementCursor cursor, string what, out string text)
    {
        text = "";
        if (cursor.Current.Kind != TokenKind.Quoted)
        {
            return cursor.Unexpected(what);
        }

        text = NameParser.Unquoted(cursor, cursor.Advance());
        return true;
    }

    private static WindowSyntax? ReadWindow(StatementCursor cursor)
    {
        if (cursor.IsWord("after") && cursor.Ahead(1).Kind == TokenKind.Number)
        {
            ReportAfter(cursor);
            return null;
        }

        if (!TimeParser.ReadOptional(cursor, "from", out var from))
        {
            return null;
        }

        return TimeParser.ReadOptional(cursor, "to", out var to) ? new WindowSyntax(from, to) : null;
    }

    /// <summary><c>after 1 ms</c>, where a window starts <c>from</c> an instant.</summary>
    private static void ReportAfter(StatementCursor cursor)
    {
        var word = cursor.Advance();
        var start = cursor.Current.Start;
        var here = cursor.Here;
        var isRead = ExpressionParser.ReadInClause(cursor) is not null;
        var time = isRead ? cursor.Shown(cursor.SpanFrom(start)) : "1 ms";
        cursor.Return(here);
        cursor.Error(word.Span, "a window starts `from` an instant, not `after` one", $"write `from {time}`");
    }
}
