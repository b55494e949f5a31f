using System.Xml.Linq;
using CircuitTransient.Reports;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Tests.Studies.Spreads;

namespace CircuitTransient.Tests.Reports.Studies;

public class SpreadReportTests
{
    internal static readonly DocumentSchema Schema = new(SpreadJson.Schema);

    private static readonly Lazy<SpreadResult> Release = new(() => Spreading.Of(
        """
        circuit "A coil <let go> & caught"
        source    Feed at s : 24 V ±10 %
        switch    K1 from s to a : closed, opens at 1 ms
        inductor  L1 from a to ground : 50 mH -10 % +20 %, carrying 480 mA, rated 600 mA
        resistor  R1 from a to g : 100 Ω ±5 % normal
        capacitor C1 from g to ground : 10 µF ±10 %, charged to 24 V
        observe voltage across K1 as "contact, \"K1\""
        observe time after which current through L1 stays below 150 mA as "release"
        require voltage across K1 at most 90 V because "contact"
        until 30 ms
        """.Replace("\\\"K1\\\"", "K1", StringComparison.Ordinal), draws: 60));

    [Fact]
    public void The_document_obeys_its_schema() =>
        Assert.Empty(Schema.Faults(SpreadJson.Write(Release.Value)));

    [Fact]
    public void A_document_without_draws_obeys_it_too() =>
        Assert.Empty(Schema.Faults(SpreadJson.Write(Release.Value with { Draws = null, Worst = null })));

    [Fact]
    public void The_schema_refuses_what_is_not_such_a_document() =>
        Assert.NotEmpty(Schema.Faults(SpreadJson.Write(Release.Value)
            .Replace("\"kind\": \"margin\"", "\"kind\": \"room\"", StringComparison.Ordinal)));

    [Fact]
    public void The_table_has_a_row_for_every_draw()
    {
        var lines = SpreadCsv.Write(Release.Value).TrimEnd().Split("\r\n");

        Assert.Equal(61, lines.Length);
        Assert.StartsWith("draw,Feed (V),L1 (H),R1 (Ω),C1 (F),\"max of contact, K1 (V)\"", lines[0]);
        Assert.All(lines[1..], line => Assert.Equal(lines[1].Split(',').Length, line.Split(',').Length));
    }

    [Fact]
    public void The_summary_keeps_within_its_width_and_says_verdict_first()
    {
        var lines = SpreadSummary.Write(Release.Value, ["output/release/spread.json"]).Split('\n');

        Assert.All(lines, line => Assert.InRange(line.Length, 0, 100));
        Assert.StartsWith("Does not hold", lines[1]);
        Assert.Contains(lines, line => line.Contains("60 random draws (seed 1)", StringComparison.Ordinal));
    }

    [Fact]
    public void The_picture_is_drawn_alike_and_well_formed()
    {
        var svg = SpreadPlot.Svg(Release.Value);

        Assert.Equal(svg, SpreadPlot.Svg(Release.Value));
        Assert.Contains("A coil <let go> & caught", XDocument.Parse(svg).Root!.Value);
        Assert.Equal((byte)'P', SpreadPlot.Png(Release.Value)[1]);
    }

    [Fact]
    public void The_bars_stand_in_the_order_of_their_length()
    {
        using var fonts = new PlotFonts();
        var bars = SpreadPlot.Draw(Release.Value, fonts).Shapes.OfType<RectangleShape>()
            .Where(shape => shape.Fill == PlotStyle.Accent).Select(shape => shape.Width).ToArray();

        Assert.Equal(4, bars.Length);
        Assert.Equal(bars.OrderDescending(), bars);
    }

    [Fact]
    public void The_section_escapes_what_the_user_wrote()
    {
        var html = SpreadSection.Of(Release.Value).Body.ToString();

        Assert.DoesNotContain("<let go>", html);
        Assert.Contains("Does not hold", html);
    }
}
