using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Equations;

/// <summary>Ideal transformers and coils coupled without leakage.</summary>
public sealed class CoupledNetworkTests
{
    [Fact]
    public void An_ideal_transformer_reflects_a_load_by_the_square_of_its_ratio()
    {
        var solved = SolvedText.Of("""
            source Feed at in : 100 V
            resistor R from in to p : 300 Ω
            transformer T primary from p to ground, secondary from s to t : turns 10 to 1
            resistor Load from s to t : 2 Ω
            capacitor C from s to t : 100 µF
            resistor Tie from t to ground : 1 kΩ
            observe voltage from s to t
            observe current through R
            observe current through Tie
            until 5 ms
            """, 0.2e-3);
        // 300 Ω and 200 Ω side by side, over 100 µF / 100
        var tau = 120 * 1e-6;
        Close.To(4 * (1 - Math.Exp(-0.2e-3 / tau)), solved.Sample("voltage from s to t", 0));
        Close.To((100 - (40 * (1 - Math.Exp(-0.2e-3 / tau)))) / 300, solved.Sample("current through R", 0));
        Close.OfScale(1, 0, solved.Sample("current through Tie", 0), 1e-14);
        Close.To(-1 / tau, Assert.Single(solved.Poles()).Re);
    }

    [Theory]
    [InlineData("")]
    [InlineData("coupling M23 of L2 and L3 : 1\ncoupling M13 of L1 and L3 : 1")]
    public void Coils_coupled_without_leakage_share_one_flux(string third)
    {
        var isThird = third.Length > 0;
        var solved = SolvedText.Of($"""
            source Feed at in : 10 V
            resistor R1 from in to a : 5 Ω
            inductor L1 at a : 8 mH
            inductor L2 at b : 2 mH
            inductor L3 at c : 18 mH
            resistor R2 at b : 3 Ω
            resistor R3 at c : 90 Ω
            coupling M12 of L1 and L2 : 1
            {third}
            observe voltage of a
            observe voltage of b
            observe voltage of c
            observe energy in L1
            until 20 ms
            """, 1e-3);
        // On the side of L1: R2 · 8/2, R3 · 8/18, the coil of 8 mH.
        var load = isThird ? 1 / ((1.0 / 12) + (1.0 / 40)) : 12;
        var tau = 8e-3 / (1 / ((1 / 5.0) + (1 / load)));
        var a = 10 * load / (5 + load) * Math.Exp(-1e-3 / tau);
        Close.To(a, solved.Sample("voltage of a", 0));
        Close.To(a / 2, solved.Sample("voltage of b", 0));
        Close.OfScale(10, isThird ? a * 1.5 : 0, solved.Sample("voltage of c", 0), 1e-12);
        Close.To(-1 / tau, solved.Poles().Where(p => p.Re != 0).MinBy(p => Math.Abs(p.Re))!.Re);
        Assert.Equal(isThird ? 1 : 2, solved.Poles().Length);
    }

    [Fact]
    public void Coils_coupled_without_leakage_that_carry_what_no_flux_allows_settle_by_an_impulse()
    {
        // Both secondaries short: the flux that was there is kept by the sum of the ampere-turns.
        var solved = SolvedText.Of("""
            inductor L1 at a : 4 mH, carrying 1 A
            inductor L2 at b : 1 mH
            resistor R1 at a : 4 Ω
            resistor R2 at b : 3 Ω
            coupling M of L1 and L2 : 1
            observe voltage of a
            observe current through L1
            observe current through L2
            until 5 ms
            """, 1e-9);
        // i1 + i2/2 = 1 A in turns of L1, v1 = 2 v2: 4 i1 = 2 · 3 i2.
        Close.To(0.75, solved.Sample("current through L1", 0), 1e-5);
        Close.To(0.5, solved.Sample("current through L2", 0), 1e-5);
        Close.To(-1 / (4e-3 * ((1 / 4.0) + (1 / 12.0))), Assert.Single(solved.Poles()).Re);
    }
}
