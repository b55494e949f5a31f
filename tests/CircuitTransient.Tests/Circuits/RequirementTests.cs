namespace CircuitTransient.Tests.Circuits;

/// <summary>Observations and requirements.</summary>
public class RequirementTests
{
    [Fact]
    public void An_unknown_node_is_offered_the_nearest() =>
        Assert.Equal(
            """
            plant.cause:3:20: error: there is no node `bsu`
              observe voltage of bsu
                                 ^^^
              → did you mean `bus`?
            """,
            Checking.Messages(
                """
                source Feed at bus : 10 V
                resistor R1 at bus : 1 kΩ
                observe voltage of bsu
                """));

    [Fact]
    public void An_unknown_part_is_offered_the_nearest() =>
        Assert.Equal(
            """
            plant.cause:3:25: error: there is no part `R2`
              require current through R2 at most 5 A
                                      ^^
              → did you mean `R1`?
            """,
            Checking.Messages(
                """
                source Feed at bus : 10 V
                resistor R1 at bus : 1 kΩ
                require current through R2 at most 5 A
                """));

    [Fact]
    public void Two_observations_of_one_name_are_refused() =>
        Assert.Equal(
            """
            plant.cause:4:1: error: two observations are named `voltage of a`
              observe voltage of a from 1 s
              ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → the first stands in line 3; tell them apart with `as "…"`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                observe voltage of a
                observe voltage of a from 1 s
                """));

    [Fact]
    public void Only_a_source_delivers() =>
        Assert.Equal(
            """
            plant.cause:3:9: error: `R1` is a resistor; only a source delivers
              observe power delivered by R1
                      ^^^^^^^^^^^^^^^^^^^^^
              → write `power in R1`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                observe power delivered by R1
                """));

    [Fact]
    public void A_coupling_has_no_terminals() =>
        Assert.Equal(
            """
            plant.cause:5:9: error: `M1` is a coupling, which has no terminals of its own
              observe current through M1
                      ^^^^^^^^^^^^^^^^^^
              → ask its coils, or `energy in M1`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 at a : 1 mH
                coupling M1 of L1 and L2 : 0.9
                observe current through M1
                """));

    [Fact]
    public void A_rate_is_that_of_a_voltage_or_current() =>
        Assert.Equal(
            """
            plant.cause:3:27: error: `power in R1` is neither a voltage nor a current
              observe rate of change of power in R1
                                        ^^^^^^^^^^^
              → a rate of change is that of a voltage or a current
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                observe rate of change of power in R1
                """));

    [Fact]
    public void A_bound_has_the_unit_of_its_quantity() =>
        Assert.Equal(
            """
            plant.cause:3:30: error: `5 A` is a current; a voltage in volts is expected here
              require voltage of a at most 5 A
                                           ^^^
              → if the number is right, write `5 V`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require voltage of a at most 5 A
                """));

    [Fact]
    public void Bounds_in_the_wrong_order_are_refused() =>
        Assert.Equal(
            """
            plant.cause:3:22: error: the lower bound lies above the upper one, so nothing can hold
              require voltage of a between 5 V and 1 V
                                   ^^^^^^^^^^^^^^^^^^^
              → write `between 1 V and 5 V`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require voltage of a between 5 V and 1 V
                """));

    [Fact]
    public void A_magnitude_is_never_negative() =>
        Assert.Equal(
            """
            plant.cause:3:22: error: a magnitude is never below zero
              require voltage of a at most -5 V in magnitude
                                   ^^^^^^^^^^^^
              → write `at most X in magnitude` with X above zero
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require voltage of a at most -5 V in magnitude
                """));

    [Fact]
    public void An_empty_window_is_never_judged() =>
        Assert.Equal(
            """
            plant.cause:3:46: error: this is never judged: its window from 2 s to 1 s is empty
              require voltage of a at most 5 V from 2 s to 1 s
                                                           ^^^
              → give the earlier time first
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require voltage of a at most 5 V from 2 s to 1 s
                """));

    [Fact]
    public void A_window_after_the_end_is_never_judged() =>
        Assert.Equal(
            """
            plant.cause:4:39: error: this is never judged: it starts at 11 s, the study ends at 10 s
              require voltage of a at most 5 V from 6 s after K1 closes
                                                    ^^^^^^^^^^^^^^^^^^^
              → write `until 22 s`, or an earlier window
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 5 s
                require voltage of a at most 5 V from 6 s after K1 closes
                until 10 s
                """));

    [Fact]
    public void Settling_after_the_end_is_never_judged() =>
        Assert.Equal(
            """
            plant.cause:3:56: error: this is never judged: the study ends at 10 s
              require settling of voltage of a to 10 V within 2 % by 11 s
                                                                     ^^^^
              → end the study later, or ask for an earlier time
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require settling of voltage of a to 10 V within 2 % by 11 s
                until 10 s
                """));

    [Fact]
    public void A_band_is_in_per_cent() =>
        Assert.Equal(
            """
            plant.cause:3:49: error: `2` has no unit; a band is in per cent
              require settling of voltage of a to 10 V within 2 by 1 s
                                                              ^
              → write `2 %`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require settling of voltage of a to 10 V within 2 by 1 s
                """));

    [Fact]
    public void A_band_about_zero_has_no_width() =>
        Assert.Equal(
            """
            plant.cause:3:37: error: a band in per cent about zero has no width
              require settling of voltage of a to 0 V within 2 % by 1 s
                                                  ^^^
              → write `require … between -X and X from T`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require settling of voltage of a to 0 V within 2 % by 1 s
                """));

    [Fact]
    public void An_overshoot_is_in_per_cent() =>
        Assert.Equal(
            """
            plant.cause:3:43: error: `5` has no unit; an overshoot is in per cent
              require overshoot of voltage of a at most 5
                                                        ^
              → write `5 %`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                require overshoot of voltage of a at most 5
                """));

    [Fact]
    public void A_tolerance_a_bound_cannot_carry_is_told() =>
        Assert.Equal(
            """
            plant.cause:4:30: warning: `Vdc` is held at its nominal value here
              require voltage of a at most 1.1*Vdc
                                           ^^^^^^^
              → its tolerance is drawn in part values, wave levels, switching instants and windows only
            """,
            Checking.Messages(
                """
                value Vdc : 10 V ±5 %
                source Feed at a : Vdc
                resistor R1 at a : 1 kΩ
                require voltage of a at most 1.1*Vdc
                """));
}
