using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.ClosedForms;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Formula;

/// <summary>What the text and the typeset form of a closed form have in common.</summary>
internal static class FormulaWords
{
    /// <summary>Stretches printed of one quantity; more are cut in the middle.</summary>
    public const int MostStretches = 24;

    private const int LastStretches = 4;
    private const double SamePole = 0.05; // how near a rate lies to the pole it belongs to, in its own block

    /// <summary>The stretches that are printed, and how many after the first of them are left out.</summary>
    public static (ImmutableArray<ClosedStretch> First, int LeftOut, ImmutableArray<ClosedStretch> Last)
        Shown(ClosedForm form) => form.Stretches.Length <= MostStretches
            ? (form.Stretches, 0, [])
            : (form.Stretches[..(MostStretches - LastStretches)], form.Stretches.Length - MostStretches,
                form.Stretches[^LastStretches..]);

    /// <summary>An instant with as many digits as its waveform moves with, no trailing zeros.</summary>
    /// <param name="time">In seconds.</param>
    /// <param name="error">The error in seconds that it may have.</param>
    public static string Instant(double time, double error)
    {
        for (var digits = 4; digits < 17; digits++)
        {
            var written = time.ToString("E" + (digits - 1), CultureInfo.InvariantCulture);
            var rounded = double.Parse(written, CultureInfo.InvariantCulture);
            if (Math.Abs(rounded - time) <= error)
            {
                return Trimmed(EngineeringNumber.Format(time, "s", digits));
            }
        }

        return Trimmed(EngineeringNumber.Format(time, "s", 17));
    }

    /// <summary>The error that an instant may have: what the fastest term makes of it stays below the
    /// printed digits.</summary>
    public static double InstantError(IEnumerable<FormulaSum> sums, int digits)
    {
        var fastest = sums.SelectMany(s => s.Printed).SelectMany(t => t.Rates).Select(r => r.Magnitude)
            .DefaultIfEmpty(0).Max();
        return 0.1 * Math.Pow(10, -digits) / fastest;
    }

    /// <summary>The modes of an interval that show in printed terms, in words; those whose words agree in one
    /// line.</summary>
    public static IEnumerable<string> Modes(ClosedInterval interval, IEnumerable<ClosedTerm> printed) =>
        PolesIn(interval, printed).Select(Mode).GroupBy(words => words)
            .Select(g => g.Key + (g.Count() > 1 ? $"; {g.Count()} such, apart by less than shows here" : ""));

    private static ImmutableArray<Pole> PolesIn(ClosedInterval interval, IEnumerable<ClosedTerm> printed)
    {
        var rates = printed.Where(t => t.Origin != TermOrigin.Source).SelectMany(t => t.Rates).Distinct()
            .ToArray();
        return [.. interval.Poles.Where(pole => rates.Any(r =>
            double.Hypot(r.Real - pole.Re, Math.Abs(r.Imaginary) - pole.Im)
                <= SamePole * double.Hypot(pole.Re, pole.Im)))];
    }

    /// <summary>A mode: its time constant, or natural frequency, damping ratio and quality factor.</summary>
    private static string Mode(Pole pole)
    {
        var times = pole.Multiplicity == 1 ? "" : $", {pole.Multiplicity} times";
        var magnitude = double.Hypot(pole.Re, pole.Im);
        if (magnitude == 0)
        {
            return "a pole at zero: it holds what it stores" + times;
        }

        var decay = pole.Re == 0 ? "undamped"
            : (pole.Re > 0 ? "grows in " : "decays in ")
                + EngineeringNumber.Format(1 / Math.Abs(pole.Re), "s");
        if (pole.Im == 0)
        {
            return $"time constant {EngineeringNumber.Format(1 / magnitude, "s")}"
                + (pole.Re > 0 ? ", growing" : "") + times;
        }

        var damping = pole.Re == 0 ? ""
            : $"damping ratio {EngineeringNumber.Format(-pole.Re / magnitude, "")}, quality factor "
                + $"{EngineeringNumber.Format(magnitude / (-2 * pole.Re), "")}, ";
        var frequency = EngineeringNumber.Format(magnitude / double.Tau, "Hz");
        return $"natural frequency {frequency}, {damping}{decay}{times}";
    }

    /// <summary>An angle in degrees with a number of decimals.</summary>
    public static string Degrees(double degrees, int decimals) =>
        degrees.ToString("F" + Math.Max(0, decimals), CultureInfo.InvariantCulture);

    /// <summary>Unit of an impulse's weight: the quantity's times seconds.</summary>
    public static string ImpulseUnit(string unit) => unit == "A" ? "C" : unit + "s";

    /// <summary>A product in words: <c>energy in Cbus is 2.8 mF times the square of voltage across
    /// Cbus</c>.</summary>
    public static string Product(ClosedProduct product)
    {
        var factor = product.Factor switch
        {
            1 => "",
            -1 => "minus ",
            _ => $"{EngineeringNumber.Format(product.Factor, product.FactorUnit)} times ",
        };
        var what = product.First == product.Second
            ? $"the square of {product.First}"
            : $"the product of {product.First} and {product.Second}";
        return product.IsIntegrated
            ? $"{product.Name} is {factor}the integral since t = 0 of {what}"
            : $"{product.Name} is {factor}{what}";
    }

    private static string Trimmed(string text)
    {
        var space = text.IndexOf(' ');
        var number = text[..space];
        return number.Contains('.') && !number.Contains('·')
            ? number.TrimEnd('0').TrimEnd('.') + text[space..]
            : text;
    }
}
