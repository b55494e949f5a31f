using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Switchings whose instants the answer decides, against closed forms; errors are fractions of the
/// study.</summary>
public sealed class DecidedEventTests
{
    private const double OfStudy = 1e-12;

    [Fact]
    public void A_current_is_parted_at_its_next_zero()
    {
        // i = I sin(ωt − φ), settled: zeros at (φ + kπ) / ω.
        var solved = SolvedText.Of("""
            source Feed at in : sine of 325 V at 50 Hz
            switch Q from in to a : closed, opens at 12 ms at next current zero
            resistor R from a to b : 3 Ω
            inductor L at b : 15 mH
            observe current through L
            start settled
            until 40 ms
            """);
        var omega = 2 * Math.PI * 50;
        var expected = (Math.Atan(omega * 15e-3 / 3) + Math.PI) / omega;
        Close.Within(40e-3 * OfStudy, expected, Instant(solved, "Q opens"));
        Assert.NotNull(solved.Result.Events.Single().Remark);
        Close.OfScale(50, 0, solved.Result.Observations[0].End!.Value, 1e-12);
    }

    [Fact]
    public void A_current_is_cut_once_it_is_small_enough_and_the_rest_is_an_impulse()
    {
        var solved = SolvedText.Of("""
            switch Q from a to b : closed, opens at 1 ms once its current is at most 4 A
            resistor R at b : 2 Ω
            inductor L from ground to a : 10 mH, carrying 100 A
            observe current through L
            until 50 ms
            """);
        var expected = 5e-3 * Math.Log(25);
        Close.Within(50e-3 * OfStudy, expected, Instant(solved, "Q opens"));
        Close.To(-40e-3, solved.Result.Intervals[1].Impulses.Single(i => i.Part == "L").VoltSeconds!.Value);
    }

    [Fact]
    public void A_cut_that_already_holds_acts_at_once()
    {
        var solved = SolvedText.Of("""
            source Feed at a : 10 V
            switch Q from a to b : closed, opens at 1 ms once its current is at most 4 A
            resistor R at b : 5 Ω
            observe current through R
            until 5 ms
            """);
        Assert.Equal(1e-3, Instant(solved, "Q opens"));
    }

    [Fact]
    public void A_hysteresis_regulator_switches_at_each_level()
    {
        // Charged through 1 kΩ from 10 V, discharged into 1 kΩ as well (the source in parallel: half of it).
        var events = string.Join(", ", Enumerable.Repeat(
            "closes when voltage of a rises above 8 V, opens when voltage of a falls below 6 V", 3));
        var solved = SolvedText.Of($"""
            source Feed at in : 10 V
            resistor R from in to a : 1 kΩ
            capacitor C at a : 1 µF
            switch Q from a to b : open, {events}
            resistor Rb at b : 1 kΩ
            observe voltage of a
            until 20 ms
            """);
        var rise = 1e-3 * Math.Log(10 / 2.0);
        var fall = 0.5e-3 * Math.Log(3 / 1.0); // from 8 to 6, towards 5
        var again = 1e-3 * Math.Log(4 / 2.0);
        double expected = rise;
        for (var k = 0; k < 6; k++)
        {
            Close.Within(20e-3 * OfStudy, expected, solved.Result.Events[k].Time);
            expected += k % 2 == 0 ? fall : again;
        }

        Assert.Equal(6, solved.Result.Events.Length);
    }

    [Theory]
    [InlineData("voltage of a falls below 1 V in magnitude", "")]
    [InlineData("voltage of a rises above -1 V", "")]
    [InlineData("voltage of a rises above -0.1 V after 3 ms", "later")]
    public void A_magnitude_falls_and_a_watch_may_begin_later(string condition, string later)
    {
        var solved = SolvedText.Of($"""
            capacitor C at a : 1 µF, charged to -10 V
            resistor R at a : 1 kΩ
            switch Q from a to b : open, closes when {condition}
            resistor Rb at b : 1 kΩ
            observe voltage of a
            until 20 ms
            """);
        var expected = later.Length > 0 ? 1e-3 * Math.Log(100) : 1e-3 * Math.Log(10);
        Close.Within(20e-3 * OfStudy, expected, Instant(solved, "Q closes"));
    }

