namespace CircuitTransient.Tests.Circuits;

/// <summary>Circuits of unusual size, which are checked or refused but never end the program.</summary>
public class LargeTextTests
{
    [Fact]
    public void At_most_twenty_errors_are_told()
    {
        var mistakes = string.Join('\n', Enumerable.Range(1, 30).Select(k => $"resistor R{k} at a : {k} V"));

        var messages = Checking.Messages($"source Feed at a : 1 V\n{mistakes}");

        Assert.Equal(20, messages.Split(": error: ").Length - 1);
    }

    [Fact]
    public void A_long_sum_is_no_deep_nesting() =>
        Assert.Empty(Checking.Messages(
            "source Feed at a : 1 V\nresistor R1 at a : "
            + string.Join(" + ", Enumerable.Repeat("1 Ω", 900))));

    [Fact]
    public void A_long_chain_of_values_counted_backwards_is_refused()
    {
        var values = Enumerable.Range(1, 300).Select(k => $"value V{k} : V{k + 1}");
        var chain = string.Join('\n', values);

        var messages = Checking.Messages(
            $"{chain}\nvalue V301 : 1 Ω\nsource Feed at a : 1 V\nresistor R1 at a : V1");

        Assert.StartsWith(
            "plant.cause:201:14: error: this expression is nested more than 200 deep\n", messages,
            StringComparison.Ordinal);
        Assert.Equal(1, messages.Split(": error: ").Length - 1);
    }

    [Fact]
    public void Switches_in_a_long_chain_are_ordered()
    {
        var circuit = Checking.Circuit(
            """
            source Feed at a : 1 V
            switch K[0] from a to b : open, closes at 1 ms
            repeat 1000 as k
              switch K[k] from a to b : open, closes at 1 ms after K[k-1] closes
            end
            resistor R1 at b : 1 Ω
            observe voltage of b
            """);

        Assert.Equal(1003, circuit.Parts.Length);
    }

    [Fact]
    public void Thousands_of_loose_ends_are_told_once() =>
        Assert.Equal(
            """
            plant.cause:3:27: warning: only `R[1]` touches the node `n[1]`
              resistor R[k] from a to n[k] : 1 Ω
                                      ^^^^
              → join another part to it, unless it is meant to hang open
            """,
            Checking.Messages(
                """
                source Feed at a : 1 V
                repeat 20000 as k
                  resistor R[k] from a to n[k] : 1 Ω
                end
                observe voltage of a
                """));
}
