namespace CircuitTransient.Tests.Circuits;

/// <summary>Tolerances of values.</summary>
public class ToleranceTests
{
    [Fact]
    public void A_tolerance_that_reaches_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:25: error: the tolerance of `R1` reaches zero: 0 Ω to 20 Ω
              resistor R1 at a : 10 Ω ±100 %
                                      ^^^^^^
              → a resistance of zero is no resistor; narrow it
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 10 Ω ±100 %
                """));

    [Fact]
    public void A_tolerance_past_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:27: error: the tolerance of `C1` reaches past zero: -1 nF to 12 nF
              capacitor C1 at a : 10 nF between -1 nF and 12 nF
                                        ^^^^^^^^^^^^^^^^^^^^^^^
              → a capacitance of zero is no capacitor; narrow it
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                capacitor C1 at a : 10 nF between -1 nF and 12 nF
                """));

    [Fact]
    public void The_tolerance_of_a_named_value_that_reaches_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:20: error: the tolerance of `R1` reaches zero: 0 Ω to 15 Ω
              resistor R1 at a : Rx
                                 ^^
              → a resistance of zero is no resistor; narrow it
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                value Rx : 10 Ω -100 % +50 %
                resistor R1 at a : Rx
                """));

    [Fact]
    public void A_nominal_value_outside_its_limits_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:20: error: `5 Ω` lies outside its own limits `between 6 Ω and 7 Ω`
              resistor R1 at a : 5 Ω between 6 Ω and 7 Ω
                                 ^^^
              → the nominal value stands between the limits or on one of them
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 5 Ω between 6 Ω and 7 Ω
                """));

    [Fact]
    public void Limits_of_another_dimension_are_refused() =>
        Assert.Equal(
            """
            plant.cause:2:32: error: `4 V` is a voltage; the limits of a resistance are in ohms
              resistor R1 at a : 5 Ω between 4 V and 7 V
                                             ^^^
              → write both limits in the unit of the value
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 5 Ω between 4 V and 7 V
                """));

    [Fact]
    public void Limits_in_the_wrong_order_are_refused() =>
        Assert.Equal(
            """
            plant.cause:2:24: error: the lower limit of this tolerance lies above its upper limit
              resistor R1 at a : 5 Ω between 7 Ω and 4 Ω
                                     ^^^^^^^^^^^^^^^^^^^
              → name the lower one first
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 5 Ω between 7 Ω and 4 Ω
                """));
}