    [Fact]
    public void A_watch_that_begins_later_acts_at_once_where_its_condition_holds()
    {
        var solved = SolvedText.Of("""
            capacitor C at a : 1 µF, charged to 10 V
            resistor R at a : 1 kΩ
            switch Q from a to b : open, closes when voltage of a falls below 9 V after 3 ms
            resistor Rb at b : 1 kΩ
            observe voltage of a
            until 20 ms
            """);
        Assert.Equal(3e-3, Instant(solved, "Q closes"));
    }

    [Fact]
    public void A_current_that_only_touches_zero_is_parted_there()
    {
        // 1 H across a sine from its zero: i = V / (ω L) (1 − cos ωt), zero again after each period.
        var solved = SolvedText.Of("""
            source Feed at in : sine of 100 V at 50 Hz
            switch Q from in to a : closed, opens at 5 ms at next current zero
            inductor L at a : 1 H
            observe current through L
            until 50 ms
            """);
        Close.Within(50e-3 * OfStudy, 20e-3, Instant(solved, "Q opens"));
    }

    [Fact]
    public void A_current_that_is_zero_throughout_is_parted_at_once()
    {
        var solved = SolvedText.Of("""
            source Feed at in : step of 100 V at 10 ms
            switch Q from in to a : closed, opens at 5 ms at next current zero
            resistor R at a : 1 kΩ
            observe current through R
            until 50 ms
            """);
        Assert.Equal(5e-3, Instant(solved, "Q opens"));
        Close.OfScale(1, 0, solved.Max("current through R"), 1e-15);
    }

    [Fact]
    public void Three_poles_clear_one_by_one_as_each_changes_the_next_ones_zero()
    {
        // A resistive star with a floating neutral: the first pole clears at its zero; the two others then
        // carry one current, driven by their line voltage, whose zero comes a quarter of a period later.
        const string pole = "closed, opens at 6 ms at next current zero";
        var solved = SolvedText.Of($"""
            source Ea at a : sine of 100 V at 50 Hz
            source Eb at b : sine of 100 V at 50 Hz phase -120°
            source Ec at c : sine of 100 V at 50 Hz phase 120°
            switch Qa from a to la : {pole}
            switch Qb from b to lb : {pole}
            switch Qc from c to lc : {pole}
            resistor Ra from la to n : 10 Ω
            resistor Rb from lb to n : 10 Ω
            resistor Rc from lc to n : 10 Ω
            observe current through Ra
            observe current through Rb
            until 40 ms
            """);
        // b crosses at 6.667 ms (phase −120°); then a and c: sin(x) − sin(x + 120°) ∝ cos(x + 60°), zero at x
        // = 210°.
        Close.Within(40e-3 * OfStudy, 20e-3 / 3, Instant(solved, "Qb opens"));
        Close.Within(40e-3 * OfStudy, 35e-3 / 3, Instant(solved, "Qa opens"));
        Close.Within(40e-3 * OfStudy, 35e-3 / 3, Instant(solved, "Qc opens"));
    }

    [Fact]
    public void A_crossing_at_a_sources_corner_is_found_at_the_corner()
    {
        var solved = SolvedText.Of("""
            source Feed at in : straight lines (0 s, 0 V) (1 ms, 5 V) (2 ms, 0 V) (3 ms, 5 V) (4 ms, 5 V)
            switch Q from in to a : closed, opens at 1.5 ms at next current zero
            resistor R at a : 1 Ω
            observe current through R
            until 4 ms
            """);
        Close.Within(4e-3 * OfStudy, 2e-3, Instant(solved, "Q opens"));
    }

    [Fact]
    public void A_level_passed_by_a_jump_is_found_at_the_jump()
    {
        var solved = SolvedText.Of("""
            source Feed at in : 1 V + step of 5 V at 2 ms
            resistor R1 from in to a : 1 Ω
            switch Q from a to ground : open, closes when voltage of a rises above 3 V
            resistor R at a : 1 kΩ
            observe voltage of a
            until 4 ms
            """);
        Assert.Equal(2e-3, Instant(solved, "Q closes"));
    }

