using System.Collections.Immutable;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The map of two parts' values: where everything holds and with how much room, what breaks outside,
/// and the values proposed.</summary>
internal sealed class SizeMap
{
    private const double Width = PlotPanel.Width;
    private const double Left = 96;
    private const double Right = 760;
    private const double Top = 64;
    private const double Bottom = 648;
    private const int MostShown = 6;

    // One hue, the more room the deeper: equal steps of lightness between the paper and the accent.
    private static readonly ImmutableArray<string> Shades =
        ["#dbe6ec", "#bdd0db", "#9dbac9", "#7ba3b6", "#578ba3"];

    private const string Broken = PlotStyle.Ground;

    private readonly SizeResult result;
    private readonly PlotFonts fonts;
    private readonly LogScale across;
    private readonly LogScale up;
    private readonly ImmutableArray<Shape>.Builder shapes = ImmutableArray.CreateBuilder<Shape>();

    private SizeMap(SizeResult result, PlotFonts fonts)
    {
        (this.result, this.fonts) = (result, fonts);
        across = Scale(result.Axes[0], Left, Right);
        up = Scale(result.Axes[1], Bottom, Top);
    }

    /// <summary>The picture.</summary>
    public static Drawing Draw(SizeResult result, PlotFonts fonts)
    {
        var map = new SizeMap(result, fonts);
        map.shapes.Add(new TextShape(
            Left, 28, fonts.Fitted(SizeWords.PictureTitle(result), 15, Right - Left, isStrong: true), 15,
            PlotStyle.Ink, IsStrong: true));
        map.AddCells();
        map.AddAxes();
        map.AddBounds();
        map.AddPlaces();
        return new Drawing(
            Width, Bottom + 48, SizeWords.PictureTitle(result), map.shapes.ToImmutable());
    }

    private static LogScale Scale(ImmutableArray<double> axis, double start, double end)
    {
        // Half a cell of room on either side, so that the outermost cells are whole.
        var half = axis.Length > 1 ? Math.Sqrt(axis[1] / axis[0]) : 1.1;
        return new LogScale(axis[0] / half, axis[^1] * half, start, end);
    }

    private void AddCells()
    {
        var (columns, rows) = (result.Axes[0], result.Axes[1]);
        var most = result.Points.Where(p => p.Holds).Select(p => p.Worst).DefaultIfEmpty(1).Max();
        for (var row = 0; row < rows.Length; row++)
        {
            var (bottom, top) = (up.Place(Edge(rows, row)), up.Place(Edge(rows, row + 1)));
            for (var column = 0; column < columns.Length;)
            {
                var fill = Fill(row, column, most);
                var last = column;
                while (last + 1 < columns.Length && Fill(row, last + 1, most) == fill)
                {
                    last++;
                }

                var (from, to) = (across.Place(Edge(columns, column)), across.Place(Edge(columns, last + 1)));
                shapes.Add(new RectangleShape(from, top, to - from, bottom - top, fill));
                column = last + 1;
            }
        }
    }

    private string Fill(int row, int column, double most)
    {
        var point = result.Points[(row * result.Axes[0].Length) + column];
        return point.Holds
            ? Shades[Math.Clamp((int)(Shades.Length * point.Worst / most), 0, Shades.Length - 1)]
            : Broken;
    }

    private static double Edge(ImmutableArray<double> axis, int index) => index == 0
        ? axis.Length > 1 ? axis[0] / Math.Sqrt(axis[1] / axis[0]) : axis[0] / 1.1
        : index == axis.Length
            ? axis.Length > 1 ? axis[^1] * Math.Sqrt(axis[^1] / axis[^2]) : axis[0] * 1.1
            : Math.Sqrt(axis[index - 1] * axis[index]);

