using System.Collections.Immutable;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>The picture of one part's values: each constraint's room over the value, and the stretches where
/// everything holds.</summary>
internal sealed class SizeLine
{
    private const double Width = PlotPanel.Width;
    private const double Left = 84;
    private const double Right = 760;
    private const double Top = 76;
    private const double Bottom = 440;
    private const int MostShown = 6;
    private const string Held = PlotStyle.WideBand;

    private readonly SizeResult result;
    private readonly PlotFonts fonts;
    private readonly LogScale across;
    private readonly PlotScale level;
    private readonly ImmutableArray<Shape>.Builder shapes = ImmutableArray.CreateBuilder<Shape>();

    private SizeLine(SizeResult result, PlotFonts fonts)
    {
        (this.result, this.fonts) = (result, fonts);
        across = new LogScale(result.Axes[0][0], result.Axes[0][^1], Left, Right);
        var most = result.Points.SelectMany(p => p.Shares).Where(double.IsFinite).DefaultIfEmpty(1).Max();
        level = new PlotScale(-100, Math.Clamp(110 * most, 20, 120), Bottom, Top);
    }

    /// <summary>The picture.</summary>
    public static Drawing Draw(SizeResult result, PlotFonts fonts)
    {
        var line = new SizeLine(result, fonts);
        line.shapes.Add(new TextShape(
            Left, 28, fonts.Fitted(SizeWords.PictureTitle(result), 15, Right - Left, isStrong: true), 15,
            PlotStyle.Ink, IsStrong: true));
        line.AddHeld();
        line.AddAxes();
        line.AddRooms();
        line.AddPlaces();
        return new Drawing(
            Width, Bottom + 44, SizeWords.PictureTitle(result), line.shapes.ToImmutable());
    }

    private void AddHeld()
    {
        shapes.Add(new RectangleShape(Left, Top, Right - Left, Bottom - Top, PlotStyle.Ground));
        foreach (var interval in result.Intervals)
        {
            var (from, to) = (across.Place(interval.From.Values[0]), across.Place(interval.To.Values[0]));
            shapes.Add(new RectangleShape(from, Top, Math.Max(1, to - from), Bottom - Top, Held));
        }
    }

    private void AddAxes()
    {
        var part = result.Problem.Parts[0];
        foreach (var (value, label) in across.Marks(part.Unit))
        {
            var x = across.Place(value);
            shapes.Add(new LineShape(x, Top, x, Bottom, new Stroke(PlotStyle.Grid, 1)));
            shapes.Add(new TextShape(x, Bottom + 18, label, 11.5, PlotStyle.Grey, TextAnchor.Middle));
        }

        foreach (var (value, label) in level.Ticks("%", 6).Marks)
        {
            var y = level.Place(value);
            var stroke = new Stroke(value == 0 ? PlotStyle.Axis : PlotStyle.Grid, 1);
            shapes.Add(new LineShape(Left, y, Right, y, stroke));
            shapes.Add(new TextShape(Left - 8, y + 4, label, 11.5, PlotStyle.Grey, TextAnchor.End));
        }

        shapes.Add(new TextShape(Right + 24, Bottom + 18, part.Name, 13, PlotStyle.Ink, IsStrong: true));
        shapes.Add(new TextShape(
            Left, Top - 12, "room to each bound, in % of it (below 0: broken)", 11.5, PlotStyle.Grey));
    }

    private void AddRooms()
    {
        var y = Top - 8;
        var shown = SizeBounds.Shown(result, MostShown, _ => true);
        for (var drawn = 0; drawn < shown.Length; drawn++)
        {
            var i = shown[drawn];
            var stroke = PlotStyle.Cause(drawn);
            foreach (var points in Stretches(i))
            {
                shapes.Add(new PolylineShape(points, stroke));
            }

            y += 22;
            shapes.Add(new LineShape(Right + 24, y - 4, Right + 54, y - 4, stroke));
            y = LegendText.Add(shapes, fonts, result.Problem.Constraints[i].Name, Right + 62, y);
        }

        var hidden = result.Problem.Constraints.Length - MostShown;
        if (hidden > 0)
        {
            shapes.Add(new TextShape(
                Right + 24, y + 22, $"and {hidden} more, in size.csv", 11.5, PlotStyle.Grey));
        }
    }

    // What lies below the frame is left out.
    private IEnumerable<ImmutableArray<PlotPoint>> Stretches(int constraint)
    {
        var stretch = ImmutableArray.CreateBuilder<PlotPoint>();
        foreach (var point in result.Points)
        {
            var room = 100 * point.Shares[constraint];
            if (room >= level.From && room <= level.To)
            {
                stretch.Add(new PlotPoint(across.Place(point.Values[0]), level.Place(room)));
            }
            else if (stretch.Count > 0)
            {
                yield return stretch.ToImmutable();
                stretch.Clear();
            }
        }

        if (stretch.Count > 1)
        {
            yield return stretch.ToImmutable();
        }
    }

    private void AddPlaces()
    {
        var part = result.Problem.Parts[0];
        if (part.Nominal >= across.From && part.Nominal <= across.To)
        {
            var x = across.Place(part.Nominal);
            shapes.Add(new LineShape(x, Top, x, Bottom, new Stroke(PlotStyle.Ink, 1, [3, 3])));
            shapes.Add(new TextShape(x + 5, Bottom - 8, "now", 11.5, PlotStyle.Ink, HasHalo: true));
        }

        foreach (var point in result.Preferred.Where(point => point.Holds))
        {
            var x = across.Place(point.Values[0]);
            shapes.Add(new LineShape(x, Bottom - 7, x, Bottom, new Stroke(PlotStyle.Accent, 1.6)));
        }

        if (result.Chosen is { } chosen)
        {
            var x = across.Place(chosen.Values[0]);
            var y = level.Place(Math.Min(level.To, 100 * chosen.Worst));
            shapes.Add(new DiscShape(x, y, 6, PlotStyle.Ink));
            var isRight = x > (Left + Right) / 2;
            shapes.Add(new TextShape(
                isRight ? x - 12 : x + 12, y - 9, SizeWords.Values(result, chosen), 13, PlotStyle.Ink,
                isRight ? TextAnchor.End : TextAnchor.Start, IsStrong: true, HasHalo: true));
        }
    }
}
