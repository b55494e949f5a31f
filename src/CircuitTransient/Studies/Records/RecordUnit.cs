using CircuitTransient.Text;

namespace CircuitTransient.Studies.Records;

/// <summary>Units as records write them.</summary>
internal static class RecordUnit
{
    /// <summary>A title and the unit in round or square brackets at its end.</summary>
    public static (string Title, Unit? Unit) Split(string title)
    {
        title = title.Trim().Trim('"').TrimStart('#', '%').Trim();
        var open = title.LastIndexOfAny(['(', '[']);
        if (open < 0 || title[^1] is not (')' or ']'))
        {
            return (title, null);
        }

        return Read(title[(open + 1)..^1]) is { } unit ? (title[..open].Trim(), unit) : (title, null);
    }

    /// <summary>A unit of time, voltage, current or power, by its symbol or its English name; null for
    /// anything else.</summary>
    public static Unit? Read(string text)
    {
        text = text.Trim().Trim('"').Trim();
        if (text.Length > 1 && ((text[0] == '(' && text[^1] == ')') || (text[0] == '[' && text[^1] == ']')))
        {
            text = text[1..^1].Trim();
        }

        text = text.ToLowerInvariant() switch
        {
            "sec" or "second" or "seconds" => "s",
            "millisecond" or "milliseconds" or "msec" => "ms",
            "microsecond" or "microseconds" or "usec" => "us",
            "nanosecond" or "nanoseconds" or "nsec" => "ns",
            "volt" or "volts" => "V",
            "ampere" or "amperes" or "amp" or "amps" => "A",
            "watt" or "watts" => "W",
            _ => text,
        };
        return Unit.TryRead(text, out var unit)
            && (unit.Dimension == Dimension.Time || unit.Dimension == Dimension.Voltage
                || unit.Dimension == Dimension.Current || unit.Dimension == Dimension.Power)
            ? unit
            : null;
    }

    /// <summary>What a value in the unit is to be multiplied with.</summary>
    public static double ScaleOf(Unit unit) => Math.Pow(10, unit.Exponent) * unit.Factor;
}
