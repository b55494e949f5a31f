using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>Names of parts and nodes.</summary>
public class NameTests
{
    [Fact]
    public void Two_parts_of_one_name_are_refused() =>
        Assert.Equal(
            """
            plant.cause:3:11: error: there are two parts named `R1`
              capacitor R1 at a : 1 µF
                        ^^
              → the first stands in line 2; give this one a name of its own
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                capacitor R1 at a : 1 µF
                """));

    [Fact]
    public void Parts_that_differ_only_in_case_are_refused() =>
        Assert.Equal(
            """
            plant.cause:3:10: error: the parts `Rpre` and `RPRE` differ only in case
              resistor RPRE at a : 2 kΩ
                       ^^^^
              → line 2 has `Rpre`; write both alike, or give one another name
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor Rpre at a : 1 kΩ
                resistor RPRE at a : 2 kΩ
                """));

    [Fact]
    public void Nodes_that_differ_only_in_case_are_refused() =>
        Assert.Equal(
            """
            plant.cause:2:16: error: the nodes `bus` and `Bus` differ only in case
              resistor R1 at Bus : 1 kΩ
                             ^^^
              → line 1 has `bus`; write both alike, or give one another name
            """,
            Checking.Messages(
                """
                source Feed at bus : 10 V
                resistor R1 at Bus : 1 kΩ
                """));

    [Fact]
    public void Both_ends_on_one_node_are_refused() =>
        Assert.Equal(
            """
            plant.cause:3:23: error: both ends of `R2` are on the node `a`
              resistor R2 from a to a : 2 kΩ
                                    ^
              → join one end to another node, or leave the part out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                resistor R2 from a to a : 2 kΩ
                """));

    [Fact]
    public void A_part_at_the_reference_has_both_ends_there() =>
        Assert.Equal(
            """
            plant.cause:3:16: error: both ends of `R2` are on the node `ground`
              resistor R2 at ground : 2 kΩ
                             ^^^^^^
              → join one end to another node, or leave the part out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                resistor R2 at ground : 2 kΩ
                """));

    [Fact]
    public void A_node_touched_once_is_asked_about_with_the_nearest() =>
        Assert.Equal(
            """
            plant.cause:3:25: warning: only `R2` touches the node `buss`
              resistor R2 from bus to buss : 1 kΩ
                                      ^^^^
              → did you mean `bus`?
            """,
            Checking.Messages(
                """
                source Feed at bus : 10 V
                resistor R1 at bus : 1 kΩ
                resistor R2 from bus to buss : 1 kΩ
                """));

    [Fact]
    public void A_node_touched_once_without_a_neighbour_is_asked_about() =>
        Assert.Equal(
            """
            plant.cause:3:25: warning: only `R2` touches the node `x`
              resistor R2 from bus to x : 1 kΩ
                                      ^
              → join another part to it, unless it is meant to hang open
            """,
            Checking.Messages(
                """
                source Feed at bus : 10 V
                resistor R1 at bus : 1 kΩ
                resistor R2 from bus to x : 1 kΩ
                """));

    [Fact]
    public void What_an_unreadable_part_is_and_touches_is_not_missed() =>
        Assert.Equal(
            """
            plant.cause:2:27: error: `3,5` has a decimal comma; the decimal mark is a point
              resistor R1 from a to b : 3,5 Ω
                                        ^^^
              → write `3.5 Ω`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 from a to b : 3,5 Ω
                capacitor C1 from b to ground : 1 µF
                observe current through R1
                observe voltage of b
                """));

    [Fact]
    public void A_name_that_stands_in_no_unreadable_part_is_still_unknown() =>
        Assert.Equal(
            """
            plant.cause:2:27: error: `3,5` has a decimal comma; the decimal mark is a point
              resistor R1 from a to b : 3,5 Ω
                                        ^^^
              → write `3.5 Ω`
            plant.cause:3:25: error: there is no part `Rload`
              observe current through Rload
                                      ^^^^^
              → the parts are `Feed`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 from a to b : 3,5 Ω
                observe current through Rload
                """));

    [Fact]
    public void Every_mistake_is_told_in_one_go() =>
        Assert.Equal(
            """
            plant.cause:1:20: error: `10` has no unit; a source is in volts or amperes
              source Feed at a : 10
                                 ^^
              → write `10 V` or `10 A`
            plant.cause:2:27: error: `5 V` is a voltage; a resistance in ohms is expected here
              resistor R1 from a to b : 5 V
                                        ^^^
              → if the number is right, write `5 Ω`
            plant.cause:3:21: error: the capacitance of `C1` is 0 F; it must be more than zero
              capacitor C1 at b : 0 F
                                  ^^^
              → leave it out if `C1` has none
            plant.cause:4:20: error: there is no node `c`
              observe voltage of c
                                 ^
              → the nodes are `ground`, `a`, `b`
            plant.cause:5:7: error: the study would end at 0 s, and it starts at 0 s
              until 0 s
                    ^^^
              → give an end after 0 s
            """,
            Checking.Messages(
                """
                source Feed at a : 10
                resistor R1 from a to b : 5 V
                capacitor C1 at b : 0 F
                observe voltage of c
                until 0 s
                """));

    [Fact]
    public void A_part_s_voltage_is_across_it() =>
        Assert.Equal(
            """
            plant.cause:3:20: error: `R9` is a part, and no node has that name
              observe voltage of R9
                                 ^^
              → for the voltage between its ends write `voltage across R9`
            """,
            Checking.Messages(
                """
                source F at b : 1 V
                resistor R9 at b : 1 Ω
                observe voltage of R9
                """));

    [Fact]
    public void A_repeated_part_is_numbered() =>
        Assert.Equal(
            """
            plant.cause:3:12: error: the repetition makes a second part named `R`
              resistor R at b : 1 Ω
                       ^
              → number them by the counter: `R[k]` where the block begins with `repeat … as k`
            """,
            Checking.Messages(
                """
                source F at b : 1 V
                repeat 3 as k
                  resistor R at b : 1 Ω
                end
                """));

    [Theory]
    [InlineData("capacitor C at b : n47", 0.47e-9)]
    [InlineData("capacitor C at b : µ47", 0.47e-6)]
    [InlineData("capacitor C at b : 47p", 47e-12)]
    public void A_letter_may_lead_a_marking_code(string text, double farads) =>
        Assert.Equal(
            farads,
            Checking.Circuit(text + "\nresistor R at b : 1 Ω").Part<Capacitor>("C").Capacitance.Nominal);

    [Fact]
    public void A_named_value_goes_before_a_marking_code() =>
        Assert.Equal(
            3000,
            Checking.Circuit("value k1 : 3 kΩ\nsource F at b : 1 V\nresistor R1 at b : k1")
                .Part<Resistor>("R1").Resistance.Nominal);
}
