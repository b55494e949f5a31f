using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>From a text to its statements as written.</summary>
public static class CircuitParser
{
    /// <summary>The most mistakes gathered; a text with more is no circuit, and reading stops.</summary>
    public const int MostErrors = 1000;

    /// <summary>The most statements read; with <see cref="MostTokens"/> it bounds memory at 300 MB.</summary>
    public const int MostStatements = 250_000;

    /// <summary>The most words and signs read.</summary>
    public const int MostTokens = 3_000_000;

    /// <summary>Reads a circuit; without a value where any statement could not be read.</summary>
    public static Outcome<CircuitSyntax> Parse(SourceText source)
    {
        var (syntax, diagnostics) = ParseWhatCanBe(source);
        var isWhole = diagnostics.All(d => d.Severity != Severity.Error);
        return new Outcome<CircuitSyntax>(isWhole ? syntax : null, diagnostics);
    }

    /// <summary>Reads every statement that can be read, and says what is wrong with the others, which are
    /// kept as <see cref="UnreadableStatement"/>.</summary>
    public static (CircuitSyntax Syntax, ImmutableArray<Diagnostic> Diagnostics) ParseWhatCanBe(
        SourceText source)
    {
        var diagnostics = new List<Diagnostic>();
        var lexer = new StatementLexer(source);
        var blocks = new BlockStack(source, diagnostics);
        var tokens = new List<Token>();
        var (count, words) = (0, 0);
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

            words += tokens.Count;
            if (++count > MostStatements || words > MostTokens)
            {
                cursor.Error(new TextSpan(cursor.LastEnd, 0), count > MostStatements
                    ? "the file has more than 250 000 statements"
                    : "the file has more than three million words and signs",
                    "write what repeats with `repeat`");
                break;
            }

            if (diagnostics.Count >= MostErrors || blocks.IsTooDeep)
            {
                break;
            }

            tokens.Clear();
        }

        return (new CircuitSyntax(source, blocks.Finish()), [.. diagnostics]);
    }
}
