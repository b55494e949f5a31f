using System.Globalization;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>What the lines above a table state: the sample interval, the unit of the values.</summary>
internal static class RecordInterval
{
    /// <summary>Looks for an interval or a sampling rate, in seconds; null where none is stated.</summary>
    public static double? Find(RecordHead head, int lines)
    {
        for (var i = 0; i < lines; i++)
        {
            var cells = Cells(head, i);
            for (var c = 0; c + 1 < cells.Length; c++)
            {
                if (ValueOf(cells, c) is { } interval and > 0)
                {
                    return interval;
                }
            }
        }

        return null;
    }

    /// <summary>Looks for the unit of the values; null where none is stated.</summary>
    public static Unit? FindUnit(RecordHead head, int lines)
    {
        for (var i = 0; i < lines; i++)
        {
            var cells = Cells(head, i);
            for (var c = 0; c + 1 < cells.Length; c++)
            {
                if (cells[c].Contains("unit", StringComparison.OrdinalIgnoreCase)
                    && RecordUnit.Read(cells[c + 1]) is { } unit && unit.Dimension != Dimension.Time)
                {
                    return unit;
                }
            }
        }

        return null;
    }

    private static string[] Cells(RecordHead head, int line) =>
        head.Text(line).TrimStart('#', '%').Split([',', ';', '\t', ':', '='],
            StringSplitOptions.TrimEntries | StringSplitOptions.RemoveEmptyEntries);

    private static double? ValueOf(string[] cells, int place)
    {
        var title = cells[place].Trim('"');
        var key = title.ToLowerInvariant();
        var isRate = Has(key, "sampl") && (Has(key, "rate") || Has(key, "frequency"));
        var isInterval = !isRate && (Has(key, "interval") || Has(key, "increment")
            || (Has(key, "sampl") && (Has(key, "period") || Has(key, "time"))) || key is "dt" or "δt");
        if (!isRate && !isInterval)
        {
            return null;
        }

        var text = cells[place + 1].Trim('"', ' ');
        var end = 0;
        while (end < text.Length && (char.IsAsciiDigit(text[end]) || text[end] is '.' or '+' or '-'
            || (text[end] is 'e' or 'E' && end + 1 < text.Length
                && (char.IsAsciiDigit(text[end + 1]) || text[end + 1] is '+' or '-'))))
        {
            end++;
        }

        if (!double.TryParse(text[..end], NumberStyles.Float, CultureInfo.InvariantCulture, out var number)
            || !double.IsFinite(number) || number <= 0)
        {
            return null;
        }

        var unit = text[end..].Trim() is { Length: > 0 } beside ? beside
            : title.Length > 0 && title[^1] is ')' or ']' ? title[(title.LastIndexOfAny(['(', '[']) + 1)..^1]
            : place + 2 < cells.Length && cells[place + 2].Any(char.IsLetter) ? cells[place + 2].Trim('"')
            : "";
        return isRate ? OfRate(number, unit) : OfInterval(number, unit);
    }

    private static double? OfInterval(double number, string unit) =>
        unit.Length == 0 ? number
        : RecordUnit.Read(unit) is { } read && read.Dimension == Dimension.Time
            ? number * RecordUnit.ScaleOf(read)
            : null;

    // A rate in samples a second (S/s, Sa/s), hertz, or bare.
    private static double? OfRate(double number, string unit)
    {
        foreach (var ending in new[] { "Hz", "Sa/s", "S/s", "samples/s" })
        {
            if (unit.EndsWith(ending, StringComparison.OrdinalIgnoreCase))
            {
                var prefix = unit[..^ending.Length].Trim();
                return prefix.Length == 0 ? 1 / number
                    : Prefix.TryRead(prefix[0], out var exponent) ? 1 / (number * Math.Pow(10, exponent))
                    : null;
            }
        }

        return unit.Length == 0 ? 1 / number : null;
    }

    private static bool Has(string key, string word) => key.Contains(word, StringComparison.Ordinal);
}
