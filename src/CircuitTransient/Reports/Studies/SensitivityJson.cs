using System.Collections.Immutable;
using System.Text.Json;
using CircuitTransient.Studies.Sensitivities;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Reports.Studies;

/// <summary>The exact derivatives in the document of a study of tolerances.</summary>
internal static class SensitivityJson
{
    /// <summary>Writes them.</summary>
    public static void Write(Utf8JsonWriter json, SpreadResult spread) => json.Object("sensitivities", () =>
    {
        var found = spread.Sensitivities;
        json.WriteString("whyNone", found.WhyNone);
        json.Objects("figures", found.Figures.Select((slopes, f) => (slopes, f)), pair =>
        {
            json.WriteString("name", spread.Figures[pair.f].Figure.Name);
            WriteFigure(json, spread, pair.slopes, pair.f);
        });
        json.Objects("poles", found.Poles.SelectMany((poles, i) => poles.Select(p => (i, p))), pair =>
        {
            var (re, im) = (pair.p.Slopes.Select(s => s.Real), pair.p.Slopes.Select(s => s.Imaginary));
            json.WriteNumber("interval", pair.i);
            json.Number("re", pair.p.Pole.Real);
            json.Number("im", pair.p.Pole.Imaginary);
            json.WriteNumber("multiplicity", pair.p.Multiplicity);
            Numbers(json, "reSlopes", re.Select(s => (double?)s));
            Numbers(json, "imSlopes", im.Select(s => (double?)s));
        });
    });

    private static void WriteFigure(
        Utf8JsonWriter json, SpreadResult spread, FigureSlopes? slopes, int figure)
    {
        var values = spread.Varied.Values;
        var all = Enumerable.Range(0, values.Length);
        Numbers(json, "slopes", slopes?.Slopes);
        Numbers(json, "timeSlopes", slopes?.TimeSlopes);
        Numbers(json, "percentPerPercent", all.Select(i => SensitivityWords.Relative(spread, figure, i)));
        Numbers(json, "timePercentPerPercent", slopes is null ? null
            : all.Select(i => SensitivityWords.RelativeTime(slopes, values[i].Nominal, i)));
        Numbers(json, "varianceShares", slopes is null ? null : SensitivityFindings.Shares(slopes, values));
        json.Array("reasons", slopes?.Reasons ?? [], json.WriteStringValue);
    }

    private static void Numbers(Utf8JsonWriter json, string name, IEnumerable<double?>? numbers)
    {
        json.WritePropertyName(name);
        SpreadJson.WriteNumbers(json, numbers is null
            ? null
            : numbers.Select(n => n ?? double.NaN).ToImmutableArray());
    }
}
