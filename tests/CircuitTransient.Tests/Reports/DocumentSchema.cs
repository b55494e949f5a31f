using System.Text.Json;
using Json.Schema;

namespace CircuitTransient.Tests.Reports;

/// <summary>A document's shipped schema; one of a name is read once, for its reader keeps one list by name
/// for all tests.</summary>
internal sealed class DocumentSchema(string text)
{
    private readonly JsonSchema schema = JsonSchema.FromText(text);

    /// <summary>What a document breaks, each with its place; empty where it obeys.</summary>
    public string[] Faults(string json)
    {
        using var document = JsonDocument.Parse(json);
        var verdict = schema.Evaluate(
            document.RootElement, new EvaluationOptions { OutputFormat = OutputFormat.List });
        var faults = (verdict.Details ?? []).Where(detail => detail.Errors is not null)
            .Select(detail => $"{detail.InstanceLocation}: {string.Join(", ", detail.Errors!.Values)}");
        return verdict.IsValid ? [] : ["not valid", .. faults];
    }
}
