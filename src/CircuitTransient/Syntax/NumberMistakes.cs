using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>What is often wrong with a number, and what to say of it.</summary>
internal static class NumberMistakes
{
    public static bool HasDecimalComma(StatementCursor cursor, Token token, bool isInPoint)
    {
        if (!cursor.IsSign(',') || cursor.Current.Start != token.End
            || cursor.Ahead(1).Kind != TokenKind.Number || !cursor.IsJoined(1))
        {
            return false;
        }

        // `(0,5)` is a point without units; `(0,5 ms, 3 V)` has a decimal comma.
        return !isInPoint || (cursor.Ahead(2).Kind == TokenKind.Word && cursor.IsSign(',', 3));
    }

    public static void ReportDecimalComma(StatementCursor cursor, Token token)
    {
        var after = cursor.Ahead(1);
        var span = new TextSpan(token.Start, after.End - token.Start);
        cursor.Advance(2);
        var number = cursor.Shown(token);
        var decimals = cursor.Shown(after);
        var length = NumberParser.UnitTokens(cursor, out var text);
        var isUnit = length > 0
            && (Unit.TryRead(text, out _) || (text.Length == 1 && Prefix.TryRead(text[0], out _)));
        var unit = isUnit ? " " + text : "";
        cursor.Advance(isUnit ? length : 0);
        if (number.Contains('.') || decimals.Contains('.'))
        {
            ReportMixedMarks(cursor, span, number, decimals, unit);
            return;
        }

        var isThousands = decimals.Length == 3 && number.Length <= 3 && number is not "0";
        cursor.Error(span, $"`{cursor.Shown(span)}` has a decimal comma; the decimal mark is a point",
            isThousands
                ? $"write `{number}.{decimals}{unit}` or, for thousands, `{number}{decimals}{unit}`"
                : $"write `{number}.{decimals}{unit}`");
    }

    /// <summary><c>1.200,5</c> and <c>1,200.5</c>: one mark parts thousands.</summary>
    private static void ReportMixedMarks(
        StatementCursor cursor, TextSpan span, string number, string decimals, string unit)
    {
        var isComma = IsGrouped(number.Split('.')) && !decimals.Contains('.');
        var isPoint = IsGrouped([number, decimals.Split('.')[0]]);
        cursor.Error(span,
            $"`{cursor.Shown(span)}` has both a comma and a point; the point is the decimal mark, and "
                + "nothing parts thousands",
            isComma ? $"write `{number.Replace(".", "")}.{decimals}{unit}`"
                : isPoint ? $"write `{number}{decimals}{unit}`"
                : "write one number, with one point as its decimal mark");
    }

    /// <summary>One to three digits, then groups of three.</summary>
    private static bool IsGrouped(string[] groups) =>
        groups is [{ Length: >= 1 and <= 3 }, _, ..] && groups.Skip(1).All(group => group.Length == 3)
        && groups.All(group => group.All(char.IsAsciiDigit));

    public static void ReportGap(StatementCursor cursor, Token token)
    {
        var text = cursor.TextOf(token).ToString();
        while (cursor.Current.Kind == TokenKind.Number && cursor.Current.Length <= DecimalText.Longest
            && text.Length < DecimalText.Longest)
        {
            text += cursor.TextOf(cursor.Advance()).ToString();
        }

        var span = cursor.SpanFrom(token.Start);
        var isRead = NumberParser.TakeUnit(cursor, token, out _, out _, out var hasUnit);
        var unit = hasUnit ? cursor.Shown(new TextSpan(span.End, cursor.LastEnd - span.End)) : "";
        if (!isRead)
        {
            return;
        }

        if (IsGroupedByPoints(text) && cursor.TextOf(span) == text)
        {
            cursor.Error(span,
                $"`{cursor.Shown(span)}` has more than one point; the point is the decimal mark",
                $"if the points part thousands, write `{text.Replace(".", "")}{unit}`");
        }
        else
        {
            cursor.Error(span, "two numbers stand side by side", text.Count(c => c == '.') > 1
                ? "write one number, with one point as its decimal mark"
                : $"write one number without blanks: `{text}{unit}`");
        }
    }

    /// <summary><c>5.000.000</c>: one to three digits, then groups of three.</summary>
    private static bool IsGroupedByPoints(string text) =>
        text.Split('.') is [_, _, _, ..] groups && IsGrouped(groups);
}
