namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Writes ladders as circuit files.</summary>
internal static class LadderText
{
    /// <summary>Equal sections between nodes n[1] … n[count], all of them with one capacitor to
    /// ground.</summary>
    /// <param name="count">Nodes.</param>
    /// <param name="series">What joins two neighbours, with its value: <c>inductor</c>, <c>1 H</c>.</param>
    /// <param name="capacitance">With its unit.</param>
    /// <param name="charged">The node charged to 1 V; 0 for none.</param>
    public static string Nodes(
        int count, (string Kind, string Value) series, string capacitance, int charged = 0)
    {
        var shunts = Enumerable.Range(1, count).Select(k =>
            $"capacitor C[{k}] from n[{k}] to ground : {capacitance}"
            + (k == charged ? ", charged to 1 V" : ""));
        var joints = Enumerable.Range(1, count - 1).Select(k =>
            $"{series.Kind} J[{k}] from n[{k}] to n[{k + 1}] : {series.Value}");
        return string.Join('\n', [.. shunts, .. joints]);
    }

    /// <summary>A ladder fed with a step of 1 V through one series part before its first node.</summary>
    public static string FedByAStep(int count, (string Kind, string Value) series, string capacitance) =>
        $"""
        source Feed at s : step of 1 V
        {series.Kind} J[0] from s to n[1] : {series.Value}
        {Nodes(count, series, capacitance)}
        """;
}
