using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads by how much the instant of an event scatters: <c>Kmain closes by 0.5 ms</c>, or the time
/// alone.</summary>
public static class ScatterParser
{
    private const string Form = "write `Kmain closes by 0.5 ms`: half a millisecond to either side";

    /// <summary>Reads it; errors point into its own text.</summary>
    public static Outcome<ScatterSyntax> Parse(SourceText source) =>
        OptionText.Parse(source, "no scatter is given", Form, cursor => Read(cursor, source));

    private static ScatterSyntax? Read(StatementCursor cursor, SourceText source)
    {
        var start = cursor.Current.Start;
        var isNamed = cursor.Current.Kind is TokenKind.Word or TokenKind.Quoted;
        var named = isNamed ? ScannedParser.ReadEvent(cursor) : null;
        var span = cursor.SpanFrom(start);
        if (isNamed && (named is null || !cursor.Expect("by")))
        {
            return null;
        }

        cursor.Take('±');
        if (ScannedParser.ReadNumber(cursor) is not { } by || !IsTime(cursor, by))
        {
            return null;
        }

        return new(source, named?.Name, isNamed ? span : by.Span, named?.Closes ?? false, by);
    }

    private static bool IsTime(StatementCursor cursor, NumberSyntax by)
    {
        var text = cursor.Shown(by.Span);
        if (!by.HasUnit)
        {
            cursor.Error(by.Span, $"`{text}` has no unit; a scatter is in seconds",
                $"write `{UnitAdvice.WithUnit(text, "s")}`");
        }
        else if (by.Dimension != Dimension.Time)
        {
            cursor.Error(by.Span, $"`{text}` is not a time; a scatter is in seconds");
        }
        else if (by.Value <= 0)
        {
            cursor.Error(by.Span, $"a scatter of `{text}` is none",
                "write how far to either side, more than 0 s");
        }
        else
        {
            return true;
        }

        return false;
    }
}
