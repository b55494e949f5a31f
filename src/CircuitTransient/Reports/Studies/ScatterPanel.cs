using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>The distribution of a figure while an event's instant scatters: in how many cases it does not
/// exceed a value, with the limit.</summary>
internal static class ScatterPanel
{
    private const double Height = 190;

    /// <summary>The shapes below an upper edge, and their height.</summary>
    public static (IEnumerable<Shape> Shapes, double Height) Draw(
        ScanResult result, ScatterResult scatter, FigureScatter figure, PlotFonts fonts, double top)
    {
        var of = figure.Scan.Figure;
        var line = ScanWords.Reached(result.Circuit, of);
        var isUsed = of.Kind == StudyFigureKind.RatingUsed;
        var unit = isUsed ? "%" : line?.Unit ?? of.Unit;
        var points = figure.Quantiles
            .Select(q => line is null
                ? (Value: isUsed ? 100 * q.Value : q.Value, Share: 100 * q.Fraction)
                : (Value: line.Of(q.Value), Share: 100 * (line.Sign < 0 ? 1 - q.Fraction : q.Fraction)))
            .OrderBy(p => p.Share).ThenBy(p => p.Value).ToArray();
        var limit = isUsed ? 100 : line?.Limit ?? (figure.Scan.IsJudged ? 0 : null);
        var (least, greatest) = Range(points[0].Value, points[^1].Value, limit);
        var across = new PlotScale(least, greatest, ScanFrame.Left, ScanFrame.Right);
        var ticks = across.Ticks(unit, 9);
        var frame = new ScanFrame(
            fonts, top + 26, Height, [.. ticks.Marks.Select(m => (across.Place(m.Value), m.Label))],
            $"{ticks.Unit}, not exceeded", new PlotScale(0, 100, top + 26 + Height, top + 26), "%");
        var title = $"{ScanWords.Title(result.Circuit, of)}: in how many cases it stays below, with "
            + $"{ScanWords.Subject(scatter.Axis)} from {scatter.Axis.Say(scatter.Axis.From)} to "
            + scatter.Axis.Say(scatter.Axis.To);
        Shape[] shapes =
            [
                .. frame.Shapes(title),
                .. limit is { } l ? Limit(frame, across, l, unit) : [],
                .. PlotTrace.Lines(
                        [.. points.Select(p => new PlotPoint(p.Value, p.Share))], across, frame.Level)
                    .Select(curve => new PolylineShape(curve, new Stroke(PlotStyle.Accent, 2))),
                .. Marks(frame, across, points, unit),
            ];
        return (shapes.OrderBy(s => s is TextShape), Height + 26 + 40);
    }

    private static (double Least, double Greatest) Range(double least, double greatest, double? limit)
    {
        var span = greatest > least ? greatest - least : Math.Max(Math.Abs(greatest), 1);
        if (limit is { } l && l > least - span && l < greatest + span)
        {
            (least, greatest) = (Math.Min(least, l), Math.Max(greatest, l));
        }

        return (least - (0.05 * span), greatest + (0.05 * span));
    }

    private static IEnumerable<Shape> Limit(ScanFrame frame, PlotScale across, double limit, string unit)
    {
        var x = across.Place(limit);
        if (x < ScanFrame.Left || x > ScanFrame.Right)
        {
            yield break;
        }

        yield return new LineShape(x, frame.Top, x, frame.Bottom, new Stroke(PlotStyle.Limit, 1.2, [8, 4]));
        yield return new TextShape(
            x + 5, frame.Bottom - 6, $"limit {EngineeringNumber.Format(limit, unit)}", ScanFrame.Small,
            PlotStyle.Limit, HasHalo: true);
    }

    private static IEnumerable<Shape> Marks(
        ScanFrame frame, PlotScale across, (double Value, double Share)[] points, string unit)
    {
        foreach (var share in (double[])[50, 95])
        {
            var (value, at) = points.MinBy(p => Math.Abs(p.Share - share));
            var (x, y) = (across.Place(value), frame.Level.Place(at));
            var isLeft = x > (ScanFrame.Left + ScanFrame.Right) / 2;
            var cases = ReportWords.Percent(at / 100);
            var words = $"{EngineeringNumber.Format(value, unit)} in {cases} of cases";
            yield return new DiscShape(x, y, 3.5, PlotStyle.Ink);
            yield return new TextShape(
                isLeft ? x - 8 : x + 8, y + 4, words, ScanFrame.Small, PlotStyle.Ink,
                isLeft ? TextAnchor.End : TextAnchor.Start, HasHalo: true);
        }
    }
}
