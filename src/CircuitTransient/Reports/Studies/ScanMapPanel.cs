using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>A figure over two scanned values: shades of one hue, darker where it is nearer to breaking, lines
/// of equal value with their labels, and where a requirement or rating begins to break.</summary>
internal sealed class ScanMapPanel
{
    private const double Height = 420;
    private const int MostCells = 80; // a side; finer maps are drawn from every second point or fewer
    private const int MostDots = 80; // more would hide their line
    private const int MostPlaces = 40; // of a line's label
    private const double Right = ScanFrame.Right;

    private readonly ScanResult result;
    private readonly FigureScan finding;
    private readonly int index;
    private readonly PlotFonts fonts;
    private readonly double top;
    private readonly ScanScale across;
    private readonly ScanScale upwards;
    private readonly ReachedLine? line;
    private readonly double[,] values;

    private ScanMapPanel(ScanResult result, FigureScan finding, int index, PlotFonts fonts, double top)
    {
        (this.result, this.finding, this.index) = (result, finding, index);
        (this.fonts, this.top) = (fonts, top + 26);
        across = new ScanScale(result.Axes[0], ScanFrame.Left, Right);
        upwards = new ScanScale(result.Axes[1], this.top + Height, this.top);
        line = ScanWords.Reached(result.Circuit, finding.Figure);
        values = Values();
    }

    private string Unit => finding.Figure.Kind == StudyFigureKind.RatingUsed
        ? "%"
        : line?.Unit ?? finding.Figure.Unit;

    /// <summary>The shapes below an upper edge, and their height.</summary>
    public static (IEnumerable<Shape> Shapes, double Height) Draw(
        ScanResult result, FigureScan finding, int index, PlotFonts fonts, double top)
    {
        var panel = new ScanMapPanel(result, finding, index, fonts, top);
        return (panel.Shapes(), Height + 26 + 40);
    }

    private double[,] Values()
    {
        var (first, second) = (result.Axes[0].Values.Length, result.Axes[1].Values.Length);
        var found = new double[first, second];
        for (var i = 0; i < first; i++)
        {
            for (var j = 0; j < second; j++)
            {
                found[i, j] = Shown(result.Points[(i * second) + j].Found?.Values[index] ?? double.NaN);
            }
        }

        return found;
    }

    private double Shown(double value) => line is not null ? line.Of(value)
        : finding.Figure.Kind == StudyFigureKind.RatingUsed ? 100 * value
        : value;

    private IEnumerable<Shape> Shapes()
    {
        yield return new TextShape(
            ScanFrame.Left, top - 12,
            fonts.Fitted(
                ScanWords.Title(result.Circuit, finding.Figure), 14, Right - ScanFrame.Left, isStrong: true),
            14, PlotStyle.Ink, IsStrong: true);
        var contours = Contours().ToArray();
        Shape[] disc = Disc is { } marked ? [marked] : [];
        Shape[] lines = [.. contours.Select(c => c.Line), .. Breaks(), .. disc];
        var room = new LabelRoom(fonts, ScanFrame.Left, top, Right, top + Height);
        room.Avoid(lines);
        Shape[] labels = [.. WorstWords(room), .. LevelWords(contours, room)];
        var above = lines.Concat(Axes()).OrderBy(s => s is TextShape).Concat(labels);
        foreach (var shape in Cells().Concat(above))
        {
            yield return shape;
        }
    }

    // Each point colours the stretch round it, halfway to its neighbours.
    private IEnumerable<Shape> Cells()
    {
        var (low, high) = (double.PositiveInfinity, double.NegativeInfinity);
        foreach (var value in values)
        {
            if (double.IsFinite(value))
            {
                (low, high) = (Math.Min(low, value), Math.Max(high, value));
            }
        }

        var (columns, rows) = (Edges(across), Edges(upwards));
        var isTurned = finding.Figure.Kind == StudyFigureKind.Margin && line is null or { Sign: 1 };
        for (var i = 0; i + 1 < columns.Length; i++)
        {
            for (var j = 0; j + 1 < rows.Length; j++)
            {
                var value = values[columns[i].Index, rows[j].Index];
                var part = high > low ? (value - low) / (high - low) : 0;
                var fill = double.IsFinite(value)
                    ? ScanShade.Of(0.75 * (isTurned ? 1 - part : part))
                    : PlotStyle.Paper;
                yield return new RectangleShape(
                    columns[i].Place, rows[j + 1].Place, columns[i + 1].Place - columns[i].Place + 0.3,
                    rows[j].Place - rows[j + 1].Place + 0.3, fill);
            }
        }
    }

    private static (double Place, int Index)[] Edges(ScanScale scale)
    {
        var ticks = scale.Axis.Values;
        var step = Math.Max(1, (int)Math.Ceiling(ticks.Length / (double)MostCells));
        var kept = Enumerable.Range(0, ticks.Length).Where(i => i % step == 0).ToArray();
        return
        [
            (scale.Start, kept[0]),
            .. kept.Zip(kept.Skip(1), (a, b) =>
                ((scale.Place(ticks[a]) + scale.Place(ticks[b])) / 2, b)),
            (scale.End, kept[^1]),
        ];
    }

