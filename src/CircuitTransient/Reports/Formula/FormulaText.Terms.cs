using System.Diagnostics;
using System.Numerics;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Formula;

/// <content>Single terms.</content>
public static partial class FormulaText
{
    private static void WriteNotes(SummaryText text, Notes notes)
    {
        if (!(notes.Angle || notes.Impulse || notes.Divided))
        {
            return;
        }

        text.Blank();
        if (notes.Angle)
        {
            text.Paragraph("Angles in degrees add to 2π·f·τ in radians.", 0, 2);
        }

        if (notes.Impulse)
        {
            text.Paragraph(
                "δ(τ) is an impulse at the start of the stretch; its weight stands before it.", 0, 2);
        }

        if (notes.Divided)
        {
            text.Paragraph(
                "D[p, q, …] is the divided difference of e^(p·τ) over rates in 1/s too near each other for a "
                + "sum of exponentials: D[p] = e^(p·τ), D[p, q] = (D[p] - D[q])/(p - q), D[p, q, r] = "
                + "(D[p, q] - D[q, r])/(p - r), with τ·e^(p·τ) and τ²/2·e^(p·τ) where all are equal.", 0, 2);
        }
    }

    private static string Term(FormulaTerm term, Notes notes)
    {
        var factors = string.Concat(term.Factors.Select(f => "·" + Factor(f, notes)));
        if (term.Powers is [var (power, coefficient)])
        {
            return Signed(Number(coefficient) + Tau(power)) + factors;
        }

        var sum = term.Powers.Select((p, i) =>
        {
            var words = Number(p.Coefficient) + Tau(p.Power);
            return i == 0 ? words : words.StartsWith('-') ? $" - {words[1..]}" : $" + {words}";
        });
        return $"+ ({string.Concat(sum)}){factors}";
    }

    private static string Factor(FormulaFactor factor, Notes notes)
    {
        switch (factor)
        {
            case ExponentialFactor e:
                return $"e^({(e.Grows ? "" : "-")}τ/{Number(e.TimeConstant)})";
            case ApproachFactor a:
                return a.Grows
                    ? $"(e^(τ/{Number(a.TimeConstant)}) - 1)"
                    : $"(1 - e^(-τ/{Number(a.TimeConstant)}))";
            case HyperbolicFactor h:
                return $"{(h.IsSine ? "sinh" : "cosh")}(τ/{Number(h.TimeConstant)})";
            case OscillationFactor o:
                notes.Angle |= o.Degrees != 0;
                var degrees = FormulaWords.Degrees(Math.Abs(o.Degrees), o.Decimals);
                var angle = o.Degrees == 0 ? "" : $" {(o.Degrees < 0 ? '-' : '+')} {degrees}°";
                return $"{(o.IsSine ? "sin" : "cos")}(2π·{Number(o.Frequency)}·τ{angle})";
            case DividedFactor d:
                notes.Divided = true;
                var difference = $"D[{string.Join(", ", d.Rates.Select(r => Rate(r, d.Digits)))}]";
                return d.Rates.All(r => r.Imaginary == 0) ? difference
                    : d.Degrees == 0 ? $"Re({difference})"
                    : $"Re(e^(j·{FormulaWords.Degrees(d.Degrees, d.Decimals)}°)·{difference})";
            default:
                throw new UnreachableException($"no words for {factor}");
        }
    }

    private static string Rate(Complex rate, int digits)
    {
        var real = EngineeringNumber.Format(rate.Real, "", digits);
        var imaginary = EngineeringNumber.Format(Math.Abs(rate.Imaginary), "", digits);
        return rate.Imaginary == 0 ? real : $"{real} {(rate.Imaginary < 0 ? '-' : '+')} j·{imaginary}";
    }

    private static string Number(FormulaNumber number) =>
        EngineeringNumber.Format(number.Value, number.Unit, number.Digits);

    private static string Tau(int power) => power switch
    {
        0 => "",
        1 => "·τ",
        _ => "·τ" + Superscript(power),
    };

    private static string Signed(string words) => words.StartsWith('-') ? $"- {words[1..]}" : $"+ {words}";
}
