using CircuitTransient.Measurements;
using CircuitTransient.Syntax;

namespace CircuitTransient.Cli;

/// <summary>What <c>solve</c> was asked for besides its files.</summary>
/// <param name="At">The instants to give exact values at.</param>
/// <param name="SampleCount">How many samples of each waveform to aim at.</param>
/// <param name="Folder">Where the folders of results go; null where no files are wanted.</param>
/// <param name="IsJson">Whether the results document takes the place of the summary.</param>
/// <param name="IsQuiet">Whether there is no summary.</param>
/// <param name="IsStrict">Whether warnings and passed linear ranges count as broken requirements.</param>
/// <param name="IsPdf">Whether the report is written as PDF too.</param>
public sealed record SolveOptions(
    InstantList At, int SampleCount, string? Folder, bool IsJson, bool IsQuiet, bool IsStrict, bool IsPdf)
{
    /// <summary>The event since which contributions are broken down a second time; null where none was
    /// asked for.</summary>
    public AfterWords? After { get; init; }

    /// <summary>What peaks are broken down by.</summary>
    public Breakdown By { get; init; }

    /// <summary>How many samples are aimed at where nothing is said.</summary>
    public const int UsualSampleCount = 2000;

    /// <summary>The command that makes the same results again beside the circuit file, wherever that
    /// is.</summary>
    public string CommandFor(string file)
    {
        string[] words =
        [
            "solve", Path.GetFileName(file),
            .. At.Instants.IsEmpty ? [] : new[] { "--at", At.Source.Content },
            .. By == Breakdown.Origin ? [] : new[] { "--by", ByWords.Of(By) },
            .. After is null ? [] : new[] { "--after", After.Text },
            .. SampleCount == UsualSampleCount ? [] : new[] { "--samples", $"{SampleCount}" },
            .. IsPdf ? new[] { "--pdf" } : [],
        ];
        return CommandText.Of(words);
    }
}
