using System.Text.Json;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;

namespace CircuitTransient.Reports;

/// <content>Breakdowns by switching and by mode in the results document.</content>
public static partial class JsonReport
{
    private static void WriteBreakdowns(
        Utf8JsonWriter json, TransientResult result, ObservationResult observation)
    {
        json.WriteStartObject("inWords");
        json.WriteString("atMax", PeakWords.Of(result, observation, atMax: true));
        json.WriteString("atMin", PeakWords.Of(result, observation, atMax: false));
        json.WriteEndObject();
        if (result.By == Breakdown.Edge)
        {
            json.WriteStartObject("inPhase");
            json.WriteString("atMax", PhaseWords.Of(result, observation, atMax: true));
            json.WriteString("atMin", PhaseWords.Of(result, observation, atMax: false));
            json.WriteEndObject();
        }

        if (observation.BySwitching is { } switchings)
        {
            json.WriteStartObject("bySwitching");
            WriteSwitchings(json, "atMax", switchings.AtMax);
            WriteSwitchings(json, "atMin", switchings.AtMin);
            json.WriteEndObject();
        }

        if (result.By == Breakdown.Mode && observation.ByMode is { } modes)
        {
            json.WriteStartObject("byMode");
            WriteModes(json, "atMax", modes.AtMax);
            WriteModes(json, "atMin", modes.AtMin);
            json.WriteEndObject();
        }
    }

    private static void WriteSwitchings(Utf8JsonWriter json, string name, SwitchingBreakdown? breakdown)
    {
        if (breakdown is null)
        {
            json.WriteNull(name);
            return;
        }

        json.WriteStartObject(name);
        json.WriteString("baseIs", breakdown.BaseWords);
        json.Number("base", breakdown.Base);
        WriteArray(json, "effects", breakdown.Effects, (to, effect) =>
        {
            to.WriteStartObject();
            to.WriteString("event", effect.Event);
            to.Number("time", effect.Time);
            to.Number("value", effect.Value);
            WriteOptional(to, "reason", effect.Reason);
            to.WriteEndObject();
        });
        json.WriteEndObject();
    }

    private static void WriteModes(Utf8JsonWriter json, string name, ModeBreakdown? breakdown)
    {
        if (breakdown is null)
        {
            json.WriteNull(name);
            return;
        }

        json.WriteStartObject(name);
        json.WriteStartArray("modes");
        for (var m = 0; m < breakdown.Modes.Length; m++)
        {
            WriteMode(json, breakdown.Modes[m], breakdown.Energies?.Own[m]);
        }

        json.WriteEndArray();
        WriteArray(json, "causes", breakdown.Causes, (to, cause) =>
        {
            to.WriteStartObject();
            to.WriteString("cause", cause.Cause);
            WriteArray(to, "values", cause.Values, (inner, value) => inner.WriteNumberValue(value));
            to.WriteEndObject();
        });
        json.Number("joint", breakdown.Joint);
        json.Number("storedEnergy", breakdown.Energies?.Stored);
        json.Number("jointEnergy", breakdown.Energies?.Joint);
        json.WriteEndObject();
    }

    private static void WriteMode(Utf8JsonWriter json, ModeResult mode, double? energy)
    {
        json.WriteStartObject();
        json.WriteString("name", mode.Name);
        json.WriteString("kind", mode.IsForced ? "forced" : "natural");
        json.WriteBoolean("driven", mode.IsDriven);
        json.Number("re", mode.Rate.Real);
        json.Number("im", mode.Rate.Imaginary);
        json.WriteNumber("multiplicity", mode.Multiplicity);
        WriteArray(json, "parts", mode.Parts, (to, part) =>
        {
            to.WriteStartObject();
            to.WriteString("part", part.Part);
            to.Number("share", part.Share);
            to.WriteEndObject();
        });
        json.Number("energy", energy);
        json.Number("value", mode.Value);
        json.WriteEndObject();
    }
}
