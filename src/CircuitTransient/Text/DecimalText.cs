using System.Globalization;
using System.Numerics;

namespace CircuitTransient.Text;

/// <summary>Decimal digits read to the nearest double, prefix and all: 22 with µ is
/// exactly the double 22e-6.</summary>
public static class DecimalText
{
    /// <summary>The longest number read, in characters; a double is settled by
    /// the first 767 digits.</summary>
    public const int Longest = 1000;

    private const int LargestExponent = 100_000; // far past any double, far from overflowing an int

    /// <summary>Reads digits with an optional point and exponent, times a power of
    /// ten and a whole factor.</summary>
    /// <returns>False where the value overflows, or where digits other than zero vanish.</returns>
    public static bool TryRead(ReadOnlySpan<char> text, int exponent, int factor, out double value)
    {
        var mark = text.IndexOfAny('e', 'E');
        var mantissa = mark < 0 ? text : text[..mark];
        if (mark >= 0)
        {
            exponent += ReadExponent(text[(mark + 1)..]);
        }

        var digits = mantissa.ToString();
        if (factor != 1)
        {
            var point = digits.IndexOf('.');
            exponent -= point < 0 ? 0 : digits.Length - point - 1;
            digits = (BigInteger.Parse(digits.Replace(".", ""), CultureInfo.InvariantCulture) * factor)
                .ToString(CultureInfo.InvariantCulture);
        }

        value = double.Parse(string.Create(CultureInfo.InvariantCulture, $"{digits}e{exponent}"),
            NumberStyles.Float, CultureInfo.InvariantCulture);
        return double.IsFinite(value) && (value != 0 || !digits.AsSpan().ContainsAnyInRange('1', '9'));
    }

    private static int ReadExponent(ReadOnlySpan<char> text)
    {
        var isNegative = text[0] == '-';
        var magnitude = 0;
        foreach (var digit in text.TrimStart("+-"))
        {
            magnitude = Math.Min((magnitude * 10) + (digit - '0'), LargestExponent);
        }

        return isNegative ? -magnitude : magnitude;
    }
}
