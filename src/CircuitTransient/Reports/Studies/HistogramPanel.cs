using System.Collections.Immutable;
using CircuitTransient.Studies.Spreads;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports.Studies;

/// <summary>How the random draws of a figure are spread, beside its hard extremes.</summary>
internal static class HistogramPanel
{
    private const double Left = 76;
    private const double Right = PlotPanel.Width - 210;
    private const double Height = 170;

    /// <summary>Draws the panel below a height; nothing where there are no draws.</summary>
    /// <returns>How high it is.</returns>
    public static double Draw(
        SpreadResult spread, int figure, PlotFonts fonts, ImmutableArray<Shape>.Builder shapes, double top)
    {
        if (spread.Draws is not { } draws || draws.Figures[figure] is not { Count: > 0 } statistics)
        {
            return 0;
        }

        var range = spread.Figures[figure];
        var scale = JudgedScale.Of(spread, range);
        var histogram = statistics.Histogram;
        var ends = new[]
        {
            histogram.From, histogram.To, range.Least?.Value ?? histogram.From,
            range.Greatest?.Value ?? histogram.To,
        }.Where(double.IsFinite).Select(scale.At).ToArray();
        var (from, to) = EffectPanel.Around(ends, scale.Limit);
        var plotTop = top + 30;
        var frame = new PlotFrame(
            new PlotScale(from, to, Left, Right),
            new PlotScale(0, 1.25 * histogram.Counts.Max(), plotTop + Height, plotTop));
        var title = $"{scale.Name} in {SpreadWords.Count(draws.Draws, "random draw")}, "
            + $"seed {spread.Options.Seed}";
        frame.Draw(
            shapes, fonts.Fitted(title, 14, Right - Left, isStrong: true), (scale.Unit, ""), unit => unit);
        AddBars(shapes, frame, scale, histogram);
        var grey = new Stroke(PlotStyle.Grey, 1.2, [2, 3]);
        MarkExtreme(range.Least, 0);
        MarkExtreme(range.Greatest, 1);
        frame.Mark(
            shapes, scale.At(range.Nominal ?? double.NaN), "nominal", new Stroke(PlotStyle.Ink, 1.2), row: 2);
        if (scale.Limit is { } limit)
        {
            frame.Mark(shapes, limit, scale.LimitWords, new Stroke(PlotStyle.Limit, 1.2, [8, 4]), row: 3);
        }

        return Height + 68;

        void MarkExtreme(ExtremePoint? point, int row)
        {
            var value = scale.At(point?.Value ?? double.NaN);
            frame.Mark(shapes, value, $"hard extreme {Number(value, scale.Unit)}", grey, row);
        }
    }

    private static void AddBars(
        ImmutableArray<Shape>.Builder shapes, PlotFrame frame, JudgedScale scale,
        CircuitTransient.Studies.Statistics.Histogram histogram)
    {
        var count = histogram.Counts.Length;
        var width = (histogram.To - histogram.From) / count;
        for (var b = 0; b < count; b++)
        {
            var one = frame.X.Place(scale.At(histogram.From + (b * width)));
            var other = frame.X.Place(scale.At(histogram.From + ((b + 1) * width)));
            var y = frame.Y.Place(histogram.Counts[b]);
            if (histogram.Counts[b] > 0)
            {
                shapes.Add(new RectangleShape(
                    Math.Min(one, other), y, Math.Max(1.5, Math.Abs(other - one) - 1), frame.Y.Start - y,
                    PlotStyle.Band));
            }
        }
    }
}
