using MathNet.Numerics.LinearAlgebra;

namespace CircuitTransient.Circuits;

/// <summary>Coils that are coupled with one another, directly or through others.</summary>
/// <param name="Coils">Indices of the coils.</param>
/// <param name="First">The first coupling among them.</param>
/// <param name="Least">The least stored energy, relative to what the coils store alone; no number where it
/// was not computed.</param>
internal sealed record CoilSet(int[] Coils, Coupling First, double Least);

/// <summary>Finds the sets of coils that could store negative energy.</summary>
internal static class CoilSets
{
    /// <summary>k = 1 works exactly; eigenvalues of sets of dozens are good to 1e-14.</summary>
    public const double Rounding = 1e-12;

    /// <summary>The most coils whose couplings may hang together: judging a set costs their cube.</summary>
    public const int MostCoils = 300;

    /// <summary>The sets of three coils and more that do; a coil that is missing leaves its set
    /// unjudged.</summary>
    public static IEnumerable<CoilSet> StoringNegativeEnergy(
        IReadOnlyList<Part?> parts, IReadOnlyCollection<Coupling> couplings)
    {
        foreach (var (coils, set) in Sets(parts, couplings))
        {
            if (coils.Length is > 2 and <= MostCoils && coils.All(c => parts[c] is Inductor)
                && LeastEnergy(parts, coils, set) is var least && least < -Rounding * coils.Length)
            {
                yield return new CoilSet(coils, set.First(), least);
            }
        }
    }

    /// <summary>The sets of more coils than are judged.</summary>
    public static IEnumerable<CoilSet> TooLarge(
        IReadOnlyList<Part?> parts, IReadOnlyCollection<Coupling> couplings) =>
        Sets(parts, couplings).Where(s => s.Coils.Length > MostCoils)
            .Select(s => new CoilSet(s.Coils, s.Couplings.First(), double.NaN));

    /// <summary>The sets of coils that hang together by couplings.</summary>
    public static IEnumerable<(int[] Coils, IEnumerable<Coupling> Couplings)> Sets(
        IReadOnlyList<Part?> parts, IReadOnlyCollection<Coupling> couplings)
    {
        var sets = new DisjointSets(parts.Count);
        foreach (var coupling in couplings)
        {
            sets.Join(coupling.First, coupling.Second);
        }

        return couplings.GroupBy(c => sets.Find(c.First).Root).Select(set =>
            (set.SelectMany(c => new[] { c.First, c.Second }).Distinct().Order().ToArray(),
                (IEnumerable<Coupling>)set));
    }

    // Stored energy ½ iᵀ L i is never negative if and only if the factors' matrix has no negative eigenvalue.
    private static double LeastEnergy(
        IReadOnlyList<Part?> parts, int[] coils, IEnumerable<Coupling> couplings) =>
        LeastEnergy(coils, couplings, c => Factor(parts, c));

    /// <summary>The least stored energy of coils, relative to what they store alone.</summary>
    public static double LeastEnergy(
        int[] coils, IEnumerable<Coupling> couplings, Func<Coupling, double> factorOf)
    {
        var factors = Matrix<double>.Build.DenseIdentity(coils.Length);
        foreach (var coupling in couplings)
        {
            var i = Array.BinarySearch(coils, coupling.First);
            var j = Array.BinarySearch(coils, coupling.Second);
            factors[i, j] = factors[j, i] = factorOf(coupling);
        }

        return factors.Evd(Symmetricity.Symmetric).EigenValues.Min(v => v.Real);
    }

    /// <summary>The coupling factor of two coils.</summary>
    public static double Factor(IReadOnlyList<Part?> parts, Coupling coupling) => coupling.IsFactor
        ? coupling.Value.Nominal
        : coupling.Value.Nominal / Math.Sqrt(
            ((Inductor)parts[coupling.First]!).Inductance.Nominal
            * ((Inductor)parts[coupling.Second]!).Inductance.Nominal);
}
