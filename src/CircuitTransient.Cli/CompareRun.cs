using System.Collections.Immutable;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Cli;

/// <summary>One call of <c>compare</c>.</summary>
/// <param name="within">The fraction that is overlooked.</param>
/// <param name="isJson">Whether the document takes the place of the summary.</param>
/// <param name="isQuiet">Whether there is no summary.</param>
/// <param name="streams">Where to write.</param>
/// <param name="cancellation">Stops the work.</param>
public sealed class CompareRun(
    double within, bool isJson, bool isQuiet, Streams streams, CancellationToken cancellation)
{
    /// <summary>Compares two files.</summary>
    /// <returns>Success where no verdict turned for the worse, nor is missing because the circuits are
    /// different ones.</returns>
    public int Run(string before, string after)
    {
        var (first, firstStatus) = DocumentFile.Read(before, streams);
        var (second, secondStatus) = DocumentFile.Read(after, streams);
        if (first is null || second is null)
        {
            return Math.Max(firstStatus, secondStatus);
        }

        cancellation.ThrowIfCancellationRequested();
        var pairs = PairsOf(first, second);
        foreach (var (file, which) in pairs.Alone)
        {
            streams.Complain($"only {(which == 0 ? before : after)} holds results of {file}");
        }

        if (pairs.Both.IsEmpty || pairs.Alone.Length > 0)
        {
            return ExitStatus.Mistake;
        }

        ImmutableArray<Comparison> comparisons =
            [.. pairs.Both.Select(pair => DocumentComparison.Compare(pair.Before, pair.After, within))];
        Say(comparisons, before, after);
        return comparisons.Any(comparison => comparison.IsWorse)
            ? ExitStatus.RequirementBroken
            : ExitStatus.Success;
    }

    private void Say(ImmutableArray<Comparison> comparisons, string before, string after)
    {
        if (isJson)
        {
            streams.Output.Write(CompareJson.Write(comparisons));
        }
        else if (!isQuiet)
        {
            streams.Output.Write(string.Join('\n', comparisons.Select(comparison =>
                CompareSummary.Write(comparison, before, after, streams.IsColoured))));
        }
    }

    /// <summary>Two single documents are a pair whatever their circuits are named; of arrays, those of one
    /// circuit file are.</summary>
    private static (ImmutableArray<(ResultsDocument Before, ResultsDocument After)> Both,
        ImmutableArray<(string File, int Which)> Alone) PairsOf(ResultsFile first, ResultsFile second)
    {
        if (first.Documents is [var single] && second.Documents is [var other])
        {
            return ([(single, other)], []);
        }

        var pairs = NamedPairs<ResultsDocument>.Of(first.Documents, second.Documents, d => d.Circuit.File);
        return (pairs.Pairs,
            [.. pairs.Gone.Select(d => (d.Circuit.File, 0)), .. pairs.New.Select(d => (d.Circuit.File, 1))]);
    }
}
