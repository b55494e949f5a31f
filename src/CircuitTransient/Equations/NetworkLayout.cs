using System.Collections.Immutable;
using CircuitTransient.Circuits;

namespace CircuitTransient.Equations;

/// <summary>Which place each unknown and each input of a circuit has in its equations, whatever its switches
/// do. Unknowns are the node voltages to the reference, then a current of every part (two of a transformer).
/// Inputs are the independent sources, then what is stored in every capacitor (a voltage) and inductor (a
/// current), then a disturbance on the right side of each law that is to have one.</summary>
public sealed class NetworkLayout
{
    private readonly ImmutableArray<int> currents;
    private readonly ImmutableArray<int> inputs;

    /// <summary>Lays out a circuit.</summary>
    public NetworkLayout(Circuit circuit)
        : this(circuit, [])
    {
    }

    /// <summary>Lays out a circuit with further inputs.</summary>
    /// <param name="circuit">The circuit.</param>
    /// <param name="disturbed">The parts whose law has an input of its own on its right side.</param>
    public NetworkLayout(Circuit circuit, ImmutableArray<int> disturbed)
    {
        Circuit = circuit;
        Disturbed = disturbed;
        var next = circuit.Nodes.Length - 1;
        var places = ImmutableArray.CreateBuilder<int>();
        foreach (var part in circuit.Parts)
        {
            places.Add(next);
            next += part is IdealTransformer ? 2 : 1;
        }

        currents = places.ToImmutable();
        UnknownCount = next;
        Sources = Indices(circuit, p => p is VoltageSource or CurrentSource);
        Stores = Indices(circuit, p => p is Capacitor or Inductor);
        var inputPlaces = new int[circuit.Parts.Length];
        Array.Fill(inputPlaces, -1);
        for (var i = 0; i < Sources.Length; i++)
        {
            inputPlaces[Sources[i]] = i;
        }

        for (var i = 0; i < Stores.Length; i++)
        {
            inputPlaces[Stores[i]] = Sources.Length + i;
        }

        inputs = [.. inputPlaces];
    }

    /// <summary>The circuit laid out.</summary>
    public Circuit Circuit { get; }

    /// <summary>The number of unknowns.</summary>
    public int UnknownCount { get; }

    /// <summary>The independent sources, as indices of parts; input k is that of <c>Sources[k]</c>.</summary>
    public ImmutableArray<int> Sources { get; }

    /// <summary>The capacitors and inductors, as indices of parts; their inputs follow those of the
    /// sources.</summary>
    public ImmutableArray<int> Stores { get; }

    /// <summary>The parts whose laws have a disturbance; their inputs come last.</summary>
    public ImmutableArray<int> Disturbed { get; }

    /// <summary>The number of inputs.</summary>
    public int InputCount => Sources.Length + Stores.Length + Disturbed.Length;

    /// <summary>The unknown that is a node's voltage; −1 for the reference.</summary>
    public static int Voltage(int node) => node - 1;

    /// <summary>The unknown that is a part's current (a transformer's primary current).</summary>
    public int Current(int part) => currents[part];

    /// <summary>The unknown that is a transformer's secondary current.</summary>
    public int SecondaryCurrent(int part) => currents[part] + 1;

    /// <summary>The input of an independent source, or of what a capacitor or inductor stores.</summary>
    public int Input(int part) => inputs[part];

    /// <summary>The input that disturbs a part's law; −1 where none does.</summary>
    public int Disturbance(int part)
    {
        var place = Disturbed.IndexOf(part);
        return place < 0 ? -1 : Sources.Length + Stores.Length + place;
    }

    /// <summary>What a part stores by: a capacitor's voltage, a coil's current.</summary>
    public Measurand Held(int part) =>
        Circuit.Parts[part] is Capacitor ? new VoltageAcross(part) : new CurrentThrough(part);

    private static ImmutableArray<int> Indices(Circuit circuit, Func<Part, bool> isWanted) =>
        [.. Enumerable.Range(0, circuit.Parts.Length).Where(i => isWanted(circuit.Parts[i]))];
}
