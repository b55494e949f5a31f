using System.Collections.Immutable;
using CircuitTransient.Numerics;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>A figure against the scanned value: its line through the points, the limit, the worst place,
/// where it begins to break, the value as written.</summary>
internal sealed class ScanCurvePanel
{
    private const double Height = 190;

    private readonly ScanAxis axis;
    private readonly FigureScan finding;
    private readonly ReachedLine? line;
    private readonly ScanScale scale;
    private readonly ScanFrame frame;
    private readonly ImmutableArray<PlotPoint> samples;
    private readonly ImmutableArray<double> solvedAt;
    private readonly string name;
    private readonly string unit;
    private readonly string limitWords = "";
    private readonly double? limit;

    private ScanCurvePanel(
        ScanResult result, ScanAxis axis, ImmutableArray<ScanPoint> points, FigureScan finding, int index,
        PlotFonts fonts, double top)
    {
        (this.axis, this.finding) = (axis, finding);
        line = ScanWords.Reached(result.Circuit, finding.Figure);
        scale = new ScanScale(axis, ScanFrame.Left, ScanFrame.Right);
        (name, unit) = (ScanWords.Title(result.Circuit, finding.Figure), line?.Unit ?? finding.Figure.Unit);
        if (finding.Figure.Kind == StudyFigureKind.RatingUsed)
        {
            (unit, limit, limitWords) = ("%", 100, "100 % of the rating");
        }
        else if (line is not null)
        {
            limit = line.Limit;
            limitWords = $"{line.Bound} {EngineeringNumber.Format(line.Limit, line.Unit)}";
        }
        else if (finding.IsJudged)
        {
            (limit, limitWords) = (0, "no margin left");
        }

        solvedAt = [.. points.Where(p => p.Found is not null).Select(p => p.At[0])];
        samples = Samples(points, index);
        var shown = samples.Select(s => s.Y).ToArray();
        var (least, greatest) = ScanFrame.Range(shown);
        var reach = 1.5 * (greatest - least);
        if (limit is { } l && l > least - reach && l < greatest + reach)
        {
            (least, greatest) = ScanFrame.Range([.. shown, l]);
        }

        var (marks, across) = ScanFrame.AcrossOf(scale);
        frame = new ScanFrame(
            fonts, top + 26, Height, marks, across,
            new PlotScale(least, greatest, top + 26 + Height, top + 26), unit);
    }

    /// <summary>The shapes below an upper edge, and their height.</summary>
    public static (IEnumerable<Shape> Shapes, double Height) Draw(
        ScanResult result, ScanAxis axis, ImmutableArray<ScanPoint> points, FigureScan finding, int index,
        PlotFonts fonts, double top)
    {
        var panel = new ScanCurvePanel(result, axis, points, finding, index, fonts, top);
        return (panel.Shapes().OrderBy(s => s is TextShape), Height + 26 + 40);
    }

    private IEnumerable<Shape> Shapes()
    {
        foreach (var shape in frame.Shapes(name))
        {
            yield return shape;
        }

        foreach (var shape in BrokenStretches().Concat(AsWritten()))
        {
            yield return shape;
        }

        if (limit is { } value)
        {
            foreach (var shape in frame.Limit(value, limitWords, isLeft: IsWorstRight))
            {
                yield return shape;
            }
        }

        foreach (var points in PlotTrace.Lines(samples, scale.Even, frame.Level))
        {
            yield return new PolylineShape(points, new Stroke(PlotStyle.Accent, 2));
        }

        foreach (var shape in Marks())
        {
            yield return shape;
        }
    }

    /// <summary>The place that is marked: the worst of what is judged, the extreme of what is
    /// observed.</summary>
    private ScanPlace? Marked => finding.Worst
        ?? (finding.Figure.Kind == StudyFigureKind.Minimum ? finding.Least : finding.Greatest);

    private bool IsWorstRight =>
        Marked is { } marked && scale.Place(marked.At[0]) > (ScanFrame.Left + ScanFrame.Right) / 2;

    /// <summary>A margin as the value that was reached, a rating's use in per cent.</summary>
    private double Shown(double value) => line is not null ? line.Of(value)
        : finding.Figure.Kind == StudyFigureKind.RatingUsed ? 100 * value
        : value;

