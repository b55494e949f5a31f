using System.Text.Json;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <content>Waveforms, verdicts and stresses in the results document.</content>
public static partial class JsonReport
{
    private static void WriteObservation(
        Utf8JsonWriter json, TransientResult result, ObservationResult observation)
    {
        json.WriteStartObject();
        json.WriteString("name", observation.Name);
        json.WriteString("unit", observation.Unit);
        json.Number("start", observation.Start);
        json.Number("end", observation.End);
        json.Number("final", observation.Final);
        WriteExtreme(json, "max", observation.Max);
        WriteExtreme(json, "min", observation.Min);
        json.WriteBoolean("endsRising", observation.EndsRising);
        WriteArray(json, "contributions", observation.Contributions, WriteContribution);
        if (!observation.Pulses.IsEmpty)
        {
            WriteArray(json, "pulses", observation.Pulses, WritePulse);
        }

        if (result.IsAfterAsked && observation.After is { } after)
        {
            json.WriteStartObject("contributionsAfter");
            WriteSinceEvent(json, "atMax", after.AtMax);
            WriteSinceEvent(json, "atMin", after.AtMin);
            json.WriteEndObject();
        }

        WriteBreakdowns(json, result, observation);
        WriteArray(json, "samples", observation.Samples, (to, at) => WriteSample(to, observation, at));
        json.WriteEndObject();
    }

    private static void WriteExtreme(Utf8JsonWriter json, string name, Extreme extreme)
    {
        json.WriteStartObject(name);
        json.Number("value", extreme.Value);
        json.Number("time", extreme.Time);
        json.WriteString("side", extreme.Side switch
        {
            InstantSide.Before => "before",
            InstantSide.At => "at",
            InstantSide.After => "after",
            _ => throw new System.Diagnostics.UnreachableException($"no word for {extreme.Side}"),
        });
        json.Number("bound", extreme.Bound);
        json.WriteEndObject();
    }

    private static void WriteContribution(Utf8JsonWriter json, Contribution contribution)
    {
        json.WriteStartObject();
        json.WriteString("cause", contribution.Cause);
        json.Number("atMax", contribution.AtMax);
        json.Number("atMin", contribution.AtMin);
        WriteTimed(json, "ownMax", contribution.OwnMax);
        WriteTimed(json, "ownMin", contribution.OwnMin);
        WriteTimed(json, "maxWithout", contribution.MaxWithout);
        WriteTimed(json, "minWithout", contribution.MinWithout);
        json.WriteEndObject();
    }

    private static void WritePulse(Utf8JsonWriter json, PulseShare pulse)
    {
        json.WriteStartObject();
        json.WriteString("pulse", pulse.Pulse);
        json.Number("atMax", pulse.AtMax);
        json.Number("atMin", pulse.AtMin);
        WriteTimed(json, "maxWithout", pulse.MaxWithout);
        WriteTimed(json, "minWithout", pulse.MinWithout);
        json.WriteEndObject();
    }

    private static void WriteSinceEvent(Utf8JsonWriter json, string name, SinceEvent? since)
    {
        if (since is null)
        {
            json.WriteNull(name);
            return;
        }

        json.WriteStartObject(name);
        json.WriteString("event", since.Event);
        json.Number("time", since.Time);
        WriteArray(json, "parts", since.Parts, WriteCauseValue);
        json.WriteEndObject();
    }

    private static void WriteCauseValue(Utf8JsonWriter json, CauseValue part)
    {
        json.WriteStartObject();
        json.WriteString("cause", part.Cause);
        json.Number("value", part.Value);
        json.WriteEndObject();
    }

    private static void WriteSample(Utf8JsonWriter json, ObservationResult observation, SampleAt sample)
    {
        json.WriteStartObject();
        json.Number("time", sample.Time);
        json.Number("value", sample.Value);
        json.WriteStartObject("byCause");
        for (var i = 0; i < sample.ByCause.Length; i++)
        {
            json.Number(observation.Contributions[i].Cause, sample.ByCause[i]);
        }

        json.WriteEndObject();
        json.WriteEndObject();
    }

    private static void WriteFigure(Utf8JsonWriter json, FigureResult figure)
    {
        json.WriteStartObject();
        json.WriteString("name", figure.Name);
        json.WriteString("unit", figure.Unit);
        json.Number("value", figure.Value);
        json.WriteString("definition", figure.Definition);
        json.WriteEndObject();
    }

    private static void WriteRequirement(Utf8JsonWriter json, RequirementResult requirement)
    {
        json.WriteStartObject();
        json.WriteString("statement", requirement.Statement);
        json.WriteNumber("line", requirement.Line);
        json.WriteBoolean("holds", requirement.Holds);
        WriteTimed(json, "worst", requirement.Worst);
        json.Number("margin", requirement.Margin);
        json.WriteString("unit", requirement.Unit);
        WriteOptional(json, "because", requirement.Reason);
        WriteOptional(json, "doubt", requirement.Doubt);
        json.WriteEndObject();
    }

