using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

public class CircuitRewritingTests
{
    private const string Text = """
        source    Feed at in : 10 V ±10 %          # the rail
        resistor  R1 from in to a : 4k7 between 4 kΩ and 5 kΩ, rated 2 W
        capacitor C1 at a : 10 µF -20 % +80 %, charged to 1 V between 0 V and 2 V
        """;

    [Fact]
    public void Values_change_where_they_stand_and_nothing_else_does()
    {
        var circuit = Checking.Circuit(Text);
        var rewritten = CircuitRewriting.Put(
            circuit, Values(circuit, ("Feed", 11), ("R1", 1234.5), ("C1", 8e-6), ("C1 initial charge", 0)),
            keepsTolerances: false);
        Assert.Equal(
            """
            source    Feed at in : 11 V          # the rail
            resistor  R1 from in to a : 1.2345 kΩ, rated 2 W
            capacitor C1 at a : 8 µF, charged to 0 V
            """,
            rewritten.Value);
    }

    [Fact]
    public void A_tolerance_stays_where_the_new_value_may_have_it()
    {
        var circuit = Checking.Circuit(Text);
        var rewritten = CircuitRewriting.Put(
            circuit, Values(circuit, ("Feed", 11), ("R1", 6000), ("C1 initial charge", 1.5)),
            keepsTolerances: true);
        Assert.Equal(
            """
            source    Feed at in : 11 V ±10 %          # the rail
            resistor  R1 from in to a : 6 kΩ, rated 2 W
            capacitor C1 at a : 10 µF -20 % +80 %, charged to 1.5 V between 0 V and 2 V
            """,
            rewritten.Value);
    }

    [Theory]
    [InlineData(1.0 / 3, "F")]
    [InlineData(4.35e-19, "H")]
    [InlineData(123456789.123456789, "Ω")]
    [InlineData(0.1 + 0.2, "V")]
    public void A_written_value_reads_back_to_the_same_bits(double value, string unit)
    {
        var text = $"value X : {CircuitRewriting.Written(value, unit)}\nsource Feed at a : 1 V\n"
            + "resistor R1 at a : 1 Ω";
        Assert.Equal(value, Checking.Circuit(text).Parameters.Single(p => p.Name == "X").Nominal);
    }

    [Fact]
    public void Parts_of_a_repeat_stand_in_one_text_and_take_one_value_only()
    {
        var circuit = Checking.Circuit(
            "source Feed at n[1] : 1 V\nrepeat 2 as k\nresistor R[k] from n[k] to n[k+1] : 1 Ω ±5 %\nend\n"
            + "capacitor C1 at n[3] : 1 µF");
        var different = CircuitRewriting.Put(
            circuit, Values(circuit, ("R[1]", 2), ("R[2]", 3)), keepsTolerances: false);
        Assert.Equal(
            "`R[1]` and `R[2]` stand in one text, and their values differ",
            Assert.Single(different.Diagnostics).Message);
        Assert.Equal(
            "write the parts out one by one in place of the repetition, with names such as `\"R[1]\"`, in "
                + "quotes",
            different.Diagnostics[0].Advice);
        var same = CircuitRewriting.Put(
            circuit, Values(circuit, ("R[1]", 2), ("R[2]", 2)), keepsTolerances: false);
        Assert.Contains("to n[k+1] : 2 Ω\nend", same.Value);
    }

    [Fact]
    public void A_repeat_whose_rounds_differ_is_written_out_where_that_is_wanted()
    {
        var circuit = Checking.Circuit("""
            source Feed at n[1] : 1 V
            repeat 2 as k      # the line
            resistor R[k] from n[k] to n[k+1] : 1 Ω ±5 %   # of round k
            capacitor C[k] at n[k+1] : k * 2 µF, charged to 1 V
            end
            require voltage of n[3] at most 1 V
            """);
        var written = CircuitRewriting.Put(
            circuit, Values(circuit, ("R[1]", 2), ("R[2]", 3)), keepsTolerances: false, writesOut: true);
        Assert.Equal(
            """
            source Feed at n[1] : 1 V
            # repeat 2 as k      # the line, written out
            resistor "R[1]" from "n[1]" to "n[2]" : 2 Ω   # of round k
            capacitor "C[1]" at "n[2]" : 1 * 2 µF, charged to 1 V
            resistor "R[2]" from "n[2]" to "n[3]" : 3 Ω   # of round k
            capacitor "C[2]" at "n[3]" : 2 * 2 µF, charged to 1 V
            require voltage of n[3] at most 1 V
            """,
            written.Value);
        Assert.Equal([2.0, 3.0], Checking.Circuit(written.Value!).Parameters
            .Where(p => p.Name.StartsWith('R')).Select(p => p.Nominal));
    }

    private static ImmutableDictionary<int, double> Values(
        Circuit circuit, params (string Name, double Value)[] values) =>
        values.ToImmutableDictionary(
            v => circuit.Parameters.Index().Single(p => p.Item.Name == v.Name).Index, v => v.Value);
}
