using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads tolerances: <c>±5 %</c>, <c>-20 % +80 %</c>, <c>between A and
/// B</c>, then <c>normal</c>.</summary>
internal static class ToleranceParser
{
    /// <summary>Whether a tolerance stands here; a closing <c>-20 % +80 %</c> is always one.</summary>
    public static bool IsAhead(StatementCursor cursor) =>
        cursor.IsSign('±') || IsPlusMinus(cursor) || cursor.IsWord("between") || IsPair(cursor);

    /// <summary>A value, a sum where <paramref name="acceptsSum"/>, and its
    /// tolerance if there is one.</summary>
    public static ToleratedSyntax? ReadTolerated(StatementCursor cursor, bool acceptsSum)
    {
        var value = acceptsSum ? ExpressionParser.ReadSum(cursor) : ExpressionParser.ReadInClause(cursor);
        return value is not null && Read(cursor, out var tolerance)
            ? new ToleratedSyntax(value, tolerance)
            : null;
    }

    /// <summary>The same for a resistance, where a name such as <c>R047</c> is a marking code.</summary>
    public static ToleratedSyntax? ReadResistance(StatementCursor cursor, bool acceptsSum)
    {
        var read = ReadTolerated(cursor, acceptsSum);
        return read?.Value is NameExpressionSyntax { Name: { Index: null, IsQuoted: false, Text: var text } }
            && MarkingCode.TryRead(text, out var value)
            ? read with { Value = new NumberSyntax(read.Value.Span, value, Dimension.None, false, text) }
            : read;
    }

    /// <summary>Reads a tolerance if there is one; false where it is wrong.</summary>
    public static bool Read(StatementCursor cursor, out ToleranceSyntax? tolerance)
    {
        tolerance = null;
        if (!IsAhead(cursor))
        {
            return true;
        }

        var start = cursor.Current.Start;
        var isAbsolute = cursor.IsWord("between");
        var limits = isAbsolute ? ReadBetween(cursor)
            : IsPair(cursor) ? ReadPair(cursor)
            : ReadPlusMinus(cursor);
        if (limits is not var (lower, upper))
        {
            return false;
        }

        var isNormal = cursor.Take("normal");
        tolerance = new ToleranceSyntax(cursor.SpanFrom(start), lower, upper, isAbsolute, isNormal);
        return true;
    }

    /// <summary>Says that no tolerance may stand here, and goes behind it; true
    /// where there is none.</summary>
    public static bool Refuse(StatementCursor cursor, string message, string advice)
    {
        if (!IsAhead(cursor))
        {
            return true;
        }

        var start = cursor.Current.Start;
        if (Read(cursor, out _))
        {
            cursor.Error(cursor.SpanFrom(start), message, advice);
        }

        return false;
    }

    private static bool IsPlusMinus(StatementCursor cursor) => cursor.IsSign('+')
        && ((cursor.IsSign('-', 1) && cursor.IsJoined(1))
            || (cursor.IsSign('/', 1) && cursor.IsJoined(1) && cursor.IsSign('-', 2) && cursor.IsJoined(2)));

    private static bool IsPair(StatementCursor cursor)
    {
        var isSigned = (cursor.IsSign('-') && cursor.IsSign('+', 3))
            || (cursor.IsSign('+') && cursor.IsSign('-', 3));
        return isSigned && cursor.Ahead(1).Kind == TokenKind.Number && cursor.IsSign('%', 2)
            && cursor.Ahead(4).Kind == TokenKind.Number && cursor.IsSign('%', 5)
            && (cursor.Ahead(6).Kind is TokenKind.End or TokenKind.Word || cursor.IsSign(',', 6));
    }

    private static (ExpressionSyntax, ExpressionSyntax)? ReadPair(StatementCursor cursor)
    {
        var first = ReadSigned(cursor);
        var second = first is null ? null : ReadSigned(cursor);
        if (first is null || second is null)
        {
            return null;
        }

        return first is NegationSyntax ? (first, second) : (second, first);
    }

    private static ExpressionSyntax? ReadSigned(StatementCursor cursor)
    {
        var sign = cursor.Advance();
        var number = NumberParser.Read(cursor);
        return number is null || sign.Sign == '+'
            ? number
            : new NegationSyntax(TextSpan.Between(sign.Span, number.Span), number);
    }

    private static (ExpressionSyntax, ExpressionSyntax)? ReadPlusMinus(StatementCursor cursor)
    {
        var start = cursor.Current;
        cursor.Advance(cursor.IsSign('±') ? 1 : cursor.IsSign('/', 1) ? 3 : 2);
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("a number and `%`");
            return null;
        }

        var digits = cursor.Shown(cursor.Current);
        var number = NumberParser.Read(cursor);
        if (number is null)
        {
            return null;
        }

        var span = cursor.SpanFrom(start.Start);
        if (!cursor.TextOf(span).EndsWith('%'))
        {
            cursor.Error(span, "a tolerance is in per cent, or between two values",
                number.HasUnit ? "write `between LEAST and GREATEST`" : $"write `±{digits} %`");
            return null;
        }

        return (new NegationSyntax(number.Span, number), number);
    }

    private static (ExpressionSyntax, ExpressionSyntax)? ReadBetween(StatementCursor cursor)
    {
        cursor.Advance();
        return ExpressionParser.ReadInClause(cursor) is { } lower && cursor.Expect("and")
            && ExpressionParser.ReadInClause(cursor) is { } upper
            ? (lower, upper)
            : null;
    }
}
