using System.Text.RegularExpressions;
using CircuitTransient.Reports.Formula;

namespace CircuitTransient.Tests.Reports.Formula;

public sealed partial class FormulaLatexTests
{
    [Theory]
    [MemberData(nameof(FormulaCircuits.All), MemberType = typeof(FormulaCircuits))]
    public void Braces_brackets_and_environments_are_balanced(string name, string text)
    {
        var latex = FormulaLatex.Write(FormulaOf.Text(text));
        var depth = 0;
        foreach (var brace in Brace().Matches(latex).Select(m => m.Value))
        {
            depth += brace == "{" ? 1 : -1;
            Assert.True(depth >= 0, name);
        }

        Assert.Equal(0, depth);
        Assert.Equal(Count(latex, @"\left"), Count(latex, @"\right"));
        Assert.Equal(Count(latex, @"\begin{align*}"), Count(latex, @"\end{align*}"));
        Assert.Contains(@"\begin{align*}", latex);
    }

    [Fact]
    public void Units_stand_upright_and_terms_in_lines_of_their_own()
    {
        const string text =
            """
            resistor  R from a to ground : 1 kΩ
            inductor  L from a to b : 10 mH
            capacitor C from b to ground : 1 µF, charged to 5 V
            observe voltage of b as "vC"
            until 1 ms
            """;

        // 5 V·(q e^(p t) - p e^(q t))/(q - p), p and q the roots of s² + 1e5 s + 1e8
        Assert.Equal(
            """
            % Closed forms of check.cause; needs \usepackage{amsmath}.

            From 0 s until 1 ms, with $\tau = t$:
            \begin{align*}
            \text{vC from C initial charge} &= 5.0516\,\mathrm{V}\,e^{-\tau/989.90\,\mathrm{\mu s}}\\
              &\quad - 51.552\,\mathrm{mV}\,e^{-\tau/10.102\,\mathrm{\mu s}}
            \end{align*}

            """,
            FormulaLatex.Write(FormulaOf.Text(text)));
    }

    [Fact]
    public void A_name_stays_text()
    {
        const string text =
            """
            source E at "a_1 & {b}\x" : 5 V
            resistor R from "a_1 & {b}\x" to ground : 1 kΩ
            observe voltage of "a_1 & {b}\x" as "50 % of $x^2$ #1"
            until 1 ms
            """;

        Assert.Contains(
            @"\text{50 \% of \$x\textasciicircum{}2\$ \#1 from E} &= 5.0000\,\mathrm{V}",
            FormulaLatex.Write(FormulaOf.Text(text)));
        Assert.Contains(
            @"\text{voltage of a\_1 \& \{b\}\textbackslash{}x from E}",
            FormulaLatex.Write(FormulaOf.Text(text, @"voltage of ""a_1 & {b}\x""")));
    }

    private static int Count(string text, string word) => text.Split(word).Length - 1;

    [GeneratedRegex(@"(?<!\\)[{}]", RegexOptions.None, 1000)]
    private static partial Regex Brace();
}
