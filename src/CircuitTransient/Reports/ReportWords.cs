using System.Collections.Immutable;
using System.Globalization;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;
using CircuitTransient.Text;

namespace CircuitTransient.Reports;

/// <summary>Figures and verdicts in words, alike on the page and on paper.</summary>
internal static class ReportWords
{
    /// <summary>A figure with its unit; <c>undetermined</c> where there is none.</summary>
    public static string Number(double? value, string unit) =>
        value is { } number && double.IsFinite(number)
            ? EngineeringNumber.Format(number, unit)
            : "undetermined";

    /// <summary>A figure beside greater ones; what rounding left of nothing is nothing.</summary>
    public static string Number(double? value, string unit, double scale) =>
        Number(value is { } number && IsRounding(number, scale) ? 0 : value, unit);

    /// <summary>Whether a figure is what rounding left of two equal ones of a size: the engine owes 1e-11 of
    /// it.</summary>
    public static bool IsRounding(double value, double scale) => Math.Abs(value) <= 1e-12 * scale;

    /// <summary>Whether a value of an observation is what rounding left of nothing.</summary>
    public static bool IsRounding(double value, ObservationResult observed) =>
        IsRounding(value, Math.Abs(observed.Greatest.Value ?? 0));

    /// <summary>What a switch saw just before it acted; nothing is known of the time before the
    /// start.</summary>
    public static string Before(EventResult switching, double? value, string unit) =>
        value is null && switching.Time == 0 ? "not known before the start" : Number(value, unit);

    /// <summary>A figure with its sign, a plus too.</summary>
    public static string Signed(double? value, string unit) =>
        value > 0 ? $"+{Number(value, unit)}" : Number(value, unit);

    /// <summary>A figure beside greater ones with its sign.</summary>
    public static string Signed(double? value, string unit, double scale) =>
        value is { } number && IsRounding(number, scale) ? Number(0, unit) : Signed(value, unit);

    /// <summary>How many there are, <c>3,290</c>; a power of ten where nobody would read the digits, which a
    /// double does not hold either.</summary>
    public static string Count(double count) =>
        count.ToString(count < 1e15 ? "N0" : "0.#e0", CultureInfo.InvariantCulture);

    /// <summary>A fraction in per cent.</summary>
    public static string Percent(double fraction)
    {
        var percent = 100 * fraction;
        var text = percent.ToString(Math.Abs(percent) >= 1000 ? "0" : "0.0", CultureInfo.InvariantCulture);
        return (text == "-0.0" ? "0.0" : text) + " %";
    }

    /// <summary>The verdict on a requirement.</summary>
    public static string Held(RequirementResult requirement) =>
        (requirement.Holds, requirement.Margin) switch
        {
            _ when !requirement.IsJudged => "broken: nothing to judge",
            (true, { } margin) => $"held, {Number(margin, requirement.Unit)} to spare",
            (true, null) => "held",
            (false, { } margin) => $"broken by {Number(-margin, requirement.Unit)}",
            (false, null) => "broken without limit",
        };

    /// <summary>The worst value as a fraction of what its bound allows; null where that has no
    /// meaning.</summary>
    public static double? Used(Bound bound, RequirementResult requirement)
    {
        if (requirement.Worst.Value is not { } value)
        {
            return requirement.Holds ? null : double.PositiveInfinity;
        }

        return bound switch
        {
            Limits { Lower: null, Upper: { } upper and not 0 } when upper > 0 => Math.Max(0, value / upper),
            Limits { Lower: { } lower and not 0, Upper: { } upper and not 0 } when lower < 0 && upper > 0 =>
                Math.Max(value / upper, value / lower),
            Limits { Lower: { } lower, Upper: null } when lower > 0 && value > 0 => lower / value,
            SettlesTo settles when settles.Target != 0 && settles.Within != 0 =>
                Math.Abs(value - settles.Target) / Math.Abs(settles.Within * settles.Target),
            _ => null,
        };
    }

    /// <summary>What a rated part reached.</summary>
    public static string Reached(RatingResult rating) =>
        rating.Reached is { } reached ? Number(reached, rating.Unit) : "no finite value";

    /// <summary>The verdict on a rating.</summary>
    public static string Held(RatingResult rating) => (rating.Holds, rating.Reached - rating.Rated) switch
    {
        (true, _) => "held",
        (false, { } excess) => $"exceeded by {Number(excess, rating.Unit)}",
        (false, null) => "exceeded without limit",
    };

