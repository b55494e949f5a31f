using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements.Verification;

/// <summary>How fast a circuit could possibly be, told from its parts alone.</summary>
internal static class RateBound
{
    /// <summary>A rate, in 1/s, that no finite pole of an ordinary circuit passes: every conductance on the
    /// smallest capacitance, every resistance on the smallest leakage inductance, and their
    /// resonance.</summary>
    public static double Of(Circuit circuit, StorageLayout storage)
    {
        var (conductance, resistance, gain, source) = (0.0, 0.0, 1.0, 0.0);
        foreach (var part in circuit.Parts)
        {
            foreach (var value in Resistances(part))
            {
                conductance += 1 / Math.Abs(value);
                resistance += Math.Abs(value);
            }

            switch (part)
            {
                case DependentSource dependent:
                    var size = Math.Abs(dependent.Gain.Nominal);
                    gain *= Math.Max(1, size);
                    conductance += size;
                    resistance += size;
                    break;
                case IdealTransformer transformer:
                    var square = transformer.Ratio * transformer.Ratio;
                    gain *= Math.Max(square, 1 / square);
                    break;
                default:
                    foreach (var piece in InputModel.WaveOf(part)?.Pieces ?? [])
                    {
                        source = Math.Max(source, piece.DecayRate + piece.AngularFrequency);
                    }

                    break;
            }
        }

        var (capacitance, inductance) = SmallestStorage(circuit, storage);
        var bound = (conductance / capacitance) + (resistance / inductance)
            + (storage.Count / Math.Sqrt(capacitance * inductance));
        return Math.Min((bound * gain) + source, 1e60);
    }

    private static IEnumerable<double> Resistances(Part part)
    {
        switch (part)
        {
            case Resistor resistor:
                yield return resistor.Resistance.Nominal;
                break;
            case Switch @switch:
                foreach (var resistance in new[] { @switch.ClosedResistance, @switch.OpenResistance })
                {
                    if (resistance is not null)
                    {
                        yield return resistance.Nominal;
                    }
                }

                break;
            default: break;
        }
    }

    // The smallest capacitance, and the smallest pivot of the inductance matrix, which is what coupling
    // leaves of an inductance; a pivot that vanishes (k = 1) is none.
    private static (double Capacitance, double Inductance) SmallestStorage(
        Circuit circuit, StorageLayout storage)
    {
        const double Vanishing = 1e-25;
        var (capacitance, inductance) = (double.PositiveInfinity, double.PositiveInfinity);
        var coupled = new SplitMatrix(storage.Count, storage.Count);
        foreach (var element in storage.Values)
        {
            coupled[element.Row, element.Column] += element.Value;
        }

        for (var k = 0; k < storage.Count; k++)
        {
            var pivot = coupled[k, k];
            if (circuit.Parts[storage.Parts[k]] is Capacitor)
            {
                capacitance = Math.Min(capacitance, pivot.Hi);
            }
            else if (pivot.Hi > Vanishing * ((Inductor)circuit.Parts[storage.Parts[k]]).Inductance.Nominal)
            {
                inductance = Math.Min(inductance, pivot.Hi);
                for (var i = k + 1; i < storage.Count; i++)
                {
                    if (!coupled[i, k].IsZero)
                    {
                        SplitMatrix.Subtract(coupled, i, coupled[i, k] / pivot, coupled, k, k);
                    }
                }
            }
        }

        return (capacitance, inductance);
    }
}
