using System.Collections.Immutable;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>What the tolerances come to, for the terminal: verdict first, within 100 columns.</summary>
public static partial class SpreadSummary
{
    private const int MostFigures = 40;

    private static readonly TextColumn Left = new();
    private static readonly TextColumn Right = new(IsRight: true);
    private static readonly TextColumn Prose = new(IsProse: true);

    /// <summary>The summary.</summary>
    /// <param name="spread">What was found.</param>
    /// <param name="files">Where the files are; may be empty.</param>
    /// <param name="colour">Whether headings and bars carry terminal attributes.</param>
    public static string Write(SpreadResult spread, ImmutableArray<string> files, bool colour = false)
    {
        var text = new SummaryText(colour);
        var source = spread.Varied.Circuit.Source.Name;
        text.Title(spread.Varied.Circuit.Title is { } title ? $"{title} ({source})" : source);
        text.Paragraph(SpreadWords.Verdict(spread), indent: 0);
        WriteJudged(text, spread);
        foreach (var doubt in SpreadDoubts.Words(spread))
        {
            text.Paragraph(doubt, hanging: 2);
        }

        WriteWorst(text, spread);
        SpreadJumps.Write(text, spread);
        WriteExtremes(text, spread);
        WriteDraws(text, spread);
        WriteDrivers(text, spread);
        text.Blank();
        text.Paragraph(SpreadWords.Checks(spread), indent: 0, hanging: 2);
        text.End(files, spread.Draws is { } draws && draws.RowCount < draws.Draws
            ? SpreadWords.Table(spread)
            : null);
        return text.ToString();
    }

    private static void WriteJudged(SummaryText text, SpreadResult spread)
    {
        var judged = spread.Figures.Where(f => f.Holds is not null)
            .OrderBy(f => f.Holds)
            .ThenByDescending(f => f.Figure.Kind == StudyFigureKind.RatingUsed ? f.Worst?.Value : 0)
            .ToArray();
        if (judged.Length == 0)
        {
            return;
        }

        text.Blank();
        text.Table(
            [Left, Prose, Right, Right],
            judged.Take(MostFigures).Select(f => ImmutableArray.Create(
                SpreadWords.Held(spread, f),
                SpreadWords.Name(spread, f.Figure) + Because(spread, f.Figure)
                    + (SpreadDoubts.Of(spread) is { } doubt ? $"; in doubt: {doubt}" : ""),
                $"nominal {SpreadWords.Reached(spread, f.Figure, f.Nominal, f.NominalReached)}",
                f.Worst is { } worst
                    ? $"worst {SpreadWords.Reached(spread, f.Figure, worst.Value, worst.Reached)}" : "")));
    }

    private static string Because(SpreadResult spread, StudyFigure figure) =>
        figure.Kind == StudyFigureKind.Margin
            && spread.Varied.Circuit.Requirements[figure.Index] is { } requirement
            ? (requirement.Reason is { } reason ? $" because \"{reason}\"" : "")
                + $" (line {spread.Varied.Circuit.Source.LineOf(requirement.Span.Start)})"
            : "";

    private static void WriteWorst(SummaryText text, SpreadResult spread)
    {
        if (spread.Worst is { } worst)
        {
            var range = spread.Figures[worst.Figure];
            var used = SpreadWords.Used(spread, worst);
            var reached = SpreadWords.Reached(spread, range.Figure, worst.Point.Value, worst.Point.Reached);
            var when = worst.Point.Time is { } time ? $" {InstantWords.At(worst.Result, time)}" : "";
            text.Heading("The worst case");
            text.Paragraph($"{SpreadWords.Name(spread, range.Figure)}: {reached}{when}{used}", hanging: 2);
            text.Paragraph($"at {SpreadWords.Point(spread, worst.Point)}", hanging: 2);
            foreach (var words in SpreadWords.Why(spread, range, worst.Point)
                .Append(SpreadWords.Steepness(worst)).OfType<string>())
            {
                text.Paragraph(words, hanging: 2);
            }
        }

        text.Blank();
        text.Paragraph(SpreadWords.Account(spread), indent: 0, hanging: 2);
        text.Paragraph(SpreadJumps.Account(spread), indent: 0, hanging: 2);
        if (spread.Account.UnsolvablePoint is { } point)
        {
            var values = spread.Varied.Values.Select((v, i) => $"{v.Name} {Number(point[i], v.Unit)}");
            text.Paragraph($"No unique solution at {string.Join(", ", values)}.", indent: 0, hanging: 2);
        }
    }

