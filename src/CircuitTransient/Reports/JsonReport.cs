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
        JsonWriting.Document(result, WriteDocument);

    /// <summary>The documents of several circuits, as an array.</summary>
    public static string Write(ImmutableArray<TransientResult> results) =>
        JsonWriting.Documents(results, WriteDocument);

    private static void WriteDocument(Utf8JsonWriter json, TransientResult result)
    {
        json.WriteString("format", Format);
        json.Circuit(result.Circuit);
        json.Object("study", () =>
        {
            json.Number("from", 0);
            json.Number("until", result.Until);
            json.WriteString("start", result.Circuit.StartsSettled ? "settled" : "as stated");
            json.Text("untilReason", result.UntilReason);
        });
        json.Objects("causes", result.Causes, WriteCause);
        json.Objects("intervals", result.Intervals, WriteInterval);
        json.Objects("events", result.Events, WriteEvent);
        json.Objects("observations", result.Observations,
            (to, observation) => WriteObservation(to, result, observation));
        json.Objects("figures", result.Figures, WriteFigure);
        json.Objects("requirements", result.Requirements, (to, r) => WriteRequirement(to, result, r));
        var stated = result.Circuit.Parts;
        json.Objects(
            "parts", result.Parts.Select((part, i) => (part, stated.ElementAtOrDefault(i))), WritePart);
        json.Objects("selfChecks", result.SelfChecks, WriteSelfCheck);
        json.Objects("notJudged", result.NotJudged, WriteNotJudged);
        json.Objects("warnings", result.Warnings, WriteWarning);
        json.Objects("cautions", result.Cautions, WriteCaution);
    }

    internal static void WriteCause(Utf8JsonWriter json, CauseName cause)
    {
        json.WriteString("name", cause.Name);
        json.WriteString("kind", cause.Kind switch
        {
            CauseKind.Source => "source",
            CauseKind.Stored => "stored",
            CauseKind.Edge => "edge",
            _ => throw new System.Diagnostics.UnreachableException($"no word for {cause.Kind}"),
        });
        json.Text("of", cause.Of);
        json.Text("pulse", cause.Pulse);
    }

    private static void WriteInterval(Utf8JsonWriter json, IntervalResult interval)
    {
        json.Number("from", interval.From);
        json.Number("until", interval.Until);
        json.Texts("startsWith", interval.StartsWith);
        json.Objects("poles", interval.Poles, WritePole);
        json.Objects("impulses", interval.Impulses, WriteImpulse);
        json.Number("energyLost", interval.EnergyLost);
    }

    private static void WritePole(Utf8JsonWriter json, Pole pole)
    {
        json.Number("re", pole.Re);
        json.Number("im", pole.Im);
        json.WriteNumber("multiplicity", pole.Multiplicity);
    }

    private static void WriteImpulse(Utf8JsonWriter json, ImpulseResult impulse)
    {
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

        json.Text("remedy", impulse.Remedy);
    }

    private static void WriteEvent(Utf8JsonWriter json, EventResult switching)
    {
        json.Number("time", switching.Time);
        json.WriteString("switch", switching.Switch);
        json.WriteString("action", switching.Closes ? "closes" : "opens");
        json.Number("voltageBefore", switching.VoltageBefore);
        json.Number("voltageAfter", switching.VoltageAfter);
        json.Number("currentBefore", switching.CurrentBefore);
        json.Number("currentAfter", switching.CurrentAfter);
        json.Text("remark", switching.Remark);
    }
}
