using System.Globalization;
using CircuitTransient.Reports;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Tests.Project;
using CircuitTransient.Tests.Studies.Scans;

namespace CircuitTransient.Tests.Reports.Studies;

public class ScanPlotTests
{
    // The first crest comes half a period after the switch closes, π √(L C) = 20 µs.
    private const string Ringing = """
        source    Feed at s : 48 V
        switch    K from s to a : open, closes at 1 µs
        inductor  L from a to b : 4 µH
        resistor  R from b to c : 100 mΩ
        capacitor C from c to ground : 10 µF
        observe voltage of c
        require voltage of c at most 80 V
        until 200 µs
        """;

    private const string Angle = """
        source E at s : sine of 10 V at 50 Hz phase 10°
        resistor R from s to r : 1 Ω
        inductor L from r to ground : 45 mH
        observe current through L
        require current through L between -2 A and 2 A
        until 40 ms
        """;

    [Theory]
    [InlineData("netlists/bullwheel-bus.cause", "Rpre from 22 Ω to 100 Ω in 10 steps")]
    [InlineData("netlists/bullwheel-bus.cause", "Rpre from 30 Ω to 200 Ω in 40 steps")]
    [InlineData("netlists/caliper-deck.cause", "Rsn from 10 Ω to 1 kΩ in 6 steps a decade")]
    public void No_label_lies_over_a_curve_or_over_another_label(string file, string words)
    {
        using var fonts = new PlotFonts();
        var shapes = ScanPlot.Draw(Scanning.Run(Repository.Read(file), ("--part", words)), fonts).Shapes;
        var labels = shapes.OfType<TextShape>().Where(t => t.HasHalo).ToArray();
        var points = shapes.OfType<PolylineShape>().SelectMany(line => Along(line)).ToArray();

        Assert.NotEmpty(labels);
        Assert.All(labels, label =>
        {
            var (left, right) = Edges(label, fonts);
            Assert.DoesNotContain(points, p =>
                p.X > left && p.X < right && p.Y > label.Y - (0.7 * label.Size) && p.Y < label.Y);
            Assert.DoesNotContain(labels, other => other != label && Math.Abs(other.Y - label.Y) < label.Size
                && Edges(other, fonts).Left < right && left < Edges(other, fonts).Right);
        });
    }

    [Fact]
    public void A_mark_at_zero_has_no_sign()
    {
        var drawn = Words(Scanning.Run(Angle, ("--phase", "E from -64° to 60° in 31° steps")));

        Assert.Contains("0", drawn);
        Assert.DoesNotContain(drawn, text => text.StartsWith("-0", StringComparison.Ordinal)
            && double.TryParse(text, CultureInfo.InvariantCulture, out var value) && value == 0);
    }

    [Fact]
    public void What_rounding_leaves_of_a_reached_zero_is_zero()
    {
        var reached = new ReachedLine("", "V", 0.3, -1, "at most").Of(0.1 + 0.2);

        Assert.Equal("0", reached.ToString(CultureInfo.InvariantCulture));
        Assert.Equal(-0.1, new ReachedLine("", "V", 0.3, -1, "at most").Of(0.4), 1e-15);
    }

    [Theory]
    [InlineData("until 200 µs", 80, 110)] // enlarged: four times as long as to the latest peak, and no more
    [InlineData("until 60 µs", 50, 60)] // the peaks take up much of it: whole
    public void A_family_whose_peaks_are_a_small_part_of_the_study_is_enlarged(
        string until, double least, double most)
    {
        var (ticks, name) = Time(Scanning.Run(
            Ringing.Replace("until 200 µs", until, StringComparison.Ordinal),
            ("--part", "R from 50 mΩ to 200 mΩ in 3 steps")));

        Assert.Equal("time (µs)", name);
        Assert.InRange(ticks[^1], least, most);
    }

    [Fact]
    public void A_family_over_a_scanned_event_counts_from_it()
    {
        var (ticks, name) = Time(Scanning.Run(Ringing, ("--event", "K closes from 1 µs to 40 µs")));

        Assert.Equal("µs after K closes", name);
        Assert.Equal(0, ticks[0]);
        Assert.InRange(ticks[^1], 80, 110);
    }

    // At C = 1 mF a crest comes ten times later than at C = 10 µF.
    [Fact]
    public void The_family_of_a_map_is_enlarged_about_its_worst_where_its_corners_peak_far_apart()
    {
        var (ticks, _) = Time(Scanning.Run(
            Ringing, ("--part", "R from 50 mΩ to 1 Ω in E3"), ("--part", "C from 10 µF to 1 mF in E3")));

        Assert.InRange(ticks[^1], 80, 110);
    }

    private static IEnumerable<string> Words(ScanResult result)
    {
        using var fonts = new PlotFonts();
        return [.. ScanPlot.Draw(result, fonts).Shapes.OfType<TextShape>().Select(t => t.Text)];
    }

    /// <summary>The marks along the family's time, and what they count.</summary>
    private static (double[] Ticks, string Name) Time(ScanResult result)
    {
        using var fonts = new PlotFonts();
        var texts = ScanPlot.Draw(result, fonts).Shapes.OfType<TextShape>().ToArray();
        var name = texts.First(t => t.Text.StartsWith("time (", StringComparison.Ordinal)
            || t.Text.Contains(" after ", StringComparison.Ordinal));
        var marks = texts.Where(t => t.Anchor == TextAnchor.Middle && t.Y == name.Y)
            .Select(t => double.Parse(t.Text, CultureInfo.InvariantCulture));
        return ([.. marks.Order()], name.Text);
    }

    private static IEnumerable<PlotPoint> Along(PolylineShape line) => line.Points.Zip(line.Points.Skip(1))
        .SelectMany(piece => Enumerable.Range(0, 1 + (int)double.Hypot(
                piece.Second.X - piece.First.X, piece.Second.Y - piece.First.Y))
            .Select(k => k / (1 + double.Hypot(
                piece.Second.X - piece.First.X, piece.Second.Y - piece.First.Y)))
            .Select(part => new PlotPoint(
                piece.First.X + (part * (piece.Second.X - piece.First.X)),
                piece.First.Y + (part * (piece.Second.Y - piece.First.Y)))));

    private static (double Left, double Right) Edges(TextShape label, PlotFonts fonts)
    {
        var width = fonts.Width(label.Text, label.Size, label.IsStrong);
        return label.Anchor switch
        {
            TextAnchor.End => (label.X - width, label.X),
            TextAnchor.Middle => (label.X - (width / 2), label.X + (width / 2)),
            _ => (label.X, label.X + width),
        };
    }
}
