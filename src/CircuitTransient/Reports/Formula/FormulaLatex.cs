using System.Diagnostics;
using System.Numerics;
using System.Text;
using CircuitTransient.Measurements.ClosedForms;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Formula;

/// <summary>Closed forms as a piece of LaTeX, for a document that uses <c>amsmath</c>.</summary>
public static class FormulaLatex
{
    /// <summary>The closed forms of a study.</summary>
    /// <param name="study">The closed forms.</param>
    /// <param name="digits">Significant digits.</param>
    public static string Write(ClosedFormStudy study, int digits = FormulaText.UsualDigits)
    {
        var text = new StringBuilder();
        text.Append("% Closed forms of ").Append(Comment(study.Circuit.Title ?? study.Circuit.Source.Name))
            .Append("; needs \\usepackage{amsmath}.\n");
        foreach (var product in study.Products)
        {
            text.Append('\n').Append(LatexText.Of(FormulaWords.Product(product))).Append(".\n");
        }

        foreach (var form in study.Forms)
        {
            var (first, leftOut, last) = FormulaWords.Shown(form);
            foreach (var stretch in first)
            {
                WriteStretch(text, study, form, stretch, digits);
            }

            if (leftOut > 0)
            {
                text.Append($"\n% {leftOut} stretches are left out here; --json writes them all.\n");
            }

            foreach (var stretch in last)
            {
                WriteStretch(text, study, form, stretch, digits);
            }
        }

        return text.ToString();
    }

    private static void WriteStretch(
        StringBuilder text, ClosedFormStudy study, ClosedForm form, ClosedStretch stretch, int digits)
    {
        text.Append('\n');
        if (stretch.Total is null)
        {
            text.Append("% ").Append(Comment(form.Name)).Append(": left open by the equations from ")
                .Append(FormulaWords.Instant(stretch.From, 0)).Append(".\n");
            return;
        }

        var sums = stretch.ByCause
            .Select(s => (Sum: s, Printed: FormulaSum.Of(s, stretch, form.Unit, digits)))
            .Where(s => !s.Printed.Terms.IsEmpty || s.Sum.Impulse != 0).ToArray();
        var total = FormulaSum.Of(stretch.Total, stretch, form.Unit, digits);
        var error = FormulaWords.InstantError([total, .. sums.Select(s => s.Printed)], digits);
        var from = FormulaWords.Instant(stretch.From, error);
        var interval = study.Intervals[stretch.Interval];
        var starts = stretch.StartsInterval && !interval.StartsWith.IsEmpty
            ? $", when {string.Join(" and ", interval.StartsWith)}," : "";
        var until = FormulaWords.Instant(stretch.Until, error);
        text.Append(LatexText.Of($"From {from}{starts} until {until}")).Append(", with $\\tau = t")
            .Append(stretch.From == 0 ? "" : $" - {LatexText.Quantity(from)}")
            .Append("$:\n\\begin{align*}\n");
        if (sums is not [_])
        {
            WriteSum(text, form.Name, stretch.Total, total, form.Unit);
        }

        foreach (var (sum, printed) in sums)
        {
            text.Append(sums is [_] ? "" : " \\\\\n");
            WriteSum(text, $"{form.Name} from {sum.Cause}", sum, printed, form.Unit);
        }

        text.Append("\n\\end{align*}\n");
    }

