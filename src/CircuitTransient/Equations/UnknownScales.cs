using CircuitTransient.Circuits;

namespace CircuitTransient.Equations;

/// <summary>What a unit of each unknown weighs when pivots are compared: a volt 1, an ampere the circuit's
/// own impedance level. Only the choice of pivots depends on it, never a value.</summary>
internal static class UnknownScales
{
    public static double[] Of(NetworkLayout layout)
    {
        var scales = new double[layout.UnknownCount];
        Array.Fill(scales, 1);
        var impedance = ImpedanceLevel(layout.Circuit);
        for (var i = layout.Circuit.Nodes.Length - 1; i < scales.Length; i++)
        {
            scales[i] = 1 / impedance;
        }

        return scales;
    }

    private static double ImpedanceLevel(Circuit circuit)
    {
        double sum = 0;
        var count = 0;
        foreach (var resistor in circuit.Parts.OfType<Resistor>())
        {
            sum += Math.Log(Math.Abs(resistor.Resistance.Nominal));
            count++;
        }

        return count == 0 ? 1 : Math.Exp(sum / count);
    }
}
