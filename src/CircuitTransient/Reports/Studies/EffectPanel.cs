using System.Collections.Immutable;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>What each value alone does to the worst figure, from one end of its tolerance to the other: the
/// longest bar on top.</summary>
internal static class EffectPanel
{
    private const int MostValues = 16;
    private const double Left = 300;
    private const double Right = PlotPanel.Width - 210;
    private const double Row = 24;
    private const double Small = 11.5;

    /// <summary>Draws the panel below a height.</summary>
    /// <returns>How high it is.</returns>
    public static double Draw(
        SpreadResult spread, WorstCase worst, PlotFonts fonts, ImmutableArray<Shape>.Builder shapes,
        double top)
    {
        var range = spread.Figures[worst.Figure];
        var scale = JudgedScale.Of(spread, range);
        var order = Enumerable.Range(0, range.Alone.Length)
            .Where(i => double.IsFinite(range.Alone[i].AtLowest + range.Alone[i].AtHighest))
            .OrderByDescending(i => Math.Abs(range.Alone[i].AtHighest - range.Alone[i].AtLowest))
            .Take(MostValues).ToArray();
        if (order.Length == 0 || range.Nominal is not { } nominal || !double.IsFinite(nominal))
        {
            return 0;
        }

        var ends = order.SelectMany(i => new[] { range.Alone[i].AtLowest, range.Alone[i].AtHighest })
            .Append(nominal).Select(scale.At).ToArray();
        var (from, to) = Around(ends, scale.Limit);
        var plotTop = top + 40;
        var bottom = plotTop + (Row * order.Length) + 12;
        var frame = new PlotFrame(
            new PlotScale(from, to, Left, Right), new PlotScale(0, 1, bottom, plotTop));
        var title = $"{scale.Name}: what each value alone does to it, from one end of its tolerance to the "
            + "other";
        frame.Draw(
            shapes, fonts.Fitted(title, 14, PlotPanel.Width - Left - 20, isStrong: true), (scale.Unit, null),
            unit => unit);
        for (var r = 0; r < order.Length; r++)
        {
            AddBar(
                shapes, frame, spread.Varied.Values[order[r]], range.Alone[order[r]], scale, fonts,
                plotTop + 6 + (Row * r));
        }

        AddMark(shapes, frame, scale.At(nominal), $"nominal {Number(scale.At(nominal), scale.Unit)}",
            new Stroke(PlotStyle.Ink, 1.2), bottom + 31);
        if (scale.Limit is { } limit && limit >= from && limit <= to)
        {
            AddMark(
                shapes, frame, limit, scale.LimitWords, new Stroke(PlotStyle.Limit, 1.2, [8, 4]),
                bottom + 45);
        }

        return bottom + 66 - top;
    }

    private static void AddMark(
        ImmutableArray<Shape>.Builder shapes, PlotFrame frame, double value, string words, Stroke stroke,
        double y)
    {
        var x = frame.X.Place(value);
        shapes.Add(new LineShape(x, frame.Y.End, x, frame.Y.Start + 4, stroke));
        shapes.Add(new TextShape(x, y, words, Small, stroke.Colour, TextAnchor.Middle));
    }

    /// <summary>A range with room about all ends, and the limit if it is near.</summary>
    public static (double From, double To) Around(double[] ends, double? limit)
    {
        var (from, to) = (ends.Min(), ends.Max());
        var reach = 0.8 * (to - from);
        if (limit is { } l && l > from - reach && l < to + reach)
        {
            (from, to) = (Math.Min(from, l), Math.Max(to, l));
        }

        var room = to > from ? 0.12 * (to - from) : to != 0 ? 0.1 * Math.Abs(to) : 1;
        return (from - room, to + room);
    }

    private static void AddBar(
        ImmutableArray<Shape>.Builder shapes, PlotFrame frame, VariedValue value, ValueEffect effect,
        JudgedScale scale, PlotFonts fonts, double top)
    {
        var low = frame.X.Place(scale.At(effect.AtLowest));
        var high = frame.X.Place(scale.At(effect.AtHighest));
        var (left, right) = (Math.Min(low, high), Math.Max(low, high));
        var baseline = top + Row - 10;
        var words = $"{value.Name} {Number(value.Tolerance!.Lowest, value.Unit)} to "
            + Number(value.Tolerance.Highest, value.Unit);
        shapes.Add(new TextShape(
            Left - 12, baseline, fonts.Fitted(words, Small, Left - 32), Small, PlotStyle.Ink,
            TextAnchor.End));
        shapes.Add(new RectangleShape(left, top + 3, Math.Max(1.5, right - left), Row - 9, PlotStyle.Accent));
        if (right - left < 3)
        {
            return;
        }

        // Which end of the tolerance stands at which end of the bar.
        AddEnd(shapes, low, low <= high, Off(value, value.Tolerance.Lowest), baseline);
        AddEnd(shapes, high, low > high, Off(value, value.Tolerance.Highest), baseline);
    }

    private static string Off(VariedValue value, double end) => value.Nominal == 0
        ? Number(end, value.Unit)
        : end == value.Nominal ? "nominal" : SpreadWords.Off(value, end).Trim(' ', '(', ')');

    private static void AddEnd(
        ImmutableArray<Shape>.Builder shapes, double x, bool isLeft, string words, double y) =>
        shapes.Add(new TextShape(
            x + (isLeft ? -5 : 5), y, words, Small, PlotStyle.Grey,
            isLeft ? TextAnchor.End : TextAnchor.Start, HasHalo: true));
}
