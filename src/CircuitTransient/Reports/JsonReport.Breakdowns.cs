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
        json.Object("inWords", () =>
        {
            json.WriteString("atMax", PeakWords.Of(result, observation, atMax: true));
            json.WriteString("atMin", PeakWords.Of(result, observation, atMax: false));
        });
        if (result.By == Breakdown.Edge)
        {
            json.Object("inPhase", () =>
            {
                json.WriteString("atMax", PhaseWords.Of(result, observation, atMax: true));
                json.WriteString("atMin", PhaseWords.Of(result, observation, atMax: false));
            });
        }

        if (observation.BySwitching is { } switchings)
        {
            json.Object("bySwitching", () =>
            {
                json.Object("atMax", switchings.AtMax, WriteSwitchings);
                json.Object("atMin", switchings.AtMin, WriteSwitchings);
            });
        }

        if (result.By == Breakdown.Mode && observation.ByMode is { } modes)
        {
            json.Object("byMode", () =>
            {
                json.Object("atMax", modes.AtMax, WriteModes);
                json.Object("atMin", modes.AtMin, WriteModes);
            });
        }
    }

    private static void WriteSwitchings(Utf8JsonWriter json, SwitchingBreakdown breakdown)
    {
        json.WriteString("baseIs", breakdown.BaseWords);
        json.Number("base", breakdown.Base);
        json.Objects("effects", breakdown.Effects, (to, effect) =>
        {
            to.WriteString("event", effect.Event);
            to.Number("time", effect.Time);
            to.Number("value", effect.Value);
            to.Text("reason", effect.Reason);
        });
    }

    private static void WriteModes(Utf8JsonWriter json, ModeBreakdown breakdown)
    {
        json.Objects(
            "modes", breakdown.Modes.Select((mode, m) => (mode, breakdown.Energies?.Own[m])), WriteMode);
        json.Objects("causes", breakdown.Causes, (to, cause) =>
        {
            to.WriteString("cause", cause.Cause);
            to.Array("values", cause.Values, to.WriteNumberValue);
        });
        json.Number("joint", breakdown.Joint);
        json.Number("storedEnergy", breakdown.Energies?.Stored);
        json.Number("jointEnergy", breakdown.Energies?.Joint);
    }

    private static void WriteMode(Utf8JsonWriter json, (ModeResult Mode, double? Energy) pair)
    {
        var (mode, energy) = pair;
        json.WriteString("name", mode.Name);
        json.WriteString("kind", mode.IsForced ? "forced" : "natural");
        json.WriteBoolean("driven", mode.IsDriven);
        json.Number("re", mode.Rate.Real);
        json.Number("im", mode.Rate.Imaginary);
        json.WriteNumber("multiplicity", mode.Multiplicity);
        json.Objects("parts", mode.Parts, (to, part) =>
        {
            to.WriteString("part", part.Part);
            to.Number("share", part.Share);
        });
        json.Number("energy", energy);
        json.Number("value", mode.Value);
    }
}
