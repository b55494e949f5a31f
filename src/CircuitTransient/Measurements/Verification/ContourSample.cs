using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements.Verification;

/// <summary>All quantities of a circuit at one instant, by numerical inversion with two numbers of points,
/// and beside it a probe whose inversion can be compared with what is known of it.</summary>
public sealed class ContourSample
{
    private readonly ContourReading finer;
    private readonly ContourReading coarser;
    private readonly ContourReading probe;
    private readonly CircuitReading probeKnown;
    private readonly double strength;

    internal ContourSample(
        double time, ContourReading finer, ContourReading coarser, ContourReading probe,
        CircuitReading probeKnown, double strength)
    {
        (Time, this.finer, this.coarser) = (time, finer, coarser);
        (this.probe, this.probeKnown, this.strength) = (probe, probeKnown, strength);
    }

    // A difference of two approximations tells the size of an error, not its bound: over 3000 random
    // circuits the error was up to 3.7 times the difference.
    private const double Doubt = 10;

    /// <summary>The instant in seconds.</summary>
    public double Time { get; }

    /// <summary>A voltage or current with its estimated error: by how much the two inversions differ, and by
    /// how much the probe missed, times how much stronger than the probe the circuit is stirred, tenfold.
    /// NaN where the equations leave it open, null for any other quantity.</summary>
    public (double Value, double EstimatedError)? ValueOf(Measurand measurand)
    {
        if (measurand is not (VoltageBetween or VoltageAcross or CurrentThrough))
        {
            return null;
        }

        double Of(CircuitReading reading) => reading.Value(measurand) ?? double.NaN;
        var value = Of(finer.Reading());
        var missed = Math.Abs(Of(probe.Reading()) - Of(probeKnown));
        return (value, Doubt * (Math.Abs(value - Of(coarser.Reading())) + (strength * missed)));
    }
}

/// <summary>What one inversion gave.</summary>
/// <param name="Unknowns">Every unknown.</param>
/// <param name="Stored">Charges (C) and flux linkages (Wb).</param>
/// <param name="StorageRates">Their rates of change, A and V.</param>
internal sealed record Inverted(double[] Unknowns, double[] Stored, double[] StorageRates);

/// <summary>An inversion with what it takes to read it.</summary>
internal sealed record ContourReading(
    Circuit Circuit, UnknownLayout Layout, StorageLayout Storage, Inverted Of, double[] Sources)
{
    /// <summary>The unknowns as voltages and currents.</summary>
    public CircuitReading Reading() => new(
        Circuit, Layout, Storage, i => Of.Unknowns[i], [.. Of.Stored], [.. Of.StorageRates],
        part => Sources[part]);
}
