using System.Globalization;
using CircuitTransient.Studies.Sensitivities;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>Exact sensitivities in words, ranked: by how many per cent a figure goes for one per cent of a
/// value.</summary>
internal static class SensitivityWords
{
    private const int MostNamed = 6;
    private const double Least = 5e-4; // per cent per per cent: less is not worth a word

    /// <summary>Per cent of a figure, on the scale a reader knows, for one per cent of a value; null where
    /// that has no meaning.</summary>
    public static double? Relative(SpreadResult spread, int figure, int value)
    {
        if (spread.Sensitivities.Figures.ElementAtOrDefault(figure) is not { } slopes
            || slopes.Slopes[value] is not { } slope)
        {
            return null;
        }

        var scale = JudgedScale.Of(spread, spread.Figures[figure]);
        var (size, place) = (scale.At(slopes.Value), spread.Varied.Values[value].Nominal);
        return size == 0 || place == 0 ? null : scale.Factor * slope * place / size;
    }

    /// <summary>Per cent of an instant for one per cent of a value.</summary>
    public static double? RelativeTime(FigureSlopes slopes, double nominal, int value) =>
        slopes.Time is { } time && time != 0 && nominal != 0
            ? slopes.TimeSlopes[value] * nominal / time
            : null;

    /// <summary>The values that move a figure, the strongest first: <c>Cbus +3.63, Rpre +3.26</c>.</summary>
    public static string Ranked(SpreadResult spread, int figure) =>
        Ranked(spread, value => Relative(spread, figure, value));

    /// <summary>The values that move a figure's instant, the strongest first.</summary>
    public static string RankedTime(SpreadResult spread, int figure) =>
        spread.Sensitivities.Figures[figure] is { } slopes
            ? Ranked(spread, value => RelativeTime(slopes, spread.Varied.Values[value].Nominal, value))
            : "";

    /// <summary>The values that move the magnitude of a pole, the strongest first.</summary>
    public static string RankedMagnitude(SpreadResult spread, PoleSlope pole) => Ranked(spread, value =>
        ((pole.Pole.Real * pole.Slopes[value].Real) + (pole.Pole.Imaginary * pole.Slopes[value].Imaginary))
            / (pole.Pole.Magnitude * pole.Pole.Magnitude) * spread.Varied.Values[value].Nominal);

    /// <summary>The values that move the damping ratio of a pair of poles, the strongest first.</summary>
    // ζ = −Re λ/|λ|, so dζ/ζ = d Re λ/Re λ − d|λ|/|λ|.
    public static string RankedDamping(SpreadResult spread, PoleSlope pole) => Ranked(spread, value =>
    {
        var (place, slope) = (pole.Pole, pole.Slopes[value]);
        var magnitude = ((place.Real * slope.Real) + (place.Imaginary * slope.Imaginary))
            / (place.Magnitude * place.Magnitude);
        return place.Real == 0 ? null
            : ((slope.Real / place.Real) - magnitude) * spread.Varied.Values[value].Nominal;
    });

    /// <summary>Whether a pole moves with any value.</summary>
    public static bool Moves(SpreadResult spread, PoleSlope pole) =>
        pole.Pole.Magnitude > 0 && RankedMagnitude(spread, pole).Length > 0;

    /// <summary>A pole by its time constant, or natural frequency and damping ratio.</summary>
    public static string Pole(PoleSlope pole)
    {
        var magnitude = pole.Pole.Magnitude;
        return pole.Pole.Imaginary == 0
            ? $"time constant {Number(Math.Abs(1 / pole.Pole.Real), "s")}"
            : $"{Number(magnitude / (2 * Math.PI), "Hz")}, damping ratio "
                + Number(-pole.Pole.Real / magnitude, "");
    }

    /// <summary>A number with its sign.</summary>
    public static string Signed(double? number) => number is { } n && double.IsFinite(n)
        ? (n > 0 ? "+" : "") + n.ToString(Math.Abs(n) < 0.1 ? "0.###" : "0.##", CultureInfo.InvariantCulture)
        : "";

    private static string Ranked(SpreadResult spread, Func<int, double?> of)
    {
        var ranked = Enumerable.Range(0, spread.Varied.Values.Length)
            .Select(i => (spread.Varied.Values[i].Name, Relative: of(i)))
            .Where(p => p.Relative is { } r && Math.Abs(r) >= Least)
            .OrderByDescending(p => Math.Abs(p.Relative!.Value))
            .Select(p => $"{p.Name} {Signed(p.Relative)}").ToArray();
        return string.Join(", ", ranked.Take(MostNamed))
            + (ranked.Length > MostNamed ? $" and {ranked.Length - MostNamed} more" : "");
    }
}
