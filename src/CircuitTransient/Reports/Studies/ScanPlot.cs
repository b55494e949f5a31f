using System.Collections.Immutable;
using CircuitTransient.Numerics;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Reports.Studies;

/// <summary>The picture of a scan: the family of waveforms, each figure against the scanned value, or maps
/// over two.</summary>
public static class ScanPlot
{
    private const int MostCurves = 8;
    private const int MostMaps = 3;
    private const int MostDistributions = 2;
    private const double VerdictSize = 12.5;

    /// <summary>The picture as SVG.</summary>
    public static string Svg(ScanResult result) => PlotPage.Svg(fonts => Draw(result, fonts));

    /// <summary>The picture as PNG, two pixels a point.</summary>
    public static byte[] Png(ScanResult result) => PlotPage.Png(fonts => Draw(result, fonts));

    /// <summary>The picture before it is rendered.</summary>
    public static Drawing Draw(ScanResult result, PlotFonts fonts)
    {
        var shapes = ImmutableArray.CreateBuilder<Shape>();
        var title = result.Circuit.Title ?? result.Circuit.Source.Name;
        shapes.Add(PlotPage.Title(title, fonts));
        var y = 55.0;
        foreach (var row in Rows(ScanSummary.Verdict(result), fonts))
        {
            shapes.Add(PlotPage.Remark(row, y, fonts, VerdictSize));
            y += 17;
        }

        y += 4;
        foreach (var panel in Panels(result, fonts))
        {
            var (drawn, height) = panel(y);
            shapes.AddRange(drawn);
            y += height;
        }

        shapes.Add(PlotPage.Foot(result.Circuit, y + 10, fonts));
        return new Drawing(PlotPanel.Width, y + 26, $"Scan of {title}", shapes.ToImmutable());
    }

    private static List<string> Rows(string text, PlotFonts fonts)
    {
        List<string> rows = [""];
        foreach (var word in text.Split(' '))
        {
            var longer = rows[^1].Length == 0 ? word : $"{rows[^1]} {word}";
            if (rows[^1].Length == 0 || fonts.Width(longer, VerdictSize) <= PlotPage.Width)
            {
                rows[^1] = longer;
            }
            else
            {
                rows.Add(word);
            }
        }

        return rows;
    }

    private static IEnumerable<Func<double, (IEnumerable<Shape> Shapes, double Height)>> Panels(
        ScanResult result, PlotFonts fonts)
    {
        if (result.Family is { } family)
        {
            yield return top => ScanFamilyPanel.Draw(result, family, fonts, top);
        }

        var wanted = Wanted(result.Findings);
        switch (result.Axes)
        {
            case [var axis]:
                foreach (var (finding, index) in wanted.Take(MostCurves))
                {
                    yield return top =>
                        ScanCurvePanel.Draw(result, axis, result.Points, finding, index, fonts, top);
                }

                break;
            case [_, _]:
                foreach (var (finding, index) in wanted.Take(MostMaps))
                {
                    yield return top => ScanMapPanel.Draw(result, finding, index, fonts, top);
                }

                break;
        }

        if (result.Scatter is { } scatter)
        {
            foreach (var figure in scatter.Figures
                .Where(f => f.Quantiles.Length > 0 && f.Scan.Greatest?.How != RangeExtremeKind.Flat)
                .OrderBy(f => f.Scan.Room ?? double.PositiveInfinity).Take(MostDistributions))
            {
                yield return top => ScatterPanel.Draw(result, scatter, figure, fonts, top);
            }

            foreach (var (finding, index) in
                Wanted([.. scatter.Figures.Select(f => f.Scan)]).Take(MostCurves / 2))
            {
                yield return top =>
                    ScanCurvePanel.Draw(result, scatter.Axis, scatter.Points, finding, index, fonts, top);
            }
        }
    }

    /// <summary>What is judged, the tightest first, then what was asked to be observed; what does not change
    /// makes no picture.</summary>
    private static IEnumerable<(FigureScan Finding, int Index)> Wanted(
        ImmutableArray<FigureScan> findings) => findings
        .Select((finding, index) => (Finding: finding, Index: index))
        .Where(f => f.Finding.Greatest is { How: not RangeExtremeKind.Flat })
        .OrderBy(f => f.Finding.Room ?? double.PositiveInfinity);
}
