using System.Collections.Immutable;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Circuits;

/// <summary>Turns couplings into mutual inductances, and checks that no set of them stores negative
/// energy.</summary>
internal static class CouplingLowering
{
    public static ImmutableArray<Coupling> Lower(CheckState state)
    {
        var couplings = ImmutableArray.CreateBuilder<Coupling>();
        var pairs = new Dictionary<(int, int), string>();
        foreach (var declared in state.Couplings)
        {
            if (Lower(state, declared, pairs) is { } coupling)
            {
                couplings.Add(coupling);
            }
        }

        CheckEnergy(state, couplings);
        if (!state.Findings.HasErrors)
        {
            CouplingTolerances.Check(state, couplings);
        }

        return couplings.ToImmutable();
    }

    private static Coupling? Lower(
        CheckState state, PartDeclaration declared, Dictionary<(int, int), string> pairs)
    {
        var syntax = (CouplingStatement)declared.Statement;
        var first = Coil(state, syntax.First, declared.Scope);
        var second = Coil(state, syntax.Second, declared.Scope);
        var value = state.Evaluator.Evaluate(syntax.Value.Value, declared.Scope);
        if (first is null || second is null || value is not { } plain)
        {
            return null;
        }

        if (first == second)
        {
            state.Findings.Error(syntax.Second.Span, $"`{declared.Name}` couples `{first.Name}` with itself",
                "name two coils");
            return null;
        }

        var pair = (Math.Min(first.Index, second.Index), Math.Max(first.Index, second.Index));
        if (!pairs.TryAdd(pair, declared.Name))
        {
            state.Findings.Error(declared.NameSyntax.Span,
                $"`{first.Name}` and `{second.Name}` are coupled by `{pairs[pair]}` already",
                    "leave one of them out");
            return null;
        }

        var isFactor = plain.Dimension == Dimension.None;
        if (!isFactor && plain.Dimension != Dimension.Inductance)
        {
            state.Findings.Error(syntax.Value.Value.Span,
                $"`{state.Text(syntax.Value.Value.Span)}` is {Measure.Of(plain.Dimension).Phrase}; "
                + "a coupling is a pure number or in henries", "write `0.9`, or `3 mH`");
            return null;
        }

        var toleranced =
            Tolerances.Apply(plain, syntax.Value, declared.Scope, state.Evaluator, state.Findings,
            state.Parameters, declared.Name, declared.NameSyntax.Span);
        return toleranced is { } v && IsPossible(state, syntax, first, second, v, isFactor)
            ? new Coupling(declared.Name, first.Index, second.Index, v.AsQuantity, isFactor, syntax.Span)
            : null;
    }

    private static PartDeclaration? Coil(CheckState state, NameSyntax name, Scope scope)
    {
        var part = state.FindPart(name, scope);
        if (part is null || part.Kind == "inductor")
        {
            return part;
        }

        state.Findings.Error(name.Span, $"`{part.Name}` is a {part.Kind}; only inductors are coupled",
            "name an inductor");
        return null;
    }

    private static bool IsPossible(
        CheckState state, CouplingStatement syntax, PartDeclaration first, PartDeclaration second,
        Evaluated value, bool isFactor)
    {
        var span = syntax.Value.Value.Span;
        if (isFactor && Math.Abs(value.Value) > 1)
        {
            state.Findings.Error(span,
                $"a coupling factor lies between -1 and 1, not at {Amount.Of(value.Value, "")}",
                "for a mutual inductance write it in henries, such as `3 mH`");
            return false;
        }

        if (isFactor || state.Parts[first.Index] is not Inductor a
            || state.Parts[second.Index] is not Inductor b)
        {
            return true;
        }

        var most = Math.Sqrt(a.Inductance.Nominal * b.Inductance.Nominal);
        if (Math.Abs(value.Value) <= most * (1 + CoilSets.Rounding))
        {
            return true;
        }

        state.Findings.Error(span,
            $"{Amount.Of(value.Value, "H")} would couple `{first.Name}` and `{second.Name}` by more than "
                + $"all their flux",
            $"the most is sqrt(L1·L2) = {Amount.Of(most, "H")}");
        return false;
    }

    private static void CheckEnergy(CheckState state, IReadOnlyCollection<Coupling> couplings)
    {
        foreach (var set in CoilSets.TooLarge(state.Parts, couplings))
        {
            state.Findings.Error(set.First.Span,
                $"{set.Coils.Length} coils hang together by couplings; {CoilSets.MostCoils} are the most",
                "leave out the weak couplings between distant coils");
        }

        foreach (var set in CoilSets.StoringNegativeEnergy(state.Parts, couplings))
        {
            var names = string.Join(", ", set.Coils.Select(c => $"`{state.Declared[c].Name}`"));
            state.Findings.Error(set.First.Span,
                $"{names} so coupled can store {EngineeringNumber.Format(set.Least, "", 3)} times their own "
                    + "energy",
                "coils close to a third one are close to each other: lower a factor, or raise or add "
                    + "another");
        }
    }
}