    private static void WriteSum(
        StringBuilder text, string name, ClosedSum sum, FormulaSum printed, string unit)
    {
        text.Append($"\\text{{{LatexText.Of(name)}}} &=");
        var isFirst = true;
        if (sum.Impulse != 0)
        {
            var weight = EngineeringNumber.Format(sum.Impulse, FormulaWords.ImpulseUnit(unit), 5);
            Append(LatexText.Quantity(weight) + "\\,\\delta(\\tau)");
        }

        foreach (var term in printed.Terms)
        {
            Append(Term(term));
        }

        if (isFirst)
        {
            text.Append(" 0");
        }

        if (printed.LeftOut > 0)
        {
            var bound = EngineeringNumber.Format(printed.LeftOut, unit, 2);
            text.Append($" \\quad (\\text{{left out: at most }} {LatexText.Quantity(bound)})");
        }

        void Append(string term)
        {
            var isNegative = term.StartsWith('-');
            text.Append(isFirst ? " " : "\\\\\n  &\\quad ")
                .Append(isFirst ? term : isNegative ? $"- {term[1..]}" : $"+ {term}");
            isFirst = false;
        }
    }

    private static string Term(FormulaTerm term)
    {
        var factors = string.Concat(term.Factors.Select(f => "\\," + Factor(f)));
        if (term.Powers is [var (power, coefficient)])
        {
            return Number(coefficient) + Tau(power) + factors;
        }

        var sum = term.Powers.Select((p, i) =>
        {
            var words = Number(p.Coefficient) + Tau(p.Power);
            return i == 0 || words.StartsWith('-') ? words : $"+ {words}";
        });
        return $"\\left({string.Join(' ', sum)}\\right){factors}";
    }

    private static string Factor(FormulaFactor factor) => factor switch
    {
        ExponentialFactor e => $"e^{{{(e.Grows ? "" : "-")}\\tau/{Number(e.TimeConstant)}}}",
        ApproachFactor { Grows: true } a => $"\\left(e^{{\\tau/{Number(a.TimeConstant)}}} - 1\\right)",
        ApproachFactor a => $"\\left(1 - e^{{-\\tau/{Number(a.TimeConstant)}}}\\right)",
        HyperbolicFactor h =>
            $"{(h.IsSine ? "\\sinh" : "\\cosh")}\\left(\\tau/{Number(h.TimeConstant)}\\right)",
        OscillationFactor o => $"{(o.IsSine ? "\\sin" : "\\cos")}"
            + $"\\left(2\\pi\\cdot {Number(o.Frequency)}\\,\\tau{Angle(o)}\\right)",
        DividedFactor d => Divided(d),
        _ => throw new UnreachableException($"no symbols for {factor}"),
    };

    private static string Angle(OscillationFactor o)
    {
        var degrees = FormulaWords.Degrees(Math.Abs(o.Degrees), o.Decimals);
        return o.Degrees == 0 ? "" : $" {(o.Degrees < 0 ? '-' : '+')} {degrees}^{{\\circ}}";
    }

    private static string Divided(DividedFactor d)
    {
        var difference = $"D\\left[{string.Join(",\\; ", d.Rates.Select(r => Rate(r, d.Digits)))}\\right]";
        var turn = d.Degrees == 0 ? ""
            : $"e^{{\\mathrm{{j}}\\,{FormulaWords.Degrees(d.Degrees, d.Decimals)}^{{\\circ}}}}\\,";
        return d.Rates.All(r => r.Imaginary == 0)
            ? difference
            : $"\\operatorname{{Re}}\\left({turn}{difference}\\right)";
    }

    private static string Rate(Complex rate, int digits)
    {
        var real = LatexText.Quantity(EngineeringNumber.Format(rate.Real, "1/s", digits));
        var imaginary = LatexText.Quantity(
            EngineeringNumber.Format(Math.Abs(rate.Imaginary), "1/s", digits));
        return rate.Imaginary == 0 ? real
            : $"{real} {(rate.Imaginary < 0 ? '-' : '+')} \\mathrm{{j}}\\,{imaginary}";
    }

    private static string Number(FormulaNumber number) =>
        LatexText.Quantity(EngineeringNumber.Format(number.Value, number.Unit, number.Digits));

    private static string Tau(int power) => power switch
    {
        0 => "",
        1 => "\\,\\tau",
        _ => $"\\,\\tau^{{{power}}}",
    };

    private static string Comment(string text) => text.ReplaceLineEndings(" ");
}
