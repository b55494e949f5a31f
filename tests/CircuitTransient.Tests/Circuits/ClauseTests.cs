namespace CircuitTransient.Tests.Circuits;

/// <summary>Clauses after a part's value.</summary>
public class ClauseTests
{
    [Fact]
    public void A_charge_on_a_resistor_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:26: error: `charged to` belongs to a capacitor, and `R1` is a resistor
              resistor R1 at a : 1 kΩ, charged to 5 V
                                       ^^^^^^^^^^^^^^
              → leave it out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ, charged to 5 V
                """));

    [Fact]
    public void A_clause_given_twice_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:44: error: `C1` has `charged to` twice
              capacitor C1 at a : 1 µF, charged to 10 V, charged to 6 V
                                                         ^^^^^^^^^^^^^^
              → leave one of them out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V, rated 5 A, rated 7 W
                resistor R1 at a : 1 kΩ
                capacitor C1 at a : 1 µF, charged to 10 V, charged to 6 V
                """));

    [Fact]
    public void A_rating_without_a_unit_says_nothing() =>
        Assert.Equal(
            """
            plant.cause:2:32: error: `5` has no unit, so it does not say what `R1` is rated for
              resistor R1 at a : 1 kΩ, rated 5
                                             ^
              → a rating is in V, A, W, J, A²s, V/µs or A/µs
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ, rated 5
                """));

    [Fact]
    public void A_rating_in_hertz_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:32: error: `5 Hz` is a frequency, which is not a rating
              resistor R1 at a : 1 kΩ, rated 5 Hz
                                             ^^^^
              → a rating is in V, A, W, J, A²s, V/µs or A/µs
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ, rated 5 Hz
                """));

    [Fact]
    public void A_negative_rating_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:32: error: a rating is more than zero, not `-5 W`
              resistor R1 at a : 1 kΩ, rated -5 W
                                             ^^^^
              → give its magnitude; both signs are meant
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ, rated -5 W
                """));

    [Fact]
    public void A_part_is_linear_up_to_a_voltage_or_current() =>
        Assert.Equal(
            """
            plant.cause:2:39: error: `5 W` is a power; a part is linear up to a voltage or a current
              resistor R1 at a : 1 kΩ, linear up to 5 W
                                                    ^^^
              → write it in V or A
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ, linear up to 5 W
                """));

    [Fact]
    public void A_winding_without_turns_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:83: error: a winding of `T1` has 0 turns
              transformer T1 primary from a to ground, secondary from s to ground : turns 10 to 0
                                                                                                ^
              → write a number above zero; swap the terminals of a winding to turn its sense
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                transformer T1 primary from a to ground, secondary from s to ground : turns 10 to 0
                resistor R1 at s : 1 kΩ
                """));

    [Fact]
    public void A_power_controls_no_source() =>
        Assert.Equal(
            """
            plant.cause:3:50: error: `power in R1` cannot control a source
              dependent source Amp from a to ground : 10 times power in R1
                                                               ^^^^^^^^^^^
              → a dependent source follows a voltage or a current
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                dependent source Amp from a to ground : 10 times power in R1
                """));

    [Fact]
    public void A_gain_of_the_wrong_dimension_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:41: error: `Amp` would set a rate of change of current, not a voltage or a current
              dependent source Amp from a to ground : 10 Hz times current through R1
                                                      ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → to set a voltage the gain is a resistance, to set a current a pure number
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                dependent source Amp from a to ground : 10 Hz times current through R1
                """));
}
