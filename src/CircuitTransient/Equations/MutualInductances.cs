using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Equations;

/// <summary>The mutual inductances of a circuit, coil by coil.</summary>
public static class MutualInductances
{
    /// <summary>For every part the coils it is coupled to, with M in henries. M = k √(L₁L₂) is formed in
    /// double-double, so that k = 1 leaves an inductance matrix that is singular to the last bit.</summary>
    public static ImmutableArray<ImmutableArray<(int Coil, DoubleDouble Mutual)>> Of(Circuit circuit)
    {
        var lists = new List<(int, DoubleDouble)>[circuit.Parts.Length];
        for (var i = 0; i < lists.Length; i++)
        {
            lists[i] = [];
        }

        foreach (var coupling in circuit.Couplings)
        {
            var mutual = Mutual(circuit, coupling);
            lists[coupling.First].Add((coupling.Second, mutual));
            lists[coupling.Second].Add((coupling.First, mutual));
        }

        return [.. lists.Select(l => l.ToImmutableArray())];
    }

    /// <summary>The mutual inductance of one coupling in henries.</summary>
    public static DoubleDouble Mutual(Circuit circuit, Coupling coupling)
    {
        DoubleDouble value = coupling.Value.Nominal;
        return coupling.IsFactor
            ? value * DoubleDouble
                .Sqrt(Inductance(circuit, coupling.First) * Inductance(circuit, coupling.Second))
            : value;
    }

    private static DoubleDouble Inductance(Circuit circuit, int part) =>
        ((Inductor)circuit.Parts[part]).Inductance.Nominal;
}
