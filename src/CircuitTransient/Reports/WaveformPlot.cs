using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Reports;

/// <summary>The picture of the waveforms: a panel for each observation, and an enlarged one where a peak
/// is too short to be seen in the whole study.</summary>
public static class WaveformPlot
{
    private const int MostPanels = 24;

    /// <summary>The picture as SVG.</summary>
    public static string Svg(TransientResult result) => PlotPage.Svg(fonts => Draw(result, fonts));

    /// <summary>The picture as PNG, two pixels a point.</summary>
    public static byte[] Png(TransientResult result) => PlotPage.Png(fonts => Draw(result, fonts));

    /// <summary>The picture before it is rendered.</summary>
    public static Drawing Draw(TransientResult result, PlotFonts fonts)
    {
        var panels = result
            .Observations.SelectMany(o => Windows(result, o).Select(window => (o, window)))
            .ToArray();
        var shapes = ImmutableArray.CreateBuilder<Shape>();
        var title = result.Circuit.Title ?? result.Circuit.Source.Name;
        shapes.Add(PlotPage.Title(title, fonts));
        shapes.Add(PlotPage.Remark(TerminalSummary.Verdict(result), 55, fonts));
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
            shapes.Add(PlotPage.Remark(words, y + 12, fonts));
            y += 24;
        }

        shapes.Add(PlotPage.Foot(result.Circuit, y + 10, fonts));
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
