using System.Collections.Immutable;
using CircuitTransient.Numerics;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Reports.Studies;

/// <summary>The summary of a scan for the terminal: where everything holds, the worst place, a short
/// table.</summary>
public static partial class ScanSummary
{
    private const int MostRows = 12;
    private const int MostFindings = 12;
    private const int MostTroubles = 3;

    private static readonly TextColumn Left = new();
    private static readonly TextColumn Right = new(IsRight: true);
    private static readonly TextColumn Prose = new(IsProse: true);

    /// <summary>The summary.</summary>
    /// <param name="result">What was found.</param>
    /// <param name="files">Where the files are; may be empty.</param>
    /// <param name="colour">Whether headings are bold.</param>
    public static string Write(ScanResult result, ImmutableArray<string> files, bool colour = false)
    {
        var text = new SummaryText(colour);
        var source = result.Circuit.Source.Name;
        text.Title(result.Circuit.Title is { } title ? $"{title} ({source})" : source);
        text.Paragraph(Verdict(result), indent: 0);
        foreach (var remark in Remarks(result))
        {
            text.Paragraph(remark, indent: 0);
        }

        if (!result.Axes.IsEmpty)
        {
            WriteJudged(text, result);
            WriteObserved(text, result);
            WriteTable(text, result);
        }

        if (result.Scatter is { } scatter)
        {
            WriteScatter(text, result, scatter);
        }

        WriteTroubles(text, result);
        text.Blank();
        text.Paragraph(Searched(result), indent: 0);
        text.End(files);
        return text.ToString();
    }

    /// <summary>The verdict in one or two sentences.</summary>
    public static string Verdict(ScanResult result)
    {
        var said = new List<string>();
        if (!result.Axes.IsEmpty)
        {
            said.Add(ScanVerdict(result));
        }

        if (result.Scatter is { } scatter)
        {
            said.Add(ScatterVerdict(scatter));
        }

        var count = result.Points.Length + (result.Scatter?.Points.Length ?? 0);
        if (result.UnsolvedCount > 0)
        {
            said.Add(result.UnsolvedCount == 1
                ? $"One of {count:N0} points has no solution."
                : $"{result.UnsolvedCount:N0} of {count:N0} points have no solution.");
        }

        return string.Join(" ", said);
    }

    /// <summary>What the verdict does not cover: windows a moved event leaves, parts past their
    /// range.</summary>
    internal static IEnumerable<string> Remarks(ScanResult result) =>
        ScanWindows.Left(result).Concat(ScanDoubt.Reasons(result).Select(reason => $"{reason}."));

    private static string ScanVerdict(ScanResult result)
    {
        var judged = result.Findings.Where(f => f.IsJudged).ToArray();
        var range = ScanWords.Range(result);
        var doubt = ScanDoubt.Of(result) is { } words ? $"; {words}." : ".";
        if (judged.Length == 0)
        {
            return $"Scanned {range}: nothing was required or rated, so there is no verdict{doubt}";
        }

        if (judged.All(f => f.HoldsThroughout))
        {
            return result.HasGaps
                ? $"Wherever there is a solution everything required and rated holds for {range}{doubt}"
                : $"Everything required and rated holds for {range}{doubt}";
        }

        if (result.Axes is not [var axis])
        {
            var holding = result.Points.Count(p => p.Found is { } found
                && judged.All(f => Holds(f.Figure, found.Values[result.Figures.IndexOf(f.Figure)])));
            return holding == result.Points.Length
                ? $"Everything required and rated holds at all {holding:N0} points of {range}, but breaks "
                    + $"between them{doubt}"
                : $"Everything required and rated holds at {holding:N0} of {result.Points.Length:N0} points "
                    + $"of {range}; the lines where it begins to break are in the map{doubt}";
        }

        var common = ScanStretches.Common(judged.Select(f => f.Holding));
        var where = result.HasGaps ? "wherever there is a solution, for" : "throughout";
        return (common.IsEmpty
            ? $"Something is broken {where} {range}"
            : $"For {ScanWords.Subject(axis)} everything required and rated "
                + ScanWords.Holding(axis, common, result.HasGaps))
            + doubt + PreferredThatHold(axis, common);
    }

