using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads what is given outside a circuit, in the text of an option, by the circuit's own
/// grammar.</summary>
internal static class OptionText
{
    /// <summary>Reads the whole text; errors point into it.</summary>
    /// <param name="source">The option's name and its text.</param>
    /// <param name="nothing">What is wrong where there is none.</param>
    /// <param name="form">How it is written, for advice.</param>
    /// <param name="read">Reads it; null where an error was reported.</param>
    /// <param name="end">What else could follow.</param>
    public static Outcome<T> Parse<T>(
        SourceText source, string nothing, string form, Func<StatementCursor, T?> read,
        string end = "the end")
        where T : class
    {
        var diagnostics = new List<Diagnostic>();
        var tokens = new List<Token>();
        if (!new StatementLexer(source).Next(tokens))
        {
            var whole = new TextSpan(0, source.Content.Length);
            return new(null, [Diagnostic.Error(source, whole, nothing, form)]);
        }

        var cursor = new StatementCursor(source, tokens, diagnostics) { Form = form };
        var value = read(cursor);
        if (!cursor.HasErrors && !cursor.IsAtEnd)
        {
            cursor.Unexpected(end);
        }

        return diagnostics.Count == 0 ? new(value, []) : new(null, [.. diagnostics]);
    }
}
