namespace CircuitTransient.Tests.Circuits;

/// <summary>Starts that contradict themselves.</summary>
public class StoredContradictionTests
{
    [Fact]
    public void Capacitors_in_parallel_with_unlike_charges_are_told_the_jump() =>
        Assert.Equal(
            """
            plant.cause:4:27: warning: `C2` is charged to 3 V, but is held at 2 V
              capacitor C2 at b : 1 µF, charged to 3 V
                                        ^^^^^^^^^^^^^^
              → it jumps by -1 V at once; write `charged to 2 V` if no jump is meant
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 from a to b : 1 kΩ
                capacitor C1 at b : 1 µF, charged to 2 V
                capacitor C2 at b : 1 µF, charged to 3 V
                """));

    [Fact]
    public void A_charge_against_a_source_is_told_the_jump() =>
        Assert.Equal(
            """
            plant.cause:2:27: warning: `C1` is charged to 3 V, but is held at 10 V
              capacitor C1 at a : 1 µF, charged to 3 V
                                        ^^^^^^^^^^^^^^
              → it jumps by 7 V at once; write `charged to 10 V` if no jump is meant
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                capacitor C1 at a : 1 µF, charged to 3 V
                """));

    [Fact]
    public void Charges_that_agree_round_a_loop_are_silent() =>
        Assert.Empty(Checking.Messages(
            """
            source Feed at a : 10 V
            capacitor C1 from a to b : 1 µF, charged to 4 V
            capacitor C2 at b : 1 µF, charged to 6 V
            """));

    [Fact]
    public void Coils_in_series_with_unlike_currents_are_told_the_rest() =>
        Assert.Equal(
            """
            plant.cause:3:33: warning: the current that `L1` carries has no way on: 1 A is left
              inductor L1 from b to c : 1 mH, carrying 1 A
                                              ^^^^^^^^^^^^
              → it jumps at once; let coils in series carry one current
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 from a to b : 1 kΩ
                inductor L1 from b to c : 1 mH, carrying 1 A
                inductor L2 at c : 1 mH, carrying 2 A
                """));

    [Fact]
    public void Coils_in_series_that_agree_are_silent() =>
        Assert.Empty(Checking.Messages(
            """
            source Feed at a : 10 V
            resistor R1 from a to b : 1 kΩ
            inductor L1 from b to c : 1 mH, carrying 1 A
            inductor L2 at c : 1 mH, carrying 1 A
            """));

    [Fact]
    public void A_switch_that_acts_at_the_start_is_no_contradiction() =>
        Assert.Empty(Checking.Messages(
            """
            source Feed at a : 10 V
            switch K1 from a to b : open, closes at 0 s
            capacitor C1 at b : 1 µF, charged to 3 V
            """));
}
