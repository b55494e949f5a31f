using CircuitTransient.Reports;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Reports;

/// <summary>Where the picture of the waveforms writes its labels.</summary>
public sealed class PlotLabelTests
{
    // A needle near the right edge, far below its limit: the note that the limit lies above the panel would
    // stand there too.
    [Fact]
    public void A_limit_above_the_panel_is_named_beside_the_label_of_the_peak()
    {
        var texts = Texts("""
            source S at a : rectangular pulse of 10 V from 9 ms to 9.6 ms
            resistor R at a : 1 kΩ
            observe voltage of a
            require voltage of a at most 100 V
            until 10 ms
            """);
        var (peak, note) = (
            texts.Single(t => t.Text.StartsWith("10.00 V at", StringComparison.Ordinal)),
            texts.Single(t => t.Text == "at most 100.0 V: above this panel"));

        Assert.True(Math.Abs(peak.Y - note.Y) > 12 || note.Anchor == TextAnchor.Start);
    }

    // A peak a little below its limit: the label goes above the line; one far from any keeps its place.
    [Fact]
    public void A_limit_close_to_a_peak_does_not_strike_its_label_through()
    {
        var shapes = Drawn("""
            source S at a : sine of 9.4 V at 100 Hz
            resistor R at a : 1 kΩ
            observe voltage of a
            require voltage of a at most 10 V
            until 10 ms
            """).Shapes;
        var limit = shapes.OfType<LineShape>().Single(l => l.Stroke.Colour == PlotStyle.Limit).Y1;
        var (high, low) = (Label("9.400 V at"), Label("-9.400 V at"));

        Assert.True(high.Y < limit, $"{high.Y} against {limit}");
        Assert.True(low.Y > limit + 100, $"{low.Y} against {limit}");

        TextShape Label(string begin) => shapes.OfType<TextShape>()
            .Single(t => t.Text.StartsWith(begin, StringComparison.Ordinal));
    }

    private static TextShape[] Texts(string text) => [.. Drawn(text).Shapes.OfType<TextShape>()];

    private static Drawing Drawn(string text)
    {
        using var fonts = new PlotFonts();
        return WaveformPlot.Draw(SolvedText.WithWaveform(text, 200).Result, fonts);
    }
}
