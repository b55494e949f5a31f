using CircuitTransient.Solutions;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Equations;

/// <summary>What is algebraic, what floats, and what the equations leave open.</summary>
public sealed class OpenQuantityTests
{
    [Fact]
    public void A_circuit_without_stores_follows_its_sources_at_every_instant()
    {
        var solved = SolvedText.Of("""
            source Feed at in : ramp of 12 V from 1 ms to 2 ms
            resistor R1 from in to a : 1 kΩ
            resistor R2 at a : 2 kΩ
            dependent source Amp at out : 4 times voltage of a
            resistor R3 from out to b : 100 Ω
            source Bias from ground to b : step of 10 mA at 1.5 ms
            observe voltage of b
            until 3 ms
            """, 1.25e-3, 1.75e-3, 2.5e-3);
        Assert.Empty(solved.Poles());
        Close.To(8, solved.Sample("voltage of b", 0));
        Close.To(25, solved.Sample("voltage of b", 1));
        Close.To(33, solved.Sample("voltage of b", 2));
    }

    [Fact]
    public void A_floating_group_of_capacitors_keeps_its_charge()
    {
        var solved = SolvedText.Of("""
            source Feed at in : step of 9 V at 1 s
            resistor R from in to a : 1 kΩ
            capacitor C1 from a to m : 2 µF
            capacitor C2 from m to n : 1 µF, charged to 5 V
            capacitor C3 from m to ground : 1 µF
            capacitor C4 from n to ground : 1 µF
            observe voltage of m
            observe voltage of n
            until 1000 s
            """, 0.5, 999);
        // A node voltage is what its group's charge says; v of m before: C1 and C3 down, C2 in series with C4
        // too. Charge of n: −5 µC; charge of m: +5 µC; a at 0, later 9 V.
        double[] before = Solve(0), after = Solve(9);
        Close.To(before[0], solved.Sample("voltage of m", 0), 1e-11);
        Close.To(before[1], solved.Sample("voltage of n", 0), 1e-11);
        Close.To(after[0], solved.Sample("voltage of m", 1), 1e-11);
        Close.To(after[1], solved.Sample("voltage of n", 1), 1e-11);
        Assert.Equal(2, solved.Poles().Where(p => p.Re == 0).Sum(p => p.Multiplicity));

        static double[] Solve(double a)
        {
            // (2 + 1 + 1) m − n = 2 a + 5;  −m + 2 n = −5
            var m = ((2 * ((2 * a) + 5)) - 5) / 7;
            return [m, (m - 5) / 2];
        }
    }

    [Fact]
    public void A_network_that_only_rides_on_its_source_carries_nothing_and_passes_its_checks()
    {
        var solved = SolvedText.Of("""
            source Feed at a : sine of 10 V at 50 Hz + step of 1 V at 3 ms
            resistor R1 from a to b : 20 Ω
            dependent source H from b to x : 17 Ω times current through Feed
            inductor L from x to c : 17 mH
            resistor R2 from c to a : 30 Ω
            capacitor C from b to c : 84 nF
            observe voltage of c
            observe current through L
            until 20 ms
            """, 5e-3);
        Close.To(11, solved.Sample("voltage of c", 0));
        Close.OfScale(1, 0, solved.Max("current through L"), 1e-20);
    }

    [Fact]
    public void Open_contacts_in_series_leave_the_rest_right()
    {
        var solved = SolvedText.Of("""
            source Feed at in : 10 V
            switch S1 from in to m : open
            switch S2 from m to a : open
            resistor R1 from in to a : 1 kΩ
            capacitor C at a : 1 µF
            observe voltage of a
            until 5 ms
            """, 1e-3);
        Close.To(10 * (1 - Math.Exp(-1)), solved.Sample("voltage of a", 0));
    }

