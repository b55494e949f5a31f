namespace CircuitTransient.Cli;

/// <summary>A command line that makes the same results again, to be pasted into a shell beside the circuit
/// file.</summary>
public static class CommandText
{
    /// <summary>The program with its words.</summary>
    public static string Of(params IEnumerable<string> words) => $"circuit-transient {Joined(words)}";

    /// <summary>The words alone.</summary>
    public static string Joined(params IEnumerable<string> words) => string.Join(' ', words.Select(Quoted));

    /// <summary>One word, in quotes where a shell needs them: double ones, which every shell has, unless the
    /// word holds what a shell still reads within them.</summary>
    private static string Quoted(string word) =>
        word.Length > 0 && word.All(c => char.IsAsciiLetterOrDigit(c) || c is '.' or '-' or '_' or '/') ? word
        : word.AsSpan().ContainsAny("\"$`\\!") ? $"'{word.Replace("'", "'\\''", StringComparison.Ordinal)}'"
        : $"\"{word}\"";
}
