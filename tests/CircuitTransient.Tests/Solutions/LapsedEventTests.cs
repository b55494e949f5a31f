using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Solutions;

/// <summary>A switching that waits for its current or a condition, and does not find it before the next event
/// of the same switch is due, no longer takes place.</summary>
public sealed class LapsedEventTests
{
    [Fact]
    public void A_contact_that_finds_no_zero_stays_closed_until_it_is_opened_at_an_instant()
    {
        var solved = SolvedText.Of("""
            source S at a : 10 V
            resistor R from a to c : 1 Ω
            switch K from c to ground : closed, opens at 5 ms at next current zero,
                closes at 10 ms, opens at 20 ms
            observe current through K
            until 60 ms
            """, 12e-3, 30e-3);

        Assert.Equal(["K opens"], Events(solved));
        Assert.Equal(20e-3, solved.Result.Events.Single().Time);
        Assert.Equal([10.0, 0.0], solved.Samples("current through K"));
        Assert.Equal([0, 20e-3], solved.Result.Intervals.Select(i => i.From));
        Assert.Contains(
            "`K` does not open here: what it waits for does not happen before its next event at 10.00 ms",
            solved.Result.Warnings.Select(w => w.Text));
    }

    // 10 sin(ωt) + 8 is zero first where sin(ωt) = −0.8, in the second half period: at (π + asin 0.8) / ω.
    [Fact]
    public void A_zero_is_sought_anew_after_one_that_lapsed()
    {
        var solved = SolvedText.Of("""
            source S at a : sine of 10 V at 50 Hz + 8 V
            resistor R from a to c : 1 Ω
            switch K from c to ground : closed, opens at 2 ms at next current zero, closes at 7 ms,
                opens at 8 ms at next current zero
            observe current through K
            until 20 ms
            """);

        Assert.Equal(["K opens"], Events(solved));
        var omega = 2 * Math.PI * 50;
        Close.Within(1e-12 * 20e-3, (Math.PI + Math.Asin(0.8)) / omega, solved.Result.Events.Single().Time);
    }

    [Fact]
    public void A_level_that_comes_after_the_next_event_is_not_waited_for()
    {
        var solved = SolvedText.Of("""
            source S at a : ramp of 10 V from 0 s to 10 ms
            resistor R from a to b : 1 Ω
            switch K from b to ground : open, closes when voltage of a rises above 6 V, opens at 5 ms
            observe current through K
            until 10 ms
            """);

        Assert.Empty(solved.Result.Events);
        Assert.Equal(0, solved.Max("current through K"));
    }

    [Fact]
    public void A_zero_that_nothing_determines_is_not_waited_for_in_silence()
    {
        var message = Unsolved.Message("""
            source S at a : sine of 10 V at 50 Hz
            resistor R from a to b : 1 Ω
            switch K1 from b to ground : closed, opens at 1 ms at next current zero
            switch K2 from b to ground : closed, opens at 12 ms
            until 20 ms
            """);

        Assert.StartsWith(
            "plant.cause:3:38: error: the current through `K1` is waited for, but nothing decides how it is "
            + "shared with the ideal contacts or sources in parallel\n", message, StringComparison.Ordinal);
    }

    private static IEnumerable<string> Events(SolvedText solved) =>
        solved.Result.Events.Select(e => $"{e.Switch} {(e.Closes ? "closes" : "opens")}");
}
