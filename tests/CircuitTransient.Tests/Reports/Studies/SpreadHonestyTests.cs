using System.Text.Json;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Statistics;
using CircuitTransient.Tests.Studies.Spreads;

namespace CircuitTransient.Tests.Reports.Studies;

/// <summary>What a study of tolerances owes its reader beside the figures: where the model ends, how sure a
/// probability is, what a file leaves out, and waveforms that were there.</summary>
public class SpreadHonestyTests
{
    // Nominal 10 V, 11 V at the worst case.
    private const string Ceramic = """
        source    Feed at in : 10 V ±10 %
        resistor  R1 from in to a : 1 Ω ±5 %
        capacitor C1 from a to ground : 1 µF ±10 %, linear up to 10.5 V
        require voltage of a at most 12 V
        until 1 ms
        """;

    // The power jumps as K1 closes at 1 ms, and rings at 1 kHz through L1 and C1.
    private const string Ringing = """
        source    Feed at s : 10 V ±5 %
        switch    K1 from s to m : open, closes at 1 ms
        resistor  R1 from m to a : 2 Ω ±10 %
        inductor  L1 from a to b : 1 mH ±10 %
        capacitor C1 from b to ground : 25 µF ±10 %
        resistor  R2 from m to ground : 50 Ω
        observe power in R2
        observe current through L1
        until 1 s
        """;

    [Fact]
    public void A_part_driven_past_its_linear_range_flags_verdict_and_requirement_with_the_direction()
    {
        var spread = Spreading.Of(Ceramic);
        const string doubt = "C1 leaves the range its value is good for";
        const string reach = "C1 is linear up to 10.50 V but reaches 11.00 V at the worst case; passes that "
            + "at 4 of the 8 corners solved: a class 2 ceramic loses capacitance with voltage, and then the "
            + "true voltage peak is higher than shown";

        Assert.True(spread.AllHold);
        Assert.Contains(doubt, SpreadWords.Verdict(spread));
        var summary = string.Join(' ', SpreadSummary.Write(spread, []).Split(
            (char[])[' ', '\n'], StringSplitOptions.RemoveEmptyEntries));
        Assert.Contains(reach, summary);
        Assert.Contains("doubt:", summary);
        var html = SpreadSection.Of(spread).Body.ToString();
        Assert.Contains("in doubt: C1 leaves the range", html);
        Assert.Contains("11.00 V at the worst case", html);
        using var document = JsonDocument.Parse(SpreadJson.Write(spread));
        var limit = Assert.Single(document.RootElement.GetProperty("linearUpTo").EnumerateArray());
        Assert.False(limit.GetProperty("holds").GetBoolean());
        Assert.Equal(10, limit.GetProperty("nominal").GetDouble(), 1e-9);
        Assert.Equal(11, limit.GetProperty("worst").GetDouble(), 1e-9);
        var margin = document.RootElement.GetProperty("figures").EnumerateArray()
            .Single(f => f.GetProperty("kind").GetString() == "margin");
        Assert.Equal(doubt, margin.GetProperty("doubt").GetString());
        Assert.Empty(SpreadReportTests.Schema.Faults(SpreadJson.Write(spread)));
    }

    [Fact]
    public void A_part_that_passes_its_linear_range_only_away_from_the_worst_case_is_counted_there()
    {
        // The requirement is worst at 9 V, where C1 is well within its range; it passes that with Feed over
        // 10.4 V, at 4 of 8 corners, and in 3 of 10 draws.
        var spread = Spreading.Of(
            Ceramic.Replace("10.5 V", "10.4 V", StringComparison.Ordinal)
                .Replace("at most 12 V", "at least 8 V from 0.5 ms", StringComparison.Ordinal), draws: 1000);
        var limit = Assert.Single(spread.Linear);
        var drawn = 1000 - spread.Draws!.Linear[0].Holding;

        Assert.Equal((4L, 8L), (limit.Passed, limit.Corners));
        Assert.Equal(11 / 10.4, limit.Used!.Value, 1e-9);
        Assert.InRange(drawn, 299, 301); // a Latin hypercube of 1000 strata
        var words = Assert.Single(SpreadDoubts.Words(spread));
        Assert.StartsWith(
            "C1 is linear up to 10.40 V but passes that at 4 of the 8 corners solved; reaches 11.00 V at "
            + $"most; passes it in {drawn} of the 1,000 draws: a class 2 ceramic", words);
        Assert.Contains("C1 leaves the range its value is good for", SpreadWords.Verdict(spread));
        using var document = JsonDocument.Parse(SpreadJson.Write(spread));
        var written = Assert.Single(document.RootElement.GetProperty("linearUpTo").EnumerateArray());
        Assert.Equal(4, written.GetProperty("cornersPassed").GetInt32());
        Assert.Equal(drawn, written.GetProperty("drawsPassed").GetInt64());
        Assert.False(written.GetProperty("holds").GetBoolean());
        Assert.Empty(SpreadReportTests.Schema.Faults(SpreadJson.Write(spread)));
    }

