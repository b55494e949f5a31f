using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>From a text to its statements as written.</summary>
public static class CircuitParser
{
    /// <summary>The most mistakes gathered; a text with more is no circuit, and reading stops.</summary>
    public const int MostErrors = 1000;

    /// <summary>The most statements read: bounds memory at some 200 MB.</summary>
    public const int MostStatements = 250_000;

    /// <summary>Reads a circuit; without a value where any statement could not be read.</summary>
    public static Outcome<CircuitSyntax> Parse(SourceText source)
    {
        var (syntax, diagnostics) = ParseWhatCanBe(source);
        var isWhole = diagnostics.All(d => d.Severity != Severity.Error);
        return new Outcome<CircuitSyntax>(isWhole ? syntax : null, diagnostics);
    }

    /// <summary>Reads every statement that can be read, and says what is wrong with the others, which are
    /// kept as <see cref="UnreadableStatement"/>.</summary>
    public static (CircuitSyntax Syntax,
        ImmutableArray<Diagnostic> Diagnostics) ParseWhatCanBe(SourceText source)
    {
        var diagnostics = new List<Diagnostic>();
        var lexer = new StatementLexer(source);
        var blocks = new BlockStack(source, diagnostics);
        var tokens = new List<Token>();
        var count = 0;
        while (lexer.Next(tokens))
        {
            var cursor = new StatementCursor(source, tokens, diagnostics);
            if (lexer.IsCut)
            {
                cursor.Error(tokens[0].Span, "the statement has more than two million words and signs",
                    "read straight lines of that length from a file: `straight lines in file \"NAME.csv\"`");
            }

            if (tokens.Count == 1 && cursor.IsWord("end"))
            {
                blocks.Close(tokens[0].Span);
            }
            else
            {
                blocks.Add(lexer.IsCut ? StatementParser.Unreadable(cursor) : StatementParser.Read(cursor));
            }

            if (++count > MostStatements || diagnostics.Count >= MostErrors || blocks.IsTooDeep)
            {
                ReportStop(cursor, count);
                break;
            }

            tokens.Clear();
        }

        return (new CircuitSyntax(source, blocks.Finish()), [.. diagnostics]);
    }

    private static void ReportStop(StatementCursor cursor, int count)
    {
        if (count > MostStatements)
        {
            cursor.Error(new TextSpan(cursor.LastEnd, 0), "the file has more than 250 000 statements",
                "write what repeats with `repeat`");
        }
    }
}
