using System.Globalization;

namespace CircuitTransient.Text;

/// <summary>A value written for reading: <c>1.284 kV</c>, <c>212.4 µs</c>, <c>71.90·10³ A²s</c>.</summary>
public static class EngineeringNumber
{
    private const string SuperscriptDigits = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    /// <summary>Writes a value in SI with the prefix that leaves one to three
    /// digits before the point.</summary>
    /// <param name="unit">The unit without a prefix; empty for a pure number. <c>V/s</c> and
    /// <c>A/s</c> are written a millisecond or microsecond where that is nearer; <c>A²s</c>, <c>%</c>
    /// and <c>°</c> never take a prefix.</param>
    public static string Format(double value, string unit, int significantDigits = 4)
    {
        if (!double.IsFinite(value))
        {
            return double.IsNaN(value) ? "undetermined" : value > 0 ? "infinite" : "-infinite";
        }

        var tail = unit.Length == 0 ? "" : " " + unit;
        if (value == 0)
        {
            return "0" + tail;
        }

        var (digits, exponent) = Digits(value, significantDigits);
        var sign = value < 0 ? "-" : "";
        if (unit is "%" or "°" && exponent is >= -4 and < 6)
        {
            return sign + Place(digits, exponent) + tail;
        }

        if (unit is "V/s" or "A/s" && exponent >= 3)
        {
            var isMicrosecond = exponent >= 6;
            tail = " " + unit[0] + (isMicrosecond ? "/µs" : "/ms");
            return sign + WithPrefix(digits, exponent - (isMicrosecond ? 6 : 3), tail);
        }

        var takesPrefix = unit is not ("" or "A²s" or "%" or "°");
        return sign + (takesPrefix ? WithPrefix(digits, exponent, tail) : WithPower(digits, exponent, tail));
    }

    /// <summary>The leading digits, correctly rounded, and the power of ten of the first.</summary>
    private static (string Digits, int Exponent) Digits(double value, int count)
    {
        var text = Math.Abs(value).ToString("E" + (count - 1), CultureInfo.InvariantCulture);
        var mark = text.IndexOf('E');
        var exponent = int.Parse(text.AsSpan(mark + 1), provider: CultureInfo.InvariantCulture);
        return (text[..mark].Replace(".", ""), exponent);
    }

    private static string WithPrefix(string digits, int exponent, string tail)
    {
        var step = Step(exponent);
        return Prefix.Write(step) is { } prefix
            ? Place(digits, exponent - step) + " " + prefix + tail[1..]
            : Place(digits, exponent - step) + Power(step) + tail;
    }

    private static string WithPower(string digits, int exponent, string tail)
    {
        // Down to a hundredth a plain decimal reads better than 10⁻³.
        var step = exponent is >= -2 and < 3 ? 0 : Step(exponent);
        return Place(digits, exponent - step) + Power(step) + tail;
    }

    private static int Step(int exponent) => 3 * (int)Math.Floor(exponent / 3.0);

    private static string Power(int exponent)
    {
        if (exponent == 0)
        {
            return "";
        }

        var digits = Math.Abs(exponent).ToString(CultureInfo.InvariantCulture);
        return "·10" + (exponent < 0 ? "⁻" : "") + string.Concat(digits.Select(d =>
            SuperscriptDigits[d - '0']));
    }

    /// <summary>Sets the decimal point after the digit that stands for 10⁰.</summary>
    private static string Place(string digits, int exponent)
    {
        if (exponent < 0)
        {
            return "0." + new string('0', -exponent - 1) + digits;
        }

        var whole = exponent + 1;
        return digits.Length <= whole ? digits.PadRight(whole, '0') : digits[..whole] + "." + digits[whole..];
    }
}
