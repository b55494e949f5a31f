using CircuitTransient.Studies.Spreads;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Spreads;

public class WorstCircuitTests
{
    // A divider of three equal parts: voltage of n[3] is greatest with the first two least and the last most.
    private const string Line = """
        source Feed at n[1] : 12 V
        repeat 3 as k
        resistor R[k] from n[k] to n[k+1] : 10 Ω ±10 %
        end
        capacitor C1 from n[3] to ground : 1 µF
        switch K from n[4] to ground : closed
        require voltage of n[3] at most 4.5 V
        until 1 ms
        """;

    [Fact]
    public void The_worst_case_of_a_repeat_is_written_out_and_solves_to_its_figure()
    {
        var spread = Spreading.Of(Line);
        var written = WorstCircuit.Write(spread, _ => new Outcome<SourceText>(null, [])).Value!;

        // 12 V · 11/(9 + 9 + 11).
        Assert.Equal(12.0 * 11 / 29, spread.Worst!.Point.Reached!.Value, 1e-6);
        Assert.Contains("resistor \"R[2]\" from \"n[2]\" to \"n[3]\" : 9 Ω\n", written);
        Assert.Contains("resistor \"R[3]\" from \"n[3]\" to \"n[4]\" : 11 Ω\n", written);
        var solved = Spreading.Varied(written).Nominal;
        var reached = solved.Observations.Single(o => o.Name == "voltage of n[3]").Max.Value;
        Assert.Equal(12.0 * 11 / 29, reached!.Value, 1e-6);
    }

    [Fact]
    public void Parts_of_an_assembly_that_must_differ_are_refused_with_what_to_do()
    {
        var spread = Spreading.Of("""
            source Feed at a : 12 V
            assembly leg with terminals p, q
            resistor R from p to q : 10 Ω ±10 %
            end
            place leg as Upper with p = a, q = b
            place leg as Lower with p = b, q = ground
            require voltage of b at most 7 V
            until 1 ms
            """);
        var refused = Assert.Single(
            WorstCircuit.Write(spread, _ => new Outcome<SourceText>(null, [])).Diagnostics);

        Assert.Equal("`Upper/R` and `Lower/R` stand in one text, and their values differ", refused.Message);
        Assert.StartsWith("give the value a name in the assembly", refused.Advice);
    }
}
