using System.Collections.Immutable;
using System.Diagnostics;
using System.Numerics;
using System.Text.Json;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.ClosedForms;

namespace CircuitTransient.Reports.Formula;

/// <summary>Closed forms as a document: SI units, doubles that read back to the same bits, every term. Its
/// shape is described by <c>formula.schema.json</c>.</summary>
public static class FormulaJson
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = "circuit-transient formula 1";

    private const string Meaning =
        "On a stretch, with tau = t - from, the value is the sum over the terms of the real part of (re, im) "
        + "times D, the divided difference of exp(p tau) over the rates p of the term: exp(p tau) of one "
        + "rate, tau^(k-1)/(k-1)! exp(p tau) of k equal ones, (exp(p tau) - exp(q tau))/(p - q) of two; of "
        + "more, the upper right element of exp(tau M), M with the rates on its diagonal and ones above it. "
        + "An impulse at tau = 0 is not among the terms.";

    /// <summary>The JSON Schema (draft 2020-12) of the document.</summary>
    public static string Schema => JsonWriting.Schema("formula.schema.json");

    /// <summary>The document of one study.</summary>
    public static string Write(ClosedFormStudy study) =>
        JsonWriting.Document(json => WriteDocument(json, study));

    /// <summary>The documents of several, as an array.</summary>
    public static string Write(ImmutableArray<ClosedFormStudy> studies) =>
        JsonWriting.Document(json => JsonReport.WriteArray(json, studies, WriteDocument));

    private static void WriteDocument(Utf8JsonWriter json, ClosedFormStudy study)
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.Circuit(study.Circuit);
        json.WriteStartObject("study");
        json.Number("from", 0);
        json.Number("until", study.Until);
        json.WriteString("start", study.Circuit.StartsSettled ? "settled" : "as stated");
        json.WriteEndObject();
        json.WriteString("meaning", Meaning);
        JsonReport.WriteArray(json, "causes", study.Causes, JsonReport.WriteCause);
        JsonReport.WriteArray(json, "intervals", study.Intervals, WriteInterval);
        JsonReport.WriteArray(json, "products", study.Products, WriteProduct);
        JsonReport.WriteArray(json, "quantities", study.Forms, WriteForm);
        JsonReport.WriteArray(json, "selfChecks", study.SelfChecks, JsonReport.WriteSelfCheck);
        JsonReport.WriteArray(json, "notJudged", study.NotJudged, JsonReport.WriteNotJudged);
        json.WriteEndObject();
    }

    private static void WriteInterval(Utf8JsonWriter json, ClosedInterval interval)
    {
        json.WriteStartObject();
        json.Number("from", interval.From);
        json.Number("until", interval.Until);
        json.WriteStartArray("startsWith");
        foreach (var switching in interval.StartsWith)
        {
            json.WriteStringValue(switching);
        }

        json.WriteEndArray();
        JsonReport.WriteArray(json, "modes", interval.Poles, WriteMode);
        json.WriteEndObject();
    }

    private static void WriteMode(Utf8JsonWriter json, Pole pole)
    {
        var magnitude = double.Hypot(pole.Re, pole.Im);
        var isPair = pole.Im != 0;
        json.WriteStartObject();
        json.Number("re", pole.Re);
        json.Number("im", pole.Im);
        json.WriteNumber("multiplicity", pole.Multiplicity);
        json.Number("timeConstant", pole.Re == 0 ? null : 1 / Math.Abs(pole.Re));
        json.Number("naturalFrequency", isPair ? magnitude / double.Tau : null);
        json.Number("dampingRatio", isPair ? -pole.Re / magnitude : null);
        json.Number("qualityFactor", isPair && pole.Re != 0 ? magnitude / (-2 * pole.Re) : null);
        json.WriteEndObject();
    }

    private static void WriteProduct(Utf8JsonWriter json, ClosedProduct product)
    {
        json.WriteStartObject();
        json.WriteString("name", product.Name);
        json.WriteString("unit", product.Unit);
        json.Number("factor", product.Factor);
        json.WriteString("first", product.First);
        json.WriteString("second", product.Second);
        json.WriteBoolean("integrated", product.IsIntegrated);
        json.WriteEndObject();
    }

    private static void WriteForm(Utf8JsonWriter json, ClosedForm form)
    {
        json.WriteStartObject();
        json.WriteString("name", form.Name);
        json.WriteString("unit", form.Unit);
        JsonReport.WriteArray(json, "stretches", form.Stretches, WriteStretch);
        json.WriteEndObject();
    }

    private static void WriteStretch(Utf8JsonWriter json, ClosedStretch stretch)
    {
        json.WriteStartObject();
        json.Number("from", stretch.From);
        json.Number("until", stretch.Until);
        json.WriteNumber("interval", stretch.Interval);
        json.WritePropertyName("total");
        if (stretch.Total is { } total)
        {
            WriteSum(json, total);
        }
        else
        {
            json.WriteNullValue();
        }

        JsonReport.WriteArray(json, "byCause", stretch.ByCause, WriteSum);
        json.WriteEndObject();
    }

    private static void WriteSum(Utf8JsonWriter json, ClosedSum sum)
    {
        json.WriteStartObject();
        JsonReport.WriteOptional(json, "cause", sum.Cause);
        if (sum.Impulse != 0)
        {
            json.Number("impulse", sum.Impulse);
        }

        if (sum.IsBeyondImpulse)
        {
            json.WriteBoolean("beyondImpulse", true);
        }

        JsonReport.WriteArray(json, "terms", sum.Terms, WriteTerm);
        json.WriteEndObject();
    }

    private static void WriteTerm(Utf8JsonWriter json, ClosedTerm term)
    {
        json.WriteStartObject();
        json.WriteString("origin", term.Origin switch
        {
            TermOrigin.Network => "network",
            TermOrigin.Source => "source",
            TermOrigin.Both => "both",
            _ => throw new UnreachableException($"no word for {term.Origin}"),
        });
        WriteComplex(json, term.Amplitude);
        json.Number("bound", term.Bound);
        JsonReport.WriteArray(json, "rates", term.Rates, (to, rate) =>
        {
            to.WriteStartObject();
            WriteComplex(to, rate);
            to.WriteEndObject();
        });
        json.WriteEndObject();
    }

    private static void WriteComplex(Utf8JsonWriter json, Complex value)
    {
        json.Number("re", value.Real);
        json.Number("im", value.Imaginary);
    }
}
