using System.Collections.Immutable;

namespace CircuitTransient.Syntax;

/// <summary>Reads straight lines through points, or from a file, behind their first words.</summary>
internal static class StraightLinesParser
{
    public static WavePieceSyntax? Read(StatementCursor cursor, int start)
    {
        cursor.Form = "write `straight lines (0 s, 0 V) (1 ms, 5 V)` or "
            + "`straight lines in file \"surge.csv\"`";
        if (cursor.Take("in", "file"))
        {
            return ReadFile(cursor, start);
        }

        var points = ImmutableArray.CreateBuilder<PointSyntax>();
        do
        {
            if (ReadPoint(cursor) is not { } point)
            {
                return null;
            }

            points.Add(point);
            cursor.Advance(cursor.IsSign(',') && cursor.IsSign('(', 1) ? 1 : 0);
        }
        while (cursor.IsSign('('));
        return new StraightLinesSyntax(cursor.SpanFrom(start), points.ToImmutable());
    }

    private static StraightLinesFileSyntax? ReadFile(StatementCursor cursor, int start)
    {
        var token = cursor.Current;
        if (token.Kind != TokenKind.Quoted)
        {
            cursor.Unexpected("the name of a file in quotes");
            return null;
        }

        cursor.Advance();
        return new StraightLinesFileSyntax(cursor.SpanFrom(start), NameParser.Unquoted(cursor, token));
    }

    private static PointSyntax? ReadPoint(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (!cursor.Take('('))
        {
            cursor.Unexpected("a point `(TIME, VALUE)`");
            return null;
        }

        // A bare number at the comma is a value without its unit, not half of one with a decimal comma.
        var time = cursor.Current.Kind == TokenKind.Number && cursor.IsSign(',', 1)
            ? NumberParser.Read(cursor, isInPoint: true)
            : ExpressionParser.ReadSum(cursor);
        return time is not null && cursor.Expect(',') && ExpressionParser.ReadSum(cursor) is { } level
            && cursor.Expect(')')
            ? new PointSyntax(cursor.SpanFrom(start), time, level)
            : null;
    }
}
