using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads a number with its power of ten and its unit.</summary>
internal static class NumberParser
{
    // Key words that may follow a number, so that they are not taken for a unit.
    private static readonly HashSet<string> followers =
    [
        "after", "and", "as", "at", "because", "between", "by", "closed", "count", "decaying", "every",
            "falls",
        "from", "front", "half", "in", "normal", "of", "once", "open", "phase", "rises", "rms", "stays",
            "times",
        "to", "until", "when", "width", "with", "within",
    ];

    /// <summary>Reads at a number token; what is wrong with the unit is said, and reading goes on behind
    /// it.</summary>
    public static NumberSyntax? Read(StatementCursor cursor) => Read(cursor, isInPoint: false);

    /// <summary>The same inside the parentheses of a point, where a comma may part two bare
    /// numbers.</summary>
    public static NumberSyntax? Read(StatementCursor cursor, bool isInPoint)
    {
        var token = cursor.Advance();
        if (token.Length > DecimalText.Longest)
        {
            cursor.Error(token.Span, $"the number has more than {DecimalText.Longest} characters",
                "a double holds 17 digits");
            return null;
        }

        if (HasDecimalComma(cursor, token, isInPoint))
        {
            ReportDecimalComma(cursor, token);
            return null;
        }

        var digits = cursor.TextOf(token).ToString().Replace('\u2212', '-');
        var exponent = TenthPower.Take(cursor, ref digits);
        if (cursor.Current.Kind == TokenKind.Number && !IsImpulseTime(cursor))
        {
            return ReportGap(cursor, token);
        }

        return TakeUnit(cursor, token, out var unit, out var mark, out var hasUnit)
            ? Number(cursor, token, digits, exponent, unit, hasUnit, mark)
            : null;
    }

    /// <summary>A number already read, times a unit; an error where no double holds it.</summary>
    public static NumberSyntax? Number(
        StatementCursor cursor, Token token, string digits, int exponent, Unit unit, bool hasUnit,
            string? mark)
    {
        var span = cursor.SpanFrom(token.Start);
        if (mark is not null && MarkingCode.TryRead(mark, out var marked))
        {
            return new NumberSyntax(span, marked, Dimension.None, HasUnit: false, mark);
        }

        var isWhole = unit.Factor >= 1;
        var isHeld = DecimalText.TryRead(digits, exponent + unit.Exponent, isWhole
            ? (int)unit.Factor
            : 1, out var value);
        value = isWhole ? value : value * unit.Factor;
        if (isHeld)
        {
            return new NumberSyntax(span, value, unit.Dimension, hasUnit, mark);
        }

        var text = cursor.TextOf(span);
        cursor.Error(span, double.IsInfinity(value)
            ? $"`{text}` is larger than any number that can be computed with, 1.8·10³⁰⁸"
            : $"`{text}` is smaller than any number that can be computed with, 4.9·10⁻³²⁴",
            double.IsInfinity(value) ? "write a value that a real part can have" : "write `0` with its unit");
        return null;
    }

    /// <summary>Takes the unit, a bare prefix or a marking code's letter and digits behind a
    /// number.</summary>
    public static bool TakeUnit(
        StatementCursor cursor, Token number, out Unit unit, out string? mark, out bool hasUnit)
    {
        unit = new Unit(Dimension.None, 0);
        mark = null;
        hasUnit = true;
        var length = UnitTokens(cursor, out var text);
        if (length > 0 && Unit.TryRead(text, out var read))
        {
            unit = read;
            cursor.Advance(length);
            return true;
        }

        hasUnit = false;
        if (length == 0 || followers.Contains(cursor.TextOf(cursor.Current).ToString()))
        {
            return true;
        }

        var word = cursor.Current;
        var joined = string.Concat(cursor.TextOf(number), cursor.TextOf(word));
        if (word.Start == number.End && MarkingCode.TryRead(joined, out _))
        {
            mark = joined;
            cursor.Advance();
            return true;
        }

        if (word.Length == 1 && Prefix.TryRead(text[0], out var exponent))
        {
            unit = new Unit(Dimension.None, exponent);
            cursor.Advance();
            return true;
        }

        var end = cursor.Ahead(length - 1).End;
        var span = new TextSpan(word.Start, end - word.Start);
        cursor.Error(span, $"`{text}` is not a unit", UnitAdvice.For(text, cursor.TextOf(number).ToString()));
        cursor.Advance(length);
        return false;
    }

