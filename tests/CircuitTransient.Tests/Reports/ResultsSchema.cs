using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

/// <summary>The shipped schema, read once: its reader keeps one list by name for all tests.</summary>
internal static class ResultsSchema
{
    private static readonly DocumentSchema Schema = new(JsonReport.Schema);

    /// <summary>What a document breaks, each with its place; empty where it obeys.</summary>
    public static string[] Faults(string json) => Schema.Faults(json);
}
