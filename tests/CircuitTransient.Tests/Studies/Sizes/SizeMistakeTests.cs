namespace CircuitTransient.Tests.Studies.Sizes;

public sealed class SizeMistakeTests
{
    private const string Circuit =
        """
        value     Rdamp : 10 Ω
        source    Feed at s : step of 10 V
        resistor  R1 from s to a : 1 kΩ
        resistor  R2 from a to b : Rdamp
        resistor  R3 from a to ground : -50 kΩ
        capacitor C1 from b to ground : 1 µF
        switch    K1 from b to c : open, closes at 1 ms
        resistor  R4 from c to ground : 1 kΩ
        require voltage of b at most 11 V
        until 5 ms
        """;

    [Theory]
    [InlineData("R5", "--part:1:1: error: there is no part `R5`")]
    [InlineData("K1", "error: `K1` has no single value that could vary")]
    [InlineData("Feed", "error: `Feed` ")]
    [InlineData("R3", "--part:1:1: error: `R3` is negative, which is nothing to buy")]
    [InlineData("R2", "the value of `R2` follows from named values")]
    [InlineData("R1 from 1 V to 2 kΩ", "--part:1:9: error: `1 V` is not in Ω")]
    [InlineData("R1 from 1 to 2 kΩ", "--part:1:9: error: `1` has no unit")]
    [InlineData("R1 from 0 Ω to 2 kΩ", "--part:1:9: error: `0 Ω` is not above zero")]
    [InlineData("R1 from 2 kΩ to 1 kΩ", "--part:1:9: error: the range does not end above its start")]
    public void A_part_that_cannot_be_sized_is_refused(string part, string message) =>
        Assert.Contains(message, Sizing.Refusal(Circuit, Sizing.Ask([part])));

    [Theory]
    [InlineData("energy in R5", "--least:1:11: error: there is no part `R5`")]
    [InlineData("C1", "--least:1:1: error: this is neither a sized part nor a quantity")]
    [InlineData("", "error: this is neither a sized part nor a quantity")]
    [InlineData("voltage of b\nuntil 1 s", "error: this is neither a sized part nor a quantity")]
    [InlineData("taste of b", "--least:1:1: error: ")]
    public void An_aim_that_means_nothing_is_refused(string aim, string message) =>
        Assert.Contains(message, Sizing.Refusal(Circuit, Sizing.Ask(["R1"], least: aim)));

    [Fact]
    public void A_circuit_that_requires_nothing_is_told_what_to_say()
    {
        var text = Circuit.Replace("require voltage of b at most 11 V", "observe voltage of b");

        Assert.Contains("nothing is required or rated", Sizing.Refusal(text, Sizing.Ask(["R1"])));
    }

    [Fact]
    public void Marking_codes_are_limits_too()
    {
        var result = Sizing.Run(Circuit, Sizing.Ask(["R1 from 470R to 4k7"]));

        Assert.Equal((470, 4700), (result.Problem.Parts[0].Lowest, result.Problem.Parts[0].Highest));
    }

    [Fact]
    public void A_part_in_a_repetition_is_sized_though_its_text_is_shared()
    {
        var result = Sizing.Run(
            """
            source    Feed at n[1] : step of 10 V
            repeat 3 as k
              resistor  R[k] from n[k] to n[k+1] : 1 kΩ
            end
            resistor  Load from n[4] to ground : 1 kΩ
            require voltage of n[4] between 2 V and 2.4 V
            until 1 ms
            """,
            Sizing.Ask(["R[2]"]));

        // 10 V·1/(3 + R[2]/1 kΩ) between 2 V and 2.4 V.
        var interval = Assert.Single(result.Intervals);
        Assert.Equal(1166.666666666667, interval.From.Values[0], 1e-6);
        Assert.Equal(2000, interval.To.Values[0], 1e-6);
        Assert.True(result.IsFound);
        Assert.Null(result.ProposedText);
    }
}
