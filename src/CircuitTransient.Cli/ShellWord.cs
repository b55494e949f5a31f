namespace CircuitTransient.Cli;

/// <summary>A word as a POSIX shell reads it back.</summary>
public static class ShellWord
{
    /// <summary>The word itself where it is plain; else in double quotes, or in single ones where it holds
    /// what a shell still reads within double ones.</summary>
    public static string Of(string word) =>
        word.Length > 0 && word.All(c => char.IsAsciiLetterOrDigit(c) || c is '.' or '-' or '_' or '/') ? word
        : word.AsSpan().ContainsAny("\"$`\\!") ? $"'{word.Replace("'", @"'\''", StringComparison.Ordinal)}'"
        : $"\"{word}\"";
}
