using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

/// <summary>Colours of neighbouring lines against each other, as the usual kinds of sight see them.</summary>
public class PlotStyleTests
{
    [Fact]
    public void Lines_differ_for_every_kind_of_sight()
    {
        string[] colours =
        [
            PlotStyle.Ink,
            .. Enumerable.Range(0, 6).Select(i => PlotStyle.Cause(i).Colour),
        ];
        Assert.InRange(ColourSight.LeastDistance(colours), 26, 200);
    }

    [Fact]
    public void No_two_causes_share_a_dash() =>
        Assert.Equal(
            6,
            Enumerable.Range(0, 6).Select(i => string.Join(' ', PlotStyle.Cause(i).Dash)).Distinct().Count());

    [Fact]
    public void Lines_stand_out_from_the_paper() =>
        Assert.All(
            Enumerable.Range(0, 6).Select(i => PlotStyle.Cause(i).Colour)
                .Select(colour => ColourSight.Contrast(colour, PlotStyle.Paper)),
            contrast => Assert.InRange(contrast, 3.5, 21));

    [Fact]
    public void Every_word_in_a_picture_reads_at_the_ratio_for_text()
    {
        var svg = WaveformPlot.Svg(SampleResults.Inrush());
        var inks = svg.Split("<text ").Skip(1)
            .Select(text => text[(text.IndexOf("fill=\"", StringComparison.Ordinal) + 6)..][..7])
            .Distinct().ToArray();

        Assert.NotEmpty(inks);
        // WCAG 2.2, success criterion 1.4.3 (from memory)
        Assert.All(inks, ink => Assert.InRange(ColourSight.Contrast(ink, PlotStyle.Paper), 4.5, 21));
    }
}
