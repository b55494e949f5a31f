using CircuitTransient.Studies.Comparing;

namespace CircuitTransient.Reports.Studies;

/// <content>The verdict.</content>
public static partial class CompareSummary
{
    /// <summary>The verdict in one or two sentences.</summary>
    public static string Verdict(Comparison comparison)
    {
        var worse = comparison.Turned(VerdictTurn.Worse);
        var better = comparison.Turned(VerdictTurn.Better);
        if (comparison.IsSame)
        {
            return comparison.Inputs.IsEmpty
                ? "The two are the same."
                : "Nothing that is computed differs; only the file does.";
        }

        var turned = (worse, better) switch
        {
            (0, 0) when NoLonger(comparison) is not null => "Of what both judge, no verdict turned.",
            (0, 0) => "No verdict turned.",
            (0, _) => $"{Verdicts(better)} turned for the better, none for the worse.",
            (_, 0) => $"{Verdicts(worse)} turned for the worse.",
            _ => $"{Verdicts(worse)} turned for the worse, {better} for the better.",
        };
        var (before, after) = (Holding(comparison.Before), Holding(comparison.After));
        var first = string.Concat(((string?[])[NoLonger(comparison), Different(comparison)])
            .Where(words => words is not null).Select(words => $"{words} "));
        return before == after
            ? $"{first}{turned} In both, {after}."
            : $"{first}{turned} Before, {before}; now {after}.";
    }

    /// <summary>What was judged and is not any more: no turned verdict, but none is left.</summary>
    private static string? NoLonger(Comparison comparison)
    {
        var (requirements, ratings) = (comparison.RequirementsGone, comparison.RatingsGone);
        return (requirements, ratings) switch
        {
            (0, 0) => null,
            (1, 0) => "One requirement is no longer judged.",
            (0, 1) => "One rating is no longer judged.",
            (_, 0) => $"{requirements} requirements are no longer judged.",
            (0, _) => $"{ratings} ratings are no longer judged.",
            _ => $"{requirements + ratings} requirements and ratings are no longer judged.",
        };
    }

    private static string? Different(Comparison comparison) => comparison.IsOfDifferentCircuits
        ? $"The two documents are of different circuits, {comparison.Before.Circuit.File} and " +
            $"{comparison.After.Circuit.File}."
        : null;

    private static string Verdicts(int count) => count == 1 ? "One verdict" : $"{count} verdicts";

    private static string Holding(ResultsDocument document)
    {
        bool[] all =
        [
            .. document.Requirements.Select(r => r.Holds),
            .. document.Parts.SelectMany(p => p.Ratings).Select(r => r.Holds),
        ];
        return all.Length == 0
            ? "nothing was required or rated"
            : $"{all.Count(holds => holds)} of {all.Length} requirements and ratings hold";
    }
}
