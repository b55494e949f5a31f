using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>The energy of a network's fields by its modes.</summary>
internal sealed class ModeEnergy
{
    private readonly NetworkLayout layout;
    private readonly ImmutableArray<(int Store, double Inertia)>[] rows;

    /// <summary>Takes the capacitances, inductances and mutual inductances.</summary>
    public ModeEnergy(NetworkLayout layout)
    {
        this.layout = layout;
        var mutual = MutualInductances.Of(layout.Circuit);
        rows = [.. layout.Stores.Select((part, k) => ImmutableArray.Create(
            [(k, Inertia(layout.Circuit.Parts[part])),
            .. mutual[part].Select(m => (layout.Stores.IndexOf(m.Coil), (double)m.Mutual))]))];
    }

    /// <summary>Joules at an instant: of each column alone, and what they hold only together.</summary>
    public (double[] Own, double Joint) At(ModeColumns columns)
    {
        double[][] held =
            [.. layout.Stores.Select(p => columns.Of(layout.Held(p)) ?? new double[columns.Count])];
        double[] own = [.. Enumerable.Range(0, columns.Count).Select(m => Energy(k => held[k][m]))];
        var all = held.Select(h => h.Sum()).ToArray();
        return (own, Energy(k => all[k]) - own.Sum());
    }

    /// <summary>Each part's share of the energy that a block of poles stores: by its eigenvectors, the mean
    /// over a cycle where it oscillates; vectors of poles that are not parted count alike.</summary>
    public ImmutableArray<PartShare> Shares(IntervalModel model, int block)
    {
        var shares = new double[rows.Length];
        var count = 0;
        for (var b = block; b < model.Blocks.Length; b++)
        {
            for (var j = 0; j < model.Blocks[b].Size && model.FirstAlike(b) == block; j++, count++)
            {
                AddShares(shares, [.. layout.Stores.Select(p => model.Project(layout.Held(p)).Rows[b][j])]);
            }
        }

        return [.. shares.Select((s, k) =>
            new PartShare(layout.Circuit.Parts[layout.Stores[k]].Name, s / count))];
    }

    private void AddShares(double[] shares, DoubleDoubleComplex[] vector)
    {
        var energies = vector.Select((v, k) =>
            rows[k].Sum(r => r.Inertia * (v.Conjugate * vector[r.Store]).Re.Hi)).ToArray();
        var sum = energies.Sum();
        for (var k = 0; k < shares.Length && sum > 0; k++)
        {
            shares[k] += energies[k] / sum;
        }
    }

    private static double Inertia(Part part) => part switch
    {
        Capacitor c => c.Capacitance.Nominal,
        Inductor l => l.Inductance.Nominal,
        _ => 0,
    };

    private double Energy(Func<int, double> held)
    {
        double sum = 0;
        for (var k = 0; k < rows.Length; k++)
        {
            foreach (var (store, inertia) in rows[k])
            {
                sum += held(k) * inertia * held(store) / 2;
            }
        }

        return sum;
    }
}
