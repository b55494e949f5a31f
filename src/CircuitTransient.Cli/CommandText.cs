namespace CircuitTransient.Cli;

/// <summary>A command line that makes the same results again, to be pasted into a shell beside the circuit
/// file.</summary>
public static class CommandText
{
    /// <summary>The program with its words.</summary>
    public static string Of(params IEnumerable<string> words) =>
        $"circuit-transient {string.Join(' ', words.Select(ShellWord.Of))}";
}
