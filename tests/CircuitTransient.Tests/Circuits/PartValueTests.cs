namespace CircuitTransient.Tests.Circuits;

/// <summary>The values of parts: units, signs, marking codes and habits.</summary>
public class PartValueTests
{
    [Fact]
    public void A_resistance_without_a_unit_is_told_its_unit() =>
        Assert.Equal(
            """
            plant.cause:2:20: error: `82` has no unit; a resistance is in ohms
              resistor R1 at a : 82
                                 ^^
              → write `82 Ω`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 82
                """));

    [Fact]
    public void A_voltage_where_a_resistance_belongs_is_named() =>
        Assert.Equal(
            """
            plant.cause:2:20: error: `5 V` is a voltage; a resistance in ohms is expected here
              resistor R1 at a : 5 V
                                 ^^^
              → if the number is right, write `5 Ω`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 5 V
                """));

    [Theory]
    [InlineData(
        "resistor R1 at a : 2.2k",
        """
        plant.cause:1:20: error: `2.2k` has no unit; a resistance is in ohms
          resistor R1 at a : 2.2k
                             ^^^^
          → write `2.2 kΩ`
        """)]
    [InlineData(
        "resistor R1 at a : 2.2 u",
        """
        plant.cause:1:20: error: `2.2 u` has no unit; a resistance is in ohms
          resistor R1 at a : 2.2 u
                             ^^^^^
          → write `2.2 µΩ`
        """)]
    [InlineData(
        "resistor R1 at a : 1 µF",
        """
        plant.cause:1:20: error: `1 µF` is a capacitance; a resistance in ohms is expected here
          resistor R1 at a : 1 µF
                             ^^^^
          → what is written here must come out in ohms
        """)]
    [InlineData(
        "resistor R1 at a : 1e3 V",
        """
        plant.cause:1:20: error: `1e3 V` is a voltage; a resistance in ohms is expected here
          resistor R1 at a : 1e3 V
                             ^^^^^
          → what is written here must come out in ohms
        """)]
    [InlineData(
        "source S1 at a : step of 5 V at 10 mS",
        """
        plant.cause:1:33: error: `10 mS` is a conductance; a time in seconds is expected here
          source S1 at a : step of 5 V at 10 mS
                                          ^^^^^
          → `S` is siemens, a second is `s`: write `10 ms`
        """)]
    [InlineData(
        "source S1 at a : 2.2 k",
        """
        plant.cause:1:18: error: `2.2 k` has no unit; a source is in volts or amperes
          source S1 at a : 2.2 k
                           ^^^^^
          → write `2.2 kV` or `2.2 kA`
        """)]
    public void A_prefix_or_a_power_of_ten_is_never_lost_in_advice(string statement, string message) =>
        Assert.Equal(message, Checking.Messages(statement + "\nresistor R2 at a : 1 Ω"));

    [Fact]
    public void An_expression_of_the_wrong_dimension_is_named() =>
        Assert.Equal(
            """
            plant.cause:3:20: error: `Tau/(2 ms)` is a pure number; a resistance in ohms is expected here
              resistor R1 at a : Tau/(2 ms)
                                 ^^^^^^^^^^
              → what is written here must come out in ohms
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                value Tau : 5 ms
                resistor R1 at a : Tau/(2 ms)
                """));

    [Fact]
    public void A_capacitance_of_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:21: error: the capacitance of `C1` is 0 F; it must be more than zero
              capacitor C1 at a : 0 F
                                  ^^^
              → leave it out if `C1` has none
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                capacitor C1 at a : 0 F
                """));

    [Fact]
    public void A_negative_capacitance_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:21: error: the capacitance of `C1` is -1 nF; it must be more than zero
              capacitor C1 at a : -1 nF
                                  ^^^^^
              → leave the minus out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                capacitor C1 at a : -1 nF
                """));

    [Fact]
    public void An_inductance_of_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:20: error: the inductance of `L1` is 0 H; it must be more than zero
              inductor L1 at a : 0 H
                                 ^^^
              → leave it out if `L1` has none
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 0 H
                """));

    [Fact]
    public void A_resistance_of_zero_is_offered_a_closed_switch() =>
        Assert.Equal(
            """
            plant.cause:2:20: error: the resistance of `R1` is zero
              resistor R1 at a : 0 Ω
                                 ^^^
              → use a closed switch: `switch R1 from a to ground : closed`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 0 Ω
                """));

    [Fact]
    public void A_negative_resistance_is_asked_about() =>
        Assert.Equal(
            """
            plant.cause:2:20: warning: `R1` has a negative resistance: it feeds power into the circuit
              resistor R1 at a : -50 Ω
                                 ^^^^^
              → taken as an incremental resistance; leave the minus out if none is meant
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : -50 Ω
                """));

    [Fact]
    public void A_marking_code_of_another_kind_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:20: error: the marking code `4k7` is not that of an inductance
              inductor L1 at a : 4k7
                                 ^^^
              → write the value with its unit, in henries
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 4k7
                """));

    [Fact]
    public void A_marking_code_beats_a_named_value_with_a_warning() =>
        Assert.Equal(
            """
            plant.cause:3:20: warning: `R47` is read as the marking code of 470 mΩ, not as the named value
              resistor R1 at a : R47
                                 ^^^
              → give the named value another name
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                value R47 : 5 Ω
                resistor R1 at a : R47
                """));

    [Fact]
    public void A_marking_code_in_a_named_value_lacks_its_unit() =>
        Assert.Equal(
            """
            plant.cause:2:12: error: the marking code `4k7` does not say its unit here
              value Rx : 4k7
                         ^^^
              → write the value with its unit, such as `4.7 kΩ`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                value Rx : 4k7
                resistor R1 at a : Rx
                """));

    [Fact]
    public void Milliohms_straight_across_a_source_are_asked_about() =>
        Assert.Equal(
            """
            plant.cause:2:20: warning: 1 mΩ stands across the source `Feed`; is that meant?
              resistor R1 at a : 1 mΩ
                                 ^^^^
              → mega is `M`: `1 MΩ`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 mΩ
                """));

    [Fact]
    public void A_megafarad_is_asked_about_with_the_prefix_meant() =>
        Assert.Equal(
            """
            plant.cause:2:21: warning: 22 MF is far from the habit of a capacitor; is it meant?
              capacitor C1 at a : 22 MF
                                  ^^^^^
              → milli is `m`: `22 mF`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                capacitor C1 at a : 22 MF
                """));

    [Fact]
    public void A_closed_resistance_of_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:2:42: error: the closed resistance of `K1` is 0 Ω; it must be more than zero
              switch K1 at a : open, closed resistance 0 Ω, closes at 1 ms
                                                       ^^^
              → leave it out if `K1` has none
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                switch K1 at a : open, closed resistance 0 Ω, closes at 1 ms
                resistor R1 at a : 1 kΩ
                """));
}
