using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>A cause that is solved alone: pieces of one source, or what one part stores at the
/// start.</summary>
/// <param name="Name">The user's own part name, with what of it.</param>
/// <param name="Source">Index of the source; −1 for a stored quantity.</param>
/// <param name="Pieces">The pieces of the source's wave that belong to it.</param>
/// <param name="Store">Index of the part that stores; −1 for a source.</param>
/// <param name="Stored">What it stores at t = 0⁻: volts or amperes.</param>
public sealed record Cause(
    string Name, int Source, ImmutableArray<WavePiece> Pieces, int Store, double Stored);

/// <summary>The lists of causes.</summary>
public static class CauseList
{
    /// <summary>From the start: every source, and every stored quantity that is not zero, in the order of the
    /// parts.</summary>
    public static ImmutableArray<Cause> FromStart(Circuit circuit)
    {
        var causes = ImmutableArray.CreateBuilder<Cause>();
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            switch (circuit.Parts[i])
            {
                case VoltageSource { Wave: var wave }:
                    causes.Add(new Cause(circuit.Parts[i].Name, i, wave.Pieces, -1, 0));
                    break;
                case CurrentSource { Wave: var wave }:
                    causes.Add(new Cause(circuit.Parts[i].Name, i, wave.Pieces, -1, 0));
                    break;
                case Capacitor { InitialVoltage: { } v } c when IsListed(circuit, v):
                    causes.Add(new Cause($"{c.Name} initial charge", -1, [], i, v.Nominal));
                    break;
                case Inductor { InitialCurrent: { } current } l when IsListed(circuit, current):
                    causes.Add(new Cause($"{l.Name} initial current", -1, [], i, current.Nominal));
                    break;
            }
        }

        return causes.ToImmutable();
    }

    /// <summary>The pieces of a source's wave with its scale.</summary>
    internal static DoubleDouble ScaleOf(Circuit circuit, int source) => circuit.Parts[source] switch
    {
        VoltageSource s => s.Wave.Scale.Nominal,
        CurrentSource s => s.Wave.Scale.Nominal,
        _ => DoubleDouble.One,
    };

    private static bool IsListed(Circuit circuit, Quantity stored) =>
        stored.Nominal != 0 || HasTolerance(circuit, stored.Formula);

    private static bool HasTolerance(Circuit circuit, Formula? formula) => formula switch
    {
        ParameterFormula p => circuit.Parameters[p.Index].Tolerance is not null,
        BinaryFormula b => HasTolerance(circuit, b.Left) || HasTolerance(circuit, b.Right),
        CallFormula c => HasTolerance(circuit, c.Argument),
        _ => false,
    };
}
