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
        JsonWriting.Document(study, WriteDocument);

    /// <summary>The documents of several, as an array.</summary>
    public static string Write(ImmutableArray<ClosedFormStudy> studies) =>
        JsonWriting.Documents(studies, WriteDocument);

    private static void WriteDocument(Utf8JsonWriter json, ClosedFormStudy study)
    {
        json.WriteString("format", Format);
        json.Circuit(study.Circuit);
        json.Object("study", () =>
        {
            json.Number("from", 0);
            json.Number("until", study.Until);
            json.WriteString("start", study.Circuit.StartsSettled ? "settled" : "as stated");
        });
        json.WriteString("meaning", Meaning);
        json.Objects("causes", study.Causes, JsonReport.WriteCause);
        json.Objects("intervals", study.Intervals, WriteInterval);
        json.Objects("products", study.Products, WriteProduct);
        json.Objects("quantities", study.Forms, WriteForm);
        json.Objects("selfChecks", study.SelfChecks, JsonReport.WriteSelfCheck);
        json.Objects("notJudged", study.NotJudged, JsonReport.WriteNotJudged);
    }

    private static void WriteInterval(Utf8JsonWriter json, ClosedInterval interval)
    {
        json.Number("from", interval.From);
        json.Number("until", interval.Until);
        json.Texts("startsWith", interval.StartsWith);
        json.Objects("modes", interval.Poles, WriteMode);
    }

    private static void WriteMode(Utf8JsonWriter json, Pole pole)
    {
        var magnitude = double.Hypot(pole.Re, pole.Im);
        var isPair = pole.Im != 0;
        json.Number("re", pole.Re);
        json.Number("im", pole.Im);
        json.WriteNumber("multiplicity", pole.Multiplicity);
        json.Number("timeConstant", pole.Re == 0 ? null : 1 / Math.Abs(pole.Re));
        json.Number("naturalFrequency", isPair ? magnitude / double.Tau : null);
        json.Number("dampingRatio", isPair ? -pole.Re / magnitude : null);
        json.Number("qualityFactor", isPair && pole.Re != 0 ? magnitude / (-2 * pole.Re) : null);
    }

    private static void WriteProduct(Utf8JsonWriter json, ClosedProduct product)
    {
        json.WriteString("name", product.Name);
        json.WriteString("unit", product.Unit);
        json.Number("factor", product.Factor);
        json.WriteString("first", product.First);
        json.WriteString("second", product.Second);
        json.WriteBoolean("integrated", product.IsIntegrated);
    }

    private static void WriteForm(Utf8JsonWriter json, ClosedForm form)
    {
        json.WriteString("name", form.Name);
        json.WriteString("unit", form.Unit);
        json.Objects("stretches", form.Stretches, WriteStretch);
    }

    private static void WriteStretch(Utf8JsonWriter json, ClosedStretch stretch)
    {
        json.Number("from", stretch.From);
        json.Number("until", stretch.Until);
        json.WriteNumber("interval", stretch.Interval);
        json.Object("total", stretch.Total, WriteSum);
        json.Objects("byCause", stretch.ByCause, WriteSum);
    }

    private static void WriteSum(Utf8JsonWriter json, ClosedSum sum)
    {
        json.Text("cause", sum.Cause);
        if (sum.Impulse != 0)
        {
            json.Number("impulse", sum.Impulse);
        }

        if (sum.IsBeyondImpulse)
        {
            json.WriteBoolean("beyondImpulse", true);
        }

        json.Objects("terms", sum.Terms, WriteTerm);
    }

    private static void WriteTerm(Utf8JsonWriter json, ClosedTerm term)
    {
        json.WriteString("origin", term.Origin switch
        {
            TermOrigin.Network => "network",
            TermOrigin.Source => "source",
            TermOrigin.Both => "both",
            _ => throw new UnreachableException($"no word for {term.Origin}"),
        });
        WriteComplex(json, term.Amplitude);
        json.Number("bound", term.Bound);
        json.Objects("rates", term.Rates, WriteComplex);
    }

    private static void WriteComplex(Utf8JsonWriter json, Complex value)
    {
        json.Number("re", value.Real);
        json.Number("im", value.Imaginary);
    }
}
