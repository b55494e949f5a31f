using System.Collections.Immutable;

namespace CircuitTransient.Syntax;

/// <summary>Reads the parts of two terminals, behind their key words.</summary>
internal static class PartParser
{
    /// <summary>What stands before a part's colon.</summary>
    public sealed record Head(NameSyntax Name, TerminalsSyntax Terminals);

    public static SimplePartStatement? ReadSimple(StatementCursor cursor, int start, SimplePartKind kind)
    {
        var (what, example) = kind switch
        {
            SimplePartKind.Resistor => ("a resistor", "resistor Rpre from b to bus : 82 Ω"),
            SimplePartKind.Capacitor => ("a capacitor", "capacitor Cbus from q to minus : 5.6 mF"),
            _ => ("an inductor", "inductor Ls from a to b : 180 µH"),
        };
        cursor.Form = $"{what} is written `{example}`";
        var head = ReadHead(cursor);
        var value = !GoToValue(cursor) || ClauseParser.ReportBeforeValue(cursor) ? null
            : kind == SimplePartKind.Resistor ? ToleranceParser.ReadResistance(cursor, acceptsSum: true)
            : ToleranceParser.ReadTolerated(cursor, acceptsSum: true);
        var clauses = ReadClauses(cursor, value is not null);
        return head is null || value is null
            ? null
            : new SimplePartStatement(
                cursor.SpanFrom(start), kind, head.Name, head.Terminals, value, clauses);
    }

    public static SourceStatement? ReadSource(StatementCursor cursor, int start)
    {
        cursor.Form = "a source is written `source Feed from bus to minus : 540 V`";
        var head = ReadHead(cursor);
        var wave = GoToValue(cursor) && !ClauseParser.ReportBeforeValue(cursor)
            ? WaveParser.Read(cursor)
            : null;
        var clauses = ReadClauses(cursor, wave is not null);
        return head is null || wave is null
            ? null
            : new SourceStatement(cursor.SpanFrom(start), head.Name, head.Terminals, wave, clauses);
    }

    public static DependentSourceStatement? ReadDependent(StatementCursor cursor, int start)
    {
        cursor.Form = "it is written `dependent source Amp from out to minus : 10 times voltage from a to b`";
        var head = cursor.Expect("source") ? ReadHead(cursor) : null;
        ExpressionSyntax? gain = null;
        QuantitySyntax? control = null;
        if (GoToValue(cursor))
        {
            gain = ExpressionParser.ReadSum(cursor);
            var isRead = gain is not null
                && ToleranceParser.Refuse(cursor,
                "the factor of a dependent source has no tolerance of its own",
                    "name the factor: `value Gain : 10 ±2 %`, and write `Gain times …`")
                && cursor.Expect("times");
            control = isRead ? QuantityParser.Read(cursor) : null;
        }

        var clauses = ReadClauses(cursor, control is not null);
        return head is null || gain is null || control is null
            ? null
            : new DependentSourceStatement(
                cursor.SpanFrom(start), head.Name, head.Terminals, gain, control, clauses);
    }

    public static SwitchStatement? ReadSwitch(StatementCursor cursor, int start)
    {
        cursor.Form = "a switch is written `switch Kmain from b to bus : open, closes at 1.8 s`";
        var head = ReadHead(cursor);
        var isClosed = false;
        var isRead = GoToValue(cursor) && ReadPosition(cursor, out isClosed);
        var clauses = ReadClauses(cursor, isRead);
        return head is null || !isRead
            ? null
            : new SwitchStatement(cursor.SpanFrom(start), head.Name, head.Terminals, isClosed, clauses);
    }

    /// <summary><c>from A to B</c> or <c>at N</c>.</summary>
    public static TerminalsSyntax? ReadTerminals(StatementCursor cursor)
    {
        if (cursor.Take("at"))
        {
            return NameParser.ReadNode(cursor) is { } node ? new TerminalsSyntax(node, null) : null;
        }

        if (!cursor.Take("from"))
        {
            cursor.Unexpected("`from` or `at`", "from", "at");
            return null;
        }

        return NameParser.ReadNode(cursor) is { } from && cursor.Expect("to")
            && NameParser.ReadNode(cursor) is { } to
            ? new TerminalsSyntax(from, to)
            : null;
    }

    /// <summary>Takes the colon; after a mistake before it, goes there, so that the
    /// value is read all the same.</summary>
    public static bool GoToValue(StatementCursor cursor)
    {
        if (cursor.HasErrors)
        {
            return cursor.SkipTo(':') && cursor.Take(':');
        }

        return cursor.Take(':') || cursor.Unexpected("`:` and the value");
    }

    /// <summary>Reads the clauses; after a mistake in the value, from the next comma on.</summary>
    public static ImmutableArray<ClauseSyntax> ReadClauses(StatementCursor cursor, bool isValueRead) =>
        isValueRead || cursor.SkipTo(',') ? ClauseParser.ReadAll(cursor) : [];

    private static Head? ReadHead(StatementCursor cursor) =>
        NameParser.Read(cursor, "the name", "from", "at") is { } name
            && ReadTerminals(cursor) is { } terminals
            ? new Head(name, terminals)
            : null;

    private static bool ReadPosition(StatementCursor cursor, out bool isClosed)
    {
        isClosed = cursor.IsWord("closed");
        if ((isClosed || cursor.IsWord("open")) && !cursor.IsWord("resistance", 1))
        {
            cursor.Advance();
            return true;
        }

        if (cursor.IsWord("closes") || cursor.IsWord("opens") || cursor.IsWord("resistance", 1))
        {
            var first = cursor.IsWord("closes") || cursor.IsWord("open") ? "open" : "closed";
            cursor.Error(cursor.Current.Span, "whether the switch starts open or closed is not said",
                $"write `: {first}, {cursor.Shown(cursor.Current)} {cursor.Shown(cursor.Ahead(1))} …`");
            return false;
        }

        return cursor.Unexpected("`open` or `closed`", "open", "closed");
    }
}
