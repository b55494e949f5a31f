using CircuitTransient.Circuits;
using CircuitTransient.Equations;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>The energy in the fields of all capacitors and coils, and what of it impulses lose.</summary>
internal sealed class StoredEnergy(CurveBuilder curves)
{
    private readonly TransientSolution solution = curves.Solution;
    private readonly ImpulseWork impulses = new(curves.Solution);

    /// <summary>Joules in all fields at the start of a segment, or at its end.</summary>
    public double At(int segment, bool end) => Terms(segment, end).Sum();

    /// <summary>The largest of its terms: near k = 1 those of two coils and of their coupling nearly
    /// cancel.</summary>
    public double LargestTermAt(int segment, bool end) =>
        Terms(segment, end).Select(Math.Abs).DefaultIfEmpty(0).Max();

    private IEnumerable<double> Terms(int segment, bool end)
    {
        var circuit = solution.Circuit;
        for (var i = 0; i < circuit.Parts.Length; i++)
        {
            switch (circuit.Parts[i])
            {
                case Capacitor c:
                    yield return c.Capacitance.Nominal / 2
                        * Square(Value(new VoltageAcross(i), segment, end));
                    break;
                case Inductor l:
                    yield return l.Inductance.Nominal / 2
                        * Square(Value(new CurrentThrough(i), segment, end));
                    break;
            }
        }

        foreach (var coupling in circuit.Couplings)
        {
            yield return (double)MutualInductances.Mutual(circuit, coupling)
                * Value(new CurrentThrough(coupling.First), segment, end)
                * Value(new CurrentThrough(coupling.Second), segment, end);
        }
    }

    /// <summary>Joules in all fields just before t = 0.</summary>
    public double Initial()
    {
        var circuit = solution.Circuit;
        double sum = 0;
        foreach (var part in solution.Layout.Stores)
        {
            sum += circuit.Parts[part] switch
            {
                Capacitor c => c.Capacitance.Nominal / 2 * Square(Held(part)),
                Inductor l => l.Inductance.Nominal / 2 * Square(Held(part)),
                _ => 0,
            };
        }

        return sum + circuit.Couplings.Sum(k =>
            (double)MutualInductances.Mutual(circuit, k) * Held(k.First) * Held(k.Second));
    }

    /// <summary>What the impulses at a segment's start lose: stored before, less stored after, and what the
    /// sources supply within the impulses.</summary>
    public double LostAtStartOf(int segment)
    {
        var before = segment == 0 ? Initial() : At(segment - 1, end: true);
        return before - At(segment, end: false) + SuppliedInImpulse(segment);
    }

    /// <summary>Joules that sources supply within the impulses at a segment's start.</summary>
    private double SuppliedInImpulse(int segment) => -Enumerable.Range(0, solution.Circuit.Parts.Length)
        .Where(i => solution.Circuit.Parts[i] is VoltageSource or CurrentSource or DependentSource)
        .Sum(i => impulses.Of(i, segment, Segment.Total, Segment.Total));

    private double Value(Measurand quantity, int segment, bool end)
    {
        var piece = curves.Of(quantity)?.Pieces[segment];
        return piece is null ? 0 : piece.ValueAt(end ? piece.Segment.Length : 0);
    }

    private double Held(int part) => solution.Initial[solution.Layout.Stores.IndexOf(part)];

    private static double Square(double x) => x * x;
}
