namespace CircuitTransient.Text;

/// <summary>A unit as written, its prefix included.</summary>
/// <param name="Dimension">What it measures.</param>
/// <param name="Exponent">Power of ten of its prefix or of its per cent.</param>
/// <param name="Factor">What is left to reach the SI unit: 60 for a minute,
/// π/180 for a degree, else 1.</param>
public readonly record struct Unit(Dimension Dimension, int Exponent, double Factor = 1)
{
    private const double RadiansInDegree = Math.PI / 180;

    /// <summary>The units a prefix may stand before, by their symbols.</summary>
    public static IEnumerable<string> Symbols =>
        ["Ω", "S", "F", "H", "V", "A", "W", "J", "C", "Wb", "Hz", "s", "Vs"];

    /// <summary>Reads a unit such as <c>µF</c>, <c>kOhm</c>, <c>V/µs</c>,
    /// <c>A²s</c>, <c>min</c>, <c>°</c>.</summary>
    public static bool TryRead(ReadOnlySpan<char> text, out Unit unit)
    {
        var whole = text switch
        {
            "min" => new Unit(Dimension.Time, 0, 60),
            "h" => new Unit(Dimension.Time, 0, 3600),
            "deg" or "°" => new Unit(Dimension.None, 0, RadiansInDegree),
            "%" => new Unit(Dimension.None, -2),
            "A²s" or "A^2s" => new Unit(Dimension.JouleIntegral, 0),
            _ => default,
        };
        if (whole != default)
        {
            unit = whole;
            return true;
        }

        var slash = text.IndexOf('/');
        if (slash < 0)
        {
            return TryReadPrefixed(text, out unit);
        }

        var isTop = TryReadPrefixed(text[..slash], out var top);
        var isBottom = TryReadPrefixed(text[(slash + 1)..], out var bottom);
        var isRate = isTop && isBottom && (top.Dimension == Dimension.Voltage
            || top.Dimension == Dimension.Current)
            && bottom.Dimension == Dimension.Time;
        unit = new Unit(top.Dimension / bottom.Dimension, top.Exponent - bottom.Exponent);
        return isRate;
    }

    /// <summary>The symbol of a dimension that has a unit of its own; null for any other.</summary>
    public static string? SymbolOf(Dimension dimension) => dimension switch
    {
        _ when dimension == Dimension.None => "",
        _ when dimension == Dimension.Voltage => "V",
        _ when dimension == Dimension.Current => "A",
        _ when dimension == Dimension.Time => "s",
        _ when dimension == Dimension.Resistance => "Ω",
        _ when dimension == Dimension.None / Dimension.Resistance => "S",
        _ when dimension == Dimension.Capacitance => "F",
        _ when dimension == Dimension.Inductance => "H",
        _ when dimension == Dimension.Power => "W",
        _ when dimension == Dimension.Energy => "J",
        _ when dimension == Dimension.Charge => "C",
        _ when dimension == Dimension.Flux => "Wb",
        _ when dimension == Dimension.Frequency => "Hz",
        _ when dimension == Dimension.JouleIntegral => "A²s",
        _ when dimension == Dimension.Voltage / Dimension.Time => "V/s",
        _ when dimension == Dimension.Current / Dimension.Time => "A/s",
        _ => null,
    };

    private static bool TryReadPrefixed(ReadOnlySpan<char> text, out Unit unit)
    {
        if (TryReadSymbol(text, out var dimension))
        {
            unit = new Unit(dimension, 0);
            return true;
        }

        var exponent = 0;
        var isRead = text.Length > 1 && Prefix.TryRead(text[0], out exponent)
            && TryReadSymbol(text[1..], out dimension);
        unit = new Unit(dimension, exponent);
        return isRead;
    }

    private static bool TryReadSymbol(ReadOnlySpan<char> text, out Dimension dimension)
    {
        Dimension? read = text switch
        {
            "\u03A9" or "\u2126" or "Ohm" or "ohm" => Dimension.Resistance,
            "S" => Dimension.None / Dimension.Resistance,
            "F" => Dimension.Capacitance,
            "H" => Dimension.Inductance,
            "V" => Dimension.Voltage,
            "A" => Dimension.Current,
            "W" => Dimension.Power,
            "J" => Dimension.Energy,
            "C" => Dimension.Charge,
            "Wb" or "Vs" => Dimension.Flux,
            "Hz" => Dimension.Frequency,
            "s" => Dimension.Time,
            "rad" => Dimension.None,
            _ => null,
        };
        dimension = read ?? default;
        return read is not null;
    }
}
