using System.Globalization;
using CircuitTransient.Circuits;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Overlays;

/// <summary>A place where a stray part may sit.</summary>
/// <param name="From">First node.</param>
/// <param name="To">Second node, for a capacitance between the two.</param>
/// <param name="Series">Index of the part that an inductance is in series with; −1 for a capacitance.</param>
internal sealed record StrayPlace(int From, int To, int Series = -1)
{
    /// <summary>The circuit with the stray in place.</summary>
    public Circuit Put(Circuit circuit, double value)
    {
        if (Series < 0)
        {
            return circuit with
            {
                Parts = circuit.Parts.Add(new Capacitor(value, null)
                {
                    Name = "stray",
                    From = From,
                    To = To,
                    Span = circuit.Parts[0].Span,
                }),
            };
        }

        var part = circuit.Parts[Series];
        var node = circuit.Nodes.Length;
        var moved = part with { From = node };
        return circuit with
        {
            Nodes = circuit.Nodes.Add("stray"),
            Parts = circuit.Parts.SetItem(Series, moved).Add(new Inductor(value, CurrentOf(part))
            {
                Name = "stray",
                From = part.From,
                To = node,
                Span = part.Span,
            }),
        };
    }

    /// <summary>The stray in words: <c>218 pF from x to pad</c>.</summary>
    public string Words(Circuit circuit, double value) => Series < 0
        ? $"{Written(value, "F")} from {circuit.Nodes[From]} to {circuit.Nodes[To]}"
        : $"{Written(value, "H")} in series with {circuit.Parts[Series].Name}";

    /// <summary>The stray as a statement; of an inductance, the part is to be moved onto the new
    /// node.</summary>
    public string Statement(Circuit circuit, double value) => Series < 0
        ? $"capacitor Cstray from {Name(circuit.Nodes[From])} to {Name(circuit.Nodes[To])} : "
            + Written(value, "F")
        : $"inductor Lstray from {Name(circuit.Nodes[circuit.Parts[Series].From])} to stray : "
            + Written(value, "H");

    // A coil that carries something at the start goes on carrying it through what is in series with it.
    private static Quantity? CurrentOf(Part part) => part is Inductor coil ? coil.InitialCurrent : null;

    private static string Name(string name) =>
        name.All(c => char.IsLetterOrDigit(c) || c == '_') ? name : $"\"{name}\"";

    private static string Written(double value, string unit) =>
        EngineeringNumber.Format(double.Parse(
            value.ToString("E2", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture), unit, 3);
}

/// <summary>The places of a circuit where strays sit: between nodes that parts join, to the reference, and in
/// series with parts.</summary>
internal static class StrayCandidates
{
    private const int MostPlaces = 80;

    public static List<StrayPlace> Of(Circuit circuit)
    {
        var places = new List<StrayPlace>();
        var pairs = new HashSet<(int, int)>();
        foreach (var source in circuit.Parts.OfType<VoltageSource>())
        {
            pairs.Add(Ordered(source.From, source.To)); // a capacitance across it changes nothing
        }

        for (var node = 1; node < circuit.Nodes.Length; node++)
        {
            Add(node, 0);
        }

        foreach (var part in circuit.Parts)
        {
            Add(part.From, part.To);
        }

        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            if (circuit.Parts[i] is Resistor or Capacitor or Inductor or VoltageSource or Switch)
            {
                places.Add(new StrayPlace(circuit.Parts[i].From, circuit.Parts[i].To, i));
            }
        }

        return places.Count > MostPlaces ? places[..MostPlaces] : places;

        void Add(int from, int to)
        {
            if (pairs.Add(Ordered(from, to)))
            {
                places.Add(new StrayPlace(from, to));
            }
        }
    }

    private static (int, int) Ordered(int a, int b) => a < b ? (a, b) : (b, a);
}
