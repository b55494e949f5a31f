using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>The picture of the waveforms: a panel for each observation, and an enlarged one where a peak
/// is too short to be seen in the whole study.</summary>
public static class WaveformPlot
{
    private const int MostPanels = 24;
    private const double PixelsPerPoint = 2;
    private const double Margin = 20;

    /// <summary>The picture as SVG.</summary>
    public static string Svg(TransientResult result)
    {
        using var fonts = new PlotFonts();
        return SvgRenderer.Write(Draw(result, fonts));
    }

    /// <summary>The picture as PNG, two pixels a point.</summary>
    public static byte[] Png(TransientResult result)
    {
        using var fonts = new PlotFonts();
        return PngRenderer.Write(Draw(result, fonts), fonts, PixelsPerPoint);
    }

    /// <summary>The picture before it is rendered.</summary>
    public static Drawing Draw(TransientResult result, PlotFonts fonts)
    {
        var panels = result
            .Observations.SelectMany(o => Windows(result, o).Select(window => (o, window)))
            .ToArray();
        var shapes = ImmutableArray.CreateBuilder<Shape>();
        var title = result.Circuit.Title ?? result.Circuit.Source.Name;
        var left = 76;
        shapes.Add(
            new TextShape(
                left,
                34,
                fonts.Fitted(title, 19, PlotPanel.Width - left - Margin, isStrong: true),
                19,
                PlotStyle.Ink,
                IsStrong: true));
        var verdict = TerminalSummary.Verdict(result);
        shapes.Add(
            new TextShape(
                left,
                55,
                fonts.Fitted(verdict, 12.5, PlotPanel.Width - left - Margin),
                12.5,
                PlotStyle.Grey));
        var y = 76.0;
        foreach (var (observation, window) in panels.Take(MostPanels))
        {
            var (panel, height) = PlotPanel.Draw(result, observation, window, fonts, y);
            shapes.AddRange(panel);
            y += height;
        }

        if (panels.Length > MostPanels)
        {
            var words =
                $"{panels.Length - MostPanels} more panels are left out; waveforms.csv has them all.";
            shapes.Add(new TextShape(left, y + 12, words, 12.5, PlotStyle.Grey));
            y += 24;
        }

        var source = result.Circuit.Source;
        var foot =
            $"{source.Name}, SHA-256 {source.Sha256[..12]}… · a linear model, a calculation aid";
        shapes.Add(
            new TextShape(
                left,
                y + 10,
                fonts.Fitted(foot, 11, PlotPanel.Width - left - Margin),
                11,
                PlotStyle.Grey));
        return new Drawing(PlotPanel.Width, y + 26, $"Waveforms of {title}", shapes.ToImmutable());
    }

    private static IEnumerable<PlotWindow> Windows(TransientResult result, ObservationResult observation)
    {
        yield return PlotWindow.Whole(result, observation);
        if (PlotWindow.Enlarged(result, observation) is { } enlarged)
        {
            yield return enlarged;
        }
    }
}
