namespace CircuitTransient.Syntax;

/// <summary>Reads steps, pulses, trains of pulses and ramps, behind their first words.</summary>
internal static class SimpleWaveParser
{
    public static StepSyntax? ReadStep(StatementCursor cursor, int start)
    {
        cursor.Form = "a step is written `step of 8 A at 400 ms`";
        if (ReadLevel(cursor) is not { } level)
        {
            return null;
        }

        if (cursor.IsWord("when"))
        {
            return TimeParser.Read(cursor) is { } when
                ? new StepSyntax(cursor.SpanFrom(start), level, when)
                : null;
        }

        return TimeParser.ReadOptional(cursor, "at", out var at)
            ? new StepSyntax(cursor.SpanFrom(start), level, at)
            : null;
    }

    public static PulseSyntax? ReadPulse(StatementCursor cursor, int start)
    {
        cursor.Form = "a pulse is written `rectangular pulse of 24 V from 1 ms to 3 ms`";
        return ReadLevel(cursor) is { } level && TimeParser.ReadOptional(cursor, "from", out var from)
            && cursor.Expect("to") && TimeParser.Read(cursor) is { } to
            ? new PulseSyntax(cursor.SpanFrom(start), level, from, to)
            : null;
    }

    public static RampSyntax? ReadRamp(StatementCursor cursor, int start)
    {
        cursor.Form = "a ramp is written `ramp of 12 V from 40 ns to 42.5 ns`";
        return ReadLevel(cursor) is { } level && TimeParser.ReadOptional(cursor, "from", out var from)
            && cursor.Expect("to") && TimeParser.Read(cursor) is { } to
            ? new RampSyntax(cursor.SpanFrom(start), level, from, to)
            : null;
    }

    public static PulseTrainSyntax? ReadTrain(StatementCursor cursor, int start)
    {
        cursor.Form = "a train is written `pulse train of 24 V width 1 ms every 5 ms from 2 ms count 10`";
        return ReadLevel(cursor) is { } level
            && cursor.Expect("width") && ExpressionParser.ReadInClause(cursor) is { } width
            && cursor.Expect("every") && ExpressionParser.ReadInClause(cursor) is { } every
            && TimeParser.ReadOptional(cursor, "from", out var from)
            && cursor.Expect("count") && ExpressionParser.ReadInClause(cursor) is { } count
            ? new PulseTrainSyntax(cursor.SpanFrom(start), level, width, every, from, count)
            : null;
    }

    /// <summary>The level of a piece; a tolerance there belongs to a named value.</summary>
    public static ExpressionSyntax? ReadLevel(StatementCursor cursor)
    {
        var level = ExpressionParser.ReadProduct(cursor);
        return level is not null && ToleranceParser.Refuse(cursor,
            "a tolerance may not stand inside a wave",
            $"name the value: `value Peak : {cursor.Shown(level.Span)} ±5 %`, and write `Peak` in the wave")
            ? level
            : null;
    }
}
