using System.Text.Json;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Tests.Project;
using CircuitTransient.Tests.Reports.Studies;

namespace CircuitTransient.Tests.Studies.Spreads;

/// <summary>What jumps between neighbouring corners, against closed forms.</summary>
public class EdgeJumpTests
{
    // v = 10 V e^(−α t) (cos ω t + α/ω sin ω t) has its crests 10 V e^(−n π α/ω) at n π/ω.
    private const string Release = """
        resistor  R1 from a to b : 55 Ω ±10 %
        inductor  L1 from b to ground : 10 mH
        capacitor C1 from a to ground : 1 µF ±5 %, charged to 10 V
        observe time after which voltage of a stays below 4.1 V as "release"
        until 10 ms
        """;

    // Two pulses, each as long as the time constant of 1 ms, the second from 3 ms on.
    private const string Pulses = """
        source    A from in to mid : rectangular pulse of 10 V from 0 s to 1 ms
        source    B from mid to ground : rectangular pulse of 9.5 V from 3 ms to 4 ms
        value     Gain : 1 ±5 %
        dependent source Amp from out to ground : Gain times voltage from in to mid
        dependent source Sum from top to out : 1 times voltage of mid
        resistor  R1 from top to a : 1 kΩ
        capacitor C1 from a to ground : 1 µF
        observe voltage of a
        until 6 ms
        """;

    [Fact]
    public void A_reading_that_jumps_is_told_with_the_corner_the_place_and_both_values()
    {
        var spread = Spreading.Of(Release);
        var jump = Assert.Single(spread.Jumps.Jumps, j => j.IsOfValue);

        // The second crest, at π/ω, is 4.1 V where α/ω = ln(10/4.1)/π.
        var q = Math.Log(10 / 4.1) / Math.PI;
        var c = jump.Point[1];
        var omega = 1 / Math.Sqrt(10e-3 * c * (1 + (q * q)));
        var resistance = 2 * 10e-3 * q * omega;
        Assert.Contains(c, (double[])[0.95e-6, 1.05e-6]);
        Assert.Equal("R1", spread.Varied.Values[jump.Value].Name);
        Assert.Equal(resistance, jump.Place, 1e-6 * resistance);
        Assert.InRange(jump.Bracket, 0, 1e-6 * resistance);
        Assert.Equal(Math.PI / omega, jump.ValueBefore, 1e-3 / omega);
        Assert.Equal(FirstBelow(q * omega, omega), jump.ValueAfter, 1e-6 / omega);
        var words = SpreadJumps.Words(spread, jump);
        Assert.StartsWith("release jumps from ", words);
        Assert.Contains("as R1 passes ", words);
        Assert.Contains(c < 1e-6 ? ", with C1 -5 %" : ", with C1 +5 %", words);
        Assert.Contains("one figure jumps", SpreadJumps.Account(spread));
    }

    [Fact]
    public void A_crest_that_takes_over_moves_the_instant_and_leaves_the_value_a_kink()
    {
        var spread = Spreading.Of(Pulses);
        var jump = Assert.Single(
            spread.Jumps.Jumps, j => spread.Figures[j.Figure].Figure.Name == "max of voltage of a");

        // Crests: g·10 V (1 − 1/e) at 1 ms; at 4 ms 9.5 V (1 − 1/e) and e^(−3) of the first one.
        var rise = 1 - Math.Exp(-1);
        var place = 9.5 / (10 * (1 - Math.Exp(-3)));
        Assert.False(jump.IsOfValue);
        Assert.Equal(place, jump.Place, 1e-7);
        Assert.Equal((4e-3, 1e-3), (Math.Round(jump.TimeBefore, 9), Math.Round(jump.TimeAfter, 9)));
        Assert.Equal(10 * place * rise, jump.ValueAfter, 1e-6);
        Assert.Equal(jump.ValueBefore, jump.ValueAfter, 1e-6);
        Assert.Equal(10 * rise * Math.Exp(-3), jump.SlopeBefore!.Value, 1e-8);
        Assert.Equal(10 * rise, jump.SlopeAfter!.Value, 1e-8);
        Assert.Contains("another extreme takes over as Gain passes ", SpreadJumps.Words(spread, jump));
        Assert.Contains("has only a kink there", SpreadJumps.Words(spread, jump));
    }

    [Fact]
    public void What_is_steep_is_no_jump()
    {
        // A resonance a hundred times as high as far from it, and narrower than what is sampled.
        var spread = Spreading.Of("""
            source    Feed at in : sine of 1 V at 1 kHz
            resistor  R1 from in to a : 0.3142 Ω
            inductor  L1 from a to b : 10 mH
            capacitor C1 from b to ground : 2.56 µF ±10 %
            start settled
            observe current through L1
            until 1 ms
            """);

        Assert.InRange(spread.Figure("max of current through L1").Greatest!.Value, 3, 1 / 0.3142);
        Assert.DoesNotContain(spread.Jumps.Jumps, j => j.IsOfValue);
        Assert.Contains("no figure was seen to jump", SpreadJumps.Account(spread));
    }

