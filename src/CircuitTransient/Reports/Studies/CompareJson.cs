using System.Collections.Immutable;
using System.Text.Json;
using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Reports.Studies;

/// <summary>The document of a comparison; its shape is described by <c>compare.schema.json</c>.</summary>
public static class CompareJson
{
    /// <summary>Name and number of the format; the number changes when a field changes or goes.</summary>
    public const string Format = "circuit-transient compare 1";

    /// <summary>The JSON Schema (draft 2020-12) of the document.</summary>
    public static string Schema => JsonWriting.Schema("compare.schema.json");

    /// <summary>One document, or an array where several pairs of results were compared.</summary>
    public static string Write(ImmutableArray<Comparison> comparisons) => JsonWriting.Document(json =>
    {
        if (comparisons is [var single])
        {
            WriteDocument(json, single);
            return;
        }

        json.WriteStartArray();
        foreach (var comparison in comparisons)
        {
            WriteDocument(json, comparison);
        }

        json.WriteEndArray();
    });

    private static void WriteDocument(Utf8JsonWriter json, Comparison comparison)
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.Number("within", comparison.Within);
        json.Object("before", () => WriteCircuit(json, comparison.Before));
        json.Object("after", () => WriteCircuit(json, comparison.After));
        json.Object("verdict", () =>
        {
            json.WriteNumber("worse", comparison.Turned(VerdictTurn.Worse));
            json.WriteNumber("better", comparison.Turned(VerdictTurn.Better));
            json.WriteNumber("gone", comparison.RequirementsGone + comparison.RatingsGone);
            json.WriteBoolean("differentCircuits", comparison.IsOfDifferentCircuits);
            json.WriteBoolean("same", comparison.IsSame);
        });
        json.Objects("inputs", comparison.Inputs, input =>
        {
            json.WriteString("what", input.What);
            json.WriteString("before", input.Before);
            json.WriteString("after", input.After);
        });
        json.Objects("values", comparison.Values, change =>
        {
            json.WriteString("part", change.Part);
            json.WriteString("unit", change.Unit);
            WriteChange(json, change.Value);
        });
        json.Objects("names", comparison.Missing.Prepend(comparison.Causes).Concat(comparison.Notes),
            change => WriteNames(json, change));
        json.Objects("renamed", comparison.Renamed, renaming =>
        {
            json.WriteString("kind", renaming.Kind);
            json.WriteString("before", renaming.Before);
            json.WriteString("after", renaming.After);
        });
        json.Objects("events", comparison.Events, change =>
        {
            json.WriteString("name", change.Name);
            json.Number("before", change.Before);
            json.Number("after", change.After);
        });
        json.Objects("requirements", comparison.Requirements, change => WriteRequirement(json, change));
        json.Objects("ratings", comparison.Ratings, change => WriteRating(json, change));
        json.Objects("selfChecks", comparison.Checks, change =>
        {
            json.WriteString("name", change.Name);
            WriteTruth(json, "before", change.Before);
            WriteTruth(json, "after", change.After);
            json.WriteString("turn", Word(change.Turn));
        });
        json.Objects("observations", comparison.Observations, change => WriteObservation(json, change));
        json.Objects("figures", comparison.Figures, change =>
        {
            json.WriteString("name", change.Name);
            json.WriteString("unit", change.Unit);
            WriteChange(json, change.Value);
        });
        json.Objects("stresses", comparison.Stresses, change =>
        {
            json.WriteString("part", change.Part);
            json.WriteString("stress", change.Stress);
            json.WriteString("unit", change.Unit);
            WriteChange(json, change.Value);
        });
        json.WriteEndObject();
    }

    private static void WriteCircuit(Utf8JsonWriter json, ResultsDocument document)
    {
        json.WriteString("title", document.Circuit.Title);
        json.WriteString("file", document.Circuit.File);
        json.WriteString("sha256", document.Circuit.Sha256);
        json.WriteBoolean("holds", document.AllHold);
    }

    private static void WriteNames(Utf8JsonWriter json, NameChange change)
    {
        json.WriteString("kind", change.Kind);
        json.Texts("gone", change.Gone);
        json.Texts("new", change.New);
        json.Objects("changed", change.Changed, words =>
        {
            json.WriteString("before", words.Before);
            json.WriteString("after", words.After);
        });
    }

    private static void WriteRequirement(Utf8JsonWriter json, RequirementChange change)
    {
        json.WriteString("turn", Word(change.Turn));
        json.WriteBoolean("differs", change.Differs);
        WriteVerdict(json, "before", change.Before);
        WriteVerdict(json, "after", change.After);
    }

    private static void WriteVerdict(Utf8JsonWriter json, string name, DocumentRequirement? requirement)
    {
        if (requirement is null)
        {
            json.WriteNull(name);
            return;
        }

        json.Object(name, () =>
        {
            json.WriteString("statement", requirement.Statement);
            json.WriteString("unit", requirement.Unit);
            json.WriteBoolean("holds", requirement.Holds);
            json.Number("worst", requirement.Worst.Value);
            json.Number("time", requirement.Worst.Time);
            json.Number("margin", requirement.Margin);
        });
    }

    private static void WriteRating(Utf8JsonWriter json, RatingChange change)
    {
        json.WriteString("part", change.Part);
        json.WriteString("unit", change.Unit);
        json.WriteString("turn", Word(change.Turn));
        json.WriteBoolean("differs", change.Differs);
        WriteRated(json, "before", change.Before);
        WriteRated(json, "after", change.After);
    }

    private static void WriteRated(Utf8JsonWriter json, string name, DocumentRating? rating)
    {
        if (rating is null)
        {
            json.WriteNull(name);
            return;
        }

        json.Object(name, () =>
        {
            json.Number("rated", rating.Rated);
            json.Number("reached", rating.Reached);
            json.Number("used", rating.Used);
            json.WriteBoolean("holds", rating.Holds);
        });
    }

    private static void WriteObservation(Utf8JsonWriter json, ObservationChange change)
    {
        json.WriteString("name", change.Name);
        json.WriteString("unit", change.Unit);
        json.WriteBoolean("differs", change.Differs);
        json.Object("max", () => WriteChange(json, change.Max));
        json.Object("maxTime", () => WriteChange(json, change.MaxTime));
        json.Object("min", () => WriteChange(json, change.Min));
        json.Object("minTime", () => WriteChange(json, change.MinTime));
        json.Object("final", () => WriteChange(json, change.Final));
        json.Objects("atMax", change.AtMax, share => WriteShare(json, share));
        json.Objects("atMin", change.AtMin, share => WriteShare(json, share));
    }

    private static void WriteShare(Utf8JsonWriter json, ContributionChange share)
    {
        json.WriteString("cause", share.Cause);
        WriteChange(json, share.Value);
    }

    private static void WriteChange(Utf8JsonWriter json, NumberChange change)
    {
        json.Number("before", change.Before);
        json.Number("after", change.After);
        json.Number("difference", change.Difference);
        json.Number("relative", change.Relative);
        json.WriteBoolean("differs", change.Differs);
    }

    private static void WriteTruth(Utf8JsonWriter json, string name, bool? truth)
    {
        if (truth is { } said)
        {
            json.WriteBoolean(name, said);
        }
        else
        {
            json.WriteNull(name);
        }
    }

    private static string Word(VerdictTurn turn) => turn switch
    {
        VerdictTurn.None => "none",
        VerdictTurn.Worse => "worse",
        VerdictTurn.Better => "better",
        _ => throw new System.Diagnostics.UnreachableException($"no word for {turn}"),
    };
}