    private void AddAxes()
    {
        var (first, second) = (result.Problem.Parts[0], result.Problem.Parts[1]);
        foreach (var (value, label) in across.Marks(first.Unit))
        {
            var x = across.Place(value);
            shapes.Add(new LineShape(x, Bottom, x, Bottom + 5, new Stroke(PlotStyle.Axis, 1)));
            shapes.Add(new TextShape(x, Bottom + 20, label, 11.5, PlotStyle.Grey, TextAnchor.Middle));
        }

        foreach (var (value, label) in up.Marks(second.Unit))
        {
            var y = up.Place(value);
            shapes.Add(new LineShape(Left - 5, y, Left, y, new Stroke(PlotStyle.Axis, 1)));
            shapes.Add(new TextShape(Left - 9, y + 4, label, 11.5, PlotStyle.Grey, TextAnchor.End));
        }

        shapes.Add(new TextShape(Right + 24, Bottom + 20, first.Name, 13, PlotStyle.Ink, IsStrong: true));
        shapes.Add(new TextShape(Left - 9, Top - 14, second.Name, 13, PlotStyle.Ink, TextAnchor.End, true));
    }

    // The line on which each constraint is just met.
    private void AddBounds()
    {
        var y = Top + 6;
        shapes.Add(new TextShape(Right + 24, y, "just met on", 11.5, PlotStyle.Grey));
        var drawn = 0;
        foreach (var i in SizeBounds.Shown(result, MostShown, i => !Contours.Of(result, i).IsEmpty))
        {
            var lines = Contours.Of(result, i);
            var stroke = PlotStyle.Cause(drawn++) with { Width = 1.6 };
            foreach (var line in lines)
            {
                shapes.Add(new PolylineShape(
                    [.. line.Select(p => new PlotPoint(across.Place(p.X), up.Place(p.Y)))], stroke));
            }

            y += 22;
            shapes.Add(new LineShape(Right + 24, y - 4, Right + 54, y - 4, stroke));
            y = LegendText.Add(shapes, fonts, result.Problem.Constraints[i].Name, Right + 62, y);
        }

        AddLegend(y + 34);
    }

    private void AddLegend(double y)
    {
        var most = result.Points.Where(p => p.Holds).Select(p => p.Worst).DefaultIfEmpty(0).Max();
        if (most <= 0)
        {
            shapes.Add(new TextShape(Right + 24, y, "nothing holds", 11.5, PlotStyle.Ink));
            return;
        }

        shapes.Add(new TextShape(
            Right + 24, y, "room to the nearest bound, as a fraction of it", 11.5, PlotStyle.Grey));
        for (var i = 0; i < Shades.Length; i++)
        {
            shapes.Add(new RectangleShape(Right + 24 + (34 * i), y + 8, 34, 14, Shades[i]));
        }

        shapes.Add(new TextShape(Right + 24, y + 37, "0", 11.5, PlotStyle.Grey));
        shapes.Add(new TextShape(
            Right + 24 + (34 * Shades.Length), y + 37, ReportWords.Percent(most), 11.5, PlotStyle.Grey,
            TextAnchor.End));
        shapes.Add(new RectangleShape(Right + 24, y + 48, 34, 14, PlotStyle.Axis));
        shapes.Add(new RectangleShape(Right + 25, y + 49, 32, 12, Broken));
        shapes.Add(new TextShape(Right + 66, y + 59, "broken", 11.5, PlotStyle.Grey));
    }

    private void AddPlaces()
    {
        var parts = result.Problem.Parts;
        var (x, y) = (across.Place(parts[0].Nominal), up.Place(parts[1].Nominal));
        if (x is >= Left and <= Right && y is >= Top and <= Bottom)
        {
            var stroke = new Stroke(PlotStyle.Ink, 1.6);
            shapes.Add(new LineShape(x - 6, y - 6, x + 6, y + 6, stroke));
            shapes.Add(new LineShape(x - 6, y + 6, x + 6, y - 6, stroke));
            shapes.Add(new TextShape(
                x - 10, y + 4, "now", 11.5, PlotStyle.Ink, TextAnchor.End, HasHalo: true));
        }

        if (result.Chosen is { } chosen)
        {
            var (cx, cy) = (across.Place(chosen.Values[0]), up.Place(chosen.Values[1]));
            shapes.Add(new DiscShape(cx, cy, 6, PlotStyle.Ink));
            var isRight = cx > (Left + Right) / 2;
            shapes.Add(new TextShape(
                isRight ? cx - 12 : cx + 12, cy - 9, SizeWords.Values(result, chosen), 13, PlotStyle.Ink,
                isRight ? TextAnchor.End : TextAnchor.Start, IsStrong: true, HasHalo: true));
        }
    }
}
