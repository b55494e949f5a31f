using System.Collections.Immutable;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <content>The tables.</content>
public static partial class ScanSummary
{
    private static void WriteJudged(SummaryText text, ScanResult result)
    {
        var judged = result.Findings.Where(f => f.IsJudged).OrderBy(f => f.Room).ToArray();
        if (judged.Length == 0)
        {
            return;
        }

        text.Heading("What is required and rated, the tightest first, each at its worst");
        text.Table(
            [Prose, Prose, Prose],
            judged.Take(MostFindings).Select(f => ImmutableArray.Create(
                Held(result, f), ScanWords.Statement(result.Circuit, f.Figure), Worst(result, f))));
        if (judged.Length > MostFindings)
        {
            text.Paragraph($"and {judged.Length - MostFindings} more, in scan.json");
        }
    }

    /// <summary>Over which stretches something judged holds.</summary>
    internal static string Held(ScanResult result, FigureScan finding) => (result.Axes, result.HasGaps) switch
    {
        (_, true) when finding.HoldsThroughout => "holds wherever there is a solution",
        ([var axis], var hasGaps) => ScanWords.Holding(axis, finding.Holding, hasGaps),
        _ => finding.HoldsThroughout ? "holds throughout" : "breaks",
    };

    /// <summary>Something judged at its worst.</summary>
    internal static string Worst(ScanResult result, FigureScan finding)
    {
        if (finding.Worst is not { } worst)
        {
            return "no value to judge";
        }

        var reached = ScanWords.Reached(result.Circuit, finding.Figure) is { } line
            ? $"{EngineeringNumber.Format(line.Of(worst.Value), line.Unit)}, "
            : "";
        var said = $"{reached}{ScanWords.Verdict(finding.Figure, worst.Value)}";
        var doubt = worst.IsInDoubt ? "; in doubt" : "";
        return worst.How == Numerics.RangeExtremeKind.Flat
            ? $"{said} throughout{doubt}"
            : $"{said} at {ScanWords.Place(result.Axes, worst.At)} ({ScanWords.How(worst.How)}){doubt}";
    }

    private static void WriteObserved(SummaryText text, ScanResult result)
    {
        var observed = result.Findings.Where(f => !f.IsJudged).ToArray();
        if (observed.Length == 0)
        {
            return;
        }

        text.Heading("What is observed: the least and the greatest on and between the points");
        text.Table(
            [Prose, Right, Prose, Right, Prose],
            observed.Take(MostFindings).Select(f => Row(result, f))
                .Prepend(["", "least", "", "greatest", ""]));
        if (observed.Length > MostFindings)
        {
            text.Paragraph($"and {observed.Length - MostFindings} more figures, in scan.json");
        }

        WriteJumps(text, result);
    }

    private static ImmutableArray<string> Row(ScanResult result, FigureScan finding)
    {
        if (finding is not { Greatest: { } greatest, Least: { } least })
        {
            return [finding.Figure.Name, "none", "", "none", ""];
        }

        return greatest.How == Numerics.RangeExtremeKind.Flat
            ? [finding.Figure.Name, Value(greatest), "throughout", "", ""]
            : [finding.Figure.Name, Value(least), Where(least), Value(greatest), Where(greatest)];

        string Value(ScanPlace place) => ScanWords.Value(finding.Figure, place.Value);

        string Where(ScanPlace place) =>
            $"at {string.Join(", ", result.Axes.Select((axis, i) => axis.Say(place.At[i])))}";
    }

    private static void WriteJumps(SummaryText text, ScanResult result)
    {
        var jumps = result.Findings.SelectMany(f => f.Jumps.Select(jump => (f.Figure, Jump: jump))).ToArray();
        foreach (var (figure, jump) in jumps.Take(MostFindings))
        {
            var (before, after) = (ScanWords.Value(figure, jump.Before), ScanWords.Value(figure, jump.After));
            text.Paragraph(
                $"{figure.Name} jumps from {before} to {after} at {ScanWords.Place(result.Axes[0], jump.At)}",
                hanging: 2);
        }

        if (jumps.Length > MostFindings)
        {
            text.Paragraph($"and {jumps.Length - MostFindings} more jumps, in scan.json");
        }
    }

    /// <summary>Some of the points with the figures that matter most.</summary>
    private static void WriteTable(SummaryText text, ScanResult result)
    {
        if (result.Axes is not [var axis])
        {
            return;
        }

        var columns = ScanColumn.Of(result).Take(3).ToArray();
        if (columns.Length == 0)
        {
            return;
        }

        var count = Math.Min(MostRows - 1, result.Points.Length);
        var shown = Enumerable.Range(0, count)
            .Select(k => result.Points[count == 1 ? 0 : k * (result.Points.Length - 1) / (count - 1)]);
        text.Heading($"Some of the {result.Points.Length:N0} points");
        text.Table(
            [Right, .. columns.Select(_ => Right)],
            shown.Select(point => ImmutableArray.Create(
                [axis.Say(point.At[0]), .. columns.Select(c => c.Say(point.Found))]))
            .Prepend(ImmutableArray.Create([ScanWords.Subject(axis), .. columns.Select(c => c.Heading)])));
    }

