using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>All unknowns of a circuit at one instant, to be read as voltages and currents. The same reading
/// serves values, rates of change and impulses, since all obey the same laws.</summary>
internal sealed class CircuitReading(
    Circuit circuit, UnknownLayout layout, StorageLayout storage, Func<int, DoubleDouble> unknown,
    ImmutableArray<DoubleDouble> stored, ImmutableArray<DoubleDouble> storageRate, Func<int, double> source)
{
    /// <summary>The charges (C) and flux linkages (Wb), in the order of
    /// <see cref="StorageLayout.Parts"/>.</summary>
    public ImmutableArray<DoubleDouble> Stored { get; } = stored;

    /// <summary>A voltage, current or power; NaN where the equations leave it open. Null for a quantity that
    /// is not one of an instant.</summary>
    public double? Value(Measurand measurand) => measurand switch
    {
        VoltageBetween between => (double)Voltage(between.From, between.To),
        VoltageAcross across => (double)VoltageAcross(across.Part),
        CurrentThrough through => (double)Current(through.Part) * (through.Delivered ? -1 : 1),
        PowerIn power => (double)(PowerIn(power.Part) * (power.Delivered ? -1 : 1)),
        EnergyIn { Part: var part } energy when storage.IndexOf[part] >= 0 =>
            (double)StoredEnergy(part) * (energy.Delivered ? -1 : 1),
        _ => null,
    };

    /// <summary>Voltage from one node to another; undefined between islands.</summary>
    public DoubleDouble Voltage(int from, int to) =>
        layout.Island[from] == layout.Island[to] ? NodeVoltage(from) - NodeVoltage(to) : double.NaN;

    /// <summary>Voltage across a part.</summary>
    public DoubleDouble VoltageAcross(int part) => Voltage(circuit.Parts[part].From, circuit.Parts[part].To);

    /// <summary>Current through a part; undefined for one of several contacts in parallel.</summary>
    public DoubleDouble Current(int part) => layout.Kinds[part] switch
    {
        Conduction.Gap => 0,
        Conduction.LoopContact or Conduction.SpareContact => double.NaN,
        _ when layout.CurrentUnknown[part] is >= 0 and var current => unknown(current),
        _ => circuit.Parts[part] switch
        {
            Resistor resistor => VoltageAcross(part) / resistor.Resistance.Nominal,
            Switch @switch => VoltageAcross(part) / ResistanceOf(part, @switch),
            Capacitor => storageRate[storage.IndexOf[part]],
            CurrentSource => source(part),
            DependentSource dependent => dependent.Gain.Nominal * Control(dependent.Control),
            _ => double.NaN,
        },
    };

    /// <summary>Power into a part; a transformer passes on what it takes.</summary>
    public DoubleDouble PowerIn(int part) =>
        circuit.Parts[part] is IdealTransformer ? 0 : VoltageAcross(part) * Current(part);

    /// <summary>½ q v of a capacitor, ½ L i² of a coil.</summary>
    public DoubleDouble StoredEnergy(int part) => circuit.Parts[part] switch
    {
        Capacitor capacitor => Square(VoltageAcross(part)) * (0.5 * capacitor.Capacitance.Nominal),
        Inductor inductor => Square(Current(part)) * (0.5 * inductor.Inductance.Nominal),
        _ => 0,
    };

    /// <summary>The energy of all fields, joules, mutual parts included.</summary>
    public DoubleDouble StoredEnergy()
    {
        DoubleDouble energy = 0;
        for (var part = 0; part < circuit.Parts.Length; part++)
        {
            energy += StoredEnergy(part);
        }

        foreach (var coupling in circuit.Couplings)
        {
            energy += StorageLayout.MutualInductance(circuit, coupling)
                * Current(coupling.First) * Current(coupling.Second);
        }

        return energy;
    }

    private static DoubleDouble Square(DoubleDouble x) => x * x;

    private DoubleDouble NodeVoltage(int node) =>
        layout.NodeUnknown[node] is >= 0 and var index ? unknown(index) : 0;

    private double ResistanceOf(int part, Switch @switch) =>
        (layout.IsClosed[part] ? @switch.ClosedResistance : @switch.OpenResistance)!.Nominal;

    private DoubleDouble Control(Measurand control) => control switch
    {
        VoltageBetween between => Voltage(between.From, between.To),
        VoltageAcross across => VoltageAcross(across.Part),
        CurrentThrough through => through.Delivered ? -Current(through.Part) : Current(through.Part),
        _ => double.NaN,
    };
}
