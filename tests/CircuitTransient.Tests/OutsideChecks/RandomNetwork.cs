using System.Globalization;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>One two-terminal part of a random network; nodes are numbers, 0 is ground.</summary>
internal sealed record RandomPart(string Kind, string Name, int From, int To, double Value, double Stored);

/// <summary>A connected network of random parts, with a voltage and a current source and one switch: a tree
/// of resistors and capacitors, resistors and coils across it, so that nothing is impulsive.</summary>
internal sealed record RandomNetwork(IReadOnlyList<RandomPart> Parts, int Nodes, int Shorted)
{
    /// <summary>Factor on all voltage sources, initial voltages, current sources and initial
    /// currents.</summary>
    public double Drive { get; init; } = 1;

    /// <summary>Factor on all impedances at given voltages.</summary>
    public double Impedance { get; init; } = 1;

    /// <summary>Factor on all times.</summary>
    public double Time { get; init; } = 1;

    /// <summary>The only cause left, by the name of its part; null for all.</summary>
    public string? OnlyCause { get; init; }

    /// <summary>Writes a node's name.</summary>
    public Func<int, string> Node { get; init; } = k => k == 0 ? "ground" : $"n{k}";

    /// <summary>Orders the statements.</summary>
    public Func<IEnumerable<string>, IEnumerable<string>> Order { get; init; } = lines => lines;

    /// <summary>Draws a network.</summary>
    public static RandomNetwork Draw(int seed, bool withSources = true)
    {
        var random = new Random(seed);
        var nodes = random.Next(3, 7);
        var parts = new List<RandomPart>();
        for (var k = 1; k <= nodes; k++)
        {
            Add(random.Next(3) == 0 ? "capacitor" : "resistor", k, random.Next(k));
        }

        Add("capacitor", nodes, nodes + 1); // so that each kind is there
        nodes++;
        Add("resistor", nodes, 0);
        for (var k = random.Next(3, 6); k > 0; k--)
        {
            var from = random.Next(1, nodes + 1);
            Add(k % 2 == 0 ? "resistor" : "inductor", from, random.Next(from));
        }

        var resistor = parts.FindIndex(p => p.Kind == "resistor");
        if (withSources)
        {
            parts.Add(new RandomPart("voltage", "E", nodes + 1, 0, Spread(10, 400), 0));
            parts.Add(new RandomPart("resistor", "Rs", nodes + 1, 1, Spread(1, 20), 0));
            parts.Add(new RandomPart("current", "J", 0, random.Next(1, nodes + 1), Spread(0.1, 10), 0));
        }

        return new RandomNetwork(parts, nodes, resistor);

        void Add(string kind, int from, int to)
        {
            var (value, stored) = kind switch
            {
                "resistor" => (Spread(1, 1000), 0),
                "capacitor" => (Spread(1e-7, 1e-5), Math.Round(random.NextDouble() * 100, 1) + 1),
                _ => (Spread(1e-3, 0.1), Math.Round(random.NextDouble(), 3) + 0.1),
            };
            parts.Add(new RandomPart(kind, $"{char.ToUpperInvariant(kind[0])}{parts.Count}", from, to, value,
                stored));
        }

        double Spread(double low, double high) => low * Math.Pow(high / low, random.NextDouble());
    }

    /// <summary>Writes the circuit file.</summary>
    public string Text(params string[] more)
    {
        var shorted = Parts[Shorted];
        IEnumerable<string> lines =
        [
            .. Parts.Select(Line),
            $"switch S from {Node(shorted.From)} to {Node(shorted.To)} : open, closes at {N(3e-3 * Time)} s",
            .. Enumerable.Range(1, Nodes).Select(k => $"observe voltage of {Node(k)}"),
            .. more,
            $"until {N(8e-3 * Time)} s",
        ];
        return string.Join('\n', Order(lines));
    }

    private string Line(RandomPart part)
    {
        var cause = OnlyCause is null || OnlyCause == part.Name ? Drive : 0;
        var ends = $"{part.Name} from {Node(part.From)} to {Node(part.To)}";
        return part.Kind switch
        {
            "resistor" => $"resistor {ends} : {N(part.Value * Impedance)} Ω",
            "capacitor" => $"capacitor {ends} : {N(part.Value / Impedance * Time)} F, "
                + $"charged to {N(part.Stored * cause)} V",
            "inductor" => $"inductor {ends} : {N(part.Value * Impedance * Time)} H, "
                + $"carrying {N(part.Stored * cause / Impedance)} A",
            "voltage" => $"source {ends} : sine of {N(part.Value * cause)} V at {N(370 / Time)} Hz phase 20° "
                + $"+ step of {N(part.Value * cause)} V at {N(1e-3 * Time)} s",
            _ => $"source {ends} : ramp of {N(part.Value * cause / Impedance)} A "
                + $"from {N(0.5e-3 * Time)} s to {N(4e-3 * Time)} s",
        };
    }

    private static string N(double value) => value.ToString("R", CultureInfo.InvariantCulture);
}
