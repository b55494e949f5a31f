using System.Collections.Immutable;
using CircuitTransient.Studies.Overlays;

namespace CircuitTransient.Reports.Studies;

/// <summary>The picture of an overlay: each record with the model over it, and below it what is
/// left.</summary>
public static class OverlayPlot
{
    private const double Left = PlotPage.Left;
    private const double Right = PlotPanel.Width - 210;
    private const double Small = 11.5;
    private const double MainHeight = 250;
    private const double LeftOverHeight = 90;
    private const int MostRecords = 12;

    private static readonly Stroke RecordStroke = new("#b87b1f", 1.2);
    private static readonly Stroke BandStroke = new("#e3c796", 1);
    private static readonly Stroke ModelStroke = new(PlotStyle.Ink, 1.6);
    private static readonly Stroke NoiseStroke = new(PlotStyle.Limit, 1, [6, 4]);

    /// <summary>The picture as SVG.</summary>
    public static string Svg(OverlayResult result) => PlotPage.Svg(fonts => Draw(result, fonts));

    /// <summary>The picture as PNG, two pixels a point.</summary>
    public static byte[] Png(OverlayResult result) => PlotPage.Png(fonts => Draw(result, fonts));

    /// <summary>The picture before it is rendered.</summary>
    public static Drawing Draw(OverlayResult result, PlotFonts fonts)
    {
        var shapes = ImmutableArray.CreateBuilder<Shape>();
        var title = result.Circuit.Title ?? result.Circuit.Source.Name;
        shapes.Add(PlotPage.Title(title, fonts));
        shapes.Add(PlotPage.Remark(OverlayWords.Verdict(result), 55, fonts));
        var y = 92.0;
        foreach (var record in result.Records.Take(MostRecords))
        {
            y = AddRecord(shapes, record, fonts, y);
        }

        if (result.Records.Length > MostRecords)
        {
            shapes.Add(PlotPage.Remark(
                $"{result.Records.Length - MostRecords} more records are left out; overlay.csv has them all.",
                y, fonts));
            y += 24;
        }

        shapes.Add(PlotPage.Foot(result.Circuit, y, fonts));
        return new Drawing(
            PlotPanel.Width, y + 18, $"Records over the model of {title}", shapes.ToImmutable());
    }

    private static double AddRecord(
        ImmutableArray<Shape>.Builder shapes, RecordComparison record, PlotFonts fonts, double top)
    {
        var trace = record.Trace;
        var heading = $"{record.File} over {record.Observation}: {OverlayWords.Verdict(record)}";
        shapes.Add(new TextShape(
            Left, top - 14, fonts.Fitted(heading, 14, PlotPage.Width, isStrong: true), 14, PlotStyle.Ink,
            IsStrong: true));
        var time = new PlotScale(trace.Times[0], trace.Times[^1], Left, Right);
        var (low, high) = Range(trace.Record.Concat(trace.Model));
        var level = new PlotScale(low, high, top + MainHeight, top);
        AddFrame(shapes, time, level, record.Unit, 5, withTimes: false, fonts);
        AddBand(shapes, trace, time, level);
        AddLine(shapes, trace.Times, trace.Record, time, level, RecordStroke);
        AddLine(shapes, trace.Times, trace.Model, time, level, ModelStroke);
        AddKey(shapes, top + 14, "record", RecordStroke);
        AddKey(shapes, top + 32, "model, gain and level applied", ModelStroke, fonts);

        var below = top + MainHeight + 26;
        var left = trace.Record.Zip(trace.Model, (r, m) => r - m).ToImmutableArray();
        var reach = Math.Max(left.Max(Math.Abs), 4 * record.Noise.Value);
        reach = reach > 0 ? reach : 1;
        var small = new PlotScale(-1.1 * reach, 1.1 * reach, below + LeftOverHeight, below);
        AddFrame(shapes, time, small, record.Unit, 3, withTimes: true, fonts);
        AddLine(shapes, trace.Times, left, time, small, RecordStroke);
        foreach (var bound in (double[])[-2 * record.Noise.Value, 2 * record.Noise.Value])
        {
            shapes.Add(new LineShape(Left, small.Place(bound), Right, small.Place(bound), NoiseStroke));
        }

        AddKey(shapes, below + 14, "record less model", RecordStroke, fonts);
        AddKey(shapes, below + 32, "twice the noise", NoiseStroke);
        return below + LeftOverHeight + 76;
    }

