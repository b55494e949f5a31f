using System.Collections.Immutable;
using System.Text.Json;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Reports;

/// <summary>The results document, <c>results.json</c>: SI units, doubles that read back to the same bits,
/// null for what is infinite or left open. Its shape is described by <c>results.schema.json</c>.</summary>
public static partial class JsonReport
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = ResultsDocument.Format;

    /// <summary>The JSON Schema (draft 2020-12) of the document.</summary>
    public static string Schema => JsonWriting.Schema("results.schema.json");

    /// <summary>The document of one circuit.</summary>
    public static string Write(TransientResult result) =>
        JsonWriting.Document(json => WriteDocument(json, result));

    /// <summary>The documents of several circuits, as an array.</summary>
    public static string Write(ImmutableArray<TransientResult> results) =>
        JsonWriting.Document(json => WriteArray(json, results, WriteDocument));

    private static void WriteDocument(Utf8JsonWriter json, TransientResult result)
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.Circuit(result.Circuit);
        json.WriteStartObject("study");
        json.Number("from", 0);
        json.Number("until", result.Until);
        json.WriteString("start", result.Circuit.StartsSettled ? "settled" : "as stated");
        WriteOptional(json, "untilReason", result.UntilReason);
        json.WriteEndObject();
        WriteArray(json, "causes", result.Causes, WriteCause);
        WriteArray(json, "intervals", result.Intervals, WriteInterval);
        WriteArray(json, "events", result.Events, WriteEvent);
        WriteArray(json, "observations", result.Observations,
            (to, observation) => WriteObservation(to, result, observation));
        WriteArray(json, "figures", result.Figures, WriteFigure);
        WriteArray(json, "requirements", result.Requirements, WriteRequirement);
        WriteParts(json, result);
        WriteArray(json, "selfChecks", result.SelfChecks, WriteSelfCheck);
        WriteArray(json, "notJudged", result.NotJudged, WriteNotJudged);
        WriteArray(json, "warnings", result.Warnings, WriteWarning);
        WriteArray(json, "cautions", result.Cautions, WriteCaution);
        json.WriteEndObject();
    }

    internal static void WriteCause(Utf8JsonWriter json, CauseName cause)
    {
        json.WriteStartObject();
        json.WriteString("name", cause.Name);
        json.WriteString("kind", cause.Kind switch
        {
            CauseKind.Source => "source",
            CauseKind.Stored => "stored",
            CauseKind.Edge => "edge",
            _ => throw new System.Diagnostics.UnreachableException($"no word for {cause.Kind}"),
        });
        WriteOptional(json, "of", cause.Of);
        WriteOptional(json, "pulse", cause.Pulse);
        json.WriteEndObject();
    }

    private static void WriteInterval(Utf8JsonWriter json, IntervalResult interval)
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
        WriteArray(json, "poles", interval.Poles, WritePole);
        WriteArray(json, "impulses", interval.Impulses, WriteImpulse);
        json.Number("energyLost", interval.EnergyLost);
        json.WriteEndObject();
    }

    private static void WritePole(Utf8JsonWriter json, Pole pole)
    {
        json.WriteStartObject();
        json.Number("re", pole.Re);
        json.Number("im", pole.Im);
        json.WriteNumber("multiplicity", pole.Multiplicity);
        json.WriteEndObject();
    }

    private static void WriteImpulse(Utf8JsonWriter json, ImpulseResult impulse)
    {
        json.WriteStartObject();
        json.Number("time", impulse.Time);
        json.WriteString("part", impulse.Part);
        if (impulse.Charge is not null)
        {
            json.Number("charge", impulse.Charge);
        }

        if (impulse.VoltSeconds is not null)
        {
            json.Number("voltSeconds", impulse.VoltSeconds);
        }

        WriteOptional(json, "remedy", impulse.Remedy);
        json.WriteEndObject();
    }

    private static void WriteEvent(Utf8JsonWriter json, EventResult switching)
    {
        json.WriteStartObject();
        json.Number("time", switching.Time);
        json.WriteString("switch", switching.Switch);
        json.WriteString("action", switching.Closes ? "closes" : "opens");
        json.Number("voltageBefore", switching.VoltageBefore);
        json.Number("voltageAfter", switching.VoltageAfter);
        json.Number("currentBefore", switching.CurrentBefore);
        json.Number("currentAfter", switching.CurrentAfter);
        WriteOptional(json, "remark", switching.Remark);
        json.WriteEndObject();
    }

    internal static void WriteArray<T>(
        Utf8JsonWriter json, string name, ImmutableArray<T> items, Action<Utf8JsonWriter, T> write)
    {
        json.WritePropertyName(name);
        WriteArray(json, items, write);
    }

    internal static void WriteArray<T>(
        Utf8JsonWriter json, ImmutableArray<T> items, Action<Utf8JsonWriter, T> write)
    {
        json.WriteStartArray();
        foreach (var item in items)
        {
            write(json, item);
        }

        json.WriteEndArray();
    }

    internal static void WriteOptional(Utf8JsonWriter json, string name, string? text)
    {
        if (text is not null)
        {
            json.WriteString(name, text);
        }
    }
}