    [Fact]
    public void An_event_may_follow_another_whose_instant_the_answer_decides()
    {
        var solved = SolvedText.Of("""
            source Feed at in : sine of 10 V at 50 Hz
            switch K1 from in to a : closed, opens at 1 ms at next current zero
            switch K2 from in to b : open, closes at 5 ms after K1 opens,
                opens at 7 ms after K1 opens at next current zero
            resistor R1 at a : 10 Ω
            resistor R2 at b : 10 Ω
            observe voltage of b
            until 40 ms
            """);
        Close.Within(40e-3 * OfStudy, 10e-3, Instant(solved, "K1 opens"));
        Close.Within(40e-3 * OfStudy, 15e-3, Instant(solved, "K2 closes"));
        Close.Within(40e-3 * OfStudy, 20e-3, Instant(solved, "K2 opens"));
    }

    [Fact]
    public void A_wait_that_never_ends_is_said()
    {
        var solved = SolvedText.Of("""
            source Feed at in : 10 V
            switch Q from in to a : closed, opens at 1 ms at next current zero
            switch K from a to b : open, closes at 1 ms after Q opens
            resistor R at a : 1 Ω
            resistor Rb at b : 1 Ω
            observe current through R
            until 4 ms
            """);
        Assert.Empty(solved.Result.Events);
        Assert.Contains(solved.Result.Warnings,
            w => w.Text == "`K` never closes within the study: what it waits for does not happen");
        Assert.Contains(solved.Result.Warnings,
            w => w.Text == "`Q` never opens within the study: what it waits for does not happen, so it stays "
                + "closed");
    }

    [Theory]
    [InlineData("power in R", "0.4 W", 0.4)]
    [InlineData("power delivered by Feed", "0.4 W", 0.8)]
    public void A_power_is_followed(string quantity, string level, double share)
    {
        // Loading: i = 0.1 A · e^(−t/τ) through R from 10 V; p_R = 1 W · e^(−2t/τ); the source gives 1 W ·
        // e^(−t/τ).
        var solved = SolvedText.Of($"""
            source Feed at in : 10 V
            resistor R from in to a : 100 Ω
            capacitor C at a : 10 µF
            switch Q from a to ground : open, closes when {quantity} falls below {level}
            observe voltage of a
            until 10 ms
            """);
        var expected = (share == 0.4 ? 0.5e-3 : 1e-3) * -Math.Log(0.4);
        Close.Within(10e-3 * OfStudy, expected, Instant(solved, "Q closes"));
    }

    [Fact]
    public void A_stored_and_an_absorbed_energy_are_followed()
    {
        var solved = SolvedText.Of("""
            source Feed at in : 10 V
            switch Q from in to x : open, closes at 1 ms, opens when energy in R rises above 400 µJ
            switch P from a to b : open, closes when energy in C rises above 100 µJ
            resistor R from x to a : 100 Ω
            capacitor C at a : 10 µF
            resistor Rb at b : 1 GΩ
            observe voltage of a
            until 10 ms
            """);
        // E_R = ½ C V² (1 − e^(−2t/τ)) = 500 µJ (1 − e^(−2t/τ)); E_C = 500 µJ (1 − e^(−t/τ))²
        var stored = 1e-3 - (1e-3 * Math.Log(1 - Math.Sqrt(0.2)));
        Close.Within(10e-3 * OfStudy, stored, Instant(solved, "P closes"));
        Close.Within(10e-3 * 1e-6, 1e-3 - (0.5e-3 * Math.Log(0.2)), Instant(solved, "Q opens")); // 1 GΩ: 10⁻⁷
    }

    private static double Instant(SolvedText solved, string words) =>
        solved.Result.Events.Single(e => $"{e.Switch} {(e.Closes ? "closes" : "opens")}" == words).Time;
}
