using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads the clauses behind a part's value.</summary>
internal static class ClauseParser
{
    private const int MostErrors = 20; // in one statement; as many as are shown of a file

    private static readonly string[] Words =
        ["charged", "carrying", "rated", "linear", "closed", "open", "closes", "opens"];

    /// <summary>Reads clauses to the end of the statement; after a mistake in one it
    /// goes on with the next.</summary>
    public static ImmutableArray<ClauseSyntax> ReadAll(StatementCursor cursor)
    {
        var clauses = ImmutableArray.CreateBuilder<ClauseSyntax>();
        while (!cursor.IsAtEnd)
        {
            if (!cursor.Take(','))
            {
                ReportRest(cursor);
            }
            else if (Read(cursor) is { } clause)
            {
                clauses.Add(clause);
                continue;
            }

            if (cursor.ErrorCount > MostErrors || !cursor.SkipTo(','))
            {
                break;
            }
        }

        return clauses.ToImmutable();
    }

    /// <summary>Says that something is left over where the statement or a comma should be.</summary>
    public static void ReportRest(StatementCursor cursor)
    {
        var token = cursor.Current;
        if (token.Kind is TokenKind.OpenQuote or TokenKind.Stray)
        {
            cursor.Unexpected("the end");
            return;
        }

        var isClause = Words.Contains(cursor.Shown(token));
        cursor.Error(token.Span, $"`{cursor.Shown(token)}` is left over behind what the statement says",
            ToleranceMeant(cursor) is { } tolerance ? $"write `{tolerance}`"
                : isClause ? $"put a comma before it: `, {cursor.TextOf(token)} …`"
                : "clauses follow a comma, comments a `#`, and a statement has its own line");
    }

    /// <summary>The tolerance that <c>tolerance 5 %</c> means; null where something else stands.</summary>
    private static string? ToleranceMeant(StatementCursor cursor) =>
        cursor.TextOf(cursor.Current) is "tolerance" or "tol"
        && cursor.Ahead(1).Kind == TokenKind.Number && cursor.IsSign('%', 2)
            ? $"±{cursor.Shown(cursor.Ahead(1))} %"
            : null;

    /// <summary>Says that a clause stands where the value should, and goes to the end; false where none
    /// does.</summary>
    public static bool ReportBeforeValue(StatementCursor cursor)
    {
        var start = cursor.Current;
        var isClause = start.Kind == TokenKind.Word
            && cursor.TextOf(start) is "charged" or "carrying" or "rated" or "linear"
            && cursor.Ahead(1).Kind is TokenKind.Number or TokenKind.Word;
        if (!isClause)
        {
            return false;
        }

        cursor.SkipTo(',');
        var clause = cursor.Shown(cursor.SpanFrom(start.Start));
        var isValueNext = cursor.Take(',') && cursor.Current.Kind == TokenKind.Number;
        var value = cursor.Current.Start;
        while (!cursor.IsAtEnd && !cursor.IsSign(','))
        {
            cursor.Advance();
        }

        cursor.Error(start.Span,
            $"`{cursor.TextOf(start)}` stands where the value should: the value comes first",
            isValueNext
                ? $"write `: {cursor.Shown(cursor.SpanFrom(value))}, {clause}`"
                : $"write `: VALUE, {clause}`");
        while (!cursor.IsAtEnd)
        {
            cursor.Advance();
        }

        return true;
    }

    private static ClauseSyntax? Read(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        cursor.Form =
            "clauses are `charged to`, `carrying`, `rated`, `linear up to`, `closes at`, `opens at`";
        return cursor switch
        {
            _ when IsActionMisspelt(cursor) => ReportAction(cursor),
            _ when cursor.IsWord("closes") || cursor.IsWord("opens") => SwitchEventParser.Read(cursor),
            _ when cursor.Take("charged") => cursor.Expect("to") && ReadTolerated(cursor) is { } voltage
                ? new ChargedToSyntax(cursor.SpanFrom(start), voltage)
                : null,
            _ when cursor.Take("carrying") => ReadTolerated(cursor) is { } current
                ? new CarryingSyntax(cursor.SpanFrom(start), current)
                : null,
            _ when cursor.Take("rated") => ReadLimit(cursor, "a rating") is { } rating
                ? new RatedSyntax(cursor.SpanFrom(start), rating)
                : null,
            _ when cursor.Take("linear") => cursor.Expect("up", "to")
                && ReadLimit(cursor, "a limit") is { } limit
                ? new LinearUpToSyntax(cursor.SpanFrom(start), limit)
                : null,
            _ when cursor.Take("closed") => cursor.Expect("resistance")
                && ToleranceParser.ReadResistance(cursor, acceptsSum: false) is { } resistance
                ? new ClosedResistanceSyntax(cursor.SpanFrom(start), resistance)
                : null,
            _ when cursor.Take("open") => cursor.Expect("resistance")
                && ToleranceParser.ReadResistance(cursor, acceptsSum: false) is { } resistance
                ? new OpenResistanceSyntax(cursor.SpanFrom(start), resistance)
                : null,
            _ => ReportUnknown(cursor),
        };
    }

    // Of `open at` and `open when` the first word is that of `open resistance`, and means an action.
    private static bool IsActionMisspelt(StatementCursor cursor) =>
        (cursor.IsWord("close") || cursor.IsWord("closed") || cursor.IsWord("open"))
        && (cursor.IsWord("at", 1) || cursor.IsWord("when", 1));

    private static ClauseSyntax? ReportAction(StatementCursor cursor)
    {
        var word = cursor.Advance();
        var acts = cursor.TextOf(word).StartsWith("close") ? "closes" : "opens";
        var rest = cursor.Current.Start;
        while (!cursor.IsAtEnd && !cursor.IsSign(','))
        {
            cursor.Advance();
        }

        cursor.Error(word.Span, $"`{cursor.TextOf(word)}` stands where `{acts}` should",
            $"write `{acts} {cursor.Shown(cursor.SpanFrom(rest))}`");
        return null;
    }

    private static ClauseSyntax? ReportUnknown(StatementCursor cursor)
    {
        if (cursor.IsAtEnd)
        {
            cursor.Error(new TextSpan(cursor.LastEnd - 1, 1), "the comma promises a clause, and none follows",
                "take the comma away, or go on in the next line");
        }
        else
        {
            cursor.Unexpected("a clause", Words);
        }

        return null;
    }

    private static ToleratedSyntax? ReadTolerated(StatementCursor cursor) =>
        ToleranceParser.ReadTolerated(cursor, acceptsSum: false);

    private static ExpressionSyntax? ReadLimit(StatementCursor cursor, string what) =>
        ExpressionParser.ReadInClause(cursor) is { } value
        && ToleranceParser.Refuse(cursor, $"{what} has no tolerance", "leave the tolerance out")
            ? value
            : null;
}