    [Fact]
    public void A_figure_that_ceases_to_be_is_told()
    {
        var spread = Spreading.Of("""
            source    Feed at in : 5 V ±20 %
            resistor  R1 from in to a : 1 kΩ
            capacitor C1 from a to ground : 1 µF
            switch    K1 from a to b : open, closes when voltage of a rises above 4.5 V
            resistor  R2 from b to ground : 2 kΩ
            observe voltage of b as "after closing" from when K1 closes
            until 3 ms
            """);
        var jump = Assert.Single(
            spread.Jumps.Jumps, j => spread.Figures[j.Figure].Figure.Name == "max of after closing");

        Assert.True(jump.IsOfValue);
        Assert.Equal(4.5 / (1 - Math.Exp(-3)), jump.Place, 1e-5);
        Assert.True(double.IsNaN(jump.ValueBefore));
        Assert.Equal(4.5, jump.ValueAfter, 1e-4);
        Assert.Contains("jumps from none to 4.5", SpreadJumps.Words(spread, jump));
    }

    [Fact]
    public void Every_ring_crest_told_of_the_bank_gallery_takes_over_there()
    {
        var spread = Spreading.Of(Repository.Read("netlists/bank-gallery.cause"));
        var rings = spread.Jumps.Jumps.Where(jump => jump.Ring is not null).ToArray();

        Assert.NotEmpty(rings);
        foreach (var jump in rings)
        {
            double[] times = [.. new[] { -1, 1 }.Select(side => Time(spread, jump, side))];
            Assert.Equal(jump.TimeBefore, times[0], 1e-6);
            Assert.Equal(jump.TimeAfter, times[1], 1e-6);
            Assert.Equal(jump.ValueBefore, jump.ValueAfter, 1e-6 * Math.Abs(jump.ValueAfter));
            Assert.Equal(
                jump.Ring!.Periods / jump.Ring.Frequency, Math.Abs(times[1] - times[0]),
                0.15 / jump.Ring.Frequency);
        }
    }

    [Fact]
    public void The_document_holds_every_jump()
    {
        foreach (var text in (string[])[Release, Pulses])
        {
            var spread = Spreading.Of(text);
            var written = SpreadJson.Write(spread);
            using var document = JsonDocument.Parse(written);
            var jumps = document.RootElement.GetProperty("jumps");

            Assert.Empty(SpreadReportTests.Schema.Faults(written));
            Assert.Equal(spread.Jumps.Jumps.Length, jumps.GetProperty("found").GetArrayLength());
            Assert.Equal(spread.Jumps.Solves, jumps.GetProperty("solves").GetInt64());
            var words = SpreadJumps.Words(spread, spread.Jumps.Jumps[0]);
            Assert.Equal(words, jumps.GetProperty("found")[0].GetProperty("words").GetString());
            Assert.Contains(words, SpreadSection.Of(spread).Body.ToString());
        }
    }

    [Fact]
    public void Of_many_values_the_edges_at_the_given_corners_are_looked_at()
    {
        var (varied, _) = Spreading.Varied(string.Join('\n', Enumerable.Range(1, 10).Select(
            i => $"resistor R{i} from a to ground : {i} Ω ±10 %")) + "\nsource Feed at a : 1 A\nuntil 1 s\n");
        var ranges = new ValueRanges(varied.Values);
        var edges = new Edges(ranges);
        var corner = ranges.Corners(5, 1);

        Assert.Equal(5120, edges.Count);
        Assert.Equal(5120, edges.Chosen([], 5120).DistinctBy(Key).Count());
        var some = edges.Chosen([corner, corner, ranges.Corners(4, 1)], 1000);
        Assert.Equal(19, some.DistinctBy(Key).Count()); // two corners with one edge between them
        Assert.All(some, edge => Assert.Equal(ranges.Lowest(edge.Value), edge.Corner[edge.Value]));

        static string Key(Edge edge) => $"{edge.Value} {string.Join(' ', edge.Corner)}";
    }

    private static double Time(SpreadResult spread, EdgeJump jump, int side)
    {
        double[] point = [.. jump.Point];
        point[jump.Value] = jump.Place * (1 + (side * 1e-4));
        var figure = spread.Figures[jump.Figure].Figure;
        return StudySolver.At(spread.Varied.At(point).Value!, [figure]).Value!.Times[0]!.Value;
    }

    /// <summary>When 10 V e^(−α t) (cos ω t + α/ω sin ω t) first falls to 4.1 V.</summary>
    private static double FirstBelow(double alpha, double omega)
    {
        var (low, high) = (0.0, Math.PI / 2 / omega);
        for (var i = 0; i < 60; i++)
        {
            var t = (low + high) / 2;
            var v = 10 * Math.Exp(-alpha * t) * (Math.Cos(omega * t) + (alpha / omega * Math.Sin(omega * t)));
            (low, high) = v > 4.1 ? (t, high) : (low, t);
        }

        return low;
    }
}
