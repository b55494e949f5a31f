using System.Collections.Immutable;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <content>The verdict on requirements and ratings.</content>
public static partial class TerminalSummary
{
    private const int MostUnrated = 40;

    /// <summary>The verdict in one sentence.</summary>
    public static string Verdict(TransientResult result)
    {
        var failed = result.SelfChecks.Count(check => !check.Holds);
        if (failed > 0)
        {
            return failed == 1
                ? "A self-check failed: do not use these figures."
                : $"{failed} self-checks failed: do not use these figures.";
        }

        var required = result.Requirements;
        var ratings = result.Parts.SelectMany(part => part.Ratings).ToArray();
        var sentences = new[]
        {
            Tally(required.Count(r => r.Holds), required.Length, "requirement", "broken"),
            Tally(ratings.Count(r => r.Holds), ratings.Length, "rating", "exceeded"),
            Doubt(result.Parts.Count(part => part.LinearUpTo is { Holds: false })),
        };
        var said = string.Join("; ", sentences.Where(sentence => sentence.Length > 0));
        return said.Length == 0
            ? "Nothing was required or rated, so there is no verdict."
            : $"{char.ToUpperInvariant(said[0])}{said[1..]}.";
    }

    private static string Tally(int holding, int all, string noun, string otherwise) => (holding, all) switch
    {
        (_, 0) => "",
        (1, 1) => $"the {noun} holds",
        (0, 1) => $"the {noun} is {otherwise}",
        (0, 2) => $"both {noun}s are {otherwise}",
        (0, _) => $"all {all} {noun}s are {otherwise}",
        (2, 2) => $"both {noun}s hold",
        _ when holding == all => $"all {all} {noun}s hold",
        _ when holding == all - 1 => $"one of {all} {noun}s is {otherwise}",
        _ => $"{all - holding} of {all} {noun}s are {otherwise}",
    };

    private static string Doubt(int parts) => parts switch
    {
        0 => "",
        1 => "one part leaves the range its value is good for",
        _ => $"{parts} parts leave the range their values are good for",
    };

    private static void WriteVerdict(SummaryText text, TransientResult result)
    {
        text.Paragraph(Verdict(result), indent: 0);
        if (!result.Requirements.IsEmpty)
        {
            text.Blank();
            text.Table(
                [Left, Prose, Prose],
                result.Requirements.OrderBy(r => r.Holds).Select(r => RowOf(result, r)));
        }

        foreach (var part in result.Parts.Where(part => part.LinearUpTo is { Holds: false }))
        {
            var linear = part.LinearUpTo!;
            var direction = linear.Direction is { } words ? $": {words}" : "";
            text.Paragraph(
                $"{part.Name} is linear up to {Number(linear.Declared, linear.Unit)} but reaches " +
                $"{Number(linear.Reached, linear.Unit)}{direction}",
                hanging: 2);
        }
    }

    private static ImmutableArray<string> RowOf(TransientResult result, RequirementResult requirement)
    {
        var because = requirement.Reason is { } reason ? $" because \"{reason}\"" : "";
        var statement = $"{requirement.Statement}{because} (line {requirement.Line})" +
            (requirement.Doubt is { } doubt ? $"; in doubt: {doubt}" : "");
        if (!requirement.IsJudged)
        {
            return [Held(requirement), statement, "there is no such value in this study"];
        }

        var worst = Peak(requirement.Worst, requirement.Unit);
        var when = InstantWords.At(result, requirement.Worst.Time);
        var joint = when.Length == 0 ? "" : when.StartsWith("at ", StringComparison.Ordinal) ? " " : ", ";
        return [Held(requirement), statement, worst + joint + when];
    }

    private static void WriteRatings(SummaryText text, TransientResult result)
    {
        var ratings = result.Parts
            .SelectMany(part => part.Ratings.Select(rating => (part.Name, Rating: rating)))
            .OrderByDescending(pair => pair.Rating.Used ?? (pair.Rating.Holds ? -1 : double.PositiveInfinity))
            .ToArray();
        if (ratings.Length == 0)
        {
            text.Blank();
            text.Paragraph("Ratings: no rating given for any part.", indent: 0);
            return;
        }

        text.Heading("Ratings, the most used first");
        text.Table(
            [Prose, Left, Right, Left, Right, Left], ratings.Select(pair => RowOf(pair.Name, pair.Rating)));
        var unrated = result.Parts.Where(part => part.Ratings.IsEmpty).Select(part => part.Name).ToArray();
        if (unrated.Length > 0)
        {
            var rest = unrated.Length > MostUnrated ? $" and {unrated.Length - MostUnrated} more" : "";
            var names = string.Join(", ", unrated.Take(MostUnrated));
            text.Paragraph($"no rating given: {names}{rest}", hanging: 2);
        }
    }

    private static ImmutableArray<string> RowOf(string part, RatingResult rating)
    {
        var used = rating.Used is { } fraction ? Percent(fraction) : "";
        return [part, Rated(rating.Unit), Reached(rating), $"of {Number(rating.Rated, rating.Unit)}", used,
            Held(rating)];
    }
}
