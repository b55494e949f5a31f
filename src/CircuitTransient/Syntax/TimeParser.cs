namespace CircuitTransient.Syntax;

/// <summary>Reads instants: a value, <c>T after NAME closes</c>, <c>when NAME opens</c>.</summary>
internal static class TimeParser
{
    private static readonly string[] Verbs = ["closes", "opens"];

    /// <summary>An instant behind <c>from</c>, <c>to</c>, <c>at</c> or <c>after</c>.</summary>
    public static TimeSyntax? Read(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (cursor.IsWord("when") && ReadWhen(cursor) is { } when)
        {
            return when;
        }

        var delay = ExpressionParser.ReadInClause(cursor);
        if (delay is null)
        {
            return null;
        }

        if (!cursor.Take("after"))
        {
            return new TimeValueSyntax(delay.Span, delay);
        }

        return ReadAction(cursor) is var (name, closes)
            ? new TimeAfterSyntax(cursor.SpanFrom(start), delay, name, closes)
            : null;
    }

    /// <summary>An optional instant behind a word, or in its place <c>when NAME closes</c>;
    /// false where it is wrong. </summary>
    public static bool ReadOptional(StatementCursor cursor, string word, out TimeSyntax? time)
    {
        time = null;
        if (!cursor.Take(word))
        {
            return true;
        }

        time = Read(cursor);
        return time is not null;
    }

    /// <summary><c>when NAME closes|opens</c>; null, and nothing taken or said, where
    /// something else stands.</summary>
    public static TimeAfterSyntax? ReadWhen(StatementCursor cursor)
    {
        var here = cursor.Here;
        var start = cursor.Current.Start;
        if (cursor.Take("when") && NameParser.ReadPart(cursor) is { } name && IsVerb(cursor))
        {
            var closes = cursor.IsWord("closes");
            cursor.Advance();
            return new TimeAfterSyntax(cursor.SpanFrom(start), null, name, closes);
        }

        cursor.Return(here);
        return null;
    }

    private static (NameSyntax Name, bool Closes)? ReadAction(StatementCursor cursor)
    {
        if (NameParser.ReadPart(cursor, "the name of a switch") is not { } name)
        {
            return null;
        }

        if (!IsVerb(cursor))
        {
            cursor.Unexpected("`closes` or `opens`", Verbs);
            return null;
        }

        var closes = cursor.IsWord("closes");
        cursor.Advance();
        return (name, closes);
    }

    private static bool IsVerb(StatementCursor cursor) => cursor.IsWord("closes") || cursor.IsWord("opens");
}
