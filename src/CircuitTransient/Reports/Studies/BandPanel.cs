using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Reports.Studies;

/// <summary>Between what an observed waveform runs from draw to draw.</summary>
internal static class BandPanel
{
    private const double Left = 76;
    private const double Right = PlotPanel.Width - 210;
    private const double Height = 200;
    private const double Small = 11.5;

    /// <summary>Draws the panel below a height.</summary>
    /// <returns>How high it is.</returns>
    public static double Draw(
        SpreadResult spread, WaveformBand band, ObservationResult observation, PlotWindow window,
        PlotFonts fonts, ImmutableArray<Shape>.Builder shapes, double top)
    {
        var waves = new[] { band.Nominal, band.Least, band.Low, band.High, band.Greatest }
            .Select(values => PlotTrace.Within(band.Times, values, window.From, window.To)
                .RemoveAll(p => !double.IsFinite(p.Y)))
            .ToArray();
        if (waves.Any(wave => wave.Length < 2))
        {
            return 0;
        }

        var limits = PlotLimit.On(spread.Nominal, observation)
            .RemoveAll(limit => limit.To <= window.From || limit.From >= window.To);
        var (from, to) = (waves[1].Min(p => p.Y), waves[4].Max(p => p.Y));
        foreach (var limit in limits.Where(l => l.Value > from - (0.8 * (to - from))
            && l.Value < to + (0.8 * (to - from))))
        {
            (from, to) = (Math.Min(from, limit.Value), Math.Max(to, limit.Value));
        }

        var room = to > from ? 0.08 * (to - from) : to != 0 ? Math.Abs(to) : 1;
        var plotTop = top + 30;
        var frame = new PlotFrame(
            new PlotScale(window.From - window.Origin, window.To - window.Origin, Left, Right),
            new PlotScale(from - room, to + room, plotTop + Height, plotTop));
        var words = window == PlotWindow.Whole(spread.Nominal, observation) ? "" : $": {window.Words()}";
        var title = $"{observation.Name}{words}, {band.Draws} draws";
        frame.Draw(
            shapes, fonts.Fitted(title, 14, Right - Left, isStrong: true), ("s", observation.Unit),
            unit => window.OriginName is null ? $"time ({unit})"
                : fonts.Fitted($"{unit} after {window.OriginName}", Small, 180, isStrong: true));
        shapes.Add(new AreaShape([.. Line(waves[1]), .. Line(waves[4]).Reverse()], PlotStyle.WideBand));
        shapes.Add(new AreaShape([.. Line(waves[2]), .. Line(waves[3]).Reverse()], PlotStyle.Band));
        shapes.Add(new PolylineShape(Line(waves[0]), PlotStyle.Total));
        AddLimits(shapes, frame, window, limits);
        AddKey(shapes, plotTop);
        return Height + 68;

        ImmutableArray<PlotPoint> Line(ImmutableArray<PlotPoint> wave) =>
            [.. wave.Select(p => new PlotPoint(frame.X.Place(p.X - window.Origin), frame.Y.Place(p.Y)))];
    }

    private static void AddLimits(
        ImmutableArray<Shape>.Builder shapes, PlotFrame frame, PlotWindow window,
        ImmutableArray<PlotLimit> limits)
    {
        foreach (var limit in limits.Where(l => l.Value >= frame.Y.From && l.Value <= frame.Y.To))
        {
            var y = frame.Y.Place(limit.Value);
            var x1 = frame.X.Place(Math.Max(limit.From, window.From) - window.Origin);
            var x2 = frame.X.Place(Math.Min(limit.To, window.To) - window.Origin);
            shapes.Add(new LineShape(x1, y, x2, y, new Stroke(PlotStyle.Limit, 1.2, [8, 4])));
            shapes.Add(new TextShape(
                x2 - 6, y - 5, limit.Words, Small, PlotStyle.Limit, TextAnchor.End, HasHalo: true));
        }
    }

    private static void AddKey(ImmutableArray<Shape>.Builder shapes, double top)
    {
        var x = Right + 22;
        shapes.Add(new LineShape(x, top + 8, x + 18, top + 8, PlotStyle.Total));
        shapes.Add(new RectangleShape(x, top + 22, 18, 10, PlotStyle.Band));
        shapes.Add(new RectangleShape(x, top + 40, 18, 10, PlotStyle.WideBand));
        foreach (var (row, words) in ((int, string)[])
            [(0, "nominal"), (1, "9 of 10 draws"), (2, "every draw")])
        {
            shapes.Add(new TextShape(x + 26, top + 12 + (18 * row), words, Small, PlotStyle.Ink));
        }
    }
}
