using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements;

/// <summary>What a window does to a quantity, and what an impulse in it does to its bounds.</summary>
public sealed class WindowTests
{
    // 10 V over 100 Ω are 1 W from the start: 2 J after 2 s, of which 1 J in the last second; 0.1 A²·1 s/10.
    [Fact]
    public void An_energy_is_counted_from_the_start_and_a_Joule_integral_from_the_window()
    {
        var solved = SolvedText.Of("""
            source S at a : 10 V
            resistor R at a : 100 Ω
            observe energy in R as "energy" from 1 s
            observe I²t through R as "heating" from 1 s
            require energy in R at most 1.5 J from 1 s
            require energy in R at least 1.5 J from 1.9 s
            require I²t through R at most 0.0105 A²s from 1 s
            until 2 s
            """);

        Close.To(2, solved.Max("energy"));
        Close.To(1, solved.Min("energy"));
        Close.To(0.01, solved.Max("heating"));
        Assert.Equal([false, true, true], solved.Result.Requirements.Select(r => r.Holds));
    }

    // Two ideal contacts share 10 A in no known way until the first opens at 1 ms.
    [Fact]
    public void What_is_open_outside_the_window_does_not_break_a_requirement()
    {
        var solved = SolvedText.Of("""
            source S at a : 10 V
            resistor R from a to b : 1 Ω
            switch K1 from b to ground : closed, opens at 1 ms
            switch K2 from b to ground : closed, opens at 2 ms
            require current through K2 at most 20 A from 1.5 ms
            require I²t through K2 at most 0.06 A²s from 1.5 ms
            until 10 ms
            """);

        Assert.All(solved.Result.Requirements, r => Assert.True(r.Holds, r.Statement));
        Assert.Equal(10, solved.Result.Requirements[0].Worst.Value!.Value, 12);
        Close.To(0.05, solved.Result.Requirements[1].Worst.Value!.Value);
    }

    [Theory]
    [InlineData("10 V", "at least -100 A")]
    [InlineData("10 V", "at most 100 A")]
    [InlineData("-10 V", "at most 100 A")]
    public void An_impulse_breaks_a_bound_on_either_side(string step, string bound)
    {
        var solved = SolvedText.Of($"""
            source S at a : step of {step} at 1 ms
            capacitor C at a : 100 µF
            resistor R at a : 1 kΩ
            require current through C {bound}
            until 2 ms
            """);

        var verdict = solved.Result.Requirements.Single();
        Assert.Equal((false, 1e-3, null), (verdict.Holds, verdict.Worst.Time, verdict.Margin));
    }

    // The voltage grows from 0.5 ms on and is cut down at 3 ms: what made it is counted from 0.5 ms.
    [Fact]
    public void A_peak_that_a_switching_ends_is_not_laid_at_its_door()
    {
        var solved = SolvedText.Of("""
            source S at s : 10 V
            resistor R from s to a : 1 kΩ
            switch K0 from a to ground : closed, opens at 0.5 ms
            switch K from a to c : open, closes at 3 ms
            resistor Rc from c to ground : 100 Ω
            capacitor C at a : 1 µF
            observe voltage of a
            until 10 ms
            """);

        var peak = solved["voltage of a"];
        Close.To(10 * (1 - Math.Exp(-2.5)), peak.Max.Value!.Value);
        Assert.Equal((3e-3, "K0 opens"), (peak.Max.Time, peak.After!.AtMax!.Event));
    }
}
