using System.Collections.Immutable;

namespace CircuitTransient.Syntax;

/// <summary>Reads the wave of a source: pieces that add.</summary>
internal static class WaveParser
{
    private const string Forms =
        "a wave is a constant, `step of`, `ramp of`, `sine of`, `impulse of`, `straight lines` or another";

    private const string PulseForms =
        "one pulse: `rectangular pulse of 24 V from 1 ms to 3 ms`; several: `pulse train of …`";

    private static readonly string[] WaveWords =
    [
        "step", "rectangular", "pulse", "ramp", "sine", "cosine", "decay", "double", "impulse", "straight",
    ];

    /// <summary>A wave, and the tolerance of one that is a constant.</summary>
    public static WaveSyntax? Read(StatementCursor cursor)
    {
        cursor.IsInWave = true;
        var wave = ReadTerms(cursor);
        cursor.IsInWave = false;
        return wave;
    }

    private static WaveSyntax? ReadTerms(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        var terms = ImmutableArray.CreateBuilder<WaveTermSyntax>();
        var isSubtracted = false;
        if (cursor.IsSign('-') && IsPieceAhead(cursor, 1))
        {
            cursor.Advance();
            isSubtracted = true;
        }

        while (ReadPiece(cursor) is { } piece)
        {
            terms.Add(new WaveTermSyntax(isSubtracted, piece));
            if (!cursor.IsSign('+') && !cursor.IsSign('-') || ToleranceParser.IsAhead(cursor))
            {
                return Finish(cursor, start, terms.ToImmutable());
            }

            isSubtracted = cursor.Advance().Sign == '-';
        }

        return null;
    }

    private static WaveSyntax? Finish(StatementCursor cursor, int start, ImmutableArray<WaveTermSyntax> terms)
    {
        ToleranceSyntax? tolerance = null;
        var isConstant = terms is [{ Piece: ConstantSyntax }];
        var isRead = isConstant
            ? ToleranceParser.Read(cursor, out tolerance)
            : ToleranceParser.Refuse(cursor, "only a constant source has a tolerance behind its value",
                "name the value: `value Peak : 325 V ±5 %`, and write `Peak` in the wave");
        if (isRead && tolerance is not null && (cursor.IsSign('+') || cursor.IsSign('-')))
        {
            var level = cursor.TextOf(cursor.SpanFrom(start));
            var joint = cursor.Current;
            while (!cursor.IsAtEnd && !cursor.IsSign(','))
            {
                cursor.Advance();
            }

            cursor.Error(tolerance.Span, "a tolerance stands behind a constant that is the whole wave",
                $"name the value: `value Level : {level}`, and write "
                    + $"`Level {cursor.TextOf(cursor.SpanFrom(joint.Start))}`");
            return null;
        }

        return isRead ? new WaveSyntax(cursor.SpanFrom(start), terms, tolerance) : null;
    }

    private static bool IsPieceAhead(StatementCursor cursor, int ahead) =>
        cursor.Ahead(ahead).Kind == TokenKind.Word && cursor.Ahead(ahead + 1).Kind == TokenKind.Word;

    private static WavePieceSyntax? ReadPiece(StatementCursor cursor)
    {
        var start = cursor.Current.Start;
        var form = cursor.Form;
        var piece = cursor switch
        {
            _ when cursor.Take("step", "of") => SimpleWaveParser.ReadStep(cursor, start),
            _ when cursor.Take("rectangular", "pulse", "of") => SimpleWaveParser.ReadPulse(cursor, start),
            _ when cursor.Take("pulse", "train", "of") => SimpleWaveParser.ReadTrain(cursor, start),
            _ when cursor.Take("ramp", "of") => SimpleWaveParser.ReadRamp(cursor, start),
            _ when cursor.Take("sine", "of") => SineParser.Read(cursor, start, isCosine: false),
            _ when cursor.Take("cosine", "of") => SineParser.Read(cursor, start, isCosine: true),
            _ when cursor.Take("decay", "of") => ImpulseParser.ReadDecay(cursor, start),
            _ when cursor.Take("double", "exponential", "of") =>
                ImpulseParser.ReadDoubleExponential(cursor, start),
            _ when cursor.Take("impulse", "of") => ImpulseParser.ReadImpulse(cursor, start),
            _ when cursor.Take("straight", "lines") => StraightLinesParser.Read(cursor, start),
            _ when IsPieceAhead(cursor, 0) || IsWaveWord(cursor) => ReportUnknown(cursor),
            _ => ReadConstant(cursor),
        };
        cursor.Form = form;
        return piece;
    }

    /// <summary><c>step 8 A</c>: the word of a wave, and a number where more words should be.</summary>
    private static bool IsWaveWord(StatementCursor cursor) =>
        cursor.Ahead(1).Kind == TokenKind.Number && WaveWords.Contains(cursor.Shown(cursor.Current));

    private static WavePieceSyntax? ReportUnknown(StatementCursor cursor)
    {
        if (IsWaveWord(cursor))
        {
            var word = cursor.TextOf(cursor.Advance()).ToString();
            cursor.Form = Meant(cursor, word) is { } meant ? $"write `{meant}`" : Forms;
            cursor.Unexpected("`of` and the rest of the wave");
            return null;
        }

        if (cursor.IsWord("between", 1))
        {
            return ReadConstant(cursor);
        }

        cursor.Form = cursor.IsWord("pulse") || cursor.IsWord("square") ? PulseForms : Forms;
        cursor.Unexpected("the value of the source", WaveWords);
        return null;
    }

    /// <summary>The wave with the words that are missing: <c>sine of 325 V at 50 Hz</c>; null where it cannot
    /// be told.</summary>
    private static string? Meant(StatementCursor cursor, string word)
    {
        var here = cursor.Here;
        var level = ExpressionParser.ReadProduct(cursor);
        var isRead = level is not null && here.Errors == cursor.Here.Errors;
        var rest = cursor.Current;
        while (!cursor.IsAtEnd && !cursor.IsSign(','))
        {
            cursor.Advance();
        }

        var behind = cursor.LastEnd > rest.Start ? " " + cursor.Shown(cursor.SpanFrom(rest.Start)) : "";
        cursor.Return(here);
        if (!isRead || word is "straight" or "double" or "rectangular" || behind.EndsWith('…'))
        {
            return null;
        }

        var whole = word is "pulse" ? "rectangular pulse" : word;
        var at = word is "sine" or "cosine" && rest.Kind == TokenKind.Number ? " at" : "";
        return $"{whole} of {cursor.Shown(level!.Span)}{at}{behind}";
    }

    private static ConstantSyntax? ReadConstant(StatementCursor cursor)
    {
        var level = ExpressionParser.ReadProduct(cursor);
        if (level is null)
        {
            return null;
        }

        if (cursor.IsWord("at") || cursor.IsWord("from"))
        {
            cursor.Error(level.Span,
                $"`{cursor.Shown(level.Span)}` is a constant; it does not start at an instant",
                $"write `step of {cursor.Shown(level.Span)} at …`, and a sum inside a wave in parentheses");
            return null;
        }

        return new ConstantSyntax(level.Span, level);
    }
}