    private ImmutableArray<PlotPoint> Samples(ImmutableArray<ScanPoint> points, int index)
    {
        var known = points.Select((p, i) => new SlopedSample(
            axis.Values[i], p.Found?.Values[index] ?? double.NaN,
            p.Slopes.IsEmpty ? double.NaN : p.Slopes[index])).ToArray();
        var between = known.Zip(known.Skip(1)).SelectMany(pair => Between(pair.First, pair.Second));
        var shown = known.Concat(between).Select(s => (s.X, Y: Shown(s.Y)))
            .Concat(new[] { finding.Greatest, finding.Least }.OfType<ScanPlace>()
                .Select(p => (X: p.At[0], Y: Shown(p.Value))))
            .Concat(finding.Jumps.SelectMany(j => new[]
            {
                (X: Math.BitDecrement(j.At), Y: Shown(j.Before)),
                (X: j.At, Y: double.NaN),
                (X: Math.BitIncrement(j.At), Y: Shown(j.After)),
            }));
        return [.. shown.OrderBy(s => s.X).Select(s => new PlotPoint(scale.Map(s.X), s.Y))];
    }

    /// <summary>The cubic between two points with slopes, where they are far enough apart to show.</summary>
    private IEnumerable<SlopedSample> Between(SlopedSample left, SlopedSample right)
    {
        const double apart = 6; // points of the screen
        var width = scale.Place(right.X) - scale.Place(left.X);
        var isJumped = finding.Jumps.Any(j => j.At >= left.X && j.At <= right.X);
        if (width < apart || isJumped || !left.HasSlope || !right.HasSlope
            || !left.HasValue || !right.HasValue)
        {
            yield break;
        }

        var count = (int)Math.Ceiling(width / apart);
        for (var k = 1; k < count; k++)
        {
            var x = left.X + ((right.X - left.X) * k / count);
            yield return new SlopedSample(x, SlopedSample.Cubic(left, right, x), double.NaN);
        }
    }

    private bool IsHeld(double x) => finding.Holding.Any(s => x >= s.From && x <= s.To);

    private IEnumerable<Shape> BrokenStretches()
    {
        if (!finding.IsJudged)
        {
            yield break;
        }

        var edge = axis.From;
        foreach (var stretch in finding.Holding.Append(new ScanStretch(axis.To, axis.To)))
        {
            if (stretch.From > edge && solvedAt.Any(x => x >= edge && x <= stretch.From && !IsHeld(x)))
            {
                var (left, right) = (scale.Place(edge), scale.Place(stretch.From));
                yield return new RectangleShape(
                    left, frame.Top, right - left, frame.Height, PlotStyle.WideBand);
            }

            edge = Math.Max(edge, stretch.To);
        }
    }

    private IEnumerable<Shape> AsWritten()
    {
        var nominal = axis.Varied.Nominal;
        if (nominal < axis.From || nominal > axis.To)
        {
            yield break;
        }

        var x = scale.Place(nominal);
        yield return new LineShape(x, frame.Top, x, frame.Bottom, new Stroke(PlotStyle.Axis, 1, [2, 3]));
        var isMarkedLow = Marked is { } marked
            && frame.Level.Place(Shown(marked.Value)) > frame.Top + (Height / 2);
        yield return new TextShape(
            x + 4, isMarkedLow ? frame.Top + 13 : frame.Bottom - 22, "as written", ScanFrame.Small,
            PlotStyle.Grey, HasHalo: true);
    }

    private IEnumerable<Shape> Marks()
    {
        foreach (var found in finding.Breaks)
        {
            var x = scale.Place(found.At[0]);
            yield return new LineShape(x, frame.Top, x, frame.Bottom, new Stroke(PlotStyle.Limit, 1));
            yield return Label(x, frame.Bottom - 6, axis.Say(found.At[0]), PlotStyle.Limit);
        }

        if (Marked is { } worst)
        {
            var (x, y) = (scale.Place(worst.At[0]), frame.Level.Place(Shown(worst.Value)));
            var words = $"{EngineeringNumber.Format(Shown(worst.Value), unit)} at {axis.Say(worst.At[0])}";
            yield return new DiscShape(x, y, 4, PlotStyle.Ink);
            yield return Label(x, y > frame.Top + 26 ? y - 9 : y + 18, words, PlotStyle.Ink, isStrong: true);
        }
    }

    private TextShape Label(double x, double y, string words, string ink, bool isStrong = false)
    {
        var width = frame.Fonts.Width(words, ScanFrame.Small, isStrong);
        return x + width + 8 > ScanFrame.Right
            ? new TextShape(x - 6, y, words, ScanFrame.Small, ink, TextAnchor.End, isStrong, HasHalo: true)
            : new TextShape(x + 6, y, words, ScanFrame.Small, ink, IsStrong: isStrong, HasHalo: true);
    }
}
