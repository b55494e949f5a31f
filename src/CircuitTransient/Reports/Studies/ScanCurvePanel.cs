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

    private static readonly double[] Asides = [6, 40, 74, 108]; // of the marked place's words

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
        Shape[] lines =
            [
                .. AsWritten is { } x
                    ? [new LineShape(x, frame.Top, x, frame.Bottom, new Stroke(PlotStyle.Axis, 1, [2, 3]))]
                    : Array.Empty<Shape>(),
                .. limit is { } value ? frame.Limit(value) : [],
                .. PlotTrace.Lines(samples, scale.Even, frame.Level)
                    .Select(points => new PolylineShape(points, new Stroke(PlotStyle.Accent, 2))),
                .. finding.Breaks.Select(found => scale.Place(found.At[0])).Select(x =>
                    new LineShape(x, frame.Top, x, frame.Bottom, new Stroke(PlotStyle.Limit, 1))),
                .. Disc is { } disc ? [disc] : Array.Empty<Shape>(),
            ];
        var room = frame.Room();
        room.Avoid(lines);
        return [.. frame.Shapes(name), .. BrokenStretches(), .. lines, .. Labels(room)];
    }

    /// <summary>The place that is marked: the worst of what is judged, the extreme of what is
    /// observed.</summary>
    private ScanPlace? Marked => finding.Worst
        ?? (finding.Figure.Kind == StudyFigureKind.Minimum ? finding.Least : finding.Greatest);

    private DiscShape? Disc => Marked is not { } marked ? null : new DiscShape(
        scale.Place(marked.At[0]), frame.Level.Place(Shown(marked.Value)), 4, PlotStyle.Ink);

    /// <summary>Where the value as written stands; null where that is outside.</summary>
    private double? AsWritten => axis.Varied.Nominal < axis.From || axis.Varied.Nominal > axis.To
        ? null
        : scale.Place(axis.Varied.Nominal);

    /// <summary>A margin as the value that was reached, a rating's use in per cent.</summary>
    private double Shown(double value) => line is not null ? line.Of(value)
        : finding.Figure.Kind == StudyFigureKind.RatingUsed ? 100 * value
        : value;

    private ImmutableArray<PlotPoint> Samples(ImmutableArray<ScanPoint> points, int index)
    {
        var known = points.Select((p, i) => new SlopedSample(
            axis.Values[i], p.Found?.Values[index] ?? double.NaN,
            p.Slopes.IsEmpty ? double.NaN : p.Slopes[index]))
            .Concat(finding.Looks.Where(look => look.HasValue)).OrderBy(s => s.X).ToArray();
        var between = known.Zip(known.Skip(1)).SelectMany(pair => Between(pair.First, pair.Second));
        var edge = finding.Figure.Kind == StudyFigureKind.RatingUsed ? 1 : 0;
        var shown = known.Concat(between).Select(s => (s.X, Y: Shown(s.Y)))
            .Concat(finding.Breaks.Where(b => !b.IsJump).Select(b => (X: b.At[0], Y: Shown(edge))))
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

    /// <summary>The cubic between two points with slopes, where they are far enough apart to show and it does
    /// not swing where both slopes lead straight from one to the other.</summary>
    private IEnumerable<SlopedSample> Between(SlopedSample left, SlopedSample right)
    {
        const double apart = 6; // points of the screen
        var width = scale.Place(right.X) - scale.Place(left.X);
        var isJumped = finding.Jumps.Any(j => j.At >= left.X && j.At <= right.X);
        var mean = (right.Y - left.Y) / (right.X - left.X);
        var isStraight = left.Slope * mean >= 0 && right.Slope * mean >= 0
            && Math.Max(Math.Abs(left.Slope), Math.Abs(right.Slope)) > 3 * Math.Abs(mean);
        if (width < apart || isJumped || isStraight || !left.HasSlope || !right.HasSlope
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

    private IEnumerable<Shape> Labels(LabelRoom room)
    {
        if (Marked is { } worst && Disc is { X: var x, Y: var y })
        {
            var words = $"{EngineeringNumber.Format(Shown(worst.Value), unit)} at {axis.Say(worst.At[0])}";
            var label = new TextShape(
                0, 0, words, ScanFrame.Small, PlotStyle.Ink, IsStrong: true, HasHalo: true);
            double[] heights = [y - 9, y + 18, y - 24, y + 33, y - 40, y + 49, y - 56, y - 72];
            yield return room.Place(
                Asides.SelectMany(apart => Beside(x, heights, label, apart)));
        }

        foreach (var found in finding.Breaks)
        {
            yield return room.Place(Beside(
                scale.Place(found.At[0]), Heights(frame.Bottom - 6, -16),
                new TextShape(
                    0, 0, axis.Say(found.At[0]), ScanFrame.Small, PlotStyle.Limit, HasHalo: true)));
        }

        if (limit is { } value)
        {
            yield return room.Place(frame.LimitWords(value, limitWords));
        }

        if (AsWritten is { } written)
        {
            yield return room.Place(Beside(
                written, [frame.Bottom - 22, frame.Top + 13, .. Heights(frame.Bottom - 6, -16)],
                new TextShape(0, 0, "as written", ScanFrame.Small, PlotStyle.Grey, HasHalo: true)));
        }
    }

    private static IEnumerable<double> Heights(double first, double step) =>
        Enumerable.Range(0, (int)((Height - 20) / Math.Abs(step))).Select(k => first + (k * step));

    /// <summary>Places to the right and to the left of something, at several heights.</summary>
    private static IEnumerable<TextShape> Beside(
        double x, IEnumerable<double> heights, TextShape label, double apart = 6) =>
        heights.SelectMany(y => new[]
        {
            label with { X = x + apart, Y = y },
            label with { X = x - apart, Y = y, Anchor = TextAnchor.End },
        });
}
