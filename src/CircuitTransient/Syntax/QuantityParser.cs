namespace CircuitTransient.Syntax;

/// <summary>Reads measured quantities and the figures read off them.</summary>
internal static class QuantityParser
{
    private const string Forms =
        "write `voltage of NODE`, `voltage across PART`, `current through PART`, `energy in PART`";

    private static readonly string[] FirstWords =
    [
        "voltage", "current", "power", "energy", "I²t", "rate", "rise", "front", "time", "overshoot",
        "settling", "ring",
    ];

    private static readonly (string[] Words, FigureKind Kind)[] Figures =
    [
        (["rise", "time", "of"], FigureKind.RiseTime),
        (["front", "time", "of"], FigureKind.FrontTime),
        (["overshoot", "of"], FigureKind.Overshoot),
        (["settling", "time", "of"], FigureKind.SettlingTime),
        (["ring", "frequency", "of"], FigureKind.RingFrequency),
        (["time", "of", "peak", "of"], FigureKind.TimeOfPeak),
        (["time", "after", "which"], FigureKind.TimeStaysBelow),
    ];

    private static readonly (string[] Words, PartQuantityKind Kind)[] OfParts =
    [
        (["voltage", "across"], PartQuantityKind.VoltageAcross),
        (["current", "through"], PartQuantityKind.CurrentThrough),
        (["current", "delivered", "by"], PartQuantityKind.CurrentDelivered),
        (["power", "in"], PartQuantityKind.PowerIn),
        (["power", "delivered", "by"], PartQuantityKind.PowerDelivered),
        (["energy", "in"], PartQuantityKind.EnergyIn),
        (["energy", "delivered", "by"], PartQuantityKind.EnergyDelivered),
    ];

    /// <summary>A quantity or a figure of one.</summary>
    public static QuantitySyntax? ReadWithFigures(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (TakeHalfValue(cursor))
        {
            return ReadFigure(cursor, start, FigureKind.TimeToHalfValue);
        }

        foreach (var (wordsOfFigure, kind) in Figures)
        {
            if (cursor.Take(wordsOfFigure))
            {
                return ReadFigure(cursor, start, kind);
            }
        }

        return Read(cursor);
    }

    /// <summary>A quantity, or the rate of change of one.</summary>
    public static QuantitySyntax? Read(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (cursor.Take("rate", "of", "change", "of"))
        {
            return ReadBasic(cursor) is { } of ? new RateSyntax(cursor.SpanFrom(start), of) : null;
        }

        return ReadBasic(cursor);
    }

    private static QuantitySyntax? ReadBasic(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        if (TakeJouleIntegral(cursor))
        {
            return cursor.Expect("through")
                ? ReadOfPart(cursor, start, PartQuantityKind.JouleIntegral)
                : null;
        }

        foreach (var (wordsOfPart, kind) in OfParts)
        {
            if (cursor.Take(wordsOfPart))
            {
                return ReadOfPart(cursor, start, kind);
            }
        }

        if (cursor.Take("voltage", "of"))
        {
            return NameParser.ReadNode(cursor) is { } node
                ? new NodeVoltageSyntax(cursor.SpanFrom(start), node, null)
                : null;
        }

        if (cursor.Take("voltage", "from"))
        {
            return NameParser.ReadNode(cursor) is { } from && cursor.Expect("to")
                && NameParser.ReadNode(cursor) is { } to
                ? new NodeVoltageSyntax(cursor.SpanFrom(start), from, to)
                : null;
        }

        Report(cursor);
        return null;
    }

    private static void Report(StatementCursor cursor)
    {
        var form = cursor.Form;
        cursor.Form = Forms;
        (string Expected, string[] Words)? second = cursor.Current switch
        {
            _ when cursor.IsWord("voltage") => ("`of`, `from` or `across`", ["of", "from", "across"]),
            _ when cursor.IsWord("current") => ("`through` or `delivered by`", ["through", "delivered"]),
            _ when cursor.IsWord("power") || cursor.IsWord("energy") =>
                ("`in` or `delivered by`", ["in", "delivered"]),
            _ => null,
        };
        if (second is var (expected, following))
        {
            cursor.Advance();
            cursor.Unexpected(expected, following);
        }
        else
        {
            cursor.Unexpected("a quantity", FirstWords);
        }

        cursor.Form = form;
    }

    private static PartQuantitySyntax? ReadOfPart(StatementCursor cursor, int start, PartQuantityKind kind) =>
        NameParser.ReadPart(cursor) is { } part
            ? new PartQuantitySyntax(cursor.SpanFrom(start), kind, part)
            : null;

    private static FigureSyntax? ReadFigure(StatementCursor cursor, int start, FigureKind kind)
    {
        var of = Read(cursor);
        var isReady = of is not null && kind switch
        {
            FigureKind.SettlingTime => cursor.Expect("within"),
            FigureKind.TimeStaysBelow => cursor.Expect("stays", "below"),
            _ => true,
        };
        if (!isReady)
        {
            return null;
        }

        if (kind is not (FigureKind.SettlingTime or FigureKind.TimeStaysBelow))
        {
            return new FigureSyntax(cursor.SpanFrom(start), kind, of!, null);
        }

        return ExpressionParser.ReadInClause(cursor) is { } argument
            ? new FigureSyntax(cursor.SpanFrom(start), kind, of!, argument)
            : null;
    }

    /// <summary><c>time to half-value of</c>.</summary>
    private static bool TakeHalfValue(StatementCursor cursor)
    {
        var isThere = cursor.IsWord("time") && cursor.IsWord("to", 1) && cursor.IsWord("half", 2)
            && cursor.IsSign('-', 3) && cursor.IsWord("value", 4) && cursor.IsWord("of", 5);
        cursor.Advance(isThere ? 6 : 0);
        return isThere;
    }

    /// <summary><c>I²t</c> or <c>I^2t</c>.</summary>
    private static bool TakeJouleIntegral(StatementCursor cursor)
    {
        if (!cursor.IsWord("I"))
        {
            return false;
        }

        var isSuperscript = cursor.TextOf(cursor.Ahead(1)) is "²" && cursor.IsWord("t", 2);
        var isCaret = cursor.IsSign('^', 1) && cursor.TextOf(cursor.Ahead(2)) is "2" && cursor.IsWord("t", 3);
        cursor.Advance(isSuperscript ? 3 : isCaret ? 4 : 0);
        return isSuperscript || isCaret;
    }
}
