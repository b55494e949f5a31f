using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Switchings whose instants the answer decides, against closed forms.</summary>
public sealed class DecidedEventTests
{
    // i = V/|Z| (sin(ωt - θ) + sin θ e^(-Rt/L)); its zero after 3 ms by halving, to the last bit.
    [Fact]
    public void A_switch_opens_at_the_next_zero_of_its_current()
    {
        const double omega = 2 * Math.PI * 50, r = 3, l = 0.01;
        var lag = Math.Atan2(omega * l, r);
        double Current(double t) => Math.Sin((omega * t) - lag) + (Math.Sin(lag) * Math.Exp(-r / l * t));
        var (low, high) = (8e-3, 15e-3);
        while (low + ((high - low) / 2) is var middle && middle > low && middle < high)
        {
            (low, high) = Current(middle) > 0 ? (middle, high) : (low, middle);
        }

        var solved = SolvedText.Of(
            """
            source E at s : sine of 100 V at 50 Hz
            switch Q from s to a : closed, opens at 3 ms at next current zero
            resistor R from a to b : 3 Ω
            inductor L from b to ground : 10 mH
            observe current through L
            until 40 ms
            """).Result;
        var opening = Assert.Single(solved.Events);
        Close.Within(1e-9 * 40e-3, high, opening.Time);
        Assert.Equal("instant decided by the answer", opening.Remark);
        Assert.Empty(solved.Intervals[1].Impulses);
    }

    [Fact]
    public void A_switch_cuts_what_is_left_below_its_stated_current()
    {
        var solved = SolvedText.Of(
            """
            source E at s : straight lines (0 s, 10 V) (1 ms, 10 V) (1 ms, 0 V)
            switch Q from s to a : closed, opens at 1 ms once its current is at most 4 A
            resistor R from a to b : 1 Ω
            inductor L from b to ground : 1 mH, carrying 10 A
            resistor Rp from b to ground : 100 Ω
            observe voltage of b
            until 5 ms
            """).Result;
        // With the source at zero the coil's current dies out with L(1/R + 1/Rp); R carries what Rp does not.
        var opening = Assert.Single(solved.Events);
        var share = 100.0 / 101;
        Close.To(1e-3 + (1e-3 / share * Math.Log(10 * share / 4)), opening.Time);
        Close.To(4, Math.Abs(opening.CurrentBefore!.Value));
        Assert.Equal(0, opening.CurrentAfter);
    }

    // 10 V over 1 kΩ charge 1 µF; at 6 V 250 Ω are laid across it, until 3 V.
    [Fact]
    public void A_relaxation_oscillator_keeps_its_closed_form_period()
    {
        const double charge = 1e-3, discharge = 1e-6 * 200, floor = 2;
        var solved = SolvedText.Of(
            """
            source E at s : 10 V
            resistor R from s to c : 1 kΩ
            capacitor C from c to ground : 1 µF
            resistor Rd from c to d : 250 Ω
            switch K from d to ground : open,
              closes when voltage of c rises above 6 V, opens when voltage of c falls below 3 V,
              closes when voltage of c rises above 6 V, opens when voltage of c falls below 3 V
            observe voltage of c
            until 5 ms
            """).Result;
        var first = charge * Math.Log(10.0 / 4);
        var down = discharge * Math.Log((6 - floor) / (3 - floor));
        var up = charge * Math.Log(7.0 / 4);
        double[] expected = [first, first + down, first + down + up, first + down + up + down];
        Assert.Equal(expected.Length, solved.Events.Length);
        Assert.All(expected.Zip(solved.Events), pair =>
            Close.Within(1e-9 * 5e-3, pair.First, pair.Second.Time));
        Close.To(6, solved.Events[0].VoltageBefore!.Value);
        Close.To(6, solved.Events[2].VoltageBefore!.Value);
    }

    [Fact]
    public void A_switch_that_waits_in_vain_stays_closed_and_the_result_says_so()
    {
        var solved = SolvedText.Of(
            """
            source E at s : 10 V
            switch Q from s to a : closed, opens at 1 ms at next current zero
            resistor R from a to ground : 1 kΩ
            observe current through R
            until 5 ms
            """).Result;
        Assert.Empty(solved.Events);
        var warning = Assert.Single(solved.Warnings, w => w.Line == 2);
        Assert.Equal(
            "`Q` never opens within the study: what it waits for does not happen, so it stays closed",
            warning.Text);
    }

    [Fact]
    public void Chatter_is_refused()
    {
        var pair = "closes when voltage of s rises above 1 V, opens when voltage of s rises above 1 V";
        var message = Unsolved.Message(
            $"""
            source E at s : 10 V
            resistor R from s to a : 1 kΩ
            switch K from a to ground : open, {string.Join(", ", Enumerable.Repeat(pair, 60))}
            until 5 ms
            """);
        Assert.Contains("error: `K` chatters: over 100 switchings at 0 s", message, StringComparison.Ordinal);
    }
}