    [Fact]
    public void A_part_within_its_linear_range_raises_no_doubt()
    {
        var spread = Spreading.Of(Ceramic.Replace("10.5 V", "11.5 V", StringComparison.Ordinal));

        Assert.DoesNotContain("range", SpreadWords.Verdict(spread));
        Assert.DoesNotContain("doubt", SpreadSummary.Write(spread, []));
        Assert.Contains("\"linearUpTo\"", SpreadJson.Write(spread));
    }

    [Fact]
    public void Bands_have_both_sides_of_a_jump_and_follow_every_crest_in_the_enlarged_stretch()
    {
        var study = Spreading.Study(
            Ringing, draws: 20, cancellation: TestContext.Current.CancellationToken);
        var nominal = Spreading.Varied(Ringing).Nominal;
        var details = SpreadPlot.Details(nominal);
        var bands = study.Finish(_ => { }, details).Draws!.Envelopes;

        // 10 V over 50 Ω from 1 ms on, nothing before.
        var power = bands[0];
        var closing = power.Times.IndexOf(1e-3);
        Assert.Equal(2, power.Nominal[closing], 1e-9);
        Assert.InRange(1e-3 - power.Times[closing - 1], 1e-16, 1e-12);
        Assert.Equal(0, power.Nominal[closing - 1]);
        Assert.Equal(0, power.Greatest[closing - 1]);

        // U/(ω L) e^(−α t) sin ω t: between neighbouring instants a straight line stays as near as one can
        // see.
        var window = details.Single(d => d.Observation == "current through L1");
        Assert.InRange(window.To, 3e-3, 0.1);
        var current = bands[1];
        var (alpha, u) = (2 / (2 * 1e-3), 10.0);
        var omega = Math.Sqrt((1 / (1e-3 * 25e-6)) - (alpha * alpha));
        for (var i = 0; i + 1 < current.Times.Length; i++)
        {
            var (from, to) = (current.Times[i], current.Times[i + 1]);
            if (from >= 1e-3 && to <= window.To)
            {
                var middle = ((from + to) / 2) - 1e-3;
                var exact = u / (omega * 1e-3) * Math.Exp(-alpha * middle) * Math.Sin(omega * middle);
                Assert.Equal(exact, (current.Nominal[i] + current.Nominal[i + 1]) / 2, 0.01);
            }
        }
    }

    [Theory]
    [InlineData(5_000_000, 5_000_000, 0.9999993, 1.0, "100 %", "99.9999 % to 100 %")]
    [InlineData(4_870_200, 5_000_000, 0.9739, 0.97418, "97.4 %", "97.39 % to 97.42 %")]
    [InlineData(4_999_999, 5_000_000, 0.9999989, 0.999999995, "99.99998 %", "99.99989 % to 99.9999995 %")]
    [InlineData(973, 1000, 0.9611, 0.9821, "97.3 %", "96.1 % to 98.2 %")]
    [InlineData(0, 20, 0.0, 0.1684, "0 %", "0 % to 16.8 %")]
    public void The_ends_of_a_probability_differ_and_less_than_certain_is_less_than_100_percent(
        long holding, long all, double low, double high, string probability, string interval)
    {
        var words = SpreadWords.Shares(new HoldingEstimate(holding, all, new ConfidenceInterval(low, high)));

        Assert.Equal((probability, interval), words);
    }

    [Fact]
    public void A_table_of_the_first_draws_says_so()
    {
        var spread = Spreading.Of(Ceramic, draws: 20);
        var more = spread with { Draws = spread.Draws! with { Draws = 5_000_000 } };
        const string words = "spread.csv holds the first 20 of the 5,000,000 draws";

        Assert.Contains(words, SpreadSummary.Write(more, ["output/a/spread.csv"]));
        Assert.Contains(words, SpreadSection.Of(more).Body.ToString());
        Assert.DoesNotContain("the first", SpreadSummary.Write(spread, ["output/a/spread.csv"]));
    }

    [Fact]
    public void What_differs_from_the_worst_corner_in_no_digit_shown_is_not_called_worse()
    {
        // A divider's greatest power in its lower part is where both are equal; the corner at 100.1 Ω falls
        // short of it by a part in four million.
        var spread = Spreading.Of("""
            source   Feed at in : 10 V
            resistor R1 from in to a : 100 Ω
            resistor R2 from a to ground : 90 Ω between 50 Ω and 100.1 Ω
            observe power in R2
            until 1 ms
            """);

        Assert.False(spread.Figure("max of power in R2").Greatest!.IsCorner);
        Assert.Contains("gave nothing worse in the four digits shown", SpreadWords.Account(spread));
        Assert.DoesNotContain("inside", SpreadSummary.Write(spread, []));
    }
}
