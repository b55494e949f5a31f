using System.Globalization;
using System.Numerics;
using System.Text.RegularExpressions;

namespace CircuitTransient.Tests.Reports.Formula;

/// <summary>Works a printed expression out, from its characters alone: what a reader with a pocket calculator
/// would do. It shares nothing with the code that printed it.</summary>
internal sealed partial class ExpressionReader(string text, double tau)
{
    private readonly string text = text;
    private int position;

    /// <summary>The value of an expression at τ, in SI.</summary>
    public static Complex Value(string text, double tau)
    {
        var reader = new ExpressionReader(text.Replace(" ", ""), tau);
        var value = reader.Sum();
        var rest = reader.text[reader.position..];
        Assert.True(rest.Length == 0, $"`{rest}` was not read");
        return value;
    }

    private Complex Sum()
    {
        var isNegative = Take('-');
        _ = isNegative || Take('+');
        var sum = isNegative ? -Product() : Product();
        while (position < text.Length && text[position] is '+' or '-')
        {
            sum += Take('-') ? -Product() : Take('+') ? Product() : 0;
        }

        return sum;
    }

    private Complex Product()
    {
        var product = Factor();
        while (position < text.Length && text[position] is '·' or '/')
        {
            product = Take('·') ? product * Factor() : Take('/') ? product / Factor() : product;
        }

        return product;
    }

    private Complex Factor()
    {
        foreach (var (name, function) in Functions)
        {
            if (Take(name))
            {
                var argument = Sum();
                Assert.True(Take(')'));
                return function(argument);
            }
        }

        if (Take('-'))
        {
            return -Factor();
        }

        if (Take("D["))
        {
            var nodes = new List<Complex> { Sum() };
            while (Take(','))
            {
                nodes.Add(Sum());
            }

            Assert.True(Take(']'));
            return DividedDifference.Of(nodes, tau);
        }

        if (Take('τ') || Take('j'))
        {
            return Power(text[position - 1] == 'τ' ? tau : Complex.ImaginaryOne);
        }

        return Number();
    }

    private Complex Number()
    {
        var match = Written().Match(text, position);
        Assert.True(match.Success, $"no number at `{text[position..]}`");
        position += match.Length;
        var value = double.Parse(match.Groups["digits"].Value, CultureInfo.InvariantCulture);
        var unit = match.Groups["unit"].Value;
        if (unit == "π")
        {
            return value * Math.PI;
        }

        if (unit == "°")
        {
            return value * Math.PI / 180;
        }

        var (top, bottom) = unit.Split('/') is [var over, var under] ? (over, under) : (unit, "");
        var factor = Prefix(top, ["V", "A", "W", "s", "Hz", "C", "Vs"]);
        var below = bottom.Length == 0 ? 1 : Prefix(bottom.TrimEnd([.. Superscripts]), ["s"]);
        return Power(value) * factor / below;
    }

    private Complex Power(Complex value)
    {
        var end = position;
        while (end < text.Length && "⁻⁰¹²³⁴⁵⁶⁷⁸⁹".Contains(text[end]))
        {
            end++;
        }

        if (end == position)
        {
            return value;
        }

        var digits = text[position..end].Replace('⁻', '-');
        position = end;
        return Math.Pow(value.Real, int.Parse(
            string.Concat(digits.Select(c => c == '-' ? "-" : Superscripts.IndexOf(c).ToString())),
            CultureInfo.InvariantCulture));
    }

    private static double Prefix(string unit, string[] known) =>
        unit.Length == 0 || known.Contains(unit) ? 1
        : known.Contains(unit[1..])
            ? Math.Pow(10, unit[0] switch
            {
                'p' => -12,
                'n' => -9,
                'µ' => -6,
                'm' => -3,
                'k' => 3,
                'M' => 6,
                'G' => 9,
                'T' => 12,
                _ => throw new InvalidDataException($"no prefix is `{unit[0]}`"),
            })
            : throw new InvalidDataException($"no unit is `{unit}`");

    private bool Take(char sign) => Take(sign.ToString());

    private bool Take(string word)
    {
        var isThere = string.CompareOrdinal(text, position, word, 0, word.Length) == 0;
        position += isThere ? word.Length : 0;
        return isThere;
    }

    private const string Superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    private static readonly (string Name, Func<Complex, Complex> Function)[] Functions =
    [
        ("e^(", Complex.Exp), ("cosh(", Complex.Cosh), ("sinh(", Complex.Sinh), ("cos(", Complex.Cos),
        ("sin(", Complex.Sin), ("Re(", z => z.Real), ("(", z => z),
    ];

    [GeneratedRegex(@"\G(?<digits>\d+(\.\d+)?)(?<unit>π|°|([A-Za-zµ]+(/[a-zµ]*s[²³⁴⁵]?)?)?)",
        RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Written();
}
