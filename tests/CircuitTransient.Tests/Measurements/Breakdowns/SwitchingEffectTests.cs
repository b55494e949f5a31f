using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;
using CircuitTransient.Reports;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements.Breakdowns;

/// <summary>Extremes by the switchings before them.</summary>
public class SwitchingEffectTests
{
    [Theory]
    [InlineData(11)]
    [InlineData(12)]
    [InlineData(13)]
    [InlineData(14)]
    [InlineData(15)]
    [InlineData(16)]
    public void Without_a_switching_the_answer_is_that_of_a_file_without_it(int seed)
    {
        var drawn = RandomNetwork.Draw(seed);
        var second = drawn.Parts.First(p => p.Kind == "capacitor");
        string[] quantities = ["energy in R1", "I²t through S2", "power in E", "energy in C2"];
        string[] more =
        [
            $"switch T from {drawn.Node(second.From)} to t : open, closes at 5 ms",
            "resistor Rt from t to ground : 40 Ω",
            .. quantities.Where(q => drawn.Parts.Any(p => q.EndsWith(' ' + p.Name)))
                .Select(q => "observe " + q),
        ];
        var text = drawn.Text(more);
        var full = SolvedText.By(Breakdown.Switching, text);
        foreach (var observed in full.Result.Observations)
        {
            foreach (var (extreme, breakdown) in new[]
            {
                (observed.Max, observed.BySwitching!.AtMax!), (observed.Min, observed.BySwitching.AtMin!),
            })
            {
                double[] levels =
                [
                    Without(text, observed.Name, extreme.Time, ", closes at 0.003 s", ", closes at 5 ms"),
                    Without(text, observed.Name, extreme.Time, ", closes at 5 ms"),
                    extreme.Value!.Value,
                ];
                Holds(observed, extreme, breakdown, levels);
            }
        }
    }

    [Fact]
    public void Decided_events_jumps_and_impulses_telescope()
    {
        const string text = """
            source Feed at a : sine of 20 V at 300 Hz phase 40° + step of 10 V at 1.5 ms
            resistor R from a to b : 40 Ω
            capacitor C at b : 3 µF, charged to 5 V
            inductor L from b to d : 5 mH
            resistor Rl at d : 25 Ω
            switch Q from b to e : open, closes when voltage of b rises above 6 V,
                opens at 2.2 ms at next current zero
            capacitor C2 at e : 1 µF, charged to 3 V
            resistor Re at e : 1 kΩ
            switch P from a to g : open, closes at 1 ms, opens at 4 ms
            capacitor C3 at g : 2 µF
            resistor Rg at g : 1 kΩ
            switch D from d to ground : open, closes at 4 ms
            observe voltage of b
            observe voltage across Rl
            observe current through R
            observe energy in Rl
            observe power in R from 2 ms to 5 ms
            until 6 ms
            """;
        var solved = SolvedText.By(Breakdown.Switching, text);
        foreach (var observed in solved.Result.Observations)
        {
            var breakdown = observed.BySwitching!.AtMax!;
            var scale = Math.Max(Math.Abs(observed.Max.Value!.Value), Math.Abs(observed.Min.Value!.Value));
            Close.OfScale(scale, observed.Max.Value!.Value,
                breakdown.Base + breakdown.Effects.Sum(e => e.Value!.Value), 1e-12);
            Assert.Equal(
                solved.Result.Events.Where(e => e.Time <= observed.Max.Time).Select(e => e.Time).Distinct(),
                breakdown.Effects.Select(e => e.Time));
        }

        var heat = solved["energy in Rl"].BySwitching!.AtMax!;
        Assert.Equal(
            ["Q closes", "P closes", "Q opens", "P opens and D closes"], heat.Effects.Select(e => e.Event));
    }

    [Fact]
    public void Of_many_switchings_the_summary_shows_the_largest_and_the_sum_of_the_rest()
    {
        var events = Enumerable.Range(0, 40)
            .Select(k => $"{(k % 2 == 0 ? "closes" : "opens")} at {50 + (50 * k)} µs");
        var solved = SolvedText.By(
            Breakdown.Switching,
            $"""
            source E at a : 48 V
            switch Q from a to b : open, {string.Join(", ", events)}
            resistor R from b to c : 50 Ω
            capacitor C at c : 100 µF
            observe voltage of c
            until 2.1 ms
            """);
        var lines = TerminalSummary.Write(solved.Result, []).Split('\n');

        Assert.Equal(11, lines.Count(l => l.Contains("    Q closes ") || l.Contains("    Q opens ")));
        Assert.Contains(lines, l => l.StartsWith("    29 others together ", StringComparison.Ordinal));
    }

