using System.Collections.Immutable;

namespace CircuitTransient.Reports.Studies;

/// <summary>The ground of a panel with its title, grid and axes.</summary>
/// <param name="X">Places along.</param>
/// <param name="Y">Places upwards: its start is the lower edge.</param>
internal sealed record PlotFrame(PlotScale X, PlotScale Y)
{
    private const double Small = 11.5;

    /// <summary>Draws it.</summary>
    /// <param name="shapes">What is drawn on.</param>
    /// <param name="title">Above the panel.</param>
    /// <param name="units">Of the axes; null for an axis without marks.</param>
    /// <param name="words">What the axis along counts, given its unit with prefix.</param>
    public void Draw(
        ImmutableArray<Shape>.Builder shapes, string title, (string? X, string? Y) units,
        Func<string, string> words)
    {
        var (left, right, top, bottom) = (X.Start, X.End, Y.End, Y.Start);
        shapes.Add(new TextShape(left, top - 12, title, 14, PlotStyle.Ink, IsStrong: true));
        shapes.Add(new RectangleShape(left, top, right - left, bottom - top, PlotStyle.Ground));
        if (units.Y is { } up)
        {
            var levels = Y.Ticks(up, 5);
            foreach (var (value, label) in levels.Marks)
            {
                var y = Y.Place(value);
                var stroke = new Stroke(value == 0 ? PlotStyle.Axis : PlotStyle.Grid, 1);
                shapes.Add(new LineShape(left, y, right, y, stroke));
                shapes.Add(new TextShape(left - 8, y + 4, label, Small, PlotStyle.Grey, TextAnchor.End));
            }

            shapes.Add(new TextShape(
                left - 8, top - 6, levels.Unit, Small, PlotStyle.Ink, TextAnchor.End, IsStrong: true));
        }

        if (units.X is { } along)
        {
            var marks = X.Ticks(along, 8);
            foreach (var (value, label) in marks.Marks)
            {
                var x = X.Place(value);
                shapes.Add(new LineShape(x, top, x, bottom, new Stroke(PlotStyle.Grid, 1)));
                shapes.Add(new TextShape(x, bottom + 16, label, Small, PlotStyle.Grey, TextAnchor.Middle));
            }

            shapes.Add(new TextShape(
                right + 22, bottom + 16, words(marks.Unit), Small, PlotStyle.Ink, IsStrong: true));
        }
    }

    /// <summary>A line across the panel at a place along it, named at its upper end; nothing
    /// outside.</summary>
    public void Mark(
        ImmutableArray<Shape>.Builder shapes, double value, string words, Stroke stroke, double row = 0)
    {
        if (!double.IsFinite(value) || value < X.From || value > X.To)
        {
            return;
        }

        var x = X.Place(value);
        var anchor = x > X.End - 150 ? TextAnchor.End : TextAnchor.Start;
        shapes.Add(new LineShape(x, Y.End, x, Y.Start, stroke));
        shapes.Add(new TextShape(
            x + (anchor == TextAnchor.End ? -5 : 5), Y.End + 13 + (row * 14), words, Small, stroke.Colour,
            anchor, HasHalo: true));
    }
}
