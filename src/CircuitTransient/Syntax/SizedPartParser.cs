using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>A part whose value is sought, as named outside a circuit: <c>Rsn from 1 Ω to 10 kΩ</c>.</summary>
/// <param name="Source">The text it is written in.</param>
/// <param name="Name">The part's name, written out.</param>
/// <param name="Span">Where the name stands.</param>
/// <param name="Lowest">The least value to look at; null where no range is said.</param>
/// <param name="Highest">The greatest.</param>
public sealed record SizedPartSyntax(
    SourceText Source, string Name, TextSpan Span, NumberSyntax? Lowest, NumberSyntax? Highest)
{
    /// <summary>Whether it is a named value that parts follow, not a part.</summary>
    public bool IsNamedValue { get; init; }
}

/// <summary>Reads what a sizing seeks: a part's name and, if said, its range.</summary>
public static class SizedPartParser
{
    private const string Form = "write `Rsn`, or with a range `Rsn from 1 Ω to 10 kΩ`";

    /// <summary>Reads one; errors point into its own text.</summary>
    public static Outcome<SizedPartSyntax> Parse(SourceText source)
    {
        var diagnostics = new List<Diagnostic>();
        var tokens = new List<Token>();
        if (!new StatementLexer(source).Next(tokens))
        {
            var nothing = new TextSpan(0, source.Content.Length);
            return new(null, [Diagnostic.Error(source, nothing, "no part is named", Form)]);
        }

        var cursor = new StatementCursor(source, tokens, diagnostics) { Form = Form };
        var part = Read(cursor, source);
        if (part is not null && !cursor.IsAtEnd)
        {
            cursor.Unexpected("the end");
        }

        return diagnostics.Count == 0 ? new(part, []) : new(null, [.. diagnostics]);
    }

    private static SizedPartSyntax? Read(StatementCursor cursor, SourceText source)
    {
        if (NameParser.ReadPart(cursor) is not { } name || WrittenName.Of(cursor, name) is not { } written)
        {
            return null;
        }

        if (cursor.IsAtEnd)
        {
            return new SizedPartSyntax(source, written, name.Span, null, null);
        }

        return cursor.Expect("from") && ReadLimit(cursor) is { } lowest
            && cursor.Expect("to") && ReadLimit(cursor) is { } highest
            ? new SizedPartSyntax(source, written, name.Span, lowest, highest)
            : null;
    }

    private static NumberSyntax? ReadLimit(StatementCursor cursor)
    {
        if (cursor.Current.Kind == TokenKind.Number)
        {
            return NumberParser.Read(cursor);
        }

        cursor.Unexpected("a value with its unit");
        return null;
    }
}