    [Fact]
    public void Ideal_contacts_in_parallel_leave_the_rest_right()
    {
        var solved = SolvedText.Of("""
            source Feed at in : 10 V
            switch S1 from in to b : open, closes at 1 ms
            switch S2 from in to b : open, closes at 1 ms, opens at 2 ms
            resistor R from b to a : 1 kΩ
            capacitor C at a : 1 µF
            observe voltage of a
            observe current through R
            until 5 ms
            """, 1.5e-3, 3e-3);
        Close.To(10 * (1 - Math.Exp(-0.5)), solved.Sample("voltage of a", 0));
        Close.To(10e-3 * Math.Exp(-2), solved.Sample("current through R", 1));
        Assert.Null(solved.Result.Parts.Single(p => p.Name == "S1").PeakCurrent?.Value);
    }

    [Theory]
    [InlineData("observe current through S1")]
    [InlineData("require current through S1 at most 1 A")]
    public void A_share_of_ideal_contacts_that_is_asked_for_is_an_error(string asked)
    {
        var diagnostic = Assert.Single(Unsolvable($"""
            source Feed at in : 10 V
            switch S1 from in to b : open, closes at 1 ms
            switch S2 from in to b : open, closes at 1 ms, opens at 2 ms
            resistor R at b : 1 kΩ
            {asked}
            until 5 ms
            """));
        Assert.Equal(
            $"the current through `S1` is {(asked[0] == 'o' ? "observed" : "required")}, but nothing "
            + "decides how it is "
            + "shared with the ideal contacts or sources in parallel from 1.000 ms on", diagnostic.Message);
        Assert.Equal(asked, diagnostic.Source[diagnostic.Span]);
    }

    [Fact]
    public void A_share_that_is_asked_for_only_while_it_is_decided_is_no_error() =>
        Assert.Empty(Unsolvable("""
            source Feed at in : 10 V
            switch S1 from in to b : closed
            switch S2 from in to b : open, closes at 1 ms, opens at 2 ms
            resistor R at b : 1 kΩ
            observe current through S1 from 0 s to 1 ms
            until 5 ms
            """));

    [Fact]
    public void A_rated_contact_in_parallel_and_a_followed_node_between_open_contacts_are_errors()
    {
        var messages = Unsolvable("""
            source Feed at in : 10 V
            switch S1 from in to b : closed, rated 5 A
            switch S2 from in to b : closed
            switch S3 from b to m : open
            switch S4 from m to ground : open, closes when voltage of m rises above 3 V
            resistor R at b : 1 kΩ
            observe voltage of b
            until 5 ms
            """).Select(d => d.Message).ToArray();
        Assert.Equal(
        [
            "the current through `S1` is rated, but nothing decides how it is shared with the ideal "
            + "contacts or sources "
            + "in parallel",
            "this voltage is waited for, but nothing fixes it: only open contacts lead to `m`",
        ], messages);
    }

    [Fact]
    public void Coils_coupled_without_leakage_side_by_side_share_their_current_in_no_definite_way()
    {
        const string coils = """
            inductor L1 at a : 1 mH, carrying 2 A
            inductor L2 at a : 1 mH
            coupling K of L1 and L2 : 1
            resistor R at a : 1 Ω
            until 10 ms

            """;
        var solved = SolvedText.Of($"{coils}observe voltage of a", 1e-3);
        Close.To(-2 * Math.Exp(-1), solved.Sample("voltage of a", 0));
        Assert.Equal(
            "the current through `L1` is observed, but nothing decides how coils coupled without leakage "
            + "share it",
            Assert.Single(Unsolvable($"{coils}observe current through L1")).Message);
    }

    /// <summary>What solving says, which must be what checking says.</summary>
    private static Diagnostic[] Unsolvable(string text)
    {
        var source = new SourceText("open.cause", text);
        var circuit = TransientAnalysis.Check(source, _ => throw new InvalidOperationException()).Value!;
        var found = TransientAnalysis.FindUnsolvable(circuit, TestContext.Current.CancellationToken);
        var solved = TransientSolver.Solve(
            circuit, CauseList.FromStart(circuit), TestContext.Current.CancellationToken);
        Assert.Equal(solved.Diagnostics.Select(d => d.Message), found.Select(d => d.Message));
        return [.. found];
    }
}
