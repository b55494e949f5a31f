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
    public static string Write(ImmutableArray<Comparison> comparisons) => comparisons is [var single]
        ? JsonWriting.Document(single, WriteDocument)
        : JsonWriting.Documents(comparisons, WriteDocument);

    private static void WriteDocument(Utf8JsonWriter json, Comparison comparison)
    {
        json.WriteString("format", Format);
        json.Number("within", comparison.Within);
        json.Object("before", comparison.Before, WriteCircuit);
        json.Object("after", comparison.After, WriteCircuit);
        json.Object("verdict", comparison, WriteVerdict);
        json.Objects("inputs", comparison.Inputs, WriteInput);
        json.Objects("values", comparison.Values, WriteValue);
        json.Objects(
            "names", comparison.Missing.Prepend(comparison.Causes).Concat(comparison.Notes), WriteNames);
        json.Objects("renamed", comparison.Renamed, WriteRenaming);
        json.Objects("events", comparison.Events, WriteEvent);
        json.Objects("requirements", comparison.Requirements, WriteRequirement);
        json.Objects("ratings", comparison.Ratings, WriteRating);
        json.Objects("selfChecks", comparison.Checks, WriteCheck);
        json.Objects("observations", comparison.Observations, WriteObservation);
        json.Objects("figures", comparison.Figures, WriteFigure);
        json.Objects("stresses", comparison.Stresses, WriteStress);
    }

    private static void WriteVerdict(Utf8JsonWriter json, Comparison comparison)
    {
        json.WriteNumber("worse", comparison.Turned(VerdictTurn.Worse));
        json.WriteNumber("better", comparison.Turned(VerdictTurn.Better));
        json.WriteNumber("gone", comparison.RequirementsGone + comparison.RatingsGone);
        json.WriteBoolean("differentCircuits", comparison.IsOfDifferentCircuits);
        json.WriteBoolean("same", comparison.IsSame);
    }

    private static void WriteCircuit(Utf8JsonWriter json, ResultsDocument document)
    {
        json.WriteString("title", document.Circuit.Title);
        json.WriteString("file", document.Circuit.File);
        json.WriteString("sha256", document.Circuit.Sha256);
        json.WriteBoolean("holds", document.AllHold);
    }

    private static void WriteInput(Utf8JsonWriter json, InputChange input)
    {
        json.WriteString("what", input.What);
        json.WriteString("before", input.Before);
        json.WriteString("after", input.After);
    }

    private static void WriteValue(Utf8JsonWriter json, StressChange change)
    {
        json.WriteString("part", change.Part);
        json.WriteString("unit", change.Unit);
        WriteChange(json, change.Value);
    }

    private static void WriteNames(Utf8JsonWriter json, NameChange change)
    {
        json.WriteString("kind", change.Kind);
        json.Texts("gone", change.Gone);
        json.Texts("new", change.New);
        json.Objects("changed", change.Changed, (to, words) =>
        {
            to.WriteString("before", words.Before);
            to.WriteString("after", words.After);
        });
    }

    private static void WriteRenaming(Utf8JsonWriter json, Renaming renaming)
    {
        json.WriteString("kind", renaming.Kind);
        json.WriteString("before", renaming.Before);
        json.WriteString("after", renaming.After);
    }

    private static void WriteEvent(Utf8JsonWriter json, EventChange change)
    {
        json.WriteString("name", change.Name);
        json.Number("before", change.Before);
        json.Number("after", change.After);
    }

    private static void WriteRequirement(Utf8JsonWriter json, RequirementChange change)
    {
        json.WriteString("turn", Word(change.Turn));
        json.WriteBoolean("differs", change.Differs);
        json.Object("before", change.Before, WriteJudged);
        json.Object("after", change.After, WriteJudged);
    }

    private static void WriteJudged(Utf8JsonWriter json, DocumentRequirement requirement)
    {
        json.WriteString("statement", requirement.Statement);
        json.WriteString("unit", requirement.Unit);
        json.WriteBoolean("holds", requirement.Holds);
        json.Number("worst", requirement.Worst.Value);
        json.Number("time", requirement.Worst.Time);
        json.Number("margin", requirement.Margin);
    }

    private static void WriteRating(Utf8JsonWriter json, RatingChange change)
    {
        json.WriteString("part", change.Part);
        json.WriteString("unit", change.Unit);
        json.WriteString("turn", Word(change.Turn));
        json.WriteBoolean("differs", change.Differs);
        json.Object("before", change.Before, WriteRated);
        json.Object("after", change.After, WriteRated);
    }

    private static void WriteRated(Utf8JsonWriter json, DocumentRating rating)
    {
        json.Number("rated", rating.Rated);
        json.Number("reached", rating.Reached);
        json.Number("used", rating.Used);
        json.WriteBoolean("holds", rating.Holds);
    }

    private static void WriteCheck(Utf8JsonWriter json, CheckChange change)
    {
        json.WriteString("name", change.Name);
        WriteTruth(json, "before", change.Before);
        WriteTruth(json, "after", change.After);
        json.WriteString("turn", Word(change.Turn));
    }

    private static void WriteObservation(Utf8JsonWriter json, ObservationChange change)
    {
        json.WriteString("name", change.Name);
        json.WriteString("unit", change.Unit);
        json.WriteBoolean("differs", change.Differs);
        json.Object("max", change.Max, WriteChange);
        json.Object("maxTime", change.MaxTime, WriteChange);
        json.Object("min", change.Min, WriteChange);
        json.Object("minTime", change.MinTime, WriteChange);
        json.Object("final", change.Final, WriteChange);
        json.Objects("atMax", change.AtMax, WriteShare);
        json.Objects("atMin", change.AtMin, WriteShare);
    }

    private static void WriteFigure(Utf8JsonWriter json, FigureChange change)
    {
        json.WriteString("name", change.Name);
        json.WriteString("unit", change.Unit);
        WriteChange(json, change.Value);
    }

    private static void WriteStress(Utf8JsonWriter json, StressChange change)
    {
        json.WriteString("part", change.Part);
        json.WriteString("stress", change.Stress);
        json.WriteString("unit", change.Unit);
        WriteChange(json, change.Value);
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
