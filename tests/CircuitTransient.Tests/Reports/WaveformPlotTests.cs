using System.Xml.Linq;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using SkiaSharp;

namespace CircuitTransient.Tests.Reports;

public class WaveformPlotTests
{
    private static readonly XNamespace Svg = "http://www.w3.org/2000/svg";

    [Fact]
    public void The_svg_is_well_formed_and_its_text_stays_text()
    {
        var texts = Texts(SampleResults.Inrush());
        Assert.Contains("voltage of bus", texts);
        Assert.Contains("Kmain closes", texts);
        Assert.Contains("Cbus initial charge", texts);
        Assert.Contains("at most 100.0 A", texts);
    }

    [Fact]
    public void Awkward_names_stay_names()
    {
        var texts = Texts(SampleResults.Awkward());
        Assert.Contains("bus, \"plus\" & <script>alert('1')</script>", texts);
        Assert.Contains(texts, text => text.StartsWith("זרם הגל 電流 🚡", StringComparison.Ordinal));
        Assert.DoesNotContain(
            "<script",
            WaveformPlot.Svg(SampleResults.Awkward()),
            StringComparison.Ordinal);
    }

    [Fact]
    public void A_peak_too_short_to_see_gets_a_panel_of_its_own()
    {
        var texts = Texts(SampleResults.Inrush());
        Assert.Contains("current through Ls: the first 15.5 ms after Kmain closes", texts);
        Assert.Contains("129.3 A, 1.500 ms after Kmain closes", texts);
    }

    [Fact]
    public void A_peak_that_can_be_seen_gets_none()
    {
        var result = SampleResults.Bare();
        var wave = SampleResults.Observed(
            "voltage of a",
            "V",
            [.. Enumerable.Range(0, 101).Select(i => i / 100.0)],
            ["Feed"],
            [t => Math.Sin(2 * Math.PI * t)]);
        var drawn = result with { SampleTimes = [.. Enumerable.Range(0, 101).Select(i => i / 100.0)] };
        Assert.DoesNotContain(Texts(drawn with { Observations = [wave] }), text =>
            text.StartsWith("voltage of a:", StringComparison.Ordinal));
    }

    [Fact]
    public void A_rise_that_ends_with_the_study_is_not_enlarged()
    {
        var times = SampleResults.Inrush().SampleTimes;
        var rising = SampleResults.Observed(
            "I²t through Ls",
            "A²s",
            times,
            ["Feed"],
            [t => 71.9e3 * t / 14]);
        var result = SampleResults.Inrush() with
        {
            Observations = [rising],
            Events = [new(13.99, "Kend", true, 1, 0, 0, 0, null)],
        };
        var texts = Texts(result);
        Assert.DoesNotContain(texts, text => text.StartsWith("I²t through Ls:", StringComparison.Ordinal));
        Assert.Contains("10³ A²s", texts);
        Assert.Contains("71.90·10³ A²s at 14.00 s", texts);
    }

    [Fact]
    public void Causes_that_would_press_the_total_flat_run_off_the_panel()
    {
        var result = SampleResults.Bare();
        var power = SampleResults.Observed(
            "power in R",
            "W",
            result.SampleTimes,
            ["Supply", "Cbus"],
            [t => 1e6 * t, t => (-1e6 * t) + 10 - t]);
        var texts = Texts(result with { Observations = [power] });
        Assert.Contains("Supply (off the panel)", texts);
        Assert.Contains("Cbus (off the panel)", texts);
        Assert.Contains("total", texts);
    }

    [Fact]
    public void Names_at_line_ends_do_not_overlap()
    {
        var result = SampleResults.Bare();
        string[] names = ["a", "b", "c", "d", "e", "f"];
        var equal = SampleResults.Observed(
            "voltage of a",
            "V",
            result.SampleTimes,
            [.. names],
            [.. names.Select(_ => (Func<double, double>)(t => 1))]);
        var places = Elements(result with { Observations = [equal] })
            .Where(text => names.Contains(text.Value) || text.Value == "total")
            .Select(text => (double)text.Attribute("y")!)
            .Order()
            .ToArray();
        Assert.Equal(7, places.Length);
        Assert.All(places.Zip(places.Skip(1)), pair =>
            Assert.InRange(pair.Second - pair.First, 14.9, double.MaxValue));
    }

    [Fact]
    public void An_observation_with_a_window_is_drawn_within_it()
    {
        var result = SampleResults.Inrush();
        var observed = result.Circuit.Observations[1] with { Window = new(null, new Instant(1.0, null)) };
        var circuit = result.Circuit with { Observations = [observed] };
        var texts = Texts(result with { Circuit = circuit, Observations = [result.Observations[1]] });
        Assert.Contains("Kpre closes", texts);
        Assert.DoesNotContain("Kmain closes", texts);
    }

    [Fact]
    public void A_gap_in_a_waveform_is_a_gap_in_its_line()
    {
        var result = SampleResults.Bare() with { SampleTimes = [0, 0.25, 0.5, 0.75, 1] };
        var wave = SampleResults.Observed("voltage of a", "V", result.SampleTimes, ["Feed"], [t => t]);
        var broken = wave with { Total = [0, 0.25, double.NaN, 0.75, 1] };
        var lines = XDocument
            .Parse(WaveformPlot.Svg(result with { Observations = [broken] }))
            .Descendants(Svg + "polyline");
        Assert.Equal(2, lines.Count());
    }

    [Fact]
    public void The_png_is_a_picture_of_the_size_of_the_drawing()
    {
        using var fonts = new PlotFonts();
        var drawing = WaveformPlot.Draw(SampleResults.Inrush(), fonts);
        using var picture = SKBitmap.Decode(WaveformPlot.Png(SampleResults.Inrush()));
        Assert.Equal(Math.Ceiling(2 * drawing.Width), picture.Width);
        Assert.Equal(Math.Ceiling(2 * drawing.Height), picture.Height);
        Assert.Equal(SKColors.White, picture.GetPixel(0, 0));
        var ink = SKColor.Parse(PlotStyle.Ink);
        Assert.Contains(Enumerable.Range(0, picture.Height), y => picture.GetPixel(1600, y) == ink);
    }

    [Fact]
    public void The_same_result_gives_the_same_bytes()
    {
        Assert.Equal(WaveformPlot.Png(SampleResults.Inrush()), WaveformPlot.Png(SampleResults.Inrush()));
        Assert.Equal(WaveformPlot.Svg(SampleResults.Inrush()), WaveformPlot.Svg(SampleResults.Inrush()));
    }

    [Fact]
    public void Very_many_observations_are_cut_and_counted()
    {
        var result = SampleResults.Bare();
        var many = Enumerable
            .Range(0, 30)
            .Select(i => result.Observations[0] with { Name = $"voltage of n[{i}]" });
        var texts = Texts(result with { Observations = [.. many] });
        Assert.Contains("voltage of n[23]", texts);
        Assert.DoesNotContain("voltage of n[24]", texts);
        Assert.Contains("6 more panels are left out; waveforms.csv has them all.", texts);
    }

    private static string[] Texts(TransientResult result) =>
        [.. Elements(result).Select(text => text.Value)];

    private static IEnumerable<XElement> Elements(TransientResult result) =>
        XDocument.Parse(WaveformPlot.Svg(result)).Descendants(Svg + "text");
}