    private static void WriteParts(Utf8JsonWriter json, TransientResult result)
    {
        json.WriteStartArray("parts");
        for (var i = 0; i < result.Parts.Length; i++)
        {
            WritePart(json, result.Parts[i], result.Circuit.Parts.ElementAtOrDefault(i));
        }

        json.WriteEndArray();
    }

    private static void WritePart(Utf8JsonWriter json, PartResult part, Part? stated)
    {
        json.WriteStartObject();
        json.WriteString("name", part.Name);
        json.WriteString("kind", part.Kind);
        (Quantity Quantity, string Unit)? value = stated switch
        {
            Resistor r => (r.Resistance, "Ω"),
            Capacitor c => (c.Capacitance, "F"),
            Inductor l => (l.Inductance, "H"),
            _ => null,
        };
        if (value is { } own)
        {
            json.Number("value", own.Quantity.Nominal);
            json.WriteString("unit", own.Unit);
        }

        WriteTimed(json, "peakVoltage", part.PeakVoltage);
        WriteTimed(json, "peakCurrent", part.PeakCurrent);
        WriteTimed(json, "peakPower", part.PeakPower);
        WriteTimed(json, "peakVoltageRate", part.PeakVoltageRate);
        WriteTimed(json, "peakCurrentRate", part.PeakCurrentRate);
        json.Number("energy", part.Energy);
        json.Number("jouleIntegral", part.JouleIntegral);
        WriteArray(json, "ratings", part.Ratings, WriteRating);
        WriteLinearUpTo(json, part.LinearUpTo);
        json.WriteEndObject();
    }

    private static void WriteRating(Utf8JsonWriter json, RatingResult rating)
    {
        json.WriteStartObject();
        json.Number("rated", rating.Rated);
        json.WriteString("unit", rating.Unit);
        json.Number("reached", rating.Reached);
        json.Number("used", rating.Used);
        json.WriteBoolean("holds", rating.Holds);
        json.WriteEndObject();
    }

    private static void WriteLinearUpTo(Utf8JsonWriter json, LinearUpToResult? linear)
    {
        if (linear is null)
        {
            json.WriteNull("linearUpTo");
            return;
        }

        json.WriteStartObject("linearUpTo");
        json.Number("declared", linear.Declared);
        json.Number("reached", linear.Reached);
        json.WriteBoolean("holds", linear.Holds);
        json.WriteString("unit", linear.Unit);
        WriteOptional(json, "direction", linear.Direction);
        json.WriteEndObject();
    }

    internal static void WriteSelfCheck(Utf8JsonWriter json, SelfCheck check)
    {
        json.WriteStartObject();
        json.WriteString("name", check.Name);
        json.Number("worst", check.Worst);
        json.Number("allowed", check.Allowed);
        json.WriteBoolean("holds", check.Holds);
        json.WriteEndObject();
    }

    internal static void WriteNotJudged(Utf8JsonWriter json, NotJudged check)
    {
        json.WriteStartObject();
        json.WriteString("name", check.Name);
        json.WriteString("reason", check.Reason);
        json.WriteEndObject();
    }

    private static void WriteWarning(Utf8JsonWriter json, Notice warning)
    {
        json.WriteStartObject();
        json.Number("line", warning.Line > 0 ? warning.Line : null);
        if (warning.Diagnostic is { } placed)
        {
            json.WriteNumber("column", placed.Source.ColumnOf(placed.Span.Start));
        }

        json.WriteString("text", warning.Text);
        WriteOptional(json, "advice", warning.Diagnostic?.Advice);
        json.WriteEndObject();
    }

    private static void WriteCaution(Utf8JsonWriter json, Caution caution)
    {
        json.WriteStartObject();
        json.WriteString("severity", caution.Severity switch
        {
            CautionSeverity.Note => "note",
            CautionSeverity.Warning => "warning",
            CautionSeverity.Danger => "danger",
            _ => throw new System.Diagnostics.UnreachableException($"no word for {caution.Severity}"),
        });
        json.WriteString("text", caution.Text);
        json.WriteString("standard", caution.Standard);
        json.WriteEndObject();
    }

    private static void WriteTimed(Utf8JsonWriter json, string name, TimedValue? timed)
    {
        if (timed is null)
        {
            json.WriteNull(name);
            return;
        }

        json.WriteStartObject(name);
        json.Number("value", timed.Value);
        json.Number("time", timed.Time);
        json.WriteEndObject();
    }
}
