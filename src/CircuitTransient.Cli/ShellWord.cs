namespace CircuitTransient.Cli;

/// <summary>A word as a POSIX shell reads it back.</summary>
public static class ShellWord
{
    /// <summary>The word itself where it is plain, else in single quotes.</summary>
    public static string Of(string word) =>
        word.Length > 0 && word.All(c => char.IsAsciiLetterOrDigit(c) || c is '.' or '-' or '_' or '/')
            ? word
            : $"'{word.Replace("'", @"'\''", StringComparison.Ordinal)}'";
}
