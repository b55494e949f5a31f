using System.Text.Json;
using CircuitTransient.Studies.Overlays;

namespace CircuitTransient.Reports.Studies;

/// <summary>The document of an overlay, <c>overlay.json</c>; its shape is described by
/// <c>overlay.schema.json</c>.</summary>
public static class OverlayJson
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = "circuit-transient overlay 1";

    /// <summary>The JSON Schema (draft 2020-12) of the document.</summary>
    public static string Schema => JsonWriting.Schema("overlay.schema.json");

    /// <summary>The document.</summary>
    public static string Write(OverlayResult result) => JsonWriting.Document(json =>
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.Circuit(result.Circuit);
        json.WriteBoolean("agrees", result.Agrees);
        json.WriteString("verdict", OverlayWords.Verdict(result));
        json.Objects("records", result.Records, record => WriteRecord(json, record));
        if (result.Fit is { } fit)
        {
            json.Object("fit", () => WriteFit(json, fit));
        }
        else
        {
            json.WriteNull("fit");
        }

        json.WriteEndObject();
    });

    private static void WriteRecord(Utf8JsonWriter json, RecordComparison record)
    {
        json.WriteString("file", record.File);
        json.WriteString("sha256", record.Sha256);
        json.WriteString("channel", record.Channel);
        json.WriteString("observation", record.Observation);
        json.WriteString("unit", record.Unit);
        json.Texts("added", record.Added);
        json.Texts("remarks", record.Remarks);
        json.WriteNumber("rows", record.RowCount);
        json.WriteNumber("compared", record.ComparedCount);
        json.WriteNumber("clipped", record.ClippedCount);
        json.WriteNumber("outsideStudy", record.OutsideCount);
        json.Object("alignment", () =>
        {
            WriteEstimate(json, "offset", record.Alignment.Offset);
            WriteEstimate(json, "gain", record.Alignment.Gain);
            WriteEstimate(json, "level", record.Alignment.Level);
        });
        json.Object("noise", () =>
        {
            json.Number("rms", record.Noise.Value);
            json.Number("relativeError", record.Noise.RelativeError);
            json.WriteString("source", record.Noise.Source);
        });
        json.Object("difference", () => WriteDifferences(json, record.Differences));
        WritePeak(json, "highest", record.Highest);
        WritePeak(json, "lowest", record.Lowest);
        WriteRing(json, record.Ring);
        json.Objects("unexplained", record.Unexplained, missing =>
        {
            json.Object("mode", () => WriteMode(json, missing.Mode));
            json.Number("nearestModelFrequency", missing.Nearest);
            json.Objects("strays", missing.Strays, stray =>
            {
                json.WriteString("words", stray.Words);
                json.WriteString("statement", stray.Statement);
                json.Number("ratioToNoise", stray.Ratio);
            });
        });
        json.Number("ratioToNoise", record.Ratio);
        json.Number("allowedRatio", record.AllowedRatio);
        json.WriteBoolean("explained", record.IsExplained);
    }

    private static void WriteEstimate(Utf8JsonWriter json, string name, Estimate estimate) =>
        json.Object(name, () =>
        {
            json.Number("value", estimate.Value);
            json.Number("standardError", estimate.StandardError);
            json.WriteBoolean("given", estimate.IsGiven);
        });

    private static void WriteDifferences(Utf8JsonWriter json, Differences left)
    {
        json.Number("rms", left.Rms);
        json.Number("greatest", left.Greatest);
        json.Number("greatestAt", left.GreatestAt);
        json.Number("correlation", left.Correlation);
        json.Number("correlationLag", left.CorrelationLag);
        json.Number("correlationBound", left.CorrelationBound);
        json.WriteBoolean("white", left.AreWhite);
    }

    private static void WritePeak(Utf8JsonWriter json, string name, PeakPair pair) => json.Object(name, () =>
    {
        json.Number("record", pair.Record);
        json.Number("recordAt", pair.RecordAt);
        json.Number("model", pair.Model);
        json.Number("modelAt", pair.ModelAt);
        json.Number("difference", pair.Difference);
    });

    private static void WriteRing(Utf8JsonWriter json, RingComparison? ring)
    {
        if (ring is null)
        {
            json.WriteNull("ring");
            return;
        }

        json.Object("ring", () =>
        {
            json.Object("record", () => WriteMode(json, ring.Record));
            json.Number("modelFrequency", ring.ModelFrequency);
            json.Number("modelDamping", ring.ModelDamping);
            json.Number("difference", ring.Difference);
        });
    }

    private static void WriteMode(Utf8JsonWriter json, RingMode mode)
    {
        json.Number("frequency", mode.Frequency);
        json.Number("frequencyError", mode.FrequencyError);
        json.Number("decay", mode.Decay);
        json.Number("decayError", mode.DecayError);
        json.Number("damping", mode.Damping);
        json.Number("amplitude", mode.Amplitude);
    }

    private static void WriteFit(Utf8JsonWriter json, FitResult fit)
    {
        json.WriteBoolean("converged", fit.Converged);
        json.WriteBoolean("resolved", fit.IsResolved);
        json.WriteNumber("steps", fit.Steps);
        json.Number("condition", fit.Condition);
        json.Objects("values", fit.Values, value =>
        {
            json.WriteString("name", value.Name);
            json.WriteString("unit", value.Unit);
            json.Number("nominal", value.Nominal);
            json.Number("value", value.IsResolved ? value.Value : null);
            json.Number("relativeError", value.RelativeError);
            json.WriteBoolean("resolved", value.IsResolved);
        });
        json.Array("correlation", fit.Correlation, row =>
        {
            json.WriteStartArray();
            foreach (var value in row)
            {
                json.NumberValue(value);
            }

            json.WriteEndArray();
        });
        json.Objects("determined", fit.Determined, product =>
        {
            json.WriteString("words", product.Words);
            json.Number("value", product.Value);
            json.Number("relativeError", product.RelativeError);
        });
    }
}
