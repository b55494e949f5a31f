using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>Stored quantities that stir every mode: some energy in each capacitor and coil, no two
/// alike.</summary>
internal sealed class Probe
{
    private readonly double[] unit;

    /// <summary>A probe for a circuit's storage.</summary>
    public Probe(StorageLayout storage)
    {
        unit = new double[storage.Count];
        foreach (var element in storage.Values)
        {
            if (element.Row == element.Column)
            {
                unit[element.Row] = Math.Sqrt(element.Value.Hi);
            }
        }

        var amounts = new double[storage.Count];
        for (var k = 0; k < amounts.Length; k++)
        {
            amounts[k] = 1 + (0.5 * Math.Sin(1 + (2.4 * k))); // any numbers that repeat in no pattern
        }

        Quantities = new double[storage.Count];
        foreach (var element in storage.Values)
        {
            Quantities[element.Row] += element.Value.Hi * amounts[element.Column] / unit[element.Column];
        }
    }

    /// <summary>The quantities, in coulombs and webers.</summary>
    public double[] Quantities { get; }

    /// <summary>The states the probe leaves after a time, by propagation.</summary>
    public SplitMatrix After(Propagator propagator, double elapsed, int sourceStates)
    {
        DoubleDouble[] quantities = [.. Quantities.Select(quantity => (DoubleDouble)quantity)];
        var row = propagator.Row(quantities, new DoubleDouble[sourceStates]);
        return propagator.Advance(propagator.Settle(row), elapsed);
    }

    /// <summary>How far inverted quantities are from the propagated ones, relative to the probe's largest,
    /// each in the root of an energy.</summary>
    public double Error(Propagator propagator, ReadOnlySpan<double> inverted, SplitMatrix known)
    {
        var states = propagator.Stored(known, unit.Length);
        var worst = 0.0;
        for (var k = 0; k < unit.Length; k++)
        {
            worst = Math.Max(worst, Math.Abs(inverted[k] - (double)states[k]) / unit[k]);
        }

        return unit.Length == 0 ? 0 : worst / Largest(Quantities);
    }

    /// <summary>How many times stronger than the probe a circuit is stirred, from its stored quantities at
    /// the start and at the sample.</summary>
    public double Strength(ReadOnlySpan<double> atStart, ReadOnlySpan<double> atSample) =>
        unit.Length == 0 ? 0 : Math.Max(Largest(atStart), Largest(atSample)) / Largest(Quantities);

    private double Largest(ReadOnlySpan<double> quantities)
    {
        var largest = 0.0;
        for (var k = 0; k < unit.Length; k++)
        {
            largest = Math.Max(largest, Math.Abs(quantities[k]) / unit[k]);
        }

        return largest;
    }
}