    private static void AddFrame(
        ImmutableArray<Shape>.Builder shapes, PlotScale time, PlotScale level, string unit, int aim,
        bool withTimes, PlotFonts fonts)
    {
        var (top, bottom) = (level.End, level.Start);
        shapes.Add(new RectangleShape(Left, top, Right - Left, bottom - top, "#fbfcfc"));
        var levels = level.Ticks(unit, aim);
        foreach (var (value, label) in levels.Marks)
        {
            var y = level.Place(value);
            shapes.Add(new LineShape(
                Left, y, Right, y, new Stroke(value == 0 ? PlotStyle.Axis : PlotStyle.Grid, 1)));
            shapes.Add(new TextShape(Left - 8, y + 4, label, Small, PlotStyle.Grey, TextAnchor.End));
        }

        shapes.Add(new TextShape(
            Left - 8, top - 6, levels.Unit, Small, PlotStyle.Ink, TextAnchor.End, IsStrong: true));
        var times = time.Ticks("s", 9);
        foreach (var (value, label) in times.Marks)
        {
            var x = time.Place(value);
            shapes.Add(new LineShape(x, top, x, bottom, new Stroke(PlotStyle.Grid, 1)));
            if (withTimes)
            {
                shapes.Add(new TextShape(x, bottom + 16, label, Small, PlotStyle.Grey, TextAnchor.Middle));
            }
        }

        if (withTimes)
        {
            shapes.Add(new TextShape(
                Right + 22, bottom + 16,
                fonts.Fitted($"time of the study ({times.Unit})", Small, 180, isStrong: true), Small,
                PlotStyle.Ink, IsStrong: true));
        }
    }

    private static void AddBand(
        ImmutableArray<Shape>.Builder shapes, OverlayTrace trace, PlotScale time, PlotScale level)
    {
        for (var k = 0; k < trace.HalfWidths.Length; k++)
        {
            var x = time.Place(trace.Times[k]);
            shapes.Add(new LineShape(
                x, level.Place(trace.Record[k] - trace.HalfWidths[k]), x,
                level.Place(trace.Record[k] + trace.HalfWidths[k]), BandStroke));
        }
    }

    private static void AddLine(
        ImmutableArray<Shape>.Builder shapes, ImmutableArray<double> times, ImmutableArray<double> values,
        PlotScale time, PlotScale level, Stroke stroke)
    {
        ImmutableArray<PlotPoint> points = [.. times.Zip(values, (t, v) => new PlotPoint(t, v))];
        foreach (var line in PlotTrace.Lines(points, time, level))
        {
            shapes.Add(new PolylineShape(line, stroke));
        }
    }

    private static void AddKey(
        ImmutableArray<Shape>.Builder shapes, double y, string words, Stroke stroke, PlotFonts? fonts = null)
    {
        shapes.Add(new LineShape(Right + 10, y - 4, Right + 32, y - 4, stroke));
        var fitted = fonts is null ? words : fonts.Fitted(words, Small, PlotPanel.Width - Right - 44);
        shapes.Add(new TextShape(Right + 38, y, fitted, Small, PlotStyle.Ink));
    }

    private static (double Low, double High) Range(IEnumerable<double> values)
    {
        var finite = values.Where(double.IsFinite).ToArray();
        var (low, high) = (finite.Min(), finite.Max());
        var room = high > low ? high - low : Math.Max(1e-12, Math.Abs(high));
        return (low - (0.08 * room), high + (0.08 * room));
    }
}
