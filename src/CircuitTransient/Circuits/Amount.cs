using System.Globalization;

namespace CircuitTransient.Circuits;

/// <summary>A value in the words of the language, short and exact: <c>1.1 kV</c>, <c>500 V/µs</c>, <c>2 %</c>.</summary>
internal static class Amount
{
    private const string Prefixes = "fpnµm kMGT";
    private const int MostDigits = 9; // what a user writes is shorter; a computed value is shown to six digits

    public static string Of(double value, string unit)
    {
        if (unit == "%")
        {
            return Digits(value * 100) + " %";
        }

        if (unit is "V/s" or "A/s" && Math.Abs(value) >= 1e5)
        {
            return Of(value / 1e6, unit[..1]) + "/µs";
        }

        if (unit.Length == 0 || unit.Contains('²') || unit.Contains('^') || unit.Contains('·') || value == 0)
        {
            return Digits(value) + (unit.Length == 0 ? "" : " " + unit);
        }

        var (sign, digits, exponent) = Split(value);
        var group = Math.Clamp((int)Math.Floor(exponent / 3.0), -5, 4);
        var prefix = Prefixes[group + 5];
        return sign + Place(digits, exponent - (3 * group)) + " " + (prefix == ' ' ? "" : prefix.ToString()) + unit;
    }

    private static string Digits(double value)
    {
        if (value == 0)
        {
            return "0";
        }

        var (sign, digits, exponent) = Split(value);
        if (exponent is >= -5 and < 6)
        {
            return sign + Place(digits, exponent);
        }

        var group = 3 * (int)Math.Floor(exponent / 3.0);
        return $"{sign}{Place(digits, exponent - group)}e{group.ToString(CultureInfo.InvariantCulture)}";
    }

    // value = ± d.ddd × 10^exponent with the fewest digits that read back as the same number.
    private static (string Sign, string Digits, int Exponent) Split(double value)
    {
        var text = Math.Abs(value).ToString("E16", CultureInfo.InvariantCulture);
        for (var places = 0; places < 17; places++)
        {
            var shorter = Math.Abs(value).ToString("E" + places, CultureInfo.InvariantCulture);
            if (double.Parse(shorter, CultureInfo.InvariantCulture) == Math.Abs(value))
            {
                text = places < MostDigits ? shorter : Math.Abs(value).ToString("E5", CultureInfo.InvariantCulture);
                break;
            }
        }

        var at = text.IndexOf('E', StringComparison.Ordinal);
        var digits = text[..at].Replace(".", "", StringComparison.Ordinal).TrimEnd('0');
        return (value < 0 ? "-" : "", digits.Length == 0 ? "0" : digits,
            int.Parse(text[(at + 1)..], CultureInfo.InvariantCulture));
    }

    private static string Place(string digits, int exponent)
    {
        if (exponent < 0)
        {
            return "0." + new string('0', -exponent - 1) + digits;
        }

        return digits.Length <= exponent + 1
            ? digits + new string('0', exponent + 1 - digits.Length)
            : digits[..(exponent + 1)] + "." + digits[(exponent + 1)..];
    }
}
