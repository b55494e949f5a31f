using CircuitTransient.Reports.Studies;

namespace CircuitTransient.Tests.Reports;

/// <summary>The shipped schema of an overlay, read once: its reader keeps one list by name for all
/// tests.</summary>
internal static class OverlaySchema
{
    private static readonly DocumentSchema Schema = new(OverlayJson.Schema);

    /// <summary>What a document breaks, each with its place; empty where it obeys.</summary>
    public static string[] Faults(string json) => Schema.Faults(json);
}
