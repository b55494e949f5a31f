using System.Globalization;

namespace CircuitTransient.Syntax;

/// <summary>Reads the power of ten of <c>71.9·10³</c>, <c>71.9·10^3</c> and <c>10³</c>.</summary>
internal static class TenthPower
{
    /// <summary>Takes the power behind a number and returns its exponent; zero where there is none.</summary>
    /// <param name="digits">The number; becomes 1 where it was itself the ten of a bare power.</param>
    public static int Take(StatementCursor cursor, ref string digits)
    {
        if (cursor.Current.Kind == TokenKind.Superscript && cursor.Current.Start == cursor.LastEnd
            && digits == "10")
        {
            digits = "1";
            return Superscript.Read(cursor.TextOf(cursor.Advance()));
        }

        var isTen = cursor.IsSign('·') && cursor.Ahead(1).Kind == TokenKind.Number
            && cursor.TextOf(cursor.Ahead(1)) is "10";
        if (!isTen)
        {
            return 0;
        }

        if (cursor.Ahead(2).Kind == TokenKind.Superscript && cursor.IsJoined(2))
        {
            var exponent = Superscript.Read(cursor.TextOf(cursor.Ahead(2)));
            cursor.Advance(3);
            return exponent;
        }

        var isNegative = cursor.IsSign('-', 3);
        var place = isNegative ? 4 : 3;
        var text = cursor.TextOf(cursor.Ahead(place));
        if (cursor.IsSign('^', 2) && cursor.Ahead(place).Kind == TokenKind.Number
            && int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out var power))
        {
            cursor.Advance(place + 1);
            return Math.Min(power, 1000) * (isNegative ? -1 : 1);
        }

        return 0;
    }
}
