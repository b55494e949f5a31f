using System.Globalization;

namespace CircuitTransient.Studies.Records;

/// <summary>What a cell of a record holds.</summary>
internal enum CellKind
{
    /// <summary>A finite number.</summary>
    Number,

    /// <summary>Nothing, or a word for no value.</summary>
    Missing,

    /// <summary>Anything else.</summary>
    Text,
}

/// <summary>Reads numbers of records.</summary>
internal static class RecordNumber
{
    private const long Exact = 1L << 53; // whole numbers up to here, and the powers below, are exact doubles

    private static readonly double[] Powers =
        [.. Enumerable.Range(0, 23).Select(n => double.Parse($"1e{n}", CultureInfo.InvariantCulture))];

    private static readonly string[] WordsForNothing =
        ["nan", "inf", "+inf", "-inf", "infinity", "-infinity", "na", "n/a", "-", "--", "---", "null"];

    /// <summary>Reads a cell.</summary>
    public static CellKind Read(ReadOnlySpan<byte> cell, char mark, out double value)
    {
        cell = Trimmed(cell);
        value = double.NaN;
        if (cell.IsEmpty)
        {
            return CellKind.Missing;
        }

        if (TryReadShort(cell, mark, out value) || TryReadAny(cell, mark, out value))
        {
            return double.IsFinite(value) ? CellKind.Number : CellKind.Missing;
        }

        return IsWordForNothing(cell) ? CellKind.Missing : CellKind.Text;
    }

    /// <summary>A cell without blanks and quotes round it.</summary>
    public static ReadOnlySpan<byte> Trimmed(ReadOnlySpan<byte> cell)
    {
        cell = cell.Trim(" \t"u8);
        return cell.Length > 1 && cell[0] == '"' && cell[^1] == '"' ? cell[1..^1].Trim(" \t"u8) : cell;
    }

    /// <summary>Up to 19 digits whose whole number and power of ten are exact doubles: one rounding, so the
    /// nearest double (W. D. Clinger, 1990, from memory).</summary>
    private static bool TryReadShort(ReadOnlySpan<byte> cell, char mark, out double value)
    {
        value = 0;
        var isNegative = cell[0] == '-';
        var i = isNegative || cell[0] == '+' ? 1 : 0;
        long digits = 0;
        var (count, decimals) = (0, -1);
        for (; i < cell.Length; i++)
        {
            if (cell[i] is >= (byte)'0' and <= (byte)'9')
            {
                digits = (digits * 10) + (cell[i] - '0');
                decimals += decimals >= 0 ? 1 : 0;
                if (++count > 17)
                {
                    return false;
                }
            }
            else if (cell[i] == mark && decimals < 0)
            {
                decimals = 0;
            }
            else
            {
                break;
            }
        }

        if (count == 0 || digits > Exact || !TryReadExponent(cell[i..], out var exponent))
        {
            return false;
        }

        exponent -= Math.Max(decimals, 0);
        if (exponent is < -22 or > 22)
        {
            return false;
        }

        value = exponent < 0 ? digits / Powers[-exponent] : digits * Powers[exponent];
        value = isNegative ? -value : value;
        return true;
    }

    private static bool TryReadExponent(ReadOnlySpan<byte> text, out int exponent)
    {
        exponent = 0;
        if (text.IsEmpty)
        {
            return true;
        }

        if (text[0] is not ((byte)'e' or (byte)'E') || text.Length is < 2 or > 5)
        {
            return false;
        }

        var isNegative = text[1] == '-';
        var from = isNegative || text[1] == '+' ? 2 : 1;
        for (var i = from; i < text.Length; i++)
        {
            if (text[i] is < (byte)'0' or > (byte)'9')
            {
                return false;
            }

            exponent = (exponent * 10) + (text[i] - '0');
        }

        exponent = isNegative ? -exponent : exponent;
        return from < text.Length;
    }

    private static bool TryReadAny(ReadOnlySpan<byte> cell, char mark, out double value)
    {
        value = double.NaN;
        var other = mark == '.' ? (byte)',' : (byte)'.';
        if (cell.Length > 400 || cell.Contains(other) || !cell.ContainsAnyInRange((byte)'0', (byte)'9'))
        {
            return false;
        }

        Span<byte> plain = stackalloc byte[cell.Length];
        cell.CopyTo(plain);
        plain.Replace((byte)mark, (byte)'.');
        return double.TryParse(plain, NumberStyles.Float, CultureInfo.InvariantCulture, out value);
    }

    private static bool IsWordForNothing(ReadOnlySpan<byte> cell)
    {
        if (cell.Length > 12)
        {
            return false;
        }

        var word = System.Text.Encoding.Latin1.GetString(cell).ToLowerInvariant();
        return WordsForNothing.Contains(word, StringComparer.Ordinal);
    }
}
