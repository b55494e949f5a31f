using CircuitTransient.Circuits;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Circuits;

/// <summary>Starts that contradict themselves.</summary>
public class StoredContradictionTests
{
    // (1 µF · 2 V + 3 µF · 4 V)/4 µF
    [Fact]
    public void Capacitors_in_parallel_are_told_how_they_share_their_charge() =>
        Assert.Equal(
            """
            plant.cause:4:27: warning: `C1` charged to 2 V and `C2` to 4 V do not agree round their loop
              capacitor C2 at b : 3 µF, charged to 4 V
                                        ^^^^^^^^^^^^^^
              → `C1` jumps by 1.5 V, `C2` by -500 mV; if no jump is meant, write `charged to 3.5 V`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 from a to b : 1 kΩ
                capacitor C1 at b : 1 µF, charged to 2 V
                capacitor C2 at b : 3 µF, charged to 4 V
                """));

    // 10 V less 1 V and 2 V is 7 V, which equal capacitors share.
    [Fact]
    public void Capacitors_in_series_with_a_source_share_what_is_missing() =>
        Assert.Equal(
            """
            plant.cause:3:27: warning: `C1` charged to 1 V and `C2` to 2 V do not agree round their loop
              capacitor C2 at b : 1 µF, charged to 2 V
                                        ^^^^^^^^^^^^^^
              → `C1` jumps by 3.5 V, `C2` by 3.5 V; if no jump is meant, \
            write `charged to 4.5 V` and `charged to 5.5 V`
            """.Replace("\\\n", "", StringComparison.Ordinal),
            Checking.Messages(
                """
                source Feed at a : 10 V
                capacitor C1 from a to b : 1 µF, charged to 1 V
                capacitor C2 at b : 1 µF, charged to 2 V
                """));

    [Fact]
    public void A_capacitor_that_is_not_charged_takes_its_share() =>
        Assert.Equal(
            """
            plant.cause:1:27: warning: `C1` charged to 10 V and `C2` to 0 V do not agree round their loop
              capacitor C1 at b : 1 µF, charged to 10 V
                                        ^^^^^^^^^^^^^^^
              → `C1` jumps by -7.5 V, `C2` by 2.5 V; if no jump is meant, write `charged to 2.5 V`
            """,
            Checking.Messages(
                """
                capacitor C1 at b : 1 µF, charged to 10 V
                capacitor C2 at b : 3 µF
                resistor R1 at b : 1 kΩ
                """));

    [Fact]
    public void Each_loop_is_told_of_its_own() =>
        Assert.Equal(
            """
            plant.cause:1:27: warning: `C1` charged to 1 V and `C2` to 0 V do not agree round their loop
              capacitor C1 at b : 1 µF, charged to 1 V
                                        ^^^^^^^^^^^^^^
              → `C1` jumps by -500 mV, `C2` by 500 mV; if no jump is meant, write `charged to 500 mV`
            plant.cause:4:27: warning: `C3` charged to 5 V and `C4` to 7 V do not agree round their loop
              capacitor C4 at c : 1 µF, charged to 7 V
                                        ^^^^^^^^^^^^^^
              → `C3` jumps by 1 V, `C4` by -1 V; if no jump is meant, write `charged to 6 V`
            """,
            Checking.Messages(
                """
                capacitor C1 at b : 1 µF, charged to 1 V
                capacitor C2 at b : 1 µF
                capacitor C3 at c : 1 µF, charged to 5 V
                capacitor C4 at c : 1 µF, charged to 7 V
                resistor R1 from b to c : 1 kΩ
                """));

    // What came to each node stays there: 2 vc - vd = 6 V and 3 vd - vc = 0, so 3.6 V and 1.2 V.
    [Fact]
    public void Of_many_the_first_jumps_are_told() =>
        Assert.Equal(
            """
            plant.cause:3:39: warning: `C1` charged to 3 V, `C2` to 3 V, `C3` to 3 V and 1 more \
            do not agree round their loop
              capacitor C3 from d to ground : 1 µF, charged to 3 V
                                                    ^^^^^^^^^^^^^^
              → `C1` jumps by 600 mV, `C2` by -600 mV, `C3` by -1.8 V and 1 more; \
            charge them to what fits if no jump is meant
            """.Replace("\\\n", "", StringComparison.Ordinal),
            Checking.Messages(
                """
                capacitor C1 from c to ground : 1 µF, charged to 3 V
                capacitor C2 from c to d : 1 µF, charged to 3 V
                capacitor C3 from d to ground : 1 µF, charged to 3 V
                capacitor C4 from d to ground : 1 µF
                resistor R1 from c to ground : 1 kΩ
                """));

    [Fact]
    public void Where_a_transformer_takes_part_no_figure_is_said() =>
        Assert.Equal(
            """
            plant.cause:2:27: warning: `C1` charged to 2 V and `C2` to 4 V do not agree round their loop
              capacitor C2 at b : 1 µF, charged to 4 V
                                        ^^^^^^^^^^^^^^
              → they share their charge at once, as the impulses in the result show; \
            charge them to what fits if no jump is meant
            """.Replace("\\\n", "", StringComparison.Ordinal),
            Checking.Messages(
                """
                capacitor C1 at b : 1 µF, charged to 2 V
                capacitor C2 at b : 1 µF, charged to 4 V
                transformer T1 primary at b, secondary at c : turns 2 to 1
                capacitor C3 at c : 1 µF
                resistor R1 at c : 1 kΩ
                """));

    [Fact]
    public void What_settles_is_no_contradiction() =>
        Assert.Empty(Checking.Messages(
            """
            source Feed at a : 10 V
            capacitor C1 from a to b : 1 µF, charged to 1 V
            capacitor C2 at b : 1 µF
            start settled
            """));

    [Fact]
    public void A_charge_against_a_source_is_told_the_jump() =>
        Assert.Equal(
            """
            plant.cause:2:27: warning: `C1` is charged to 3 V, but is held at 10 V
              capacitor C1 at a : 1 µF, charged to 3 V
                                        ^^^^^^^^^^^^^^
              → it jumps by 7 V at once; write `charged to 10 V` if no jump is meant
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                capacitor C1 at a : 1 µF, charged to 3 V
                """));

    [Fact]
    public void Charges_that_agree_round_a_loop_are_silent() =>
        Assert.Empty(Checking.Messages(
            """
            source Feed at a : 10 V
            capacitor C1 from a to b : 1 µF, charged to 4 V
            capacitor C2 at b : 1 µF, charged to 6 V
            """));

    // (1 mH · 1 A + 3 mH · 2 A)/4 mH
    [Fact]
    public void Coils_in_series_are_told_how_they_share_their_flux() =>
        Assert.Equal(
            """
            plant.cause:4:26: warning: `L1` carrying 1 A and `L2` 2 A do not agree where only they meet
              inductor L2 at c : 3 mH, carrying 2 A
                                       ^^^^^^^^^^^^
              → `L1` jumps by 750 mA, `L2` by -250 mA; if no jump is meant, write `carrying 1.75 A`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 from a to b : 1 kΩ
                inductor L1 from b to c : 1 mH, carrying 1 A
                inductor L2 at c : 3 mH, carrying 2 A
                """));

    [Fact]
    public void A_coil_behind_an_open_contact_is_held_at_nothing() =>
        Assert.Equal(
            """
            plant.cause:2:33: warning: `L1` carries 1 A, but is held at 0 A
              inductor L1 from a to b : 1 mH, carrying 1 A
                                              ^^^^^^^^^^^^
              → it jumps by -1 A at once; write `carrying 0 A` if no jump is meant
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                inductor L1 from a to b : 1 mH, carrying 1 A
                switch K1 at b : open, closes at 1 ms
                """));

    // The solver knows nothing of how the warning is worked out.
    [Fact]
    public void The_jumps_are_those_of_the_solution()
    {
        const string text = """
            source Feed at a : 10 V
            capacitor C1 from a to b : 1 µF, charged to 1 V
            capacitor C2 at b : 2 µF, charged to 2 V
            capacitor C3 from b to c : 4 µF, charged to 3 V
            capacitor C4 at c : 8 µF
            capacitor C5 from c to a : 5 µF, charged to -4 V
            resistor R1 from c to d : 1 kΩ
            inductor L1 from d to e : 1 mH, carrying 1 A
            inductor L2 from e to ground : 3 mH, carrying 2 A
            inductor L3 from e to f : 2 mH, carrying -1 A
            inductor L4 from ground to f : 5 mH
            coupling M1 of L2 and L3 : 0.4
            source J at f : 3 A
            """;
        var circuit = Checking.Circuit(text);
        var solved = SolvedText.Of(text + string.Join("", circuit.Parts.Select(p => p switch
        {
            Capacitor => $"\nobserve voltage across {p.Name}",
            Inductor => $"\nobserve current through {p.Name}",
            _ => "",
        })) + "\nuntil 1 ms");
        HeldQuantity[] held =
        [
            .. new StoredCharges(circuit.Parts, circuit.Nodes.Length).Contradictions()
                .Concat(new StoredCurrents(circuit.Parts, circuit.Nodes.Length, circuit.Couplings)
                    .Contradictions())
                .SelectMany(c => c.Parts),
        ];
        Assert.Equal(9, held.Length);
        Assert.All(held, h => Close.OfScale(
            10,
            solved[$"{(h.Part is Capacitor ? "voltage across" : "current through")} {h.Part.Name}"]
                .Start!.Value,
            h.After!.Value, 1e-13));
    }

    [Fact]
    public void Coils_in_series_that_agree_are_silent() =>
        Assert.Empty(Checking.Messages(
            """
            source Feed at a : 10 V
            resistor R1 from a to b : 1 kΩ
            inductor L1 from b to c : 1 mH, carrying 1 A
            inductor L2 at c : 1 mH, carrying 1 A
            """));

    [Fact]
    public void A_switch_that_acts_at_the_start_is_no_contradiction() =>
        Assert.Empty(Checking.Messages(
            """
            source Feed at a : 10 V
            switch K1 from a to b : open, closes at 0 s
            capacitor C1 at b : 1 µF, charged to 3 V
            """));
}
