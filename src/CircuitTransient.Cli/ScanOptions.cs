using System.Collections.Immutable;
using CircuitTransient.Syntax;

namespace CircuitTransient.Cli;

/// <summary>What <c>scan</c> was asked for besides its file.</summary>
/// <param name="Scanned">What varies, in the order said.</param>
/// <param name="Scatter">How an event scatters; null where nothing was said.</param>
/// <param name="Study">What every study is asked for.</param>
public sealed record ScanOptions(
    ImmutableArray<ScannedSyntax> Scanned, ScatterSyntax? Scatter, StudyOptions Study)
{
    /// <summary>The command that makes the same results again beside the circuit file, wherever that
    /// is.</summary>
    public string CommandFor(string file)
    {
        var said = Scanned.Select(s => s.Source).ToList();
        if (Scatter is { } scatter)
        {
            said.Add(scatter.Source);
        }

        var name = Path.GetFileName(file);
        var isPlain = name.All(c => char.IsAsciiLetterOrDigit(c) || c is '.' or '-' or '_');
        return $"circuit-transient scan {(isPlain ? name : $"\"{name}\"")}"
            + string.Concat(said.Select(s => $" {s.Name} '{s.Content}'"));
    }
}
