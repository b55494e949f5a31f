using System.Text.Json;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The document of a sizing, <c>size.json</c>; its shape is described by
/// <c>size.schema.json</c>.</summary>
public static class SizeJson
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = "circuit-transient size 1";

    /// <summary>The JSON Schema (draft 2020-12) of the document.</summary>
    public static string Schema => JsonWriting.Schema("size.schema.json");

    /// <summary>The document.</summary>
    public static string Write(SizeResult result) => JsonWriting.Document(json =>
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.Circuit(result.Problem.File);
        WriteAsked(json, result);
        json.WriteBoolean("found", result.IsFound);
        WritePoint(json, "asItStands", result, result.AsItStands);
        WritePoint(json, "proposed", result, result.Chosen);
        WritePoint(json, "exact", result, result.Exact);
        WriteConfirmation(json, result);
        WriteConflict(json, result);
        json.Objects("intervals", result.Intervals, interval =>
        {
            WritePoint(json, "from", result, interval.From);
            WritePoint(json, "to", result, interval.To);
            WriteName(json, "below", result, interval.Below);
            WriteName(json, "above", result, interval.Above);
        });
        json.Array("preferred", result.Preferred, point => WritePoint(json, result, point));
        json.Array("points", result.Points, point => WritePoint(json, result, point));
        json.WriteEndObject();
    });

    private static void WriteAsked(Utf8JsonWriter json, SizeResult result)
    {
        json.Objects("parts", result.Problem.Parts, part =>
        {
            json.WriteString("name", part.Name);
            json.WriteString("unit", part.Unit);
            json.Number("nominal", part.Nominal);
            json.Number("from", part.Lowest);
            json.Number("to", part.Highest);
        });
        json.WriteString("series", result.Request.Series?.ToString());
        json.Object("aim", () =>
        {
            json.WriteString("kind", result.Problem.AimSign switch
            {
                > 0 => "least",
                < 0 => "greatest",
                _ => "most room",
            });
            json.WriteString("of", (result.Request.Aim as Extremal)?.Of.Content.Trim());
            json.WriteString("unit", result.Problem.AimUnit);
        });
        json.Objects("constraints", result.Problem.Constraints, constraint =>
        {
            json.WriteString("name", constraint.Name);
            json.WriteString("unit", constraint.Unit);
            json.Number("scale", constraint.Scale);
        });
    }

    private static void WriteConfirmation(Utf8JsonWriter json, SizeResult result) =>
        json.Object("confirmation", () =>
        {
            json.WriteBoolean("holds", result.Chosen is not null && result.Proposed.AllHold);
            json.WriteBoolean("selfChecksHold", result.ChecksHold);
            json.WriteBoolean("withSpread", result.Request.WithSpread);
            json.Array("tolerances", result.Problem.Corners.Toleranced,
                place => json.WriteStringValue(result.Problem.NameOf(place)));
            json.WriteNumber("corners",
                result.Request.WithSpread && !result.Problem.Corners.Toleranced.IsEmpty
                    ? result.Account.Count
                    : 0);
            json.WriteBoolean("everyCorner", result.Account.IsComplete);
            json.WriteNumber("inFull", result.Confirmed.Length);
        });

    private static void WriteConflict(Utf8JsonWriter json, SizeResult result)
    {
        if (result.Conflict is not { } conflict)
        {
            json.WriteNull("conflict");
            return;
        }

        json.Object("conflict", () =>
        {
            WritePoint(json, "nearest", result, conflict.Nearest);
            json.Array("alone", conflict.Alone,
                index => json.WriteStringValue(result.Problem.Constraints[index].Name));
            json.Objects("pairs", conflict.Pairs, pair =>
            {
                WriteName(json, "first", result, pair.First);
                WriteName(json, "second", result, pair.Second);
                WritePoint(json, "nearest", result, pair.Nearest);
            });
        });
    }

    private static void WriteName(Utf8JsonWriter json, string name, SizeResult result, int? constraint) =>
        json.WriteString(name, constraint switch
        {
            null => null,
            FeasibleInterval.Unsolvable => SizeWords.NoSolution,
            { } index => result.Problem.Constraints[index].Name,
        });

    private static void WritePoint(Utf8JsonWriter json, string name, SizeResult result, SizePoint? point)
    {
        json.WritePropertyName(name);
        if (point is null)
        {
            json.WriteNullValue();
        }
        else
        {
            WritePoint(json, result, point);
        }
    }

    private static void WritePoint(Utf8JsonWriter json, SizeResult result, SizePoint point)
    {
        json.WriteStartObject();
        json.Array("values", point.Values, value => json.NumberValue(value));
        json.WriteBoolean("holds", point.Holds);
        json.Number("aim", point.Aim);
        json.Array("margins", point.Shares.Zip(result.Problem.Constraints),
            pair => json.NumberValue(pair.First * pair.Second.Scale));
        json.WriteEndObject();
    }
}
