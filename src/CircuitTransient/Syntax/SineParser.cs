namespace CircuitTransient.Syntax;

/// <summary>Reads sines and cosines, behind their first words.</summary>
internal static class SineParser
{
    private static readonly string[] Options = ["phase", "from", "until", "decaying"];

    public static SineSyntax? Read(StatementCursor cursor, int start, bool isCosine)
    {
        cursor.Form = "a sine is written `sine of 325 V at 50 Hz phase 30°`, or `sine of 230 V rms at 50 Hz`";
        if (SimpleWaveParser.ReadLevel(cursor) is not { } amplitude)
        {
            return null;
        }

        var isRms = cursor.Take("rms");
        if (!cursor.Expect("at") || ExpressionParser.ReadProduct(cursor) is not { } frequency)
        {
            return null;
        }

        var sine = new SineSyntax(default, isCosine, amplitude, isRms, frequency, null, null, null, null);
        while (IsOption(cursor) || IsBehindComma(cursor))
        {
            if (cursor.IsSign(','))
            {
                ReportComma(cursor, start);
                return null;
            }

            var option = cursor.Current;
            if (IsGiven(sine, cursor))
            {
                cursor.Error(option.Span, $"`{cursor.TextOf(option)}` is said twice",
                    "leave one of them out");
                return null;
            }

            if (ReadOption(cursor, sine) is not { } extended)
            {
                return null;
            }

            sine = extended;
        }

        return sine with { Span = cursor.SpanFrom(start) };
    }

    private static bool IsOption(StatementCursor cursor)
    {
        foreach (var option in Options)
        {
            if (cursor.IsWord(option))
            {
                return true;
            }
        }

        return false;
    }

    private static bool IsBehindComma(StatementCursor cursor) =>
        cursor.IsSign(',') && Options.Contains(cursor.Shown(cursor.Ahead(1)));

    private static void ReportComma(StatementCursor cursor, int start)
    {
        var before = cursor.TextOf(cursor.SpanFrom(start));
        var comma = cursor.Advance();
        var rest = cursor.Current.Start;
        while (!cursor.IsAtEnd && !cursor.IsSign(','))
        {
            cursor.Advance();
        }

        cursor.Error(comma.Span, "what belongs to a sine follows it without a comma",
            $"write `{before} {cursor.TextOf(cursor.SpanFrom(rest))}`");
    }

    private static bool IsGiven(SineSyntax sine, StatementCursor cursor) =>
        cursor.TextOf(cursor.Current) switch
        {
            "phase" => sine.Phase is not null,
            "from" => sine.From is not null,
            "until" => sine.Until is not null,
            _ => sine.TimeConstant is not null,
        };

    private static SineSyntax? ReadOption(StatementCursor cursor, SineSyntax sine)
    {
        if (cursor.Take("phase"))
        {
            return ExpressionParser.ReadProduct(cursor) is { } phase ? sine with { Phase = phase } : null;
        }

        if (cursor.Take("from"))
        {
            return TimeParser.Read(cursor) is { } from ? sine with { From = from } : null;
        }

        if (cursor.Take("until"))
        {
            return TimeParser.Read(cursor) is { } until ? sine with { Until = until } : null;
        }

        return cursor.Expect("decaying", "in") && ExpressionParser.ReadProduct(cursor) is { } constant
            ? sine with { TimeConstant = constant }
            : null;
    }
}
