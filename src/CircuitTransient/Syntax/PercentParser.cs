using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads a fraction given outside a circuit in per cent, such as <c>1 %</c>.</summary>
public static class PercentParser
{
    private const string Form = "such as `1 %`";

    /// <summary>Reads one, zero or more; errors point into its own text.</summary>
    public static Outcome<NumberSyntax> Parse(SourceText source) =>
        OptionText.Parse(source, "nothing is given", Form, Read);

    private static NumberSyntax? Read(StatementCursor cursor)
    {
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("a number in per cent");
            return null;
        }

        var number = NumberParser.Read(cursor);
        if (number is not null && cursor.IsAtEnd && (!number.HasUnit || number.Dimension != Dimension.None))
        {
            var text = cursor.TextOf(number.Span);
            cursor.Error(number.Span, $"`{text}` is not in per cent", $"write it {Form}");
        }

        return number;
    }
}
