using System.Collections.Immutable;
using System.Text.RegularExpressions;

namespace CircuitTransient.Studies.Comparing;

/// <summary>Notes of two documents, paired though their figures differ.</summary>
internal static class ChangedWords
{
    // A number that is no part of a name, with its unit: `900.0 µC`, `1.200 mC`.
    private static readonly Regex Figure = new(
        @"(?<before>^|[^\w.])[-+−]?\d+(\.\d+)?([eE][-+]?\d+)?( [pnµmkMGT]?[A-ZΩs])?",
        RegexOptions.NonBacktracking | RegexOptions.ExplicitCapture | RegexOptions.CultureInvariant);

    /// <summary>Which notes are gone, new, or the same with other figures.</summary>
    public static NameChange Of(
        string kind, ImmutableArray<string> before, ImmutableArray<string> after)
    {
        var pairs = NamedPairs<string>.Of(before, after, words => words).ThenBy(WithoutFigures);
        return pairs.Left(kind, words => words) with
        {
            Changed =
            [
                .. pairs.Pairs.Where(pair => pair.Before != pair.After)
                    .Select(pair => new WordsChange(pair.Before, pair.After)),
            ],
        };
    }

    private static string WithoutFigures(string words) => Figure.Replace(words, "${before}#");
}
