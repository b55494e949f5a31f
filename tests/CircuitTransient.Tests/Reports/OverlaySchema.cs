using System.Text.Json;
using CircuitTransient.Reports.Studies;
using Json.Schema;

namespace CircuitTransient.Tests.Reports;

/// <summary>The shipped schema of an overlay, read once: its reader keeps one list by name for all
/// tests.</summary>
internal static class OverlaySchema
{
    private static readonly JsonSchema Schema = JsonSchema.FromText(OverlayJson.Schema);

    /// <summary>What a document breaks, each with its place; empty where it obeys.</summary>
    public static string[] Faults(string json)
    {
        using var document = JsonDocument.Parse(json);
        var options = new EvaluationOptions { OutputFormat = OutputFormat.List };
        var verdict = Schema.Evaluate(document.RootElement, options);
        string[] faults =
        [
            .. (verdict.Details ?? [])
                .Where(detail => detail.Errors is not null)
                .Select(detail => $"{detail.InstanceLocation}: {string.Join(", ", detail.Errors!.Values)}"),
        ];
        return verdict.IsValid ? [] : ["not valid", .. faults];
    }
}
