using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns the wave of a source into pieces.</summary>
internal static class WaveLowering
{
    /// <summary>The wave and what it is in, or null where an error was reported.</summary>
    public static (Wave Wave, bool IsVoltage)? Lower(
        CheckState state, PartDeclaration part, WaveSyntax syntax)
    {
        var pieces = ImmutableArray.CreateBuilder<WavePiece>();
        Dimension? dimension = null;
        Evaluated? only = null;
        var isGood = true;
        foreach (var term in syntax.Terms)
        {
            var lowering = new WaveTermLowering(
                state, part.Scope, dimension, term.IsSubtracted, syntax.Terms.Length == 1);
            var lowered = lowering.Lower(term.Piece);
            isGood &= lowered is not null;
            dimension ??= lowering.Dimension;
            only = lowering.Level;
            pieces.AddRange(syntax.Terms.Length > 1 && lowering.Level is { Formula: not null } level
                ? Following(state, level, term.Piece, lowered ?? [])
                : lowered ?? []);
        }

        if (!isGood || dimension is null)
        {
            return null;
        }

        var single = syntax.Terms.Length == 1 ? only : null;
        var (scale, isScaled) = Scale(state, part, syntax, single);
        return isScaled ? (new Wave(pieces.ToImmutable(), scale), dimension == Dimension.Voltage) : null;
    }

    /// <summary>The pieces of a term of a sum, each moved by what the term's level follows from; a level of
    /// zero has nothing to be moved.</summary>
    private static ImmutableArray<WavePiece> Following(
        CheckState state, Evaluated level, WavePieceSyntax term, ImmutableArray<WavePiece> pieces)
    {
        if (level.Value == 0)
        {
            Expected.Fixed(state, WaveTermLowering.LevelOf(term)!, level);
            return pieces;
        }

        var factor = new Quantity(
            1, new BinaryFormula('/', level.AsFormula, new NumberFormula(level.Value)));
        return [.. pieces.Select(p => p with { Share = new WaveShare(factor, p.Amplitude, p.Slope) })];
    }

    // The tolerance of a source's level is carried by one factor on the whole wave.
    private static (Quantity Scale, bool Succeeded) Scale(
        CheckState state, PartDeclaration part, WaveSyntax syntax, Evaluated? level)
    {
        if (syntax.Tolerance is { } tolerance
            && (level is null || syntax.Terms[0].Piece is not ConstantSyntax))
        {
            state.Findings.Error(tolerance.Span, "a tolerance stands after a constant value only",
                "name the level: `value Level : 540 V ±10 %`, then use `Level` in a wave of one term");
            return (1, false);
        }

        if (level is not { } nominal)
        {
            return (1, true);
        }

        var value = new ToleratedSyntax(WaveTermLowering.LevelOf(syntax.Terms[0].Piece)!, syntax.Tolerance);
        var applied = Tolerances.Apply(nominal, value, part.Scope, state.Evaluator, state.Findings,
            state.Parameters, part.Name, part.NameSyntax.Span);
        if (applied is not { } a)
        {
            return (1, false);
        }

        return nominal.Value == 0
            ? (new Quantity(0, a.Formula), true)
            : (new Quantity(1, new BinaryFormula('/', a.AsFormula, new NumberFormula(nominal.Value))), true);
    }
}
