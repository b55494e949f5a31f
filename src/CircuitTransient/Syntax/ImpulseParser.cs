using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads decays, double exponentials and impulses as the trade writes them,
/// behind their first words.</summary>
internal static class ImpulseParser
{
    public static DecaySyntax? ReadDecay(StatementCursor cursor, int start)
    {
        cursor.Form = "a decay is written `decay of 5 kV in 20 µs from 1 ms`";
        return SimpleWaveParser.ReadLevel(cursor) is { } level
            && cursor.Expect("in") && ExpressionParser.ReadProduct(cursor) is { } constant
            && TimeParser.ReadOptional(cursor, "from", out var from)
            ? new DecaySyntax(cursor.SpanFrom(start), level, constant, from)
            : null;
    }

    public static ImpulseSyntax? ReadDoubleExponential(StatementCursor cursor, int start)
    {
        cursor.Form = "it is written `double exponential of 6 kV front 1.2 µs half-value 50 µs from 1 ms`";
        return SimpleWaveParser.ReadLevel(cursor) is { } peak
            && cursor.Expect("front") && ExpressionParser.ReadProduct(cursor) is { } front
            && cursor.Expect("half") && cursor.Expect('-') && cursor.Expect("value")
            && ExpressionParser.ReadProduct(cursor) is { } half
            && TimeParser.ReadOptional(cursor, "from", out var from)
            ? new ImpulseSyntax(cursor.SpanFrom(start), peak, front, half, from)
            : null;
    }

    public static ImpulseSyntax? ReadImpulse(StatementCursor cursor, int start)
    {
        cursor.Form = "an impulse is written `impulse of 6 kV 1.2/50 µs from 1 ms`";
        return SimpleWaveParser.ReadLevel(cursor) is { } peak
            && ReadTimes(cursor) is var (front, half)
            && TimeParser.ReadOptional(cursor, "from", out var from)
            ? new ImpulseSyntax(cursor.SpanFrom(start), peak, front, half, from)
            : null;
    }

    /// <summary><c>1.2/50 µs</c>: the unit behind the second number is that of the first too.</summary>
    private static (NumberSyntax Front, NumberSyntax Half)? ReadTimes(StatementCursor cursor)
    {
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("the front and half-value times");
            return null;
        }

        var first = cursor.Advance();
        if (!NumberParser.TakeUnit(cursor, first, out var own, out _, out var hasOwn) || !cursor.Expect('/'))
        {
            return null;
        }

        var firstEnd = first.Span;
        if (cursor.Current.Kind != TokenKind.Number)
        {
            cursor.Unexpected("the half-value time");
            return null;
        }

        var second = cursor.Advance();
        if (!NumberParser.TakeUnit(cursor, second, out var unit, out _, out var hasUnit))
        {
            return null;
        }

        if (!hasOwn && !hasUnit)
        {
            var times = cursor.SpanFrom(first.Start);
            cursor.Error(times, $"`{cursor.Shown(times)}` has no unit; the front and half-value times are in "
                + "seconds", $"write `{cursor.TextOf(first)}/{cursor.TextOf(second)} µs`");
            return null;
        }

        var half = Number(cursor, second, unit, hasUnit);
        var front = Number(cursor, first, hasOwn ? own : unit, hasOwn || hasUnit);
        return front is null || half is null ? null : (front with { Span = firstEnd }, half);
    }

    private static NumberSyntax? Number(StatementCursor cursor, Token token, Unit unit, bool hasUnit) =>
        NumberParser.Number(cursor, token, cursor.TextOf(token).ToString(), 0, unit, hasUnit, mark: null);
}