    private static void WriteExtremes(SummaryText text, SpreadResult spread)
    {
        var observed = spread.Figures.RemoveAll(f => f.Holds is not null);
        if (observed.IsEmpty)
        {
            return;
        }

        text.Heading("Hard extremes of what is observed");
        var rows = observed.Take(MostFigures).Select(f => ImmutableArray.Create(
            f.Figure.Name,
            Value(f, f.Nominal),
            Value(f, f.Least?.Value),
            Value(f, f.Greatest?.Value),
            Between(spread, f)));
        text.Table(
            [Prose, Right, Right, Right, Left], rows.Prepend(["", "nominal", "least", "greatest", ""]));
        if (observed.Any(f => Between(spread, f).Length > 0))
        {
            text.Paragraph("inside: between the corners; the worst corner stands in spread.json", hanging: 2);
        }

        if (observed.Length > MostFigures)
        {
            text.Paragraph($"and {observed.Length - MostFigures} more, in spread.json");
        }

        var told = new HashSet<(string, bool, string, string)>();
        if (spread.Worst is { } worst)
        {
            told.UnionWith(worst.Point.Jumps.Select(j => Key(spread, spread.Figures[worst.Figure], j)));
        }

        foreach (var range in spread.Figures)
        {
            WriteJumps(text, spread, range, range.Least, "its least value", told);
            WriteJumps(text, spread, range, range.Greatest, "its greatest value", told);
        }
    }

    /// <summary>Jumps of a figure, and those of the instant at which a judged one is worst; those of the
    /// worst case have been told, and one of a required figure where the figure's own was.</summary>
    private static void WriteJumps(
        SummaryText text, SpreadResult spread, FigureRange range, ExtremePoint? point, string to,
        HashSet<(string Measured, bool IsOfValue, string Jump, string Place)> told)
    {
        if (point is null || point == spread.Worst?.Point)
        {
            return;
        }

        foreach (var jump in point.Jumps
            .Where(j => j.IsOfValue || (point == range.Worst && range.Holds is not null)))
        {
            if (told.Add(Key(spread, range, jump)))
            {
                text.Paragraph(
                    $"{SpreadWords.Name(spread, range.Figure)}: {SpreadWords.Jump(spread, range, jump, to)}",
                    hanging: 2);
            }
        }
    }

    /// <summary>By which a jump of a required figure is the same as that of the figure.</summary>
    private static (string Measured, bool IsOfValue, string Jump, string Place) Key(
        SpreadResult spread, FigureRange range, FigureJump jump)
    {
        var ends = jump.IsOfValue
            ? SpreadWords.Quantity(spread, range, jump.ValueBefore)
                + $" to {SpreadWords.Quantity(spread, range, jump.ValueAfter)}"
            : $"{Number(jump.TimeBefore, "s")} to {Number(jump.TimeAfter, "s")}";
        return (SpreadWords.Measured(spread, range), jump.IsOfValue, ends, Percent(jump.Place));
    }

    private static string Between(SpreadResult spread, FigureRange range) =>
        (SpreadWords.IsInside(spread, range, range.Least),
            SpreadWords.IsInside(spread, range, range.Greatest)) switch
        {
            (true, true) => "both inside",
            (true, _) => "least inside",
            (_, true) => "greatest inside",
            _ => "",
        };

    private static string Value(FigureRange range, double? value) =>
        value is { } number && double.IsFinite(number) ? Number(number, range.Figure.Unit) : "none";
}
