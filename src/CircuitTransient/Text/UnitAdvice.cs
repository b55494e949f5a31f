using System.Globalization;

namespace CircuitTransient.Text;

/// <summary>What to write in place of something that is not a unit.</summary>
public static class UnitAdvice
{
    private static readonly (string Word, string Symbol)[] UnitWords =
    [
        ("volt", "V"), ("amp", "A"), ("ampere", "A"), ("ohm", "Ω"), ("farad", "F"), ("henry", "H"),
        ("henries", "H"), ("watt", "W"), ("joule", "J"), ("coulomb", "C"), ("weber", "Wb"), ("siemens", "S"),
        ("hertz", "Hz"), ("sec", "s"), ("second", "s"), ("minute", "min"), ("hour", "h"), ("hr", "h"),
        ("degree", "deg"), ("percent", "%"), ("millisecond", "ms"), ("microsecond", "µs"),
        ("nanosecond", "ns"),
    ];

    private static readonly (string Letters, string Word, string Prefix)[] PrefixWords =
    [
        ("meg", "mega", "M"), ("kil", "kilo", "k"), ("gig", "giga", "G"), ("ter", "tera", "T"),
        ("mil", "milli", "m"), ("mic", "micro", "µ"), ("nan", "nano", "n"),
        ("pic", "pico", "p"), ("fem", "femto", "f"),
    ];

    /// <summary>Advice for a word that stands where a unit should, behind a number.</summary>
    public static string For(string word, string number)
    {
        if (word is [var lead, 'A', '²' or '^', .., 's'] && Prefix.TryRead(lead, out var power))
        {
            return "`A²s` takes no prefix, which could be squared or not: "
                + $"write `{number}·10{Raised(power)} A²s`";
        }

        if (word == "K")
        {
            return $"kilo is `k`, and the unit follows it: write `{number} kΩ` for a resistance";
        }

        if (ForLongTime(word, number) is { } time)
        {
            return time;
        }

        if ((SymbolOf(word) ?? PrefixedSymbolOf(word)) is { } symbol)
        {
            return $"write `{number} {symbol}`";
        }

        if (SameButForCase(word) is { } unit)
        {
            return $"case matters: write `{number} {unit}`";
        }

        foreach (var (letters, name, prefix) in PrefixWords)
        {
            if (word.StartsWith(letters, StringComparison.OrdinalIgnoreCase))
            {
                return $"{name} is `{prefix}`, and the unit follows it: `{prefix}Ω`, `{prefix}V`";
            }
        }

        return $"units: {string.Join(' ', Unit.Symbols)} A²s V/s A/s min h deg ° rad %; "
            + $"prefixes: {Prefix.All}; "
            + $"a product: `{number} * {word}`";
    }

    /// <summary>A number without a unit and the unit it lacks; a prefix that stands alone joins it:
    /// <c>2.2k</c> is <c>2.2 kΩ</c>.</summary>
    public static string WithUnit(string number, string unit)
    {
        var bare = number.Length > 1 ? number[..^1].TrimEnd() : "";
        return bare is [.., >= '0' and <= '9'] && Prefix.TryRead(number[^1], out var exponent)
            ? $"{bare} {Prefix.Write(exponent)}{unit}"
            : $"{number} {unit}";
    }

    /// <summary>An exponent in raised digits: <c>⁻³</c>.</summary>
    private static string Raised(int exponent) => string.Concat(
        exponent.ToString(CultureInfo.InvariantCulture).Select(c => c == '-' ? '⁻' : "⁰¹²³⁴⁵⁶⁷⁸⁹"[c - '0']));

    /// <summary>A day and what is longer has no unit of its own.</summary>
    private static string? ForLongTime(string word, string number)
    {
        var hours = word switch
        {
            "d" or "day" or "days" => 24,
            "week" or "weeks" => 168,
            "month" or "months" or "year" or "years" => 0,
            _ => -1,
        };
        if (hours < 0)
        {
            return null;
        }

        const string units = "the units of time are `s`, `min` and `h`";
        return hours > 0 && number.Length < 10
            && decimal.TryParse(number, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture,
                out var count)
            ? $"{units}: write `{(count * hours).ToString("0.############", CultureInfo.InvariantCulture)} h`"
            : $"{units}, with prefixes `ms`, `µs`, `ns`";
    }

    /// <summary>The symbol of a unit written out.</summary>
    private static string? SymbolOf(string word)
    {
        foreach (var (name, symbol) in UnitWords)
        {
            if (word.Equals(name, StringComparison.OrdinalIgnoreCase)
                || word.Equals(name + "s", StringComparison.OrdinalIgnoreCase))
            {
                return symbol;
            }
        }

        return null;
    }

    /// <summary>The same with a prefix before it: <c>kOhms</c>, <c>msec</c>.</summary>
    private static string? PrefixedSymbolOf(string word) =>
        word.Length > 1 && Prefix.TryRead(word[0], out var exponent) && SymbolOf(word[1..]) is { } symbol
            && Unit.Symbols.Contains(symbol)
            ? Prefix.Write(exponent) + symbol
            : null;

    /// <summary>The unit meant by one in the wrong case: <c>KOHM</c>, <c>uf</c>, <c>HZ</c>.</summary>
    private static string? SameButForCase(string word)
    {
        foreach (var symbol in Unit.Symbols.Append("Ohm"))
        {
            if (!word.EndsWith(symbol, StringComparison.OrdinalIgnoreCase))
            {
                continue;
            }

            var shown = symbol == "Ohm" ? "Ω" : symbol;
            var prefix = word[..^symbol.Length];
            if (prefix.Length == 0)
            {
                return shown;
            }

            // `MF` may be mega or milli: a prefix is only mended where one reading exists.
            var mended = prefix switch
            {
                "u" or "U" => "µ",
                "K" => "k",
                "N" => "n",
                "g" => "G",
                _ when prefix.Length == 1 && Prefix.TryRead(prefix[0], out _) => prefix,
                _ => null,
            };
            if (mended is not null)
            {
                return mended + shown;
            }
        }

        return null;
    }
}