    /// <summary>How many tokens spell the unit: <c>µF</c> one, <c>V/µs</c> three, <c>A^2s</c> four.</summary>
    private static int UnitTokens(StatementCursor cursor, out string text)
    {
        var first = cursor.Current;
        var length = first.Kind switch
        {
            TokenKind.Sign when first.Sign is '%' or '°' => 1,
            TokenKind.Word => 1,
            _ => 0,
        };
        if (first.Kind == TokenKind.Word && cursor.IsJoined(1))
        {
            var isWord = cursor.Ahead(2).Kind == TokenKind.Word && cursor.IsJoined(2);
            var isSquare = cursor.IsSign('^', 1) && cursor.Ahead(2).Kind == TokenKind.Number
                && cursor.IsJoined(2)
                && cursor.Ahead(3).Kind == TokenKind.Word && cursor.IsJoined(3);
            length = isSquare ? 4
                : isWord && cursor.Ahead(1).Kind == TokenKind.Superscript ? 3
                : isWord && cursor.IsSign('/', 1) && IsRate(cursor) ? 3
                : 1;
        }

        text = length == 0
            ? ""
            : cursor.TextOf(new TextSpan(first.Start, cursor.Ahead(length - 1).End - first.Start));
        return length;
    }

    private static bool IsRate(StatementCursor cursor) =>
        Unit.TryRead(cursor.TextOf(new TextSpan(cursor.Current.Start,
            cursor.Ahead(2).End - cursor.Current.Start)), out _);

    /// <summary>Whether the number ahead is the front of <c>6 kV 1.2/50 µs</c>.</summary>
    private static bool IsImpulseTime(StatementCursor cursor) =>
        cursor.IsSign('/', 1) && cursor.Ahead(2).Kind == TokenKind.Number;

    private static bool HasDecimalComma(StatementCursor cursor, Token token, bool isInPoint)
    {
        if (!cursor.IsSign(',') || cursor.Current.Start != token.End
            || cursor.Ahead(1).Kind != TokenKind.Number
            || !cursor.IsJoined(1))
        {
            return false;
        }

        // `(0,5)` is a point without units; `(0,5 ms, 3 V)` has a decimal comma.
        return !isInPoint || (cursor.Ahead(2).Kind == TokenKind.Word && cursor.IsSign(',', 3));
    }

    private static void ReportDecimalComma(StatementCursor cursor, Token token)
    {
        var after = cursor.Ahead(1);
        var span = new TextSpan(token.Start, after.End - token.Start);
        cursor.Advance(2);
        var number = cursor.TextOf(token);
        var decimals = cursor.TextOf(after);
        var length = UnitTokens(cursor, out var text);
        var unit = length > 0 && (Unit.TryRead(text, out _) || (text.Length == 1
            && Prefix.TryRead(text[0], out _)))
            ? " " + text
            : "";
        cursor.Advance(unit.Length > 0 ? length : 0);
        var isThousands = decimals.Length == 3 && number.Length <= 3 && number is not "0";
        cursor.Error(span, $"`{cursor.TextOf(span)}` has a decimal comma; the decimal mark is a point",
            $"write `{number}.{decimals}{unit}`" + (isThousands
                ? $" or, for thousands, `{number}{decimals}{unit}`"
                : ""));
    }

    private static NumberSyntax? ReportGap(StatementCursor cursor, Token token)
    {
        var text = cursor.TextOf(token).ToString();
        while (cursor.Current.Kind == TokenKind.Number && cursor.Current.Length <= DecimalText.Longest
            && text.Length < DecimalText.Longest)
        {
            text += cursor.TextOf(cursor.Advance()).ToString();
        }

        var span = cursor.SpanFrom(token.Start);
        TakeUnit(cursor, token, out _, out _, out _);
        cursor.Error(span, "two numbers stand side by side", $"write one number without blanks: `{text}`");
        return null;
    }
}
