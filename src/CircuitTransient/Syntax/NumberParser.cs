using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads a number with its power of ten and its unit.</summary>
internal static class NumberParser
{
    // Key words that may follow a number, so that they are not taken for a unit.
    private static readonly HashSet<string> Followers =
    [
        "after", "and", "as", "at", "because", "between", "by", "closed", "count", "current", "decaying",
        "energy", "every", "falls", "from", "front", "half", "in", "normal", "of", "once", "open", "phase",
        "power", "rises", "rms", "stays", "times", "to", "until", "voltage", "when", "width", "with",
        "within",
    ];

    /// <summary>Reads at a number token; what is wrong with the unit is said, and
    /// reading goes on behind it.</summary>
    public static NumberSyntax? Read(StatementCursor cursor) => Read(cursor, isInPoint: false);

    /// <summary>The same inside the parentheses of a point, where a comma may
    /// part two bare numbers.</summary>
    public static NumberSyntax? Read(StatementCursor cursor, bool isInPoint)
    {
        var token = cursor.Advance();
        if (NumberMistakes.HasDecimalComma(cursor, token, isInPoint))
        {
            NumberMistakes.ReportDecimalComma(cursor, token);
            return null;
        }

        var digits = cursor.TextOf(token).ToString();
        var exponent = TenthPower.Take(cursor, ref digits);
        if (cursor.Current.Kind == TokenKind.Number && !IsImpulseTime(cursor))
        {
            NumberMistakes.ReportGap(cursor, token);
            return null;
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
        if (digits.Length > DecimalText.Longest)
        {
            cursor.Error(token.Span, $"the number has more than {DecimalText.Longest} characters",
                "write at most 17 digits; a computed value holds no more");
            return null;
        }

        var span = cursor.SpanFrom(token.Start);
        if (mark is not null && MarkingCode.TryRead(mark, out var marked))
        {
            return new NumberSyntax(span, marked, Dimension.None, HasUnit: false, mark);
        }

        // A minute and an hour are whole numbers of seconds and keep the rounding right; a degree is not.
        var (whole, rest) = unit.Factor >= 1 ? ((int)unit.Factor, 1.0) : (1, unit.Factor);
        if (DecimalText.TryRead(digits.Replace('\u2212', '-'), exponent + unit.Exponent, whole,
            out var value))
        {
            return new NumberSyntax(span, value * rest, unit.Dimension, hasUnit, mark);
        }

        var text = cursor.Shown(span);
        cursor.Error(span, double.IsInfinity(value)
            ? $"`{text}` is larger than any number that can be computed with, 1.8·10³⁰⁸"
            : $"`{text}` is smaller than any number that can be computed with, 4.9·10⁻³²⁴",
            double.IsInfinity(value) ? "write a value that a real part can have" : "write `0` with its unit");
        return null;
    }

    /// <summary>Takes the unit, a bare prefix or the rest of a marking code behind a number.</summary>
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
        if (length == 0 || Followers.Contains(cursor.TextOf(cursor.Current).ToString()))
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

        var shown = cursor.Shown(Run(cursor, length));
        cursor.Error(Run(cursor, length), $"`{shown}` is not a unit",
            UnitAdvice.For(shown, cursor.Shown(number)));
        cursor.Advance(length);
        return false;
    }

    /// <summary>How many tokens spell the unit: <c>µF</c> one, <c>V/µs</c> three, <c>A^2s</c> four.</summary>
    public static int UnitTokens(StatementCursor cursor, out string text)
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
                && cursor.IsJoined(2) && cursor.Ahead(3).Kind == TokenKind.Word && cursor.IsJoined(3);
            length = isSquare ? 4
                : isWord && cursor.Ahead(1).Kind == TokenKind.Superscript ? 3
                : isWord && cursor.IsSign('/', 1) && IsRate(cursor) ? 3
                : 1;
        }

        text = length == 0 ? "" : cursor.TextOf(Run(cursor, length));
        return length;
    }

    private static bool IsRate(StatementCursor cursor) => Unit.TryRead(cursor.TextOf(Run(cursor, 3)), out _);

    private static TextSpan Run(StatementCursor cursor, int length) =>
        TextSpan.Between(cursor.Current.Span, cursor.Ahead(length - 1).Span);

    /// <summary>Whether the number ahead is the front of <c>6 kV 1.2/50 µs</c>.</summary>
    private static bool IsImpulseTime(StatementCursor cursor) =>
        cursor.IsSign('/', 1) && cursor.Ahead(2).Kind == TokenKind.Number;
}