    private IEnumerable<Shape> Axes()
    {
        var (marks, name) = ScanFrame.AcrossOf(across);
        foreach (var (x, label) in marks)
        {
            yield return new TextShape(
                x, top + Height + 16, label, ScanFrame.Small, PlotStyle.Grey, TextAnchor.Middle);
        }

        yield return new TextShape(
            Right + 22, top + Height + 16, fonts.Fitted(name, ScanFrame.Small, 180, isStrong: true),
            ScanFrame.Small, PlotStyle.Ink, IsStrong: true);
        var ticks = upwards.Ticks(7);
        foreach (var (value, label) in ticks.Marks)
        {
            yield return new TextShape(
                ScanFrame.Left - 8, upwards.Place(value) + 4, label, ScanFrame.Small, PlotStyle.Grey,
                TextAnchor.End);
        }

        var unit = ticks.Unit.Length > 0 ? $" ({ticks.Unit})" : "";
        yield return new TextShape(
            Right + 22, top + 12,
            fonts.Fitted(
                $"upwards: {ScanWords.Subject(upwards.Axis)}{unit}", ScanFrame.Small, 184, isStrong: true),
            ScanFrame.Small, PlotStyle.Ink, IsStrong: true);
    }

    private IEnumerable<(double Level, LineShape Line)> Contours()
    {
        var finite = values.Cast<double>().Where(double.IsFinite).ToArray();
        if (finite.Length == 0 || finite.Min() == finite.Max())
        {
            yield break;
        }

        var middles = Middles();
        var levels = new PlotScale(finite.Min(), finite.Max(), 0, 1).Ticks(Unit, 7).Marks;
        var step = levels.Length > 1 ? levels[1].Value - levels[0].Value : finite.Max() - finite.Min();
        var limit = line?.Of(0) ?? (finding.Figure.Kind == StudyFigureKind.RatingUsed ? 100 : double.NaN);

        // Where the limit is one of the levels, the exact line of breaks stands there already.
        var drawn = levels.Where(l => finding.Breaks.IsEmpty || !(Math.Abs(l.Value - limit) < 1e-9 * step));
        foreach (var (level, _) in drawn)
        {
            foreach (var (a, b) in MapLines.Equal(values, middles, level, step))
            {
                var (from, to) = (Placed(a), Placed(b));
                yield return (
                    level, new LineShape(from.X, from.Y, to.X, to.Y, new Stroke(PlotStyle.Ink, 0.7)));
            }
        }
    }

    /// <summary>The label of each line of equal value where it meets nothing but that line; none where it
    /// would cover another label.</summary>
    private IEnumerable<Shape> LevelWords(IEnumerable<(double Level, LineShape Line)> lines, LabelRoom room)
    {
        foreach (var equal in lines.GroupBy(l => l.Level, l => l.Line))
        {
            var (pieces, words) = (equal.ToArray(), EngineeringNumber.Format(equal.Key, Unit, 3));
            var places = Enumerable.Range(0, MostPlaces)
                .Select(k => pieces[(k * (pieces.Length - 1) / (MostPlaces - 1))])
                .Select(piece => new TextShape(
                    piece.X1, piece.Y1 + 4, words, 10.5, PlotStyle.Ink, TextAnchor.Middle, HasHalo: true))
                .Where(room.IsFree).ToArray();
            if (places.Length > 0)
            {
                yield return room.Place(places);
            }
        }
    }

    private double[,]? Middles()
    {
        if (result.Middles.IsEmpty)
        {
            return null;
        }

        var (columns, rows) = (values.GetLength(0) - 1, values.GetLength(1) - 1);
        var found = new double[columns, rows];
        for (var k = 0; k < columns * rows; k++)
        {
            found[k / rows, k % rows] = Shown(result.Middles[k].Found?.Values[index] ?? double.NaN);
        }

        return found;
    }

    /// <summary>A place between points, by their numbers.</summary>
    private PlotPoint Placed(PlotPoint at) => new(Placed(across, at.X), Placed(upwards, at.Y));

    private static double Placed(ScanScale scale, double number)
    {
        var ticks = scale.Axis.Values;
        var left = Math.Min((int)number, ticks.Length - 2);
        var (a, b) = (scale.Place(ticks[left]), scale.Place(ticks[left + 1]));
        return a + ((b - a) * (number - left));
    }

    // The line joins places that were solved for, on the lines between the points.
    private IEnumerable<Shape> Breaks()
    {
        foreach (var (a, b) in MapLines.Breaking(result.Axes, finding.Breaks))
        {
            var (from, to) = (Placed(a), Placed(b));
            yield return new LineShape(from.X, from.Y, to.X, to.Y, new Stroke(PlotStyle.Limit, 1.6));
        }

        foreach (var found in finding.Breaks.Length <= MostDots ? finding.Breaks : [])
        {
            yield return new DiscShape(
                across.Place(found.At[0]), upwards.Place(found.At[1]), 2.4, PlotStyle.Limit);
        }

        if (!finding.Breaks.IsEmpty)
        {
            yield return new LineShape(
                Right + 22, top + 32, Right + 36, top + 32, new Stroke(PlotStyle.Limit, 1.6));
            yield return new TextShape(
                Right + 42, top + 36, "begins to break", ScanFrame.Small, PlotStyle.Limit);
        }
    }

    private ScanPlace? Marked => finding.Worst ?? finding.Greatest;

    private DiscShape? Disc => Marked is { } worst
        ? new DiscShape(across.Place(worst.At[0]), upwards.Place(worst.At[1]), 4.5, PlotStyle.Ink)
        : null;

    private IEnumerable<Shape> WorstWords(LabelRoom room)
    {
        if (Marked is { } worst && Disc is { X: var x, Y: var y })
        {
            var label = new TextShape(
                x + 8, y + 4, EngineeringNumber.Format(Shown(worst.Value), Unit), ScanFrame.Small,
                PlotStyle.Ink, IsStrong: true, HasHalo: true);
            var toTheLeft = label with { X = x - 8, Anchor = TextAnchor.End };
            yield return room.Place(
                label, toTheLeft, label with { Y = y - 9 }, label with { Y = y + 18 },
                toTheLeft with { Y = y - 9 }, toTheLeft with { Y = y + 18 });
        }
    }
}
