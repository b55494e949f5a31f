using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads one quantity given outside a circuit, such as <c>voltage of bus</c>.</summary>
public static class QuantityTextParser
{
    /// <summary>Reads a quantity or a figure of one; errors point into its own text.</summary>
    public static Outcome<QuantitySyntax> Parse(SourceText source)
    {
        var diagnostics = new List<Diagnostic>();
        var tokens = new List<Token>();
        var lexer = new StatementLexer(source);
        if (!lexer.Next(tokens))
        {
            var nothing = new TextSpan(0, source.Content.Length);
            return new(null, [Diagnostic.Error(source, nothing, "no quantity is given",
                "such as `voltage of bus` or `current through L1`")]);
        }

        var cursor = new StatementCursor(source, tokens, diagnostics);
        var quantity = QuantityParser.ReadWithFigures(cursor);
        if (quantity is not null && !cursor.IsAtEnd)
        {
            cursor.Unexpected("the end");
        }

        return diagnostics.Count == 0 ? new(quantity, []) : new(null, [.. diagnostics]);
    }
}
