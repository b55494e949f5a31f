namespace CircuitTransient.Tests.Circuits;

/// <summary>Named values that nothing follows from.</summary>
public class UnusedValueTests
{
    [Fact]
    public void A_value_used_nowhere_is_reported_with_the_part_it_may_belong_to() =>
        Assert.Equal(
            """
            plant.cause:1:7: warning: `Lstray` is used nowhere
              value Lstray : 60 µH ±20 %
                    ^^^^^^
              → write `Lstray` where it belongs, such as in the value of `L`, or leave it out
            """,
            Checking.Messages(
                """
                value Lstray : 60 µH ±20 %
                source V at a : 400 V
                resistor R from a to b : 2 Ω
                inductor L at b : 50 µH
                """));

    [Fact]
    public void What_only_an_unused_value_is_made_of_is_unused_too() =>
        Assert.Equal(
            """
            plant.cause:1:7: warning: `Tau` is used nowhere
              value Tau : 3 ms
                    ^^^
              → write `Tau` where it belongs, or leave it out
            plant.cause:2:7: warning: `Late` is used nowhere
              value Late : 2 * Tau
                    ^^^^
              → write `Late` where it belongs, or leave it out
            """,
            Checking.Messages(
                """
                value Tau : 3 ms
                value Late : 2 * Tau
                source V at a : 400 V
                resistor R at a : 2 Ω
                """));

    [Theory]
    [InlineData("value X : 2 Ω\nresistor R at a : X")]
    [InlineData("value Half : 1 Ω\nvalue X : 2 * Half\nresistor R at a : X")]
    [InlineData("value X : 2 ms\nresistor R at a : 2 Ω\nuntil X")]
    [InlineData("value X : 600 V\nresistor R at a : 2 Ω\nrequire voltage of a at most X")]
    [InlineData("value X : 900 V\nresistor R at a : 2 Ω, rated X")]
    [InlineData("value X : 1 ms\nresistor R at a : 2 Ω\nobserve voltage of a from X")]
    [InlineData("repeat 3 as k\nvalue X[k] : 2 Ω\nend\nresistor R at a : X[1] + X[2]")]
    [InlineData("assembly Load with t\nvalue X : 2 Ω\nresistor R at t : X\nend\nplace Load as A with t = a")]
    public void A_value_used_anywhere_is_not_reported(string text) =>
        Assert.DoesNotContain("used nowhere", Checking.Messages("source V at a : 400 V\n" + text));

    [Fact]
    public void Where_a_statement_has_a_mistake_nothing_is_said_of_values_it_may_use() =>
        Assert.DoesNotContain("used nowhere", Checking.Messages(
            """
            value X : 2 Ω
            source V at a : 400 V
            resistor R at a X
            """));
}
