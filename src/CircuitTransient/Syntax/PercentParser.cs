using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads a fraction given outside a circuit in per cent, such as <c>1 %</c>.</summary>
public static class PercentParser
{
    private const string Form = "such as `1 %`";

    /// <summary>Reads one, zero or more; errors point into its own text.</summary>
    public static Outcome<NumberSyntax> Parse(SourceText source)
    {
        var diagnostics = new List<Diagnostic>();
        var tokens = new List<Token>();
        var whole = new TextSpan(0, source.Content.Length);
        if (!new StatementLexer(source).Next(tokens))
        {
            return new(null, [Diagnostic.Error(source, whole, "nothing is given", Form)]);
        }

        var cursor = new StatementCursor(source, tokens, diagnostics) { Form = Form };
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("a number in per cent");
            return new(null, [.. diagnostics]);
        }

        var number = NumberParser.Read(cursor);
        if (number is not null && !cursor.IsAtEnd)
        {
            cursor.Unexpected("the end");
        }
        else if (number is not null && (!number.HasUnit || number.Dimension != Dimension.None))
        {
            var text = cursor.TextOf(number.Span);
            cursor.Error(number.Span, $"`{text}` is not in per cent", $"write it {Form}");
        }

        return diagnostics.Count == 0 ? new(number, []) : new(null, [.. diagnostics]);
    }
}
