using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns statements into parts; null means that an error has been reported.</summary>
internal static class PartLowering
{
    public static Part? Lower(CheckState state, PartDeclaration part)
    {
        var clauses = PartClauses.Read(state, part);
        var lowered = part.Statement switch
        {
            SimplePartStatement simple => Simple(state, part, simple),
            SourceStatement source => Source(state, part, source),
            DependentSourceStatement source => DependentSources.Lower(state, part, source),
            SwitchStatement => state.Parts[part.Index],
            TransformerStatement transformer => Transformer(state, part, transformer),
            _ => throw new System.Diagnostics.UnreachableException($"no part for {part.Statement}"),
        };
        return lowered is null || clauses is null
            ? null
            : lowered with { Ratings = clauses.Ratings, LinearUpTo = clauses.LinearUpTo };
    }

    private static Part? Simple(CheckState state, PartDeclaration part, SimplePartStatement syntax)
    {
        var value = PartValues.Own(state, part, syntax);
        var (isGood, stored) = Stored(state, part, syntax);
        if (value is not { } own || !isGood)
        {
            return null;
        }

        return syntax.Kind switch
        {
            SimplePartKind.Resistor => new Resistor(own)
            {
                Name = part.Name,
                From = part.From,
                To = part.To,
                Span = syntax.Span,
            },
            SimplePartKind.Capacitor => new Capacitor(own, stored)
            {
                Name = part.Name,
                From = part.From,
                To = part.To,
                Span = syntax.Span,
            },
            _ => new Inductor(own, stored)
            {
                Name = part.Name,
                From = part.From,
                To = part.To,
                Span = syntax.Span,
            },
        };
    }

    private static (bool IsGood, Quantity? Stored) Stored(
        CheckState state, PartDeclaration part, SimplePartStatement syntax)
    {
        var (written, dimension, aspect) = syntax.Kind switch
        {
            SimplePartKind.Capacitor => (syntax.Clauses.OfType<ChargedToSyntax>().FirstOrDefault()?.Voltage,
                Dimension.Voltage, "initial charge"),
            SimplePartKind.Inductor => (syntax.Clauses.OfType<CarryingSyntax>().FirstOrDefault()?.Current,
                Dimension.Current, "initial current"),
            _ => (null, Dimension.None, ""),
        };
        if (written is null)
        {
            return (true, null);
        }

        var stored = PartValues.Toleranced(state, part, written, dimension, aspect);
        return (stored is not null, stored?.AsQuantity);
    }

    private static Part? Source(CheckState state, PartDeclaration part, SourceStatement syntax)
    {
        if (WaveLowering.Lower(state, part, syntax.Wave) is not { } lowered)
        {
            return null;
        }

        return lowered.IsVoltage
            ? new VoltageSource(lowered.Wave)
            {
                Name = part.Name,
                From = part.From,
                To = part.To,
                Span = syntax.Span,
            }
            : new CurrentSource(lowered.Wave)
            {
                Name = part.Name,
                From = part.From,
                To = part.To,
                Span = syntax.Span,
            };
    }

    private static IdealTransformer? Transformer(CheckState state, PartDeclaration part,
        TransformerStatement syntax)
    {
        var primary = Expected.Fixed(state, syntax.PrimaryTurns, part.Scope, Dimension.None);
        var secondary = Expected.Fixed(state, syntax.SecondaryTurns, part.Scope, Dimension.None);
        var windings = new[] { (primary, syntax.PrimaryTurns), (secondary, syntax.SecondaryTurns) };
        foreach (var (turns, written) in windings)
        {
            if (turns <= 0)
            {
                state.Findings.Error(written.Span,
                    $"a winding of `{part.Name}` has {Amount.Of(turns.Value, "")} turns",
                    "write a number above zero; swap the terminals of a winding to turn its sense");
                return null;
            }
        }

        return primary is { } p && secondary is { } s
            ? new IdealTransformer(part.SecondaryFrom, part.SecondaryTo, p / s)
            {
                Name = part.Name,
                From = part.From,
                To = part.To,
                Span = syntax.Span,
            }
            : null;
    }
}
