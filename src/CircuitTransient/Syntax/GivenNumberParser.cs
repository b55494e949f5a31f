using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>A number given outside a circuit, in SI.</summary>
/// <param name="Value">In SI.</param>
/// <param name="Dimension">What it measures.</param>
public sealed record GivenNumber(double Value, Dimension Dimension);

/// <summary>Reads one number with its unit, such as <c>-3.3 ns</c>, from the text of an option.</summary>
public static class GivenNumberParser
{
    /// <summary>Reads a number; errors point into its own text.</summary>
    /// <param name="source">The option's name and its text.</param>
    /// <param name="wanted">The dimensions that will do; with none among them a bare number will.</param>
    /// <param name="form">How it is written, for advice.</param>
    public static Outcome<GivenNumber> Parse(SourceText source, ReadOnlySpan<Dimension> wanted, string form)
    {
        var diagnostics = new List<Diagnostic>();
        var tokens = new List<Token>();
        if (!new StatementLexer(source).Next(tokens))
        {
            var nothing = new TextSpan(0, source.Content.Length);
            return new(null, [Diagnostic.Error(source, nothing, "no value is given", form)]);
        }

        var cursor = new StatementCursor(source, tokens, diagnostics) { Form = form };
        var isNegative = cursor.Take('-');
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("a number");
            return new(null, [.. diagnostics]);
        }

        if (NumberParser.Read(cursor) is not { } number)
        {
            return new(null, [.. diagnostics]);
        }

        var text = cursor.TextOf(number.Span);
        if (!cursor.IsAtEnd)
        {
            cursor.Unexpected("the end");
        }
        else if (!number.HasUnit && !wanted.Contains(Dimension.None))
        {
            var symbol = Unit.SymbolOf(wanted[0])!;
            cursor.Error(number.Span, $"`{text}` has no unit",
                $"write `{UnitAdvice.WithUnit(text, symbol)}`");
        }
        else if (!wanted.Contains(number.Dimension))
        {
            cursor.Error(number.Span, $"`{text}` has another unit than is asked for", form);
        }

        return diagnostics.Count > 0
            ? new(null, [.. diagnostics])
            : new(new GivenNumber(isNegative ? -number.Value : number.Value, number.Dimension), []);
    }
}
