using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The stored quantities of a circuit, whatever its switch positions: the charge of each capacitor
/// and the flux linkage of each coil, and how they follow from voltages and currents (q = D v).</summary>
/// <param name="Parts">The part of each stored quantity.</param>
/// <param name="IndexOf">For each part its place in <paramref name="Parts"/>, or −1.</param>
/// <param name="Values">The elements of D that are not zero: capacitances, inductances, mutual
/// inductances.</param>
internal sealed record StorageLayout(
    ImmutableArray<int> Parts, ImmutableArray<int> IndexOf, ImmutableArray<StorageElement> Values)
{
    /// <summary>Number of stored quantities.</summary>
    public int Count => Parts.Length;

    /// <summary>The layout of a circuit.</summary>
    public static StorageLayout Of(Circuit circuit)
    {
        var parts = ImmutableArray.CreateBuilder<int>();
        var indexOf = new int[circuit.Parts.Length];
        var values = ImmutableArray.CreateBuilder<StorageElement>();
        for (var part = 0; part < circuit.Parts.Length; part++)
        {
            indexOf[part] = -1;
            if (OwnValue(circuit.Parts[part]) is { } value)
            {
                indexOf[part] = parts.Count;
                values.Add(new StorageElement(parts.Count, parts.Count, value));
                parts.Add(part);
            }
        }

        foreach (var coupling in circuit.Couplings)
        {
            var (first, second) = (indexOf[coupling.First], indexOf[coupling.Second]);
            var mutual = MutualInductance(circuit, coupling);
            values.Add(new StorageElement(first, second, mutual));
            values.Add(new StorageElement(second, first, mutual));
        }

        return new StorageLayout(parts.ToImmutable(), [.. indexOf], values.ToImmutable());
    }

    /// <summary>Mutual inductance of a coupling in henries.</summary>
    public static DoubleDouble MutualInductance(Circuit circuit, Coupling coupling)
    {
        var value = coupling.Value.Nominal;
        return coupling.IsFactor
            ? value * DoubleDouble.Sqrt(DoubleDouble.FromProduct(
                ((Inductor)circuit.Parts[coupling.First]).Inductance.Nominal,
                ((Inductor)circuit.Parts[coupling.Second]).Inductance.Nominal))
            : value;
    }

    /// <summary>What the statements say is stored at t = 0⁻: a voltage for a capacitor, a current for a
    /// coil, zero for every other part and where nothing was said.</summary>
    public static ImmutableArray<double> StatedAtStart(Circuit circuit) =>
        [
            .. circuit.Parts.Select(part => part switch
            {
                Capacitor { InitialVoltage: { } voltage } => voltage.Nominal,
                Inductor { InitialCurrent: { } current } => current.Nominal,
                _ => 0.0,
            }),
        ];

    /// <summary>Charges and flux linkages from capacitor voltages and coil currents, given for each
    /// part.</summary>
    public DoubleDouble[] FromVoltagesAndCurrents(ImmutableArray<double> byPart)
    {
        var stored = new DoubleDouble[Count];
        foreach (var element in Values)
        {
            stored[element.Row] += element.Value * byPart[Parts[element.Column]];
        }

        return stored;
    }

    private static double? OwnValue(Part part) => part switch
    {
        Capacitor capacitor => capacitor.Capacitance.Nominal,
        Inductor inductor => inductor.Inductance.Nominal,
        _ => null,
    };
}

/// <summary>One element of D, in farads or henries.</summary>
internal readonly record struct StorageElement(int Row, int Column, DoubleDouble Value);
