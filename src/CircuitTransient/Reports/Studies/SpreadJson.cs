using System.Collections.Immutable;
using System.Text.Json;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Reports.Studies;

/// <summary>The document of a study of tolerances; its shape is described by
/// <c>spread.schema.json</c>.</summary>
public static class SpreadJson
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = "circuit-transient spread 1";

    /// <summary>The JSON Schema (draft 2020-12) of the document.</summary>
    public static string Schema => JsonWriting.Schema("spread.schema.json");

    /// <summary>The document.</summary>
    public static string Write(SpreadResult spread) => JsonWriting.Document(json =>
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.Circuit(spread.Varied.Circuit);
        json.WriteString("verdict", SpreadWords.Verdict(spread));
        json.WriteBoolean("holds", spread.AllHold);
        json.Objects("values", spread.Varied.Values, value =>
        {
            json.WriteString("name", value.Name);
            json.WriteString("unit", value.Unit);
            json.Number("nominal", value.Nominal);
            json.Number("lowest", value.Tolerance!.Lowest);
            json.Number("highest", value.Tolerance.Highest);
            json.WriteString("distribution", value.Tolerance.IsNormal ? "normal" : "uniform");
        });
        json.Object("search", () => WriteAccount(json, spread));
        json.Objects("figures", spread.Figures, figure => WriteFigure(json, spread, figure));
        SpreadJumps.Write(json, spread);
        WriteWorst(json, spread);
        SpreadDoubts.Write(json, spread);
        SensitivityJson.Write(json, spread);
        WriteDraws(json, spread);
        json.Array("selfChecks", spread.Nominal.SelfChecks, check => WriteCheck(json, "nominal", check));
        json.WriteEndObject();
    });

    private static void WriteAccount(Utf8JsonWriter json, SpreadResult spread)
    {
        var account = spread.Account;
        json.Number("corners", account.Corners);
        json.WriteBoolean("allCorners", account.AllCorners);
        json.WriteNumber("cornerPoints", account.CornerPoints);
        json.WriteNumber("interiorPoints", account.InteriorPoints);
        json.WriteNumber("worseInside", account.WorseInside);
        json.WriteNumber("unsolvable", account.Unsolvable);
        json.WritePropertyName("unsolvablePoint");
        WriteNumbers(json, account.UnsolvablePoint);
        json.Number("largestCorrection", account.LargestCorrection);
        json.WriteString("whyExact", account.WhyExact);
        json.WriteString("words", SpreadWords.Account(spread));
    }

    private static void WriteFigure(Utf8JsonWriter json, SpreadResult spread, FigureRange figure)
    {
        json.WriteString("name", figure.Figure.Name);
        json.WriteString("kind", SpreadWords.Kind(figure.Figure));
        json.WriteString("unit", figure.Figure.Unit);
        json.Number("nominal", figure.Nominal);
        json.Number("nominalTime", figure.NominalTime);
        json.Number("nominalReached", figure.NominalReached);
        WriteCauses(json, "nominalCauses", figure.NominalCauses);
        if (figure.Holds is { } holds)
        {
            json.WriteBoolean("holds", holds);
            if (SpreadDoubts.Of(spread) is { } doubt)
            {
                json.WriteString("doubt", doubt);
            }
        }

        json.WriteNumber("missing", figure.Missing);
        WriteExtreme(json, "least", figure.Least);
        WriteExtreme(json, "greatest", figure.Greatest);
        json.Array("alone", figure.Alone.Select((effect, i) => (effect, i)), pair =>
        {
            json.WriteStartObject();
            json.WriteString("value", spread.Varied.Values[pair.i].Name);
            json.Number("atLowest", pair.effect.AtLowest);
            json.Number("atHighest", pair.effect.AtHighest);
            json.WriteEndObject();
        });
    }

    private static void WriteExtreme(Utf8JsonWriter json, string name, ExtremePoint? extreme)
    {
        if (extreme is null)
        {
            json.WriteNull(name);
            return;
        }

        json.Object(name, () =>
        {
            json.Number("value", extreme.Value);
            json.Number("time", extreme.Time);
            json.Number("reached", extreme.Reached);
            json.WriteBoolean("corner", extreme.IsCorner);
            json.Number("atWorstCorner", extreme.AtWorstCorner);
            json.WritePropertyName("point");
            WriteNumbers(json, extreme.Point);
            json.Array("matters", extreme.Matters, json.WriteBooleanValue);
            json.WritePropertyName("withValueNominal");
            WriteNumbers(json, extreme.Returns);
            WriteCauses(json, "causes", extreme.Causes);
            json.Objects("jumps", extreme.Jumps, jump =>
            {
                json.WriteString("of", jump.IsOfValue ? "value" : "time");
                json.Number("place", jump.Place);
                json.Number("valueBefore", jump.ValueBefore);
                json.Number("valueAfter", jump.ValueAfter);
                json.Number("timeBefore", jump.TimeBefore);
                json.Number("timeAfter", jump.TimeAfter);
            });
        });
    }

    private static void WriteCauses(Utf8JsonWriter json, string name, ImmutableArray<CauseValue> causes) =>
        json.Objects(name, causes, cause =>
        {
            json.WriteString("cause", cause.Cause);
            json.Number("value", cause.Value);
        });

    private static void WriteWorst(Utf8JsonWriter json, SpreadResult spread)
    {
        if (spread.Worst is not { } worst)
        {
            json.WriteNull("worst");
            return;
        }

        json.Object("worst", () =>
        {
            var range = spread.Figures[worst.Figure];
            json.WriteString("figure", range.Figure.Name);
            json.Number("value", worst.Point.Value);
            json.Number("reached", worst.Point.Reached);
            json.Number("time", worst.Point.Time);
            json.Number("used", worst.Used);
            json.Object("values", () =>
            {
                for (var i = 0; i < worst.Point.Point.Length; i++)
                {
                    json.Number(spread.Varied.Values[i].Name, worst.Point.Point[i]);
                }
            });
            json.WriteString(
                "drivenBy", SpreadWords.Drivers(worst.Point).Select(i => spread.Varied.Values[i].Name)
                    .FirstOrDefault());
            json.WritePropertyName("derivativesPointOut");
            if (worst.IsSteepest is { } isSteepest)
            {
                json.WriteBooleanValue(isSteepest);
            }
            else
            {
                json.WriteNullValue();
            }

            json.Array("selfChecks", worst.Result.SelfChecks, check => WriteCheck(json, "worst", check));
        });
    }

    private static void WriteCheck(Utf8JsonWriter json, string of, SelfCheck check)
    {
        json.WriteStartObject();
        json.WriteString("of", of);
        json.WriteString("name", check.Name);
        json.Number("worst", check.Worst);
        json.Number("allowed", check.Allowed);
        json.WriteBoolean("holds", check.Holds);
        json.WriteEndObject();
    }

    private static void WriteDraws(Utf8JsonWriter json, SpreadResult spread)
    {
        if (spread.Draws is not { } draws)
        {
            json.WriteNull("draws");
            return;
        }

        json.Object("draws", () =>
        {
            json.WriteNumber("count", draws.Draws);
            json.WriteNumber("seed", spread.Options.Seed);
            json.WriteString("design", SpreadWords.Design(draws.Draws));
            json.WriteNumber("unsolvable", draws.Unsolvable);
            json.Array("unsolvableDraws", draws.UnsolvableDraws, json.WriteNumberValue);
            json.Objects("figures", spread.Figures.Zip(draws.Figures), pair =>
            {
                json.WriteString("name", pair.First.Figure.Name);
                WriteStatistics(json, pair.Second);
            });
            json.Objects("envelopes", draws.Envelopes, band => WriteBand(json, spread, band));
        });
    }

    private static void WriteStatistics(Utf8JsonWriter json, FigureStatistics statistics)
    {
        json.WriteNumber("finite", statistics.Count);
        json.WriteNumber("none", statistics.None);
        json.WriteNumber("infinite", statistics.Infinite);
        json.Number("least", statistics.Least);
        json.Number("greatest", statistics.Greatest);
        json.Number("mean", statistics.Mean);
        WriteInterval(json, "meanInterval", statistics.MeanInterval);
        json.Number("deviation", statistics.Deviation);
        WriteInterval(json, "deviationInterval", statistics.DeviationInterval);
        json.Objects("quantiles", statistics.Quantiles, quantile =>
        {
            json.Number("fraction", quantile.Fraction);
            json.Number("value", quantile.Value);
            WriteInterval(json, "interval", quantile.Interval);
        });
        json.Number("resolution", statistics.Resolution);
        json.Object("histogram", () =>
        {
            json.Number("from", statistics.Histogram.From);
            json.Number("to", statistics.Histogram.To);
            json.Array("counts", statistics.Histogram.Counts, json.WriteNumberValue);
        });
        if (statistics.Holding is { } held)
        {
            json.Object("holding", () =>
            {
                json.WriteNumber("draws", held.Holding);
                json.Number("fraction", held.Fraction);
                WriteInterval(json, "interval", held.Interval);
            });
        }
    }

    private static void WriteBand(Utf8JsonWriter json, SpreadResult spread, WaveformBand band)
    {
        json.WriteString("observation", spread.Varied.Circuit.Observations[band.Observation].Name);
        json.WriteNumber("draws", band.Draws);
        foreach (var (name, numbers) in ((string, ImmutableArray<double>)[])
            [("time", band.Times), ("nominal", band.Nominal), ("least", band.Least), ("below5", band.Low),
                ("above95", band.High), ("greatest", band.Greatest)])
        {
            json.WritePropertyName(name);
            WriteNumbers(json, numbers);
        }
    }

    private static void WriteInterval(Utf8JsonWriter json, string name, ConfidenceInterval interval)
    {
        json.WritePropertyName(name);
        WriteNumbers(json, [interval.Low, interval.High]);
    }

    /// <summary>An array of numbers; null where there is none.</summary>
    internal static void WriteNumbers(Utf8JsonWriter json, ImmutableArray<double>? numbers)
    {
        if (numbers is not { } all)
        {
            json.WriteNullValue();
            return;
        }

        json.WriteStartArray();
        foreach (var number in all)
        {
            json.NumberValue(number);
        }

        json.WriteEndArray();
    }
}
