using CircuitTransient.Numerics;

namespace CircuitTransient.Circuits;

/// <summary>Coils whose currents do not sum to zero where only coils, current sources and open contacts meet.
/// Each loop keeps its flux while they share it: L (i − i₀) is the difference of the volt-seconds of the
/// places a coil joins.</summary>
internal sealed class StoredCurrents
{
    private const int MostShared = 200; // unknowns: a dense elimination of more would be felt

    private readonly IReadOnlyList<Part?> parts;
    private readonly int[] carriers; // indices of coils and current sources
    private readonly (int From, int To)[] edges;
    private readonly IReadOnlyCollection<Coupling> couplings;
    private readonly int nodes;

    /// <summary>All parts but coils, current sources and open contacts tie nodes to one place.</summary>
    public StoredCurrents(IReadOnlyList<Part?> parts, int nodes, IReadOnlyCollection<Coupling> couplings)
    {
        this.nodes = nodes;
        this.couplings = couplings;
        this.parts = parts;
        var tied = new DisjointSets(nodes);
        foreach (var part in parts.OfType<Part>())
        {
            var isGap = part is Switch { StartsClosed: false, OpenResistance: null } contact
                && !contact.ActsAtStart();
            if (part is not (Inductor or CurrentSource) && !isGap)
            {
                tied.Join(part.From, part.To);
            }

            if (part is IdealTransformer t)
            {
                tied.Join(t.SecondaryFrom, t.SecondaryTo);
                tied.Join(t.From, t.SecondaryFrom); // windings tie their currents together
            }
        }

        carriers = [.. Enumerable.Range(0, parts.Count).Where(p => parts[p] is Inductor or CurrentSource)];
        edges = [.. carriers.Select(p => (tied.Find(parts[p]!.From).Root, tied.Find(parts[p]!.To).Root))];
    }

    /// <summary>Each set of coils that share a flux at once.</summary>
    public IEnumerable<Contradiction> Contradictions() =>
        Enumerable.Range(0, edges.Length) is var all && all.Any(IsStated) && IsContradictory(all)
            ? EdgeBlocks.Of(nodes, edges).Where(b => b.Any(IsStated) && IsContradictory(b)).Select(Shared)
            : [];

    private bool IsStated(int carrier) => parts[carriers[carrier]] is Inductor { InitialCurrent: not null };

    private double Stated(int carrier) => parts[carriers[carrier]] switch
    {
        Inductor coil => coil.InitialCurrent?.Nominal ?? 0,
        CurrentSource source => source.Wave.AtStart(),
        var other => throw new System.Diagnostics.UnreachableException($"no current of {other}"),
    };

    private bool IsContradictory(IEnumerable<int> block)
    {
        var sums = new Dictionary<int, (double Sum, double Largest)>();
        foreach (var c in block.Where(c => edges[c].From != edges[c].To))
        {
            Add(edges[c].From, Stated(c));
            Add(edges[c].To, -Stated(c));
        }

        return sums.Values.Any(s => Math.Abs(s.Sum) > HeldQuantity.Rounding * s.Largest);

        void Add(int node, double current)
        {
            var (sum, largest) = sums.GetValueOrDefault(node);
            sums[node] = (sum + current, Math.Max(largest, Math.Abs(current)));
        }
    }

    private Contradiction Shared(int[] block)
    {
        int[] met = [.. block.SelectMany(c => new[] { edges[c].From, edges[c].To }).Distinct()];
        int[] coils = [.. block.Where(c => parts[carriers[c]] is Inductor)];
        var isReached = coils.Length > 1 && couplings.Any(c => IsAmong(c.First) != IsAmong(c.Second));
        var after = isReached || coils.Length + met.Length > MostShared
            ? null
            : Currents(coils, [.. block.Except(coils)], met);
        return new Contradiction([.. coils.Select((c, k) => new HeldQuantity(
            parts[carriers[c]]!, Stated(c), IsStated(c), after?[k]))]);

        bool IsAmong(int part) => coils.Any(c => carriers[c] == part);
    }

    private Inductor Coil(int carrier) => (Inductor)parts[carriers[carrier]]!;

    /// <summary>The coils' currents just after the start; null where the equations leave them open.</summary>
    private double[]? Currents(int[] coils, int[] sources, int[] met)
    {
        var index = met.Select((node, i) => (node, i)).ToDictionary(n => n.node, n => coils.Length + n.i - 1);
        var n = coils.Length + met.Length - 1;
        var (a, b) = (new double[n * n], new double[n]);
        var inductance = Inductances(coils);
        for (var k = 0; k < coils.Length; k++)
        {
            for (var m = 0; m < coils.Length; m++)
            {
                a[(k * n) + m] = inductance[k, m];
                b[k] += inductance[k, m] * Stated(coils[m]);
            }

            foreach (var (node, sign) in Ends(coils[k]))
            {
                a[(k * n) + node] -= sign;
                a[(node * n) + k] += sign;
            }
        }

        foreach (var source in sources)
        {
            foreach (var (node, sign) in Ends(source))
            {
                b[node] -= sign * Stated(source);
            }
        }

        return RealElimination.Solve(a, n, b, 1) ? b[..coils.Length] : null;

        IEnumerable<(int Node, int Sign)> Ends(int carrier) =>
            new[] { (index[edges[carrier].From], 1), (index[edges[carrier].To], -1) }
                .Where(e => e.Item1 >= coils.Length && edges[carrier].From != edges[carrier].To);
    }

    /// <summary>Self and mutual inductances over the largest.</summary>
    private double[,] Inductances(int[] coils)
    {
        var result = new double[coils.Length, coils.Length];
        var largest = coils.Max(c => Coil(c).Inductance.Nominal);
        for (var k = 0; k < coils.Length; k++)
        {
            result[k, k] = Coil(coils[k]).Inductance.Nominal / largest;
        }

        foreach (var coupling in couplings)
        {
            var first = Array.FindIndex(coils, c => carriers[c] == coupling.First);
            var second = Array.FindIndex(coils, c => carriers[c] == coupling.Second);
            if (first >= 0 && second >= 0)
            {
                result[first, second] = result[second, first] = CoilSets.Factor(parts, coupling)
                    * Math.Sqrt(result[first, first] * result[second, second]);
            }
        }

        return result;
    }
}
