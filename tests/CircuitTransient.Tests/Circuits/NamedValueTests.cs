namespace CircuitTransient.Tests.Circuits;

/// <summary>Named values: expressions, dimensions and cycles.</summary>
public class NamedValueTests
{
    [Fact]
    public void A_cycle_is_printed() =>
        Assert.Equal(
            """
            plant.cause:3:7: error: the value `A` is made of itself: A → B → C → A
              value A : B + 1 V
                    ^
              → give one of them as a number
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value A : B + 1 V
                value B : C * 2
                value C : A
                """));

    [Fact]
    public void A_value_made_of_itself_is_named() =>
        Assert.Equal(
            """
            plant.cause:3:7: error: the value `D` is made of itself
              value D : 2 * D
                    ^
              → give one of them as a number
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value D : 2 * D
                """));

    [Fact]
    public void A_voltage_and_a_current_are_not_added() =>
        Assert.Equal(
            """
            plant.cause:3:11: error: a voltage cannot be added to a current
              value E : 5 V + 1 A
                        ^^^^^^^^^
              → `5 V` is a voltage, `1 A` a current
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value E : 5 V + 1 A
                """));

    [Fact]
    public void The_root_of_a_voltage_has_no_meaning() =>
        Assert.Equal(
            """
            plant.cause:3:15: error: `sqrt` of a voltage has no meaning
              value F : sqrt(5 V)
                            ^^^^^
              → the unit under a root must be a square, as in `sqrt(Lcable/Cin)`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value F : sqrt(5 V)
                """));

    [Fact]
    public void The_exponential_of_a_voltage_has_no_meaning() =>
        Assert.Equal(
            """
            plant.cause:3:14: error: `exp` of a voltage has no meaning
              value G : exp(5 V)
                           ^^^^^
              → divide by a voltage first, so that a pure number is left
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value G : exp(5 V)
                """));

    [Fact]
    public void The_root_of_a_negative_number_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:11: error: `sqrt` of -1 is not a number
              value S : sqrt(1-2)
                        ^^^^^^^^^
              → a root is taken of zero or more
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value S : sqrt(1-2)
                """));

    [Fact]
    public void The_logarithm_of_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:11: error: `ln` of 0 is not a number
              value M : ln(0)
                        ^^^^^
              → a logarithm is taken of a positive number
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value M : ln(0)
                """));

    [Fact]
    public void A_division_by_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:13: error: `(2-2)` is zero, and nothing can be divided by it
              value H : 1/(2-2)
                          ^^^^^
              → look for two values that cancel
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value H : 1/(2-2)
                """));

    [Fact]
    public void A_broken_exponent_of_a_unit_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:17: error: a voltage takes a whole number as its exponent
              value I : (5 V)^0.5
                              ^^^
              → for a root write `sqrt(…)`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value I : (5 V)^0.5
                """));

    [Fact]
    public void An_exponent_with_a_unit_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:13: error: an exponent is a pure number, not a voltage
              value I : 5^(2 V)
                          ^^^^^
              → divide it by a value of the same unit
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value I : 5^(2 V)
                """));

    [Fact]
    public void An_overflow_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:11: error: `1e300 V * 1e300` is not a finite number
              value N : 1e300 V * 1e300
                        ^^^^^^^^^^^^^^^
              → keep values below 1e308 in their SI unit
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value N : 1e300 V * 1e300
                """));

    [Fact]
    public void An_unknown_value_is_offered_the_nearest() =>
        Assert.Equal(
            """
            plant.cause:4:11: error: there is no value `Vdcc`
              value J : Vdcc * 2
                        ^^^^
              → did you mean `Vdc`?
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value Vdc : 5 V
                value J : Vdcc * 2
                """));

    [Fact]
    public void An_unknown_value_without_a_neighbour_is_offered_a_definition() =>
        Assert.Equal(
            """
            plant.cause:2:20: error: there is no value `Rcoil`
              resistor R1 at a : Rcoil
                                 ^^^^^
              → define it: `value Rcoil : …`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : Rcoil
                """));

    [Fact]
    public void Two_values_of_one_name_are_refused() =>
        Assert.Equal(
            """
            plant.cause:4:7: error: there are two values named `J`
              value J : 6 V
                    ^
              → the first stands in line 3; give this one a name of its own
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value J : 5 V
                value J : 6 V
                """));

    [Fact]
    public void The_circle_number_is_not_named_again() =>
        Assert.Equal(
            """
            plant.cause:3:7: error: `pi` is the circle number already
              value pi : 3
                    ^^
              → give the value another name
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                value pi : 3
                """));
}
