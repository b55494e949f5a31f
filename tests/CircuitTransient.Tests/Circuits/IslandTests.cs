namespace CircuitTransient.Tests.Circuits;

/// <summary>Paths to the reference conductor.</summary>
public class IslandTests
{
    [Fact]
    public void An_island_names_its_parts() =>
        Assert.Equal(
            """
            plant.cause:3:10: error: `R2` and `C2` have no path to the reference `ground`
              resistor R2 from x to y : 1 kΩ
                       ^^
              → tie them down, such as `resistor Rtie from x to ground : 10 MΩ`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                resistor R2 from x to y : 1 kΩ
                capacitor C2 from x to y : 1 µF
                """));

    [Theory]
    [InlineData("gnd", "ground")]
    [InlineData("GND", "ground")]
    [InlineData("earth", "ground")]
    [InlineData("0", "ground")]
    [InlineData("grund", "ground")]
    [InlineData("gnd", "minus")]
    [InlineData("ground", "minus")]
    public void A_loose_node_named_as_others_name_the_reference_is_told_its_name(
        string name, string reference) =>
        Assert.Equal(
            $"""
            plant.cause:4:19: warning: only `C1` touches the node `{name}`
              capacitor C1 from {name} to a : 1 µF
                                {new string('^', name.Length)}
              → did you mean `{reference}`, the reference?
            """,
            Checking.Messages(
                $"""
                reference is {reference}
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                capacitor C1 from {name} to a : 1 µF
                """));

    [Fact]
    public void A_large_island_names_four() =>
        Assert.Equal(
            """
            plant.cause:3:10: error: `R2`, `R3`, `R4`, `R5` and 3 more have no path to the reference `ground`
              resistor R2 from x to y : 1 kΩ
                       ^^
              → tie them down, such as `resistor Rtie from x to ground : 10 MΩ`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                resistor R2 from x to y : 1 kΩ
                resistor R3 from x to y : 1 kΩ
                resistor R4 from x to y : 1 kΩ
                resistor R5 from x to y : 1 kΩ
                resistor R6 from x to y : 1 kΩ
                resistor R7 from x to y : 1 kΩ
                resistor R8 from x to y : 1 kΩ
                """));

    [Fact]
    public void A_secondary_has_no_path_through_its_transformer() =>
        Assert.Equal(
            """
            plant.cause:2:13: error: `T1` and `R1` have no path to the reference `ground`
              transformer T1 primary from a to ground, secondary from s to t : turns 10 to 1
                          ^^
              → tie them down, such as `resistor Rtie from s to ground : 10 MΩ`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                transformer T1 primary from a to ground, secondary from s to t : turns 10 to 1
                resistor R1 from s to t : 1 Ω
                """));

    [Fact]
    public void A_coupling_is_no_path() =>
        Assert.Equal(
            """
            plant.cause:3:10: error: `L2` and `R2` have no path to the reference `ground`
              inductor L2 from s to t : 1 mH
                       ^^
              → tie them down, such as `resistor Rtie from s to ground : 10 MΩ`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 at a : 1 mH
                inductor L2 from s to t : 1 mH
                resistor R2 from s to t : 1 Ω
                coupling M1 of L1 and L2 : 0.9
                """));

    [Fact]
    public void An_untouched_reference_is_named() =>
        Assert.Equal(
            """
            plant.cause:1:14: error: no part touches the reference conductor `minus`
              reference is minus
                           ^^^^^
              → name the node all voltages count from: `reference is mins`
            """,
            Checking.Messages(
                """
                reference is minus
                source Feed from a to mins : 10 V
                resistor R1 from a to mins : 1 kΩ
                """));

    [Fact]
    public void An_untouched_reference_without_a_neighbour_is_offered_the_busiest_node() =>
        Assert.Equal(
            """
            plant.cause:1:1: error: no part touches the reference conductor `ground`
              source Feed from a to b : 10 V
              ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → name the node all voltages count from: `reference is a`
            """,
            Checking.Messages(
                """
                source Feed from a to b : 10 V
                resistor R1 from a to c : 1 kΩ
                resistor R2 from b to a : 1 kΩ
                resistor R3 from c to b : 1 kΩ
                """));
}
