namespace CircuitTransient.Tests.Cli;

/// <summary>Circuits for the tests of the command line, each with one exit status.</summary>
internal static class Circuits
{
    public const string Holding =
        """
        source    Feed at a : rectangular pulse of 10 V from 0 s to 3 ms
        resistor  R1 from a to b : 1 kΩ
        capacitor C1 from b to ground : 1 µF
        require voltage of b at most 11 V
        until 5 ms
        """;

    public const string Mistaken = "resistor R1 from a to ground : 1\n";

    // Two ideal voltage sources in parallel that disagree.
    public const string WithoutUniqueSolution =
        """
        source   Feed at a : 10 V
        source   Tie at a : 9 V
        resistor R1 from a to ground : 1 kΩ
        until 5 ms
        """;

    // A line of 140 stored quantities, watched at its far end: seconds of work.
    public const string Slow =
        """
        source Feed at n[1] : step of 10 V
        repeat 70 as k
          inductor  L[k] from n[k] to m[k] : 1 mH
          resistor  R[k] from m[k] to n[k+1] : 10 mΩ
          capacitor C[k] from n[k+1] to ground : 1 µF
        end
        resistor Load from n[71] to ground : 31 Ω
        observe voltage of n[71]
        until 100 ms
        """;

    public static string Broken => Holding.Replace("at most 11 V", "at most 5 V", StringComparison.Ordinal);
}
