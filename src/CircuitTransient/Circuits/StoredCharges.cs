using CircuitTransient.Numerics;

namespace CircuitTransient.Circuits;

/// <summary>Capacitors whose voltages do not sum to zero round a loop of sources, closed contacts and
/// capacitors. Each node keeps its charge while they share it: of all voltages that fit, those with the least
/// Σ C (v − v₀)², since its slope by a node's potential is the charge that came to that node.</summary>
internal sealed class StoredCharges
{
    private const int MostShared = 200; // nodes: a dense elimination of more would be felt

    private readonly Capacitor[] capacitors;
    private readonly double[] offset;
    private readonly (int From, int To)[] edges;
    private readonly int nodes;

    /// <summary>Sources and closed contacts tie nodes together.</summary>
    public StoredCharges(IReadOnlyList<Part?> parts, int nodes)
    {
        this.nodes = nodes;
        var tied = new DisjointSets(nodes);
        foreach (var part in parts)
        {
            switch (part)
            {
                case Switch { StartsClosed: true, ClosedResistance: null } contact
                    when !contact.ActsAtStart():
                    tied.Join(contact.From, contact.To);
                    break;
                case VoltageSource source:
                    tied.Join(source.From, source.To, source.Wave.AtStart());
                    break;
                default:
                    break;
            }
        }

        capacitors = [.. parts.OfType<Capacitor>()];
        edges = [.. capacitors.Select(c => (tied.Find(c.From).Root, tied.Find(c.To).Root))];
        offset = [.. capacitors.Select(c => tied.Find(c.From).Height - tied.Find(c.To).Height)];
    }

    /// <summary>Each set of capacitors that share a charge at once.</summary>
    public IEnumerable<Contradiction> Contradictions() =>
        Enumerable.Range(0, edges.Length) is var all && all.Any(IsStated) && IsContradictory(all)
            ? EdgeBlocks.Of(nodes, edges).Where(b => b.Any(IsStated) && IsContradictory(b)).Select(Shared)
            : [];

    private bool IsStated(int capacitor) => capacitors[capacitor].InitialVoltage is not null;

    private double Stated(int capacitor) => capacitors[capacitor].InitialVoltage?.Nominal ?? 0;

    private bool IsContradictory(IEnumerable<int> block)
    {
        var sets = new DisjointSets(nodes);
        foreach (var c in block)
        {
            if (!sets.Join(edges[c].From, edges[c].To, Stated(c) - offset[c]))
            {
                var imposed = sets.Find(edges[c].From).Height - sets.Find(edges[c].To).Height + offset[c];
                if (Math.Abs(imposed - Stated(c))
                    > HeldQuantity.Rounding * Math.Max(Math.Abs(imposed), Math.Abs(Stated(c))))
                {
                    return true;
                }
            }
        }

        return false;
    }

    private Contradiction Shared(int[] block)
    {
        int[] met = [.. block.SelectMany(c => new[] { edges[c].From, edges[c].To }).Distinct()];
        var potential = met.Length > MostShared ? null : Potentials(block, met);
        return new Contradiction([.. block.Select(c => new HeldQuantity(
            capacitors[c], Stated(c), IsStated(c),
            potential is null ? null
                : potential[edges[c].From] - potential[edges[c].To] + offset[c]))]);
    }

    /// <summary>The potentials just after the start, the first node's being zero.</summary>
    private Dictionary<int, double>? Potentials(int[] block, int[] met)
    {
        var index = met.Select((node, i) => (node, i)).ToDictionary(n => n.node, n => n.i - 1);
        var n = met.Length - 1;
        var (a, b) = (new double[n * n], new double[n]);
        var largest = block.Max(c => capacitors[c].Capacitance.Nominal);
        foreach (var c in block)
        {
            var (from, to) = (index[edges[c].From], index[edges[c].To]);
            var weight = capacitors[c].Capacitance.Nominal / largest;
            foreach (var (row, other, sign) in new[] { (from, to, 1), (to, from, -1) })
            {
                if (row < 0 || row == other)
                {
                    continue;
                }

                a[(row * n) + row] += weight;
                b[row] += sign * weight * (Stated(c) - offset[c]);
                if (other >= 0)
                {
                    a[(row * n) + other] -= weight;
                }
            }
        }

        return RealElimination.Solve(a, n, b, 1)
            ? index.ToDictionary(i => i.Key, i => i.Value < 0 ? 0 : b[i.Value])
            : null;
    }
}
