using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Instants given outside a circuit, such as <c>1 ms, 2.5 ms</c>, in seconds after t = 0.</summary>
/// <param name="Source">The text they are written in.</param>
/// <param name="Instants">The instants in the order written.</param>
public sealed record InstantList(SourceText Source, ImmutableArray<NumberSyntax> Instants)
{
    /// <summary>No instants.</summary>
    public static InstantList Empty { get; } = new(new SourceText("", ""), []);
}

/// <summary>Reads lists of instants: numbers with units of time, parted by commas.</summary>
public static class InstantListParser
{
    private const string Form = "such as `1 ms, 2.5 ms`";

    /// <summary>Reads a list; errors point into its own text.</summary>
    public static Outcome<InstantList> Parse(SourceText source) =>
        OptionText.Parse(source, "no instant is given", Form, cursor => Read(cursor, source), end: "`,`");

    private static InstantList? Read(StatementCursor cursor, SourceText source)
    {
        var instants = ImmutableArray.CreateBuilder<NumberSyntax>();
        do
        {
            if (ReadInstant(cursor) is not { } instant)
            {
                return null;
            }

            instants.Add(instant);
        }
        while (cursor.Take(','));

        return new InstantList(source, instants.ToImmutable());
    }

    /// <summary>One instant; null where an error was reported.</summary>
    internal static NumberSyntax? ReadInstant(StatementCursor cursor)
    {
        if (cursor.IsSign('-'))
        {
            cursor.Error(cursor.Current.Span, "an instant before t = 0 is before the study",
                "the study starts at t = 0: write a time after it, such as `1 ms`");
            return null;
        }

        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("an instant");
            return null;
        }

        if (ReportListWithoutUnits(cursor) || NumberParser.Read(cursor) is not { } number)
        {
            return null;
        }

        if (cursor.Current.Sign is '*' or '/' or '+' or '-' or '^')
        {
            cursor.Error(cursor.Current.Span, "an instant is one number with its unit, and no sum or product",
                cursor.Form);
            return null;
        }

        var text = cursor.TextOf(number.Span);
        if (!number.HasUnit)
        {
            cursor.Error(number.Span, $"`{text}` has no unit; an instant is in seconds",
                $"write `{UnitAdvice.WithUnit(text, "s")}`");
            return null;
        }

        if (number.Dimension != Dimension.Time)
        {
            cursor.Error(number.Span, $"`{text}` is not an instant, which is in seconds", cursor.Form);
            return null;
        }

        return number;
    }

    /// <summary><c>1,2</c>: two instants or a decimal comma, and no unit to tell which.</summary>
    private static bool ReportListWithoutUnits(StatementCursor cursor)
    {
        var (first, second) = (cursor.Current, cursor.Ahead(2));
        if (!cursor.IsSign(',', 1) || !cursor.IsJoined(1) || second.Kind != TokenKind.Number
            || !cursor.IsJoined(2) || cursor.Ahead(3).Kind == TokenKind.Word)
        {
            return false;
        }

        cursor.Advance(3);
        var (a, b) = (cursor.Shown(first), cursor.Shown(second));
        cursor.Error(cursor.SpanFrom(first.Start), $"`{a},{b}` has no unit; an instant is in seconds",
            $"write `{a} s, {b} s` for two instants, `{a}.{b} s` for one");
        return true;
    }
}
