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
    public static Outcome<GivenNumber> Parse(
        SourceText source, IReadOnlyCollection<Dimension> wanted, string form) =>
        OptionText.Parse(source, "no value is given", form, cursor => Read(cursor, wanted, form));

    private static GivenNumber? Read(
        StatementCursor cursor, IReadOnlyCollection<Dimension> wanted, string form)
    {
        var isNegative = cursor.Take('-');
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("a number");
            return null;
        }

        if (NumberParser.Read(cursor) is not { } number)
        {
            return null;
        }

        var text = cursor.TextOf(number.Span);
        if (cursor.IsAtEnd && !number.HasUnit && !wanted.Contains(Dimension.None))
        {
            var symbol = Unit.SymbolOf(wanted.First())!;
            cursor.Error(number.Span, $"`{text}` has no unit",
                $"write `{UnitAdvice.WithUnit(text, symbol)}`");
        }
        else if (cursor.IsAtEnd && !wanted.Contains(number.Dimension))
        {
            cursor.Error(number.Span, $"`{text}` has another unit than is asked for", form);
        }

        return new GivenNumber(isNegative ? -number.Value : number.Value, number.Dimension);
    }
}
