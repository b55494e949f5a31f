using System.Collections.Immutable;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>A sizing for the terminal: the values proposed, what they leave to spare, and what else would
/// do.</summary>
public static class SizeSummary
{
    private const int MostRows = 12;
    private const int MostIntervals = 12;
    private const int MostWarnings = 6;

    private static readonly TextColumn Left = new();
    private static readonly TextColumn Right = new(IsRight: true);
    private static readonly TextColumn Prose = new(IsProse: true);

    /// <summary>The summary.</summary>
    /// <param name="result">What was found.</param>
    /// <param name="files">Where the files are; may be empty.</param>
    /// <param name="colour">Whether headings are bold.</param>
    public static string Write(SizeResult result, ImmutableArray<string> files, bool colour = false)
    {
        var text = new SummaryText(colour);
        var circuit = result.Problem.File;
        text.Title(circuit.Title is { } title ? $"{title} ({circuit.Source.Name})" : circuit.Source.Name);
        text.Paragraph(SizeWords.Verdict(result), indent: 0);
        foreach (var doubt in SizeWords.Doubts(result))
        {
            text.Paragraph(doubt, indent: 0);
        }

        WriteAim(text, result);
        text.Paragraph(SizeWords.AsItStands(result), indent: 0);
        WriteChosen(text, result);
        WriteConflict(text, result);
        WriteIntervals(text, result);
        WriteOthers(text, result);
        SizeTextMap.Write(text, result);
        WriteWarnings(text, result);
        text.Heading("What was looked at");
        foreach (var words in SizeWords.Searched(result))
        {
            text.Paragraph(words, hanging: 2);
        }

        text.End(files);
        return text.ToString();
    }

    private static void WriteAim(SummaryText text, SizeResult result)
    {
        if (result.Chosen is not { } chosen)
        {
            return;
        }

        var aim = SizeWords.HasOwnAim(result) ? $": {SizeWords.AimValue(result, chosen)}" : "";
        text.Paragraph(
            $"Of the values that hold, these have the {SizeWords.Aim(result)}{aim}.", indent: 0);
        if (result.Request.Series is not null && result.Exact is { } exact)
        {
            aim = SizeWords.HasOwnAim(result) ? $" ({SizeWords.AimValue(result, exact)})" : "";
            text.Paragraph(
                $"Not bound to {result.Request.Series}, it would be {SizeWords.Values(result, exact)}{aim}" +
                $"{SizeWords.Unproven(result)}.",
                indent: 0);
        }
    }

    private static void WriteChosen(SummaryText text, SizeResult result)
    {
        if (result.Chosen is not { } chosen)
        {
            return;
        }

        text.Blank();
        text.Table([Right, Prose], result.Problem.Constraints
            .Select((constraint, i) => (constraint, Share: chosen.Shares[i]))
            .OrderBy(pair => pair.Share)
            .Select(pair => ImmutableArray.Create(
                SizeWords.Margin(pair.constraint, pair.Share), pair.constraint.Name)));
    }

    private static void WriteWarnings(SummaryText text, SizeResult result)
    {
        var warnings = result.Proposed.Warnings;
        if (result.Chosen is null || warnings.IsEmpty)
        {
            return;
        }

        text.Heading("Warnings of the circuit with these values");
        foreach (var warning in warnings.Take(MostWarnings))
        {
            var place = warning.Line > 0 ? $"line {warning.Line}: " : "";
            text.Paragraph(place + warning.Text, hanging: 2);
        }

        if (warnings.Length > MostWarnings)
        {
            text.Paragraph($"and {warnings.Length - MostWarnings} more, in report.html");
        }
    }

    private static void WriteConflict(SummaryText text, SizeResult result)
    {
        if (result.Conflict is not { } conflict)
        {
            return;
        }

        text.Blank();
        foreach (var words in SizeWords.Conflict(result))
        {
            text.Paragraph(words, hanging: 2);
        }

        var constraints = result.Problem.Constraints;
        text.Heading($"The least broken: {SizeWords.Values(result, conflict.Nearest)}");
        text.Table([Right, Prose], constraints
            .Select((constraint, i) => (constraint, Share: conflict.Nearest.Shares[i]))
            .OrderBy(pair => pair.Share)
            .Select(pair => ImmutableArray.Create(
                SizeWords.Margin(pair.constraint, pair.Share), pair.constraint.Name)));
    }

    private static void WriteIntervals(SummaryText text, SizeResult result)
    {
        if (result.Intervals.IsEmpty)
        {
            return;
        }

        var part = result.Problem.Parts[0];
        text.Heading($"Every value of {part.Name} that holds{SizeWords.Unproven(result)}");
        foreach (var interval in result.Intervals.Take(MostIntervals))
        {
            text.Paragraph(
                $"{SizeWords.Value(interval.From.Values[0], part.Unit)} to " +
                $"{SizeWords.Value(interval.To.Values[0], part.Unit)}");
            text.Paragraph($"below it: {SizeWords.End(result, interval.Below)}", indent: 4, hanging: 2);
            text.Paragraph($"above it: {SizeWords.End(result, interval.Above)}", indent: 4, hanging: 2);
        }

        if (result.Intervals.Length > MostIntervals)
        {
            text.Paragraph($"and {result.Intervals.Length - MostIntervals} more, in size.json");
        }
    }

    // The best few, so that the one proposed is seen among its like.
    private static void WriteOthers(SummaryText text, SizeResult result)
    {
        if (result.Chosen is null || result.Preferred.IsEmpty)
        {
            return;
        }

        var sign = result.Problem.AimSign;
        var holding = result.Preferred.Where(point => point.Holds && (sign == 0 || point.Aim is not null))
            .OrderBy(point => sign == 0 ? -point.Worst : sign * point.Aim!.Value)
            .ThenByDescending(point => point.Worst).ToArray();
        var kind = result.Problem.Parts.Length == 1 ? "values" : "pairs of values";
        kind = $"{result.Request.Series} {kind}";
        text.Heading(
            $"{holding.Length} of {result.Preferred.Length} {kind} hold{SizeWords.OfListed(result)}; " +
            "the best of them");
        ImmutableArray<TextColumn> columns =
        [
            .. result.Problem.Parts.Select(_ => Right),
            .. SizeWords.HasOwnAim(result) ? [Right] : Array.Empty<TextColumn>(),
            Right,
            Prose,
        ];
        text.Table(columns, holding.Take(MostRows).Select(point => Row(result, point)));
    }

    private static ImmutableArray<string> Row(SizeResult result, SizePoint point)
    {
        var tightest = result.Problem.Constraints[SizeWords.Tightest(point)];
        string[] aim = SizeWords.HasOwnAim(result) ? [SizeWords.AimValue(result, point)] : [];
        return
        [
            .. result.Problem.Parts.Select((part, i) => SizeWords.Value(point.Values[i], part.Unit)),
            .. aim,
            SizeWords.Margin(tightest, point.Worst),
            tightest.Name,
        ];
    }
}
