using System.Text;
using CircuitTransient.Text;
using CsCheck;

namespace CircuitTransient.Tests.Solutions;

/// <summary>A circuit without a unique solution is explained by the smallest set of parts at fault.</summary>
public sealed class SingularDiagnosisTests
{
    [Theory]
    [InlineData("""
        source V1 at a : 10 V
        source V2 at b : 10 V
        switch S from a to b : open, closes at 3 ms
        resistor R at a : 1 Ω
        """,
        "`V1`, `V2` and `S` form a loop of ideal voltage sources and closed switches from 3.000 ms on: "
        + "their current "
        + "has no value")]
    [InlineData("""
        source V1 at a : 10 V
        source V2 at a : sine of 10 V at 50 Hz
        resistor R at a : 1 Ω
        """, "`V1` and `V2` form a loop of ideal voltage sources: their current has no value")]
    [InlineData("""
        source I1 from ground to a : 2 A
        switch S from a to b : closed, opens at 1 ms
        resistor R at b : 1 Ω
        """,
        "`I1` and `S` are all that joins two parts of the circuit from 1.000 ms on, and they force currents "
        + "that do "
        + "not agree")]
    [InlineData("""
        source V1 at a : 10 V
        dependent source E at b : 2 times voltage of a
        switch S from a to b : closed
        resistor R at b : 1 Ω
        """, "`V1`, `E` and `S` leave no unique solution: their laws contradict each other")]
    [InlineData("""
        source V1 at a : 10 V
        resistor R1 from a to b : 1 Ω
        dependent source E at b : 1 times voltage of b
        capacitor C at b : 1 µF
        """, "`E` leaves no unique solution: its law says nothing")]
    [InlineData("""
        source V1 at a : 10 V
        source V2 at b : 5 V
        inductor L1 at a : 1 mH
        inductor L2 at b : 1 mH
        coupling K of L1 and L2 : 1
        """,
        "`V1`, `V2`, `L1` and `L2` contradict each other: coils coupled without leakage tie their voltages "
        + "together, "
        + "so two sources cannot both set them")]
    [InlineData("""
        source I1 from ground to a : 1 A
        resistor R1 at a : 2 Ω
        resistor R2 at a : -2 Ω
        """,
        "`I1`, `R1` and `R2` cancel each other exactly: a negative resistance against as much positive "
        + "resistance, "
        + "and what is left has no value")]
    [InlineData("""
        source V1 at a : 10 V
        source V2 at b : 10 V
        transformer T primary from a to ground, secondary from b to ground : turns 2 to 1
        """, "`V1`, `V2` and `T` leave no unique solution: their laws contradict each other")]
    [InlineData("""
        source V1 at a : 10 V
        switch S1 from a to b : closed
        switch S2 from a to b : closed
        resistor R at b : 1 Ω
        dependent source F from ground to c : 2 times current through S1
        resistor R2 at c : 1 Ω
        capacitor C2 at c : 1 µF
        """, "nothing decides how `S1` and `S2` share a current, and `F` follows it")]
    [InlineData("""
        source V1 at a : 10 V
        switch S1 from a to b : closed
        switch S2 from a to b : closed
        resistor R at b : 1 Ω
        dependent source F from ground to c : 2 times current through S1
        resistor R2 at c : 1 Ω
        """,
        "the current through `S1` is followed by `F`, but nothing decides how it is shared with the ideal "
        + "contacts or "
        + "sources in parallel")]
    public void The_message_names_the_parts_and_the_physics(string text, string message)
    {
        var found = Assert.Single(Unsolvable(text + "\nuntil 5 ms"));
        Assert.Equal(message, found.Message);
        Assert.False(string.IsNullOrEmpty(found.Advice));
    }

    [Fact]
    public void Advice_speaks_of_a_switch_only_where_one_is_at_fault()
    {
        var sources = Assert.Single(Unsolvable(
            "source V1 at a : 10 V\nsource V2 at a : 5 V\nresistor R at a : 1 Ω\nuntil 5 ms"));
        var contact = Assert.Single(Unsolvable(
            "source V1 at a : 10 V\nswitch S at a : closed\nresistor R at a : 1 Ω\nuntil 5 ms"));
        Assert.Equal(
            "put the inner resistance of a source or that of its leads in series: a resistor of some "
            + "milliohms",
            sources.Advice);
        Assert.Equal(
            "put the real resistance of a contact or lead in series, some milliohms: "
            + "`closed resistance 1 mΩ` on a switch, or a resistor",
            contact.Advice);
    }

    [Fact]
    public void One_planted_fault_among_random_parts_is_never_misdiagnosed() =>
        Gen.Select(Gen.Int[0, 6], Gen.Int[3, 10], Gen.Int[1, 4], Gen.Int.Array[30]).OnEach(
            (kind, nodes, length, draws) =>
            {
                var random = Sound(nodes, draws);
                Assert.Empty(Unsolvable(random));
                var (fault, names) = Fault(kind, nodes, length, draws[0]);
                var found = Assert.Single(Unsolvable($"{random}\n{fault}"));
                var named = found.Message.Split('`').Where((_, i) => i % 2 == 1);
                Assert.Equal(names.Order(StringComparer.Ordinal), named.Order(StringComparer.Ordinal));
            },
            seed: "0000000000000", iter: 200);

