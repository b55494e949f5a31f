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
    /// kept as
    /// <see cref="UnreadableStatement"/>.</summary>
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
                cursor.Error(tokens[0].Span, "the statement has more than a million words and signs",
                    "read straight lines of that length from a file: `straight lines in file \"NAME.csv\"`");
            }
            else if (tokens.Count == 1 && cursor.IsWord("end"))
            {
                blocks.Close(tokens[0].Span);
            }
            else
            {
                blocks.Add(StatementParser.Read(cursor));
            }

            if (++count > MostStatements || diagnostics.Count >= MostErrors)
            {
                ReportStop(cursor, count > MostStatements);
                break;
            }

            tokens.Clear();
        }

        var statements = blocks.Finish();
        if (count == 0)
        {
            diagnostics.Add(Diagnostic.Error(source, new TextSpan(0, 0), "the file has no statement",
                "start with a part: `resistor R1 from a to ground : 82 Ω`"));
        }

        return (new CircuitSyntax(source, statements), [.. diagnostics]);
    }

    private static void ReportStop(StatementCursor cursor, bool isTooLong)
    {
        var message = isTooLong
            ? "the file has more than 250 000 statements; reading stopped here"
            : "the file has 1000 mistakes; reading stopped here";
        cursor.Error(new TextSpan(cursor.LastEnd, 0), message,
            isTooLong ? "write what repeats with `repeat`" : null);
    }
}