    [Fact]
    public void An_event_at_the_start_has_its_effect_too()
    {
        var solved = SolvedText.By(
            Breakdown.Switching,
            """
            source Feed at a : step of 12 V
            resistor R1 from a to b : 10 Ω
            switch K from b to c : open, closes at 0 s
            resistor R2 at c : 20 Ω
            resistor R3 at b : 30 Ω
            observe voltage of b
            until 1 ms
            """);
        var breakdown = solved["voltage of b"].BySwitching!.AtMax!;

        // Ohm: 12 V · 30/40 without it, 12 V · 12/22 with it
        Assert.Equal("with no switching", breakdown.BaseWords);
        Close.To(9, breakdown.Base);
        Assert.Equal(("K closes", 0.0), (breakdown.Effects[0].Event, breakdown.Effects[0].Time));
        Close.To((12 * 12.0 / 22) - 9, breakdown.Effects[0].Value!.Value);
    }

    [Fact]
    public void Where_no_switching_leaves_the_quantity_open_the_base_is_the_first_that_does_not()
    {
        // Between two open switches nothing decides the voltage of m.
        var solved = SolvedText.By(
            Breakdown.Switching,
            """
            source Feed at a : 12 V
            switch K1 from a to m : open, closes at 0 s
            switch K2 from m to b : open, closes at 3 ms
            resistor Rb at b : 10 Ω
            observe voltage of m from 4 ms
            until 5 ms
            """);
        var breakdown = solved["voltage of m"].BySwitching!.AtMax!;

        Assert.Equal(
            "with the switchings up to K1 closes: without it the equations leave the quantity open",
            breakdown.BaseWords);
        Assert.Equal(12, breakdown.Base);
        Assert.Equal([new SwitchingEffect("K2 closes", 3e-3, 0)], breakdown.Effects);
    }

    [Fact]
    public void Where_an_answer_in_between_grows_past_every_number_its_effect_stands_with_the_next()
    {
        var solved = SolvedText.By(
            Breakdown.Switching,
            """
            source J from ground to a : step of 1 mA
            capacitor C at a : 1 µF
            resistor R at a : 10 kΩ
            switch K1 from a to b : open, closes at 1 ms
            resistor Rneg at b : -100 Ω
            switch K2 from a to d : open, closes at 1.1 ms
            resistor Rd at d : 10 Ω
            observe voltage of a from 2 ms
            until 100 ms
            """);
        var breakdown = solved["voltage of a"].BySwitching!.AtMax!;

        Assert.Equal(("K1 closes", null), (breakdown.Effects[0].Event, breakdown.Effects[0].Value));
        Assert.Equal(
            "stands with the next: without it a mode grows past every number", breakdown.Effects[0].Reason);
        Close.To(solved.Max("voltage of a"), breakdown.Base + breakdown.Effects[1].Value!.Value);
    }

    [Fact]
    public void Where_no_switching_leaves_no_unique_solution_the_base_is_the_first_that_has_one()
    {
        var solved = SolvedText.By(
            Breakdown.Switching,
            """
            source J from ground to a : step of 2 A
            switch K from a to b : open, closes at 0 s
            resistor R at b : 10 Ω
            observe voltage of b
            until 1 ms
            """);
        var breakdown = solved["voltage of b"].BySwitching!.AtMax!;

        Assert.Equal(
            "with the switchings up to K closes: without it the network has no unique solution",
            breakdown.BaseWords);
        Close.To(20, breakdown.Base);
        Assert.Empty(breakdown.Effects);
    }

    [Fact]
    public void Where_a_mode_would_grow_past_every_number_it_is_said()
    {
        var solved = SolvedText.By(
            Breakdown.Switching,
            """
            source J from ground to a : step of 1 mA
            capacitor C at a : 1 µF
            resistor Rneg at a : -100 Ω
            switch K from a to b : open, closes at 1 ms
            resistor R at b : 10 Ω
            observe voltage of a
            until 200 ms
            """);
        var breakdown = solved["voltage of a"].BySwitching!.AtMax!;

        Assert.Equal(
            "with the switchings up to K closes: without it a mode grows past every number",
            breakdown.BaseWords);
    }

    private static double Without(string text, string name, double time, params string[] events) =>
        SolvedText.Of(
            events.Aggregate(text, (left, e) => left.Replace(e, "", StringComparison.Ordinal)), time)
            .Sample(name, 0);

    private static void Holds(
        ObservationResult observed, Extreme extreme, SwitchingBreakdown breakdown, double[] levels)
    {
        var scale = Math.Max(Math.Abs(observed.Max.Value!.Value), Math.Abs(observed.Min.Value!.Value));
        scale = Math.Max(scale, levels.Max(Math.Abs));
        double[] times = [3e-3, 5e-3];
        var acting = times.Count(t =>
            t < extreme.Time || (t == extreme.Time && extreme.Side != InstantSide.Before));
        Assert.Equal(acting, breakdown.Effects.Length);
        var (sum, atEnd) = (breakdown.Base, levels[2]);
        if (acting == 2)
        {
            Close.OfScale(scale, levels[0], breakdown.Base, 1e-11);
            Close.OfScale(scale, levels[1] - levels[0], breakdown.Effects[0].Value!.Value, 1e-11);
            Close.OfScale(scale, levels[2] - levels[1], breakdown.Effects[1].Value!.Value, 1e-11);
        }

        sum += breakdown.Effects.Sum(e => e.Value!.Value);
        Close.OfScale(scale, atEnd, sum, 1e-12);
    }
}
