using System.Collections.Immutable;
using CircuitTransient.Text;

namespace CircuitTransient.Syntax;

/// <summary>Reads the wave of a source: pieces that add.</summary>
internal static class WaveParser
{
    private static readonly string[] waveWords =
    [
        "step", "rectangular", "pulse", "ramp", "sine", "cosine", "decay", "double", "impulse", "straight",
    ];

    /// <summary>A wave, and the tolerance of one that is a constant.</summary>
    public static WaveSyntax? Read(StatementCursor cursor)
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
            _ when IsPieceAhead(cursor, 0) => ReportUnknown(cursor),
            _ => ReadConstant(cursor),
        };
        cursor.Form = form;
        return piece;
    }

    private static WavePieceSyntax? ReportUnknown(StatementCursor cursor)
    {
        var word = cursor.Current;
        if (ToleranceParser.IsAhead(cursor) || cursor.IsWord("between", 1))
        {
            return ReadConstant(cursor);
        }

        var nearest = NearestName.Find(cursor.Shown(word), waveWords);
        if (nearest is null || nearest == cursor.Shown(word))
        {
            cursor.Advance(nearest is null ? 0 : 1);
        }

        cursor.Form =
            "waves are a constant, `step of`, `rectangular pulse of`, `pulse train of`, `ramp of`, "
            + "`sine of`, `cosine of`, `decay of`, `double exponential of`, `impulse of`, `straight lines`";
        cursor.Unexpected("the value of the source", waveWords);
        return null;
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
                $"`{cursor.TextOf(level.Span)}` is a constant; it does not start at an instant",
                $"write `step of {cursor.TextOf(level.Span)} at …`, and a sum inside a wave in parentheses");
            return null;
        }

        return new ConstantSyntax(level.Span, level);
    }
}
