namespace CircuitTransient.Tests.Circuits;

/// <summary>Mutual inductances.</summary>
public class CouplingTests
{
    [Fact]
    public void A_set_that_stores_negative_energy_is_refused() =>
        Assert.Equal(
            """
            plant.cause:5:1: error: `L1`, `L2`, `L3` so coupled can store -0.224 times their own energy
              coupling M1 of L1 and L2 : 0.9
              ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → coils close to a third one are close to each other: lower a factor, or raise or add another
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 1 mH
                inductor L3 at a : 1 mH
                coupling M1 of L1 and L2 : 0.9
                coupling M2 of L2 and L3 : 0.9
                coupling M3 of L1 and L3 : 0.1
                """));

    [Fact]
    public void More_coils_than_can_be_judged_together_are_refused()
    {
        var text = string.Join('\n', Enumerable.Range(1, 301).Select(k => $"inductor L{k} at a : 1 mH")
            .Concat(Enumerable.Range(1, 300).Select(k => $"coupling M{k} of L{k} and L{k + 1} : 0.1")));
        Assert.Equal(
            """
            plant.cause:303:1: error: 301 coils hang together by couplings; 300 are the most
              coupling M1 of L1 and L2 : 0.1
              ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → leave out the weak couplings between distant coils
            """,
            Checking.Messages($"source Feed at a : 10 V\n{text}"));
    }

    [Fact]
    public void A_factor_above_one_is_refused() =>
        Assert.Equal(
            """
            plant.cause:4:28: error: a coupling factor lies between -1 and 1, not at 1.1
              coupling M1 of L1 and L2 : 1.1
                                         ^^^
              → for a mutual inductance write it in henries, such as `3 mH`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 1 mH
                coupling M1 of L1 and L2 : 1.1
                """));

    [Fact]
    public void A_mutual_inductance_above_its_coils_is_refused() =>
        Assert.Equal(
            """
            plant.cause:4:28: error: 3 mH would couple `L1` and `L2` by more than all their flux
              coupling M1 of L1 and L2 : 3 mH
                                         ^^^^
              → the most is sqrt(L1·L2) = 2 mH
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 4 mH
                coupling M1 of L1 and L2 : 3 mH
                """));

    [Fact]
    public void A_coupling_in_farads_is_refused() =>
        Assert.Equal(
            """
            plant.cause:4:28: error: `3 mF` is a capacitance; a coupling is a pure number or in henries
              coupling M1 of L1 and L2 : 3 mF
                                         ^^^^
              → write `0.9`, or `3 mH`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 4 mH
                coupling M1 of L1 and L2 : 3 mF
                """));

    [Fact]
    public void A_factor_that_may_pass_one_is_narrowed() =>
        Assert.Equal(
            """
            plant.cause:4:33: error: the tolerance of `M1` passes a coupling of all flux: 0.931 to 1.029
              coupling M1 of L1 and L2 : 0.98 ±5 %
                                              ^^^^
              → a factor is at most 1 in magnitude; narrow it: `between 0.931 and 1`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 4 mH
                coupling M1 of L1 and L2 : 0.98 ±5 %
                """));

    // 0.99 mH/(0.9 mH)
    [Fact]
    public void A_mutual_inductance_that_coils_may_fall_below_is_written_as_a_factor() =>
        Assert.Equal(
            """
            plant.cause:4:28: warning: within the tolerances `M1` couples `L1` and `L2` by \
            up to 1.1 of all flux
              coupling M1 of L1 and L2 : 0.99 mH
                                         ^^^^^^^
              → write the factor, which goes with the coils: `0.99`
            """.Replace("\\\n", "", StringComparison.Ordinal),
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH ±10 %
                inductor L2 at a : 1 mH ±10 %
                coupling M1 of L1 and L2 : 0.99 mH
                """));

    [Fact]
    public void Three_coils_are_judged_within_their_tolerances_too() =>
        Assert.Equal(
            """
            plant.cause:5:1: warning: within their tolerances `L1`, `L2`, `L3` so coupled \
            can store -0.05038 times their energy
              coupling M1 of L1 and L2 : 0.9 ±5 %
              ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → narrow the tolerances of the couplings, or lower a factor
            """.Replace("\\\n", "", StringComparison.Ordinal),
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 1 mH
                inductor L3 at a : 1 mH
                coupling M1 of L1 and L2 : 0.9 ±5 %
                coupling M2 of L2 and L3 : 0.9 ±5 %
                coupling M3 of L1 and L3 : 0.65
                """));

    [Fact]
    public void What_varies_together_keeps_its_coupling() =>
        Assert.Empty(Checking.Messages(
            """
            value Lcoil : 1 mH ±10 %
            source Feed at a : 10 V
            inductor L1 at a : Lcoil
            inductor L2 at a : Lcoil
            coupling M1 of L1 and L2 : 0.99*Lcoil
            """));

    [Fact]
    public void A_pair_is_coupled_once() =>
        Assert.Equal(
            """
            plant.cause:5:10: error: `L2` and `L1` are coupled by `M1` already
              coupling M2 of L2 and L1 : 0.5
                       ^^
              → leave one of them out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 1 mH
                coupling M1 of L1 and L2 : 0.5
                coupling M2 of L2 and L1 : 0.5
                """));

    [Fact]
    public void Only_inductors_are_coupled() =>
        Assert.Equal(
            """
            plant.cause:4:23: error: `R1` is a resistor; only inductors are coupled
              coupling M1 of L1 and R1 : 0.5
                                    ^^
              → name an inductor
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                resistor R1 at a : 1 Ω
                coupling M1 of L1 and R1 : 0.5
                """));

    [Fact]
    public void A_coil_is_not_coupled_with_itself() =>
        Assert.Equal(
            """
            plant.cause:3:23: error: `M1` couples `L1` with itself
              coupling M1 of L1 and L1 : 0.5
                                    ^^
              → name two coils
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                coupling M1 of L1 and L1 : 0.5
                """));
}
