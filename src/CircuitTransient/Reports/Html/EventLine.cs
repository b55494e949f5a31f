using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports.Html;

/// <summary>The switchings along the study's time.</summary>
internal static class EventLine
{
    private const double Width = 860;
    private const double Left = 16;
    private const double Right = Width - 92;
    private const double Size = 12;
    private const int MostRows = 6;

    /// <summary>The picture.</summary>
    public static Drawing Draw(TransientResult result, PlotFonts fonts)
    {
        var shapes = ImmutableArray.CreateBuilder<Shape>();
        var time = new PlotScale(0, result.Until, Left, Right);
        var labels = Labels(result, time, fonts);
        var rows = labels.Select(l => l.Row + 1).DefaultIfEmpty(1).Max();
        var axis = 14 + (rows * 17.0);
        foreach (var (x, _, row, text) in labels)
        {
            var y = axis - 10 - (row * 17);
            var top = text.Length == 0 ? axis - 10 : y + 4;
            shapes.Add(new LineShape(x, top, x, axis, new(PlotStyle.Axis, 1)));
            shapes.Add(new DiscShape(x, axis, 4.5, PlotStyle.Ink));
        }

        // Words after the lines, so that no stem of a later event strikes them through.
        shapes.AddRange(labels.Select(label => new TextShape(
            label.Start, axis - 10 - (label.Row * 17), label.Text, Size, PlotStyle.Ink, HasHalo: true)));
        shapes.Insert(0, new LineShape(Left, axis, Right, axis, new(PlotStyle.Axis, 1.5)));
        var ticks = time.Ticks("s", 9);
        foreach (var (value, label) in ticks.Marks)
        {
            var x = time.Place(value);
            shapes.Add(new LineShape(x, axis, x, axis + 6, new(PlotStyle.Axis, 1)));
            shapes.Add(new TextShape(x, axis + 21, label, 11.5, PlotStyle.Grey, TextAnchor.Middle));
        }

        shapes.Add(new TextShape(Right + 24, axis + 21, $"time ({ticks.Unit})", 11.5, PlotStyle.Grey));
        return new Drawing(Width, axis + 30, Words(result), shapes.ToImmutable());
    }

    private static List<(double X, double Start, int Row, string Text)> Labels(
        TransientResult result, PlotScale time, PlotFonts fonts)
    {
        var labels = new List<(double, double, int, string)>();
        var ends = new List<double>();
        foreach (var together in result.Events.GroupBy(e => e.Time))
        {
            var text = fonts.Fitted(string.Join(", ", together.Select(InstantWords.Name)), Size, Width / 2);
            var (x, width) = (time.Place(together.Key), fonts.Width(text, Size));
            var start = Math.Clamp(x - (width / 2), 2, Width - width - 2);
            var row = ends.FindIndex(end => end + 10 <= start);
            if (row < 0 && ends.Count < MostRows)
            {
                row = ends.Count;
                ends.Add(0);
            }

            if (row >= 0)
            {
                ends[row] = start + width;
            }

            labels.Add((x, start, Math.Max(0, row), row >= 0 ? text : ""));
        }

        return labels;
    }

    private static string Words(TransientResult result) =>
        "Time line: " + string.Join("; ", result.Events.Take(20).Select(e =>
            $"{InstantWords.Name(e)} at {Text.EngineeringNumber.Format(e.Time, "s")}"));
}
