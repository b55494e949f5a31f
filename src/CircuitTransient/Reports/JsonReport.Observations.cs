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
        json.WriteString("name", observation.Name);
        json.WriteString("unit", observation.Unit);
        json.Number("start", observation.Start);
        json.Number("end", observation.End);
        json.Number("final", observation.Final);
        json.Object("max", observation.Max, WriteExtreme);
        json.Object("min", observation.Min, WriteExtreme);
        json.WriteBoolean("endsRising", observation.EndsRising);
        json.Objects("contributions", observation.Contributions, WriteContribution);
        if (!observation.Pulses.IsEmpty)
        {
            json.Objects("pulses", observation.Pulses, WritePulse);
        }

        if (result.IsAfterAsked && observation.After is { } after)
        {
            json.Object("contributionsAfter", () =>
            {
                json.Object("atMax", after.AtMax, WriteSinceEvent);
                json.Object("atMin", after.AtMin, WriteSinceEvent);
            });
        }

        WriteBreakdowns(json, result, observation);
        json.Objects("samples", observation.Samples, (to, at) => WriteSample(to, observation, at));
    }

    private static void WriteExtreme(Utf8JsonWriter json, Extreme extreme)
    {
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
    }

    private static void WriteContribution(Utf8JsonWriter json, Contribution contribution)
    {
        json.WriteString("cause", contribution.Cause);
        json.Number("atMax", contribution.AtMax);
        json.Number("atMin", contribution.AtMin);
        json.Object("ownMax", contribution.OwnMax, WriteTimed);
        json.Object("ownMin", contribution.OwnMin, WriteTimed);
        json.Object("maxWithout", contribution.MaxWithout, WriteTimed);
        json.Object("minWithout", contribution.MinWithout, WriteTimed);
    }

    private static void WritePulse(Utf8JsonWriter json, PulseShare pulse)
    {
        json.WriteString("pulse", pulse.Pulse);
        json.Number("atMax", pulse.AtMax);
        json.Number("atMin", pulse.AtMin);
        json.Object("maxWithout", pulse.MaxWithout, WriteTimed);
        json.Object("minWithout", pulse.MinWithout, WriteTimed);
    }

    private static void WriteSinceEvent(Utf8JsonWriter json, SinceEvent since)
    {
        json.WriteString("event", since.Event);
        json.Number("time", since.Time);
        json.Objects("parts", since.Parts, WriteCauseValue);
    }

    private static void WriteCauseValue(Utf8JsonWriter json, CauseValue part)
    {
        json.WriteString("cause", part.Cause);
        json.Number("value", part.Value);
    }

    private static void WriteSample(Utf8JsonWriter json, ObservationResult observation, SampleAt sample)
    {
        json.Number("time", sample.Time);
        json.Number("value", sample.Value);
        json.Object("byCause", () =>
        {
            for (var i = 0; i < sample.ByCause.Length; i++)
            {
                json.Number(observation.Contributions[i].Cause, sample.ByCause[i]);
            }
        });
    }

    private static void WriteFigure(Utf8JsonWriter json, FigureResult figure)
    {
        json.WriteString("name", figure.Name);
        json.WriteString("unit", figure.Unit);
        json.Number("value", figure.Value);
        json.WriteString("definition", figure.Definition);
    }

    private static void WriteRequirement(
        Utf8JsonWriter json, TransientResult result, RequirementResult requirement)
    {
        json.WriteString("statement", requirement.Statement);
        json.Text("quantity", requirement.Quantity);
        json.WriteNumber("line", requirement.Line);
        json.WriteBoolean("holds", requirement.Holds);
        json.Object("worst", requirement.Worst, WriteTimed);
        json.Number("margin", requirement.Margin);
        json.WriteString("unit", requirement.Unit);
        json.Text("because", requirement.Reason);
        json.Text("doubt", requirement.Doubt);
        if (requirement.Within is { } within
            && JudgedExtreme.IsMax(within, requirement.Worst, 1, result.Until) is { } atMax)
        {
            json.Objects(
                "contributions",
                within.Contributions.Select(c => new CauseValue(c.Cause, atMax ? c.AtMax : c.AtMin)),
                WriteCauseValue);
            json.Object("since", atMax ? within.After?.AtMax : within.After?.AtMin, WriteSinceEvent);
            json.WriteString("inWords", PeakWords.Of(result, within, atMax));
        }
    }

    private static void WritePart(Utf8JsonWriter json, (PartResult Part, Part? Stated) pair)
    {
        var (part, stated) = pair;
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

        json.Object("peakVoltage", part.PeakVoltage, WriteTimed);
        json.Object("peakCurrent", part.PeakCurrent, WriteTimed);
        json.Object("peakPower", part.PeakPower, WriteTimed);
        json.Object("peakVoltageRate", part.PeakVoltageRate, WriteTimed);
        json.Object("peakCurrentRate", part.PeakCurrentRate, WriteTimed);
        json.Number("energy", part.Energy);
        json.Number("jouleIntegral", part.JouleIntegral);
        json.Objects("ratings", part.Ratings, WriteRating);
        json.Object("linearUpTo", part.LinearUpTo, WriteLinearUpTo);
    }

    private static void WriteRating(Utf8JsonWriter json, RatingResult rating)
    {
        json.Number("rated", rating.Rated);
        json.WriteString("unit", rating.Unit);
        json.Number("reached", rating.Reached);
        json.Number("used", rating.Used);
        json.WriteBoolean("holds", rating.Holds);
    }

    private static void WriteLinearUpTo(Utf8JsonWriter json, LinearUpToResult linear)
    {
        json.Number("declared", linear.Declared);
        json.Number("reached", linear.Reached);
        json.WriteBoolean("holds", linear.Holds);
        json.WriteString("unit", linear.Unit);
        json.Text("direction", linear.Direction);
    }

    internal static void WriteSelfCheck(Utf8JsonWriter json, SelfCheck check)
    {
        json.WriteString("name", check.Name);
        json.Number("worst", check.Worst);
        json.Number("allowed", check.Allowed);
        json.WriteBoolean("holds", check.Holds);
    }

    internal static void WriteNotJudged(Utf8JsonWriter json, NotJudged check)
    {
        json.WriteString("name", check.Name);
        json.WriteString("reason", check.Reason);
    }

    private static void WriteWarning(Utf8JsonWriter json, Notice warning)
    {
        json.Number("line", warning.Line > 0 ? warning.Line : null);
        if (warning.Diagnostic is { } placed)
        {
            json.WriteNumber("column", placed.Source.ColumnOf(placed.Span.Start));
        }

        json.WriteString("text", warning.Text);
        json.Text("advice", warning.Diagnostic?.Advice);
    }

    private static void WriteCaution(Utf8JsonWriter json, Caution caution)
    {
        json.WriteString("severity", caution.Severity switch
        {
            CautionSeverity.Note => "note",
            CautionSeverity.Warning => "warning",
            CautionSeverity.Danger => "danger",
            _ => throw new System.Diagnostics.UnreachableException($"no word for {caution.Severity}"),
        });
        json.WriteString("text", caution.Text);
        json.WriteString("standard", caution.Standard);
    }

    private static void WriteTimed(Utf8JsonWriter json, TimedValue timed)
    {
        json.Number("value", timed.Value);
        json.Number("time", timed.Time);
    }
}
