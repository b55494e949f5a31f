using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>The event that a breakdown begins with, as named outside a circuit.</summary>
public abstract record AfterSyntax;

/// <summary><c>last</c>: the last event before each extreme.</summary>
public sealed record AfterLastSyntax : AfterSyntax;

/// <summary><c>6 s</c>: the last event up to an instant.</summary>
public sealed record AfterInstantSyntax(NumberSyntax Instant) : AfterSyntax;

/// <summary><c>Kmain closes</c>.</summary>
public sealed record AfterSwitchingSyntax(string Switch, bool Closes) : AfterSyntax;

/// <summary>Reads the event that a breakdown begins with.</summary>
public static class AfterParser
{
    private const string Form =
        "write a switching such as `Kmain closes`, an instant such as `6 s`, or `last`";

    /// <summary>Reads it; errors point into its own text.</summary>
    public static Outcome<AfterSyntax> Parse(SourceText source) =>
        OptionText.Parse(source, "no event is named", Form, Read);

    private static AfterSyntax? Read(StatementCursor cursor)
    {
        if (cursor.IsWord("last") && cursor.Ahead(1).Kind == TokenKind.End)
        {
            cursor.Advance();
            return new AfterLastSyntax();
        }

        if (cursor.Current.Kind == TokenKind.Number || cursor.IsSign('-'))
        {
            return InstantListParser.ReadInstant(cursor) is { } instant
                ? new AfterInstantSyntax(instant)
                : null;
        }

        return ScannedParser.ReadEvent(cursor) is var (name, closes)
            ? new AfterSwitchingSyntax(name, closes)
            : null;
    }
}
