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

    /// <summary>How far inverted quantities are from the propagated ones, relative to the probe's largest,
    /// each in the root of an energy.</summary>
    public double Error(
        Propagator propagator, ReadOnlySpan<double> inverted, double elapsed, int sourceStates)
    {
        DoubleDouble[] quantities = [.. Quantities.Select(quantity => (DoubleDouble)quantity)];
        var row = propagator.Row(quantities, new DoubleDouble[sourceStates]);
        var known = propagator.Stored(propagator.Advance(propagator.Settle(row), elapsed), unit.Length);
        var (worst, largest) = (0.0, 0.0);
        for (var k = 0; k < unit.Length; k++)
        {
            worst = Math.Max(worst, Math.Abs(inverted[k] - (double)known[k]) / unit[k]);
            largest = Math.Max(largest, Math.Abs(Quantities[k]) / unit[k]);
        }

        return largest == 0 ? 0 : worst / largest;
    }
}
