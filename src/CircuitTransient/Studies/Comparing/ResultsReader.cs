using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Reads results documents back; trusts nothing in them.</summary>
public static class ResultsReader
{
    /// <summary>The largest file read, in bytes (256 MiB).</summary>
    public const int LargestFile = 256 * 1024 * 1024;

    private const string FormatName = "circuit-transient results ";

    private static readonly (string Name, string Unit)[] Peaks =
    [
        ("peakVoltage", "V"), ("peakCurrent", "A"), ("peakPower", "W"), ("peakVoltageRate", "V/s"),
        ("peakCurrentRate", "A/s"),
    ];

    /// <summary>Reads a file's text; errors stand at the place they speak of.</summary>
    public static Outcome<ResultsFile> Read(SourceText source)
    {
        var start = source.Content.AsSpan().TrimStart();
        if (start.IsEmpty || start[0] is not ('{' or '['))
        {
            return Refuse(source, start.IsEmpty ? "the file is empty" : "this is not a results document",
                "compare takes what `solve` writes: solve the circuit first, then give its results.json");
        }

        var json = JsonText.Read(source);
        if (!json.Succeeded)
        {
            return new(null, json.Diagnostics);
        }

        using var text = json.Value;
        var faults = new List<(string Path, string Message)>();
        var root = new JsonField(text.Document.RootElement, faults);
        ImmutableArray<ResultsDocument> documents =
            root.IsArray ? [.. root.Items().Select(Document)] : [Document(root)];
        if (documents.IsEmpty)
        {
            root.Fault("the array holds no results document");
        }

        return faults.Count > 0 ? new(null, text.Errors(faults)) : new(new ResultsFile(documents), []);
    }

    private static Outcome<ResultsFile> Refuse(SourceText source, string message, string advice) =>
        new(null, [Diagnostic.Error(source, new TextSpan(0, 0), message, advice)]);

    private static ResultsDocument Document(JsonField json)
    {
        // Of another format nothing else is worth a message.
        return HasFormat(json) ? Known(json) : new(
            new(null, "", "", 0, 0, 0), new(0, ""), [], [], [], [], [], [], [], [], [], []);
    }

    private static bool HasFormat(JsonField json)
    {
        if (json.Member("format") is not { } field)
        {
            json.Fault("this is not a results document: it names no `format`");
            return false;
        }

        var format = field.Text();
        if (format.StartsWith(FormatName, StringComparison.Ordinal) && format != ResultsDocument.Format)
        {
            field.Fault($"this version reads `{ResultsDocument.Format}`, no other number");
        }
        else if (format != ResultsDocument.Format)
        {
            field.Fault($"this is not a results document: its format is not `{ResultsDocument.Format}`");
        }

        return format == ResultsDocument.Format;
    }

    private static ResultsDocument Known(JsonField json)
    {
        var (circuit, study) = (json["circuit"], json["study"]);
        return new ResultsDocument(
            new DocumentCircuit(
                circuit["title"].TextOrNull(), circuit["file"].Text(), circuit["sha256"].Text(),
                circuit["parts"].Count(), circuit["nodes"].Count(), circuit["storedQuantities"].Count()),
            new DocumentStudy(study["until"].Number(), study["start"].Text()),
            [.. json["causes"].Items().Select(cause => cause["name"].Text())],
            json.Member("events") is { } events ? [.. events.Items().Select(Event)] : [],
            [.. json["observations"].Items().Select(Observation)],
            [.. json["figures"].Items().Select(f =>
                new DocumentFigure(f["name"].Text(), f["unit"].Text(), f["value"].NumberOrNull()))],
            [.. json["requirements"].Items().Select(Requirement)],
            [.. json["parts"].Items().Select(Part)],
            [.. json["selfChecks"].Items().Select(c =>
                new DocumentCheck(c["name"].Text(), c["holds"].Truth()))],
            [.. json["notJudged"].Items().Select(n => n["name"].Text())],
            [.. json["warnings"].Items().Select(w => w["text"].Text())],
            [.. json["cautions"].Items().Select(c => $"{c["severity"].Text()}: {c["text"].Text()}")]);
    }

    private static DocumentEvent Event(JsonField json) =>
        new($"{json["switch"].Text()} {json["action"].Text()}", json["time"].Number());

    private static DocumentPeak Peak(JsonField json) =>
        new(json["value"].NumberOrNull(), json["time"].Number());

    private static DocumentObservation Observation(JsonField json) => new(
        json["name"].Text(),
        json["unit"].Text(),
        json["final"].NumberOrNull(),
        Peak(json["max"]),
        Peak(json["min"]),
        [.. json["contributions"].Items().Select(c => new DocumentContribution(
            c["cause"].Text(), c["atMax"].NumberOrNull(), c["atMin"].NumberOrNull()))]);

    private static DocumentRequirement Requirement(JsonField json) => new(
        json["statement"].Text(),
        json.Member("quantity")?.Text() ?? json["statement"].Text(),
        json.Member("unit")?.Text() ?? "",
        json["holds"].Truth(),
        Peak(json["worst"]),
        json["margin"].NumberOrNull());

    private static DocumentPart Part(JsonField json)
    {
        var stresses = Peaks.Select(peak => new DocumentStress(
            peak.Name, peak.Unit, json[peak.Name] is { IsNothing: false } at ? Peak(at).Value : null));
        var linear = json["linearUpTo"];
        return new DocumentPart(
            json["name"].Text(),
            json["kind"].Text(),
            [
                .. stresses,
                new DocumentStress("energy", "J", json["energy"].NumberOrNull()),
                new DocumentStress("jouleIntegral", "A²s", json["jouleIntegral"].NumberOrNull()),
            ],
            [.. json["ratings"].Items().Select(Rating)],
            linear.IsNothing ? null : Limit(linear))
        {
            Value = json.Member("value")?.NumberOrNull(),
            ValueUnit = json.Member("unit")?.Text() ?? "",
        };
    }

    private static DocumentRating Rating(JsonField json) => new(
        json["rated"].Number(), json["unit"].Text(), json["reached"].NumberOrNull(),
        json["used"].NumberOrNull(), json["holds"].Truth());

    private static DocumentLimit Limit(JsonField json) => new(
        json["declared"].Number(), json.Member("unit")?.Text() ?? "", json["reached"].NumberOrNull(),
        json["holds"].Truth());
}