    /// <summary>What is rated, by its unit.</summary>
    public static string Rated(string unit) => unit switch
    {
        "V" => "peak voltage",
        "A" => "peak current",
        "W" => "mean power",
        "J" => "energy",
        "A²s" => "I²t",
        "V/s" => "rate of change of voltage",
        "A/s" => "rate of change of current",
        _ => "rating",
    };

    /// <summary>A peak; infinite ones in words.</summary>
    public static string Peak(TimedValue? peak, string unit) => peak switch
    {
        null => "undetermined",
        { Value: null } => "no finite value",
        { Value: { } value } => Number(value, unit),
    };

    /// <summary>A figure of a self-check.</summary>
    public static string Small(double value) =>
        value == 0 ? "0" : value.ToString("0.#e-0", CultureInfo.InvariantCulture);

    /// <summary>An interval and what it starts with.</summary>
    public static string IntervalName(IntervalResult interval)
    {
        var from = interval.From == 0 ? "0 s" : Number(interval.From, "s");
        var span = $"{from} to {Number(interval.Until, "s")}";
        return interval.StartsWith.IsEmpty
            ? span
            : $"{span}, from {string.Join(" and ", interval.StartsWith)}";
    }

    /// <summary>A pole in words: place, time constant, natural frequency, damping ratio,
    /// multiplicity.</summary>
    public static ImmutableArray<string> PoleWords(Pole pole)
    {
        var magnitude = Math.Sqrt((pole.Re * pole.Re) + (pole.Im * pole.Im));
        var place = pole.Im == 0
            ? $"{Number(pole.Re, "")} 1/s"
            : $"{Number(pole.Re, "")} 1/s ± j {Number(pole.Im, "")} rad/s";
        var growing = pole.Re > 0 ? ", growing" : "";
        var constant = pole.Re == 0 ? "does not decay" : Number(Math.Abs(1 / pole.Re), "s") + growing;
        var frequency = pole.Im == 0 ? "" : Number(magnitude / (2 * Math.PI), "Hz");
        var damping = pole.Im == 0 ? "" : Number(-pole.Re / magnitude, "");
        return [place, constant, frequency, damping, $"{pole.Multiplicity}"];
    }

    /// <summary>When an extreme stands, to follow its value: <c> at 2 s</c>, <c>, 3 ms after S
    /// closes</c>.</summary>
    public static string When(TransientResult result, Extreme extreme)
    {
        var when = extreme.Value is null ? "" : InstantWords.At(result, extreme.Time, extreme.Side);
        var isPlain = when.Length == 0 || when.StartsWith("at ", StringComparison.Ordinal);
        return isPlain ? $" {when}" : $", {when}";
    }

    /// <summary>What is stored at an instant, and how the modes share it: what no mode has alone lies between
    /// two that add, and takes off where they cancel.</summary>
    public static string Stored(EnergyByMode energies)
    {
        var stored = Number(energies.Stored, "J");
        return energies.Joint < 0 && !IsRounding(energies.Joint, energies.Stored)
            ? $"{stored}; the modes, each alone, would store "
                + $"{Number(energies.Stored - energies.Joint, "J")} in all, for in part they cancel"
            : $"{stored}, of which {Number(energies.Joint, "J", energies.Stored)} belongs to no mode alone";
    }

    /// <summary>The greatest voltage and current of a circuit, beside which what rounding left of nothing is
    /// told.</summary>
    public static (double Volts, double Amperes) Scales(TransientResult result)
    {
        return (
            Greatest(
                result.Parts.Select(p => p.PeakVoltage?.Value),
                result.Events.SelectMany(e => new[] { e.VoltageBefore, e.VoltageAfter })),
            Greatest(
                result.Parts.Select(p => p.PeakCurrent?.Value),
                result.Events.SelectMany(e => new[] { e.CurrentBefore, e.CurrentAfter })));

        static double Greatest(IEnumerable<double?> peaks, IEnumerable<double?> seen) =>
            peaks.Concat(seen).Max(value => Math.Abs(value ?? 0));
    }

    /// <summary>A value of an observation; what rounding left of nothing is nothing.</summary>
    public static double? Cleaned(double? value, ObservationResult observed) =>
        value is { } figure && IsRounding(figure, observed) ? 0 : value;
}
