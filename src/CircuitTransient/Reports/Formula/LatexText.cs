using System.Text;

namespace CircuitTransient.Reports.Formula;

/// <summary>Words and numbers in LaTeX.</summary>
internal static class LatexText
{
    private const string Superscripts = "⁰¹²³⁴⁵⁶⁷⁸⁹";

    /// <summary>Any text, so that it stands as it is.</summary>
    public static string Of(string words)
    {
        var text = new StringBuilder();
        foreach (var c in words)
        {
            text.Append(c switch
            {
                '\\' => "\\textbackslash{}",
                '{' or '}' or '$' or '&' or '#' or '%' or '_' => $"\\{c}",
                '^' => "\\textasciicircum{}",
                '~' => "\\textasciitilde{}",
                'µ' or 'μ' => "$\\mu$",
                'Ω' => "$\\Omega$",
                '²' => "$^{2}$",
                _ when char.IsControl(c) => " ",
                _ => c.ToString(),
            });
        }

        return text.ToString();
    }

    /// <summary>A number with its unit as <see cref="Text.EngineeringNumber"/> writes it: the unit
    /// upright.</summary>
    public static string Quantity(string written)
    {
        var space = written.IndexOf(' ');
        var number = space < 0 ? written : written[..space];
        var unit = space < 0 ? "" : $"\\,\\mathrm{{{Symbols(written[(space + 1)..])}}}";
        var power = number.IndexOf('·');
        var digits = power < 0 ? number
            : $"{number[..power]}\\cdot 10^{{{Plain(number[(power + 3)..])}}}";
        return digits + unit;
    }

    private static string Symbols(string unit)
    {
        var text = new StringBuilder();
        foreach (var c in unit)
        {
            var digit = Superscripts.IndexOf(c);
            text.Append(digit >= 0 ? $"^{{{digit}}}" : c switch
            {
                'µ' => "\\mu ",
                'Ω' => "\\Omega ",
                '°' => "^{\\circ}",
                '%' => "\\%",
                _ => c.ToString(),
            });
        }

        return text.ToString();
    }

    private static string Plain(string superscript) =>
        string.Concat(superscript.Select(c => c == '⁻' ? "-" : Superscripts.IndexOf(c).ToString()));
}