    /// <summary>A resistor from every node to an earlier one, and parts of all kinds that do no
    /// harm.</summary>
    private static string Sound(int nodes, int[] draws)
    {
        var text = new StringBuilder(
            "until 1 ms\nobserve voltage of n1\nresistor T1 from n1 to ground : 100 Ω\n");
        for (var k = 2; k <= nodes; k++)
        {
            var earlier = 1 + (Draw(k) % (k - 1));
            text.AppendLine($"resistor T{k} from n{k} to n{earlier} : {10 + (Draw(k) % 90)} Ω");
        }

        for (var k = 10; k < 24; k++)
        {
            var (a, b) = (1 + (Draw(k) % nodes), 1 + (Draw(k) / 100 % nodes));
            if (a == b)
            {
                continue;
            }

            text.AppendLine((Draw(k) / 10_000 % 8) switch
            {
                0 => $"capacitor P{k} from n{a} to n{b} : {k} nF",
                1 => $"inductor P{k} from n{a} to n{b} : {k} mH",
                2 => $"source P{k} from n{a} to n{b} : {k} mA",
                3 => $"source P{k} from n{a} to x{k} : {k} V\nresistor Q{k} from x{k} to n{b} : 3 Ω",
                4 => $"switch P{k} from n{a} to n{b} : open",
                5 => $"dependent source P{k} from n{a} to n{b} : {k} µS times voltage of n{b}",
                6 => $"switch P{k} from n{a} to x{k} : closed\nresistor Q{k} from x{k} to n{b} : 3 Ω",
                _ =>
                    $"transformer P{k} primary from n{a} to x{k}, secondary from n{b} to ground : turns {k} "
                    + "to 7\n"
                    + $"resistor Q{k} from x{k} to n{b} : 3 Ω",
            });
        }

        return text.ToString();

        int Draw(int k) => draws[k] & int.MaxValue;
    }

    /// <summary>A fault at nodes of a sound circuit, and the parts it is made of.</summary>
    private static (string Text, string[] Names) Fault(int kind, int nodes, int length, int draw)
    {
        var a = 1 + ((draw & int.MaxValue) % nodes);
        var b = (a % nodes) + 1;
        string[] chain = [.. Enumerable.Range(1, length).Select(k => $"F{k}")];
        string Node(int k) => k == 0 ? $"n{a}" : k == length ? $"n{b}" : $"f{k}";
        return kind switch
        {
            // A chain of closed switches shorts a source; taps load its inner nodes.
            0 => (
                $"source V from n{a} to n{b} : 5 V\n" + Lines(k =>
                    $"switch F{k} from {Node(k - 1)} to {Node(k)} : closed\nresistor G{k} at {Node(k)} : 1 "
                    + "kΩ"),
                ["V", .. chain]),

            // A current source into an island that open switches alone join to the rest.
            1 => (
                "source J from n1 to island : 1 A\nresistor Inner from island to far : 1 Ω\n" + Lines(k =>
                    $"switch F{k} from {(k % 2 == 0 ? "far" : "island")} to n{1 + (k % nodes)} : open"),
                ["J", .. chain]),

            2 => (
                $"source V from n{a} to n{b} : 5 V\n"
                + $"dependent source E from n{a} to n{b} : 3 times voltage from n{b} to n{a}",
                ["V", "E"]),
            3 => ($"dependent source E from n{a} to n{b} : 1 times voltage from n{a} to n{b}", ["E"]),
            4 => (
                $"source V from n{a} to p : 5 V\ninductor L1 from n{a} to p : 1 mH\n"
                + "source W at q : 3 V\ninductor L2 at q : 4 mH\ncoupling K of L1 and L2 : 1",
                ["V", "W", "L1", "L2"]),
            5 => (
                $"source J from n{a} to p : 1 A\nresistor Rp from n{b} to p : 5 Ω\nresistor Rq from n{b} to "
                + "p : -5 Ω",
                ["J", "Rp", "Rq"]),
            _ => (
                "source V at p : 1 V\nsource W at q : 2 V\n"
                + $"transformer T primary from p to ground, secondary from q to ground : turns 3 to {length}",
                ["V", "W", "T"]),
        };

        string Lines(Func<int, string> line) =>
            string.Join('\n', Enumerable.Range(1, length).Select(line)) + "\n";
    }

    [Fact]
    public void A_shorted_winding_is_told_of_its_contact() =>
        Assert.Equal(
            """
            plant.cause:1:1: error: `F`, `T` and `K` leave no unique solution: \
            their laws contradict each other
              source F at a : 1 V
              ^^^^^^^^^^^^^^^^^^^
              → give the contact the resistance it has: `closed resistance 1 mΩ` on `K`

            """.Replace("\\\n", "", StringComparison.Ordinal),
            Unsolved.Message(
                """
                source F at a : 1 V
                transformer T primary at a, secondary at b : turns 10 to 1
                switch K at b : closed, opens at 1 s
                resistor R at b : 1 Ω
                until 2 s
                """));

    private static Diagnostic[] Unsolvable(string text)
    {
        var circuit = TransientAnalysis.Check(
            new SourceText("fault.cause", text), _ => throw new InvalidOperationException());
        Assert.True(circuit.Succeeded, string.Join('\n', circuit.Diagnostics.Select(DiagnosticText.Render)));
        return [.. TransientAnalysis.FindUnsolvable(circuit.Value, TestContext.Current.CancellationToken)];
    }
}
