using System.Globalization;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads names: <c>Rpre</c>, <c>"DC+"</c>, <c>n[k+1]</c>,
/// <c>Stage1/R1</c>, a node <c>3</c>.</summary>
internal static class NameParser
{
    private const int Longest = 200; // past all use, and keeps every message short

    /// <summary>A name in a definition or an expression: one word or quoted text, with an index.</summary>
    public static NameSyntax? Read(StatementCursor cursor, string what, params ReadOnlySpan<string> followers)
    {
        foreach (var follower in followers)
        {
            // `resistor from a to b`: the name is missing, and its place is taken by what should follow it.
            if (cursor.IsWord(follower) && !cursor.IsWord(follower, 1))
            {
                var next = cursor.Current;
                cursor.Error(next.Span, $"{what} is missing before `{follower}`", cursor.Form);
                return null;
            }
        }

        return ReadSegment(cursor, what, acceptsNumber: false, owner: null);
    }

    /// <summary>A node as it is connected or observed.</summary>
    public static NameSyntax? ReadNode(StatementCursor cursor, string what = "the name of a node") =>
        ReadPath(cursor, what, acceptsNumber: true);

    /// <summary>A part as it is spoken of.</summary>
    public static NameSyntax? ReadPart(StatementCursor cursor, string what = "the name of a part") =>
        ReadPath(cursor, what, acceptsNumber: false);

    /// <summary>The text of a quoted token without its quotes.</summary>
    public static string Unquoted(StatementCursor cursor, Token token) =>
        cursor.TextOf(token)[1..^1].ToString();

    private static NameSyntax? ReadPath(StatementCursor cursor, string what, bool acceptsNumber)
    {
        var name = ReadSegment(cursor, what, acceptsNumber, owner: null);
        while (name is not null && cursor.IsSign('/') && cursor.Current.Start == cursor.LastEnd
            && cursor.IsJoined(1)
            && cursor.Ahead(1).Kind is TokenKind.Word or TokenKind.Quoted or TokenKind.Number)
        {
            cursor.Advance();
            name = ReadSegment(cursor, what, acceptsNumber, name);
        }

        return name;
    }

    private static NameSyntax? ReadSegment(
        StatementCursor cursor, string what, bool acceptsNumber, NameSyntax? owner)
    {
        var token = cursor.Current;
        var start = owner?.Span.Start ?? token.Start;
        switch (token.Kind)
        {
            case TokenKind.Word or TokenKind.Quoted when token.Length > Longest:
                cursor.Error(token.Span, $"the name has more than {Longest} characters",
                    "give it a shorter one");
                return null;
            case TokenKind.Word:
                cursor.Advance();
                IndexSyntax? index = null;
                if (cursor.IsSign('[') && cursor.Current.Start == token.End)
                {
                    index = ReadIndex(cursor);
                    if (index is null)
                    {
                        return null;
                    }
                }

                return new NameSyntax(
                    cursor.TextOf(token).ToString(), cursor.SpanFrom(start), index, Owner: owner);
            case TokenKind.Quoted when token.Length == 2:
                cursor.Error(token.Span, "a name in quotes has no character",
                    "write the name between the quotes");
                return null;
            case TokenKind.Quoted:
                cursor.Advance();
                return new NameSyntax(
                    Unquoted(cursor, token), cursor.SpanFrom(start), IsQuoted: true, Owner: owner);
            case TokenKind.Number when acceptsNumber
                && !cursor.TextOf(token).ContainsAnyExceptInRange('0', '9'):
                return ReadNumbered(cursor, token, start, owner);
            default:
                cursor.Unexpected(what);
                return null;
        }
    }

    private static NameSyntax? ReadNumbered(StatementCursor cursor, Token token, int start, NameSyntax? owner)
    {
        cursor.Advance();
        if (cursor.Current is { Kind: TokenKind.Word } tail && tail.Start == token.End)
        {
            var text = $"{cursor.Shown(token)}{cursor.Shown(tail)}";
            cursor.Error(new TextSpan(token.Start, token.Length + tail.Length),
                $"the name `{text}` starts with a digit", $"put it in quotes: `\"{text}\"`");
            return null;
        }

        return new NameSyntax(cursor.TextOf(token).ToString(), cursor.SpanFrom(start), Owner: owner);
    }

    private static IndexSyntax? ReadIndex(StatementCursor cursor)
    {
        var start = cursor.Advance().Start;
        string? counter = null;
        var offset = 0;
        var isRead = true;
        if (cursor.Current is { Kind: TokenKind.Word } word)
        {
            cursor.Advance();
            counter = cursor.TextOf(word).ToString();
            if (cursor.IsSign('+') || cursor.IsSign('-'))
            {
                var isMinus = cursor.Advance().Sign == '-';
                isRead = TryReadWhole(cursor, out offset);
                offset = isMinus ? -offset : offset;
            }
        }
        else
        {
            isRead = TryReadWhole(cursor, out offset);
        }

        if (isRead && cursor.Take(']'))
        {
            return new IndexSyntax(counter, offset, cursor.SpanFrom(start));
        }

        cursor.Error(TextSpan.Between(new TextSpan(start, 1), cursor.Current.Span),
            "an index is a whole number, or a counter and what is added to it",
            "write `[3]`, `[k]`, `[k+1]` or `[k-1]`");
        return null;
    }

    private static bool TryReadWhole(StatementCursor cursor, out int value)
    {
        value = 0;
        if (cursor.Current.Kind != TokenKind.Number)
        {
            return false;
        }

        var text = cursor.TextOf(cursor.Advance());
        return int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out value)
            && value < 1_000_000_000;
    }
}