    private static void WriteScatter(SummaryText text, ScanResult result, ScatterResult scatter)
    {
        text.Heading($"With {Words(scatter)}, each instant as likely");
        var shown = scatter.Figures
            .Where(f => f.Quantiles.Length > 0)
            .OrderBy(f => f.Scan.Room ?? double.PositiveInfinity)
            .Take(MostFindings).ToArray();
        var names = shown.Select(f => Name(f)).ToArray();
        var rows = shown.Select((f, k) => Row(
            result, f, names.Count(n => n == names[k]) > 1
                ? ScanWords.Title(result.Circuit, f.Scan.Figure)
                : names[k]));
        text.Table(
            [Prose, Right, Right, Right, Right, Right],
            rows.Prepend(["", "least", "median", "95 %", "greatest", ""]));

        string Name(FigureScatter f) =>
            ScanWords.Reached(result.Circuit, f.Scan.Figure)?.Name ?? f.Scan.Figure.Name;
    }

    private static ImmutableArray<string> Row(ScanResult result, FigureScatter figure, string name)
    {
        var line = ScanWords.Reached(result.Circuit, figure.Scan.Figure);
        ImmutableArray<double?> values =
            [figure.Scan.Least?.Value, At(0.5), At(0.95), figure.Scan.Greatest?.Value];
        if (line is { Sign: < 0 })
        {
            values = [figure.Scan.Greatest?.Value, At(0.5), At(0.05), figure.Scan.Least?.Value];
        }

        var shown = values.Select(v => line is not null && v is { } margin && double.IsFinite(margin)
            ? EngineeringNumber.Format(line.Of(margin), line.Unit)
            : ScanWords.Value(figure.Scan.Figure, v));
        return [name, .. shown,
            figure.Holding is { } holding ? $"{ReportWords.Percent(holding)} hold" : ""];

        double? At(double fraction) => figure.Quantiles.FirstOrDefault(q => q.Fraction == fraction)?.Value;
    }

    private static void WriteTroubles(SummaryText text, ScanResult result)
    {
        if (result.UnsolvedCount == 0)
        {
            return;
        }

        var axes = result.Axes;
        var all = result.Points.Select(p => (Axes: axes, Point: p));
        if (result.Scatter is { } scatter)
        {
            all = all.Concat(scatter.Points.Select(p => (ImmutableArray.Create(scatter.Axis), p)));
        }

        var unsolved = all.Where(p => p.Point.Found is null).ToArray();
        text.Heading("Points without a solution, of which nothing is said");
        foreach (var (own, point) in unsolved.Take(MostTroubles))
        {
            text.Paragraph($"{ScanWords.Place(own, point.At)}: {point.Trouble}", hanging: 2);
        }

        if (unsolved.Length > MostTroubles)
        {
            text.Paragraph($"and {unsolved.Length - MostTroubles} more, in scan.json");
        }
    }
}

/// <summary>A column of the table of points.</summary>
/// <param name="Heading">What it shows.</param>
/// <param name="Say">Its words at a point, empty where that has no solution.</param>
internal sealed record ScanColumn(string Heading, Func<StudyPoint?, string> Say)
{
    /// <summary>The columns that matter, the tightest requirement first.</summary>
    public static IEnumerable<ScanColumn> Of(ScanResult result)
    {
        var wanted = result.Findings
            .Select((finding, index) => (Finding: finding, Index: index))
            .Where(f => f.Finding.Greatest is not { How: Numerics.RangeExtremeKind.Flat })
            .OrderBy(f => f.Finding.Room ?? double.PositiveInfinity).ToArray();
        var names = wanted.Select(f => ScanWords.Reached(result.Circuit, f.Finding.Figure)?.Name).ToList();
        return wanted.Select((f, k) => Column(
            result, f.Finding.Figure, f.Index, names.Count(n => n == names[k]) > 1));
    }

    private static ScanColumn Column(ScanResult result, StudyFigure figure, int index, bool isAmbiguous)
    {
        var line = ScanWords.Reached(result.Circuit, figure);
        var heading = line is null ? figure.Name
            : isAmbiguous ? result.Circuit.Requirements[figure.Index].Statement
            : line.Name;
        return new ScanColumn(heading, found => found is null ? "no solution"
            : line is null ? ScanWords.Value(figure, found.Values[index])
            : found.Values[index] is { } margin && double.IsFinite(margin)
                ? EngineeringNumber.Format(line.Of(margin), line.Unit)
                : "without limit");
    }
}

/// <summary>Stretches of a scanned value taken together.</summary>
internal static class ScanStretches
{
    /// <summary>Where all of several lists of stretches are open.</summary>
    public static ImmutableArray<ScanStretch> Common(IEnumerable<ImmutableArray<ScanStretch>> lists)
    {
        ImmutableArray<ScanStretch>? common = null;
        foreach (var list in lists)
        {
            common = common is { } known
                ?
                [
                    .. known.SelectMany(a => list.Select(b =>
                            new ScanStretch(Math.Max(a.From, b.From), Math.Min(a.To, b.To))))
                        .Where(s => s.From <= s.To).OrderBy(s => s.From),
                ]
                : list;
        }

        return common ?? [];
    }
}
