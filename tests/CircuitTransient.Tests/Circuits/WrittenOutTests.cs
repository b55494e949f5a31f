using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>What repetitions and assemblies become.</summary>
public class WrittenOutTests
{
    [Fact]
    public void A_repetition_writes_out_names_and_counters()
    {
        var circuit = Checking.Circuit(
            """
            source Feed at n[1] : 1 V
            repeat 3 as k
              value V[k] : k * 1 Ω
              resistor R[k] from n[k] to n[k+1] : V[k] * k
              capacitor C[k] at n[k+1] : 1 nF
            end
            observe voltage of n[4]
            observe current through R[2]
            """);

        Assert.Equal(["Feed", "R[1]", "C[1]", "R[2]", "C[2]", "R[3]", "C[3]"],
            circuit.Parts.Select(p => p.Name));
        Assert.Equal(["ground", "n[1]", "n[2]", "n[3]", "n[4]"], circuit.Nodes);
        Assert.Equal([1.0, 4, 9], circuit.Parts.OfType<Resistor>().Select(r => r.Resistance.Nominal));
        Assert.Equal(new VoltageBetween(4, 0), circuit.Observations[0].Quantity);
    }

    [Fact]
    public void An_assembly_keeps_its_inner_names_to_itself()
    {
        var circuit = Checking.Circuit(
            """
            reference is minus
            value Rdamp : 7 Ω
            assembly filter with terminals in, out, ret
              value Rd : 3 Ω ±1 %
              resistor R1 from in to x : Rd
              capacitor C1 from x to out : 1 µF
              resistor R2 from x to ret : Rdamp
            end
            source Feed from a to minus : 1 V
            place filter as Stage1 with in = a, out = b, ret = minus
            place filter as Stage2 with in = b, out = a, ret = minus, Rd = 2*Rdamp
            observe voltage of Stage2/x
            observe current through Stage1/R1
            """);

        Assert.Equal(["minus", "a", "Stage1/x", "b", "Stage2/x"], circuit.Nodes);
        Assert.Equal(
            ["Feed", "Stage1/R1", "Stage1/C1", "Stage1/R2", "Stage2/R1", "Stage2/C1", "Stage2/R2"],
            circuit.Parts.Select(p => p.Name));
        Assert.Equal(3, circuit.Part<Resistor>("Stage1/R1").Resistance.Nominal);
        Assert.Equal(14, circuit.Part<Resistor>("Stage2/R1").Resistance.Nominal);
        Assert.Equal(["voltage of Stage2/x", "current through Stage1/R1"],
            circuit.Observations.Select(o => o.Name));
        Assert.Contains(circuit.Parameters, p => p is { Name: "Stage1/Rd", Tolerance: not null });
    }

    [Fact]
    public void Assemblies_nest_and_are_placed_in_repetitions()
    {
        var circuit = Checking.Circuit(
            """
            assembly cell with terminals in, out
              resistor R from in to out : 1 Ω
              capacitor C at out : 1 nF
            end
            assembly pair with terminals in, out
              place cell as A with in = in, out = m
              place cell as B with in = m, out = out
            end
            source Feed at n[1] : 1 V
            repeat 2 as k
              place pair as P[k] with in = n[k], out = n[k+1]
            end
            observe voltage of P[2]/m
            observe current through P[2]/B/R
            """);

        Assert.Equal(9, circuit.Parts.Length);
        Assert.Equal(circuit.Nodes.IndexOf("P[2]/m"), circuit.Part<Resistor>("P[2]/B/R").From);
        Assert.Equal(circuit.Nodes.IndexOf("n[3]"), circuit.Part<Resistor>("P[2]/B/R").To);
    }

    [Fact]
    public void The_reference_is_one_conductor_inside_and_outside()
    {
        var circuit = Checking.Circuit(
            """
            assembly load with terminals in
              resistor R from in to ground : 1 Ω
            end
            source Feed at a : 1 V
            place load as X with in = a
            """);

        Assert.Equal(0, circuit.Part<Resistor>("X/R").To);
    }

    [Fact]
    public void Two_thousand_sections_are_checked()
    {
        var circuit = Checking.Circuit(
            """
            source Feed at n[1] : 1 V
            repeat 2000 as k
              resistor R[k] from n[k] to n[k+1] : 1 Ω ±5 %
              capacitor C[k] at n[k+1] : 1 nF
            end
            observe voltage of n[2001]
            """);

        Assert.Equal((4001, 2002), (circuit.Parts.Length, circuit.Nodes.Length));
    }
}
