using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads expressions: <c>+ - * / ^ ( )</c>, functions, names and numbers with units.</summary>
internal static class ExpressionParser
{
    private const int Deepest = 200;
    private const int LongestChain = 1000; // operators in a row at one level; later stages descend the tree
    private static readonly string[] Functions = ["sqrt", "exp", "ln"];

    /// <summary>A sum: where an expression stands alone.</summary>
    public static ExpressionSyntax? ReadSum(StatementCursor cursor)
    {
        var left = ReadProduct(cursor);
        for (var count = 0; left is not null && (cursor.IsSign('+') || cursor.IsSign('-')); count++)
        {
            if (ToleranceParser.IsAhead(cursor))
            {
                break;
            }

            left = ReadRight(cursor, left, cursor.Advance().Sign, count, ReadProduct);
        }

        return left;
    }

    /// <summary>A product: where a bare plus or minus would mean something else.</summary>
    public static ExpressionSyntax? ReadProduct(StatementCursor cursor)
    {
        var left = ReadSigned(cursor);
        for (var count = 0;
            left is not null && (cursor.IsSign('*') || cursor.IsSign('/') || cursor.IsSign('·'));
            count++)
        {
            var sign = cursor.Advance().Sign;
            left = ReadRight(cursor, left, sign == '·' ? '*' : sign, count, ReadSigned);
        }

        return left;
    }

    /// <summary>A product inside a clause, where a sum must stand in parentheses.</summary>
    public static ExpressionSyntax? ReadInClause(StatementCursor cursor)
    {
        var value = ReadProduct(cursor);
        if (value is null || cursor.IsInWave || !(cursor.IsSign('+') || cursor.IsSign('-'))
            || ToleranceParser.IsAhead(cursor))
        {
            return value;
        }

        var here = cursor.Here;
        cursor.Advance();
        if (ReadSum(cursor) is null)
        {
            return null;
        }

        var span = cursor.SpanFrom(value.Span.Start);
        cursor.Return(here);
        cursor.Error(span, "a sum inside a clause stands in parentheses",
            $"write `({cursor.Shown(span)})`");
        cursor.Advance();
        ReadSum(cursor);
        return value;
    }

    private static BinarySyntax? ReadRight(
        StatementCursor cursor, ExpressionSyntax left, char sign, int count,
        Func<StatementCursor, ExpressionSyntax?> read)
    {
        if (count == LongestChain)
        {
            cursor.Error(cursor.SpanFrom(cursor.LastEnd - 1),
                $"the expression has more than {LongestChain} operators in a row",
                    "name its pieces with `value`");
            return null;
        }

        return read(cursor) is { } right
            ? new BinarySyntax(TextSpan.Between(left.Span, right.Span), sign, left, right)
            : null;
    }

    private static ExpressionSyntax? ReadSigned(StatementCursor cursor)
    {
        if (!cursor.IsSign('-') && !cursor.IsSign('+'))
        {
            return ReadPower(cursor);
        }

        var sign = cursor.Current;
        if (!Descend(cursor))
        {
            return null;
        }

        cursor.Advance();
        var operand = ReadSigned(cursor);
        cursor.Depth--;
        return operand is null || sign.Sign == '+'
            ? operand
            : new NegationSyntax(TextSpan.Between(sign.Span, operand.Span), operand);
    }

    private static ExpressionSyntax? ReadPower(StatementCursor cursor)
    {
        var left = ReadPrimary(cursor);
        if (left is null || !cursor.IsSign('^'))
        {
            return left;
        }

        if (!Descend(cursor))
        {
            return null;
        }

        cursor.Advance();
        var right = ReadSigned(cursor);
        cursor.Depth--;
        return right is null
            ? null
            : new BinarySyntax(TextSpan.Between(left.Span, right.Span), '^', left, right);
    }

    private static ExpressionSyntax? ReadPrimary(StatementCursor cursor)
    {
        var token = cursor.Current;
        switch (token.Kind)
        {
            case TokenKind.Number:
                return NumberParser.Read(cursor);
            case TokenKind.Word when cursor.IsSign('(', 1):
                return ReadCall(cursor);
            case TokenKind.Word or TokenKind.Quoted:
                return NameParser.Read(cursor, "a value") is { } name
                    ? new NameExpressionSyntax(name.Span, name)
                    : null;
            case TokenKind.Sign when token.Sign == '(':
                return ReadParenthesis(cursor);
            default:
                cursor.Unexpected("a value");
                return null;
        }
    }

    private static CallSyntax? ReadCall(StatementCursor cursor)
    {
        var name = cursor.Current;
        var function = cursor.Shown(name);
        if (!Functions.Contains(function))
        {
            var nearest = NearestName.Find(function, Functions);
            cursor.Error(name.Span, $"`{function}` is not a function",
                nearest is null ? "the functions are `sqrt`, `exp` and `ln`; a product is written with `*`"
                    : $"did you mean `{nearest}`?");
            return null;
        }

        cursor.Advance();
        return ReadParenthesis(cursor) is { } argument
            ? new CallSyntax(cursor.SpanFrom(name.Start), function, argument)
            : null;
    }

    private static ExpressionSyntax? ReadParenthesis(StatementCursor cursor)
    {
        var open = cursor.Current;
        if (!Descend(cursor))
        {
            return null;
        }

        cursor.Advance();
        var inner = ReadSum(cursor);
        cursor.Depth--;
        if (inner is null)
        {
            return null;
        }

        if (cursor.IsAtEnd)
        {
            cursor.Error(open.Span, "the parenthesis that opens here is not closed",
                "put a `)` where it ends");
            return null;
        }

        return cursor.Expect(')') ? inner with { Span = cursor.SpanFrom(open.Start) } : null;
    }

    private static bool Descend(StatementCursor cursor)
    {
        if (++cursor.Depth <= Deepest)
        {
            return true;
        }

        cursor.Error(cursor.Current.Span, $"the expression is nested deeper than {Deepest}",
            "name its pieces with `value`");
        return false;
    }
}