    /// <summary>Which of the preferred values hold, for only those can be bought.</summary>
    private static string PreferredThatHold(ScanAxis axis, ImmutableArray<ScanStretch> common)
    {
        const int few = 6;
        if (axis.Spacing != ScanSpacing.Preferred)
        {
            return "";
        }

        var holding = axis.Values.Where(v => common.Any(s => v >= s.From && v <= s.To)).ToArray();
        var named = holding.Length is 0 or > few
            ? ""
            : $": {string.Join(", ", holding.Select(v => axis.Say(v, fewer: 1)))}";
        var count = holding.Length switch
        {
            0 => "none holds",
            1 => "one holds",
            _ => $"{holding.Length} hold",
        };
        return $" Of the {axis.Values.Length} preferred values {count}{named}.";
    }

    private static string ScatterVerdict(ScatterResult scatter)
    {
        var judged = scatter.Figures.Where(f => f.Scan.IsJudged).ToArray();
        var range = Words(scatter);
        if (judged.Length == 0)
        {
            return $"With {range} nothing was required or rated, so there is no verdict.";
        }

        var common = ScanStretches.Common(judged.Select(f => f.Scan.Holding));
        var fraction = common.Sum(s => s.To - s.From) / (scatter.Axis.To - scatter.Axis.From);
        var hasGaps = scatter.UnsolvedCount > 0;
        var doubt = ScanDoubt.Of(scatter) is { } words ? $"; {words}." : ".";
        return judged.All(f => f.Scan.HoldsThroughout)
            ? $"With {range} everything required and rated holds"
                + (hasGaps ? " wherever there is a solution" : "") + doubt
            : $"With {range} everything required and rated holds in {ReportWords.Percent(fraction)} of cases"
                + (hasGaps ? ", those without a solution counted as not holding" : "") + doubt;
    }

    private static string Words(ScatterResult scatter)
    {
        var axis = scatter.Axis;
        var from = axis.Say(axis.From)
            + (scatter.Scatter.IsCutBelow ? " (cut there: nothing is earlier)" : "");
        var to = axis.Say(axis.To) + (scatter.Scatter.IsCutAbove ? " (cut there: the study ends)" : "");
        return $"{ScanWords.Subject(axis)} anywhere from {from} to {to}";
    }

    private static bool Holds(StudyFigure figure, double? value) =>
        figure.Kind == StudyFigureKind.RatingUsed ? value <= 1 : value >= 0;

    /// <summary>What was solved, what was searched and what was not.</summary>
    internal static string Searched(ScanResult result)
    {
        var scans = result.Findings.Concat(result.Scatter?.Figures.Select(f => f.Scan) ?? []).ToArray();
        var kinds = scans.SelectMany(s => new[] { s.Greatest?.How, s.Least?.How }).ToArray();
        var breaks = scans.SelectMany(s => s.Breaks).ToArray();
        var isCompared = kinds.Contains(RangeExtremeKind.Compared) || breaks.Any(b => !b.IsBySlope);
        var isBySlope = result.HasSlopes || breaks.Any(b => b.IsBySlope);
        var how = (isBySlope, isCompared) switch
        {
            (true, false) => "root-finding on exact slopes",
            (true, true) => "root-finding on exact slopes, and where there is none by comparing exact values",
            _ => "comparing exact values",
        };
        return "Every figure is an exact solution of its own. Between the points extremes and breaks were "
            + $"searched by {how}. {Unseen(result, isBySlope)}{LeftOver(scans)}";
    }

    /// <summary>What may still be missed.</summary>
    private static string Unseen(ScanResult result, bool isBySlope)
    {
        if (result.Axes.Length > 1)
        {
            return result.Middles.IsEmpty
                ? "A break that lies wholly between the points, without standing out at one, is not seen."
                : "A break that lies wholly within a field of the map, without standing out at its corners "
                    + "or its middle, is not seen.";
        }

        return isBySlope
            ? "Where the slopes of two neighbouring points lead towards a limit, or a bend twice as sharp as "
                + "any beside would reach it, that was followed to its end: a break between them that bends "
                + "more sharply, there and back, is not seen."
            : "Dips that show in the values were followed to their ends: a break that lies wholly between "
                + "two neighbouring points, without showing at either, is not seen.";
    }

    private static string LeftOver(FigureScan[] scans) => scans.Sum(s => s.LeftOver) switch
    {
        0 => "",
        1 => " One stretch that might hide one was not searched to its end.",
        var count => $" {count} stretches that might hide one were not searched to their ends.",
    };
}
