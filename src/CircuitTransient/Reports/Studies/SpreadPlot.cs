using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Reports.Studies;

/// <summary>The picture of a study of tolerances: what each value does to the worst figure, how the draws are
/// spread, and the band of every observed waveform.</summary>
public static class SpreadPlot
{
    private const int MostBands = 12;

    /// <summary>The stretches of time that the picture enlarges.</summary>
    public static ImmutableArray<WaveformDetail> Details(TransientResult nominal) =>
    [
        .. from observation in nominal.Observations.Take(MostBands)
           let window = PlotWindow.Enlarged(nominal, observation)
           where window is not null
           select new WaveformDetail(observation.Name, window.From, window.To),
    ];

    /// <summary>The picture as SVG.</summary>
    public static string Svg(SpreadResult spread) => PlotPage.Svg(fonts => Draw(spread, fonts));

    /// <summary>The picture as PNG, two pixels a point.</summary>
    public static byte[] Png(SpreadResult spread) => PlotPage.Png(fonts => Draw(spread, fonts));

    /// <summary>The picture before it is rendered.</summary>
    public static Drawing Draw(SpreadResult spread, PlotFonts fonts)
    {
        var circuit = spread.Varied.Circuit;
        var shapes = ImmutableArray.CreateBuilder<Shape>();
        var title = $"{circuit.Title ?? circuit.Source.Name}: every tolerance";
        shapes.Add(PlotPage.Title(title, fonts));
        shapes.Add(PlotPage.Remark(SpreadWords.Verdict(spread), 55, fonts));
        var y = 76.0;
        if (spread.Worst is { } worst)
        {
            y += EffectPanel.Draw(spread, worst, fonts, shapes, y);
            y += HistogramPanel.Draw(spread, worst.Figure, fonts, shapes, y);
        }

        foreach (var band in (spread.Draws?.Envelopes ?? []).Take(MostBands))
        {
            var observation = spread.Nominal.Observations.FirstOrDefault(o =>
                o.Name == circuit.Observations[band.Observation].Name);
            if (observation is null)
            {
                continue;
            }

            var whole = PlotWindow.Whole(spread.Nominal, observation);
            y += BandPanel.Draw(spread, band, observation, whole, fonts, shapes, y);
            if (PlotWindow.Enlarged(spread.Nominal, observation) is { } enlarged)
            {
                y += BandPanel.Draw(spread, band, observation, enlarged, fonts, shapes, y);
            }
        }

        shapes.Add(PlotPage.Foot(circuit, y + 10, fonts));
        return new Drawing(PlotPanel.Width, y + 26, $"Tolerances of {title}", shapes.ToImmutable());
    }
}
