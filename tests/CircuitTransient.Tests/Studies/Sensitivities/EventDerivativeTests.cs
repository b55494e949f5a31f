using CircuitTransient.Circuits;
using CircuitTransient.Studies;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Studies.Sensitivities;

/// <summary>Derivatives with respect to instants and phases, and through instants that the answer
/// decides.</summary>
public class EventDerivativeTests
{
    private const string Switched = """
        source    Grid at in : sine of 325 V at 50 Hz phase 30°
        resistor  Rs from in to a : 2 Ω
        inductor  Ls from a to b : 10 mH
        capacitor Cs from b to ground : 20 µF, charged to 15 V
        switch    K1 from b to c : open, closes at 3 ms, opens at 9 ms at next current zero
        switch    K2 from c to d : closed, opens at 1.5 ms after K1 closes, open resistance 1 kΩ
        switch    K3 from b to e : open, closes when voltage of b rises above 150 V after 14 ms
        resistor  Re from e to ground : 60 Ω
        inductor  Lc from d to f : 30 mH
        resistor  Rc from f to ground : 12 Ω
        observe voltage of b
        observe current through Lc
        observe current through Ls
        until 25 ms
        """;

    [Fact]
    public void A_switching_that_moves_carries_on_through_those_that_follow_it()
    {
        var derived = Derived.Of(Switched, new EventTimeTarget("K1", true), new EventTimeTarget("K2", false));
        AssertAgrees(derived);
    }

    [Fact]
    public void A_phase_turns_all_that_follows()
    {
        AssertAgrees(Derived.Of(Switched, new SourcePhaseTarget("Grid")));
    }

    [Fact]
    public void Instants_that_the_answer_decides_move_with_every_value()
    {
        var derived = Derived.Of(
            Switched,
            [.. new[] { "Rs", "Ls", "Cs", "Lc", "Rc", "Re" }.Select(n => new PartValueTarget(n))]);
        Assert.Equal(4, derived.Analysis.Solution.Occurrences.Length);
        AssertAgrees(derived);
    }

    [Fact]
    public void A_phase_in_a_settled_start_turns_what_is_stored()
    {
        AssertAgrees(Derived.Of(
            Switched.Replace(", charged to 15 V", "") + "\nstart settled",
            new SourcePhaseTarget("Grid"), new PartValueTarget("Ls")));
    }

    /// <summary>Two capacitors joined: v = (C₁ v₁ + C₂ v₂)/(C₁ + C₂), charge conserved (any handbook), with
    /// v₁ = V e^(−T/τ) when they are, τ = R C₁.</summary>
    [Fact]
    public void Charge_sharing_has_the_derivatives_of_its_closed_form()
    {
        var derived = Derived.Of(
            """
            resistor  R1 from a to ground : 1 kΩ
            capacitor C1 from a to ground : 1 µF, charged to 10 V
            switch    K1 from a to b : open, closes at 0.5 ms
            capacitor C2 from b to ground : 2 µF, charged to -3 V
            resistor  R2 from b to c : 1 kΩ
            switch    K2 from c to ground : open
            observe voltage of b
            until 0.6 ms
            """,
            new PartValueTarget("C1"), new PartValueTarget("C2"), new EventTimeTarget("K1", true));
        var slopes = derived.Analysis.ValueSlopes(derived.Varied.Circuit.Observations[0].Quantity, 0.5e-3);
        const double c1 = 1e-6, c2 = 2e-6, r = 1e3, t = 0.5e-3, v2 = -3;
        var v1 = 10 * Math.Exp(-t / (r * c1));
        var v = ((c1 * v1) + (c2 * v2)) / (c1 + c2);
        var first = v1 * t / (r * c1 * c1); // ∂v₁/∂C₁
        Close.To((v1 - v + (c1 * first)) / (c1 + c2), slopes[0]!.Value);
        Close.To((v2 - v) / (c1 + c2), slopes[1]!.Value);
        // after the instant the pair discharges into R₁: a later joining moves that, too
        Close.To((-c1 * v1 / (r * c1) / (c1 + c2)) + (v / (r * (c1 + c2))), slopes[2]!.Value);
    }

    [Fact]
    public void Two_switchings_at_one_instant_that_part_have_no_derivative_and_it_is_said()
    {
        var derived = Derived.Of(
            """
            source    Feed at in : 10 V
            resistor  R1 from in to a : 1 kΩ
            switch    K1 from a to b : open, closes at 1 ms
            switch    K2 from a to ground : closed, opens at 1 ms
            capacitor C1 from b to ground : 1 µF
            observe voltage of b
            until 3 ms
            """,
            new EventTimeTarget("K1", true), new PartValueTarget("R1"));
        Assert.Equal(1e-3, derived.Analysis.Refusals[0]!.From);
        Assert.Contains("order", derived.Analysis.Refusals[0]!.Reason, StringComparison.Ordinal);
        Assert.Null(derived.Analysis.Refusals[1]);
        var slopes = derived.Analysis.ValueSlopes(new VoltageAcross(4), 2e-3);
        Assert.Null(slopes[0]);
        Assert.NotNull(slopes[1]);
    }

    private static void AssertAgrees(Derived derived)
    {
        Assert.All(derived.Analysis.Refusals, Assert.Null);
        double[] times = [.. Enumerable.Range(0, 19).Select(k => ((k * 1.31) + 0.17) * 1e-3)];
        var worst = derived.WorstAgainstDifferences(
            [.. derived.Varied.Circuit.Observations.Select(o => o.Quantity)], times);
        Assert.True(worst < 1e-7, $"{worst:E2}");
    }
}
