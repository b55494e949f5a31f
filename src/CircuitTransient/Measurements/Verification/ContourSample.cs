using CircuitTransient.Circuits;

namespace CircuitTransient.Measurements.Verification;

/// <summary>All quantities of a circuit at one instant, by numerical inversion with two numbers of
/// points.</summary>
public sealed class ContourSample
{
    private readonly ContourReading finer;
    private readonly ContourReading coarser;

    internal ContourSample(double time, ContourReading finer, ContourReading coarser) =>
        (Time, this.finer, this.coarser) = (time, finer, coarser);

    /// <summary>The instant in seconds.</summary>
    public double Time { get; }

    /// <summary>A voltage, current, power or stored energy, and by how much the two inversions differ. NaN
    /// where the equations leave it open, null for quantities that are not of one instant.</summary>
    public (double Value, double EstimatedError)? ValueOf(Measurand measurand) =>
        finer.Reading().Value(measurand) is { } value && coarser.Reading().Value(measurand) is { } other
            ? (value, Math.Abs(value - other))
            : null;
}

/// <summary>What one inversion gave.</summary>
/// <param name="Unknowns">Every unknown.</param>
/// <param name="Stored">Charges (C) and flux linkages (Wb).</param>
/// <param name="StorageRates">Their rates of change, A and V.</param>
/// <param name="Probe">The stored quantities of the probe.</param>
internal sealed record Inverted(double[] Unknowns, double[] Stored, double[] StorageRates, double[] Probe);

/// <summary>An inversion with what it takes to read it.</summary>
internal sealed record ContourReading(
    Circuit Circuit, UnknownLayout Layout, StorageLayout Storage, Inverted Of, double[] Sources)
{
    /// <summary>The unknowns as voltages and currents.</summary>
    public CircuitReading Reading() => new(
        Circuit, Layout, Storage, i => Of.Unknowns[i], [.. Of.Stored], [.. Of.StorageRates],
        part => Sources[part]);
}
