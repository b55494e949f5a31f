using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>What <c>scan</c> was asked for besides its file.</summary>
/// <param name="Scanned">What varies, in the order said.</param>
/// <param name="Scatter">How an event scatters; null where nothing was said.</param>
/// <param name="Resumes">Whether an unfinished scan is gone on with.</param>
/// <param name="Study">What every study is asked for.</param>
public sealed record ScanOptions(
    ImmutableArray<ScannedSyntax> Scanned, ScatterSyntax? Scatter, bool Resumes, StudyOptions Study)
{
    /// <summary>What is to be scanned, in the words of the command line.</summary>
    public ImmutableArray<string> Asked =>
    [
        .. Scanned.Select(s => s.Source).Append(Scatter?.Source).OfType<SourceText>()
            .SelectMany(s => new[] { s.Name, s.Content }),
    ];

    /// <summary>The command that makes the same results again beside the circuit file, wherever that
    /// is.</summary>
    public string CommandFor(string file) =>
        CommandText.Of(["scan", Path.GetFileName(file), .. Asked]);
}
