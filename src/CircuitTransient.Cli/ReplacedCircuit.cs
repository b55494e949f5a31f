using System.Text.Json;
using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Cli;

/// <summary>Whose results stand where new ones are written: two circuit files of the same name in different
/// folders share one folder of results.</summary>
internal static class ReplacedCircuit
{
    /// <summary>The title of the circuit whose document is replaced; null where there is none, or it has the
    /// title of the new one.</summary>
    /// <param name="folder">The folder of results.</param>
    /// <param name="files">What is written there.</param>
    public static string? In(string folder, IEnumerable<OutputFile> files)
    {
        if (files.FirstOrDefault(f => f.Name.EndsWith(".json", StringComparison.Ordinal)) is not { } document)
        {
            return null;
        }

        var path = Path.Combine(folder, document.Name);
        try
        {
            return File.Exists(path)
                && TitleIn(BoundedFile.Read(path, ResultsReader.LargestFile)) is { } before
                && before != TitleIn(document.Content)
                ? before
                : null;
        }
        catch (Exception trouble) when (trouble.IsFileTrouble() || trouble is JsonException)
        {
            return null; // not a document of this program: there is no circuit to name
        }
    }

    private static string? TitleIn(ReadOnlyMemory<byte> json)
    {
        using var document = JsonDocument.Parse(json);
        return document.RootElement.ValueKind == JsonValueKind.Object
            && document.RootElement.TryGetProperty("circuit", out var circuit)
            && circuit.ValueKind == JsonValueKind.Object
            && circuit.TryGetProperty("title", out var title) && title.ValueKind == JsonValueKind.String
            ? title.GetString()
            : null;
    }
}
