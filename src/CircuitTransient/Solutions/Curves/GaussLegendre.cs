namespace CircuitTransient.Solutions.Curves;

/// <summary>Nodes and weights of the rules of Gauss and Legendre with four and ten points, positive
/// half.</summary>
/// <remarks>M. Abramowitz and I. A. Stegun, Handbook of Mathematical Functions, table 25.4 (from memory;
/// tests integrate powers up to the 7th and the 19th exactly).</remarks>
internal static class GaussLegendre
{
    private static readonly Rule Four =
        new([0.3399810435848563, 0.8611363115940526], [0.6521451548625461, 0.3478548451374538]);

    private static readonly Rule Ten = new(
        [0.1488743389816312, 0.4333953941292472, 0.6794095682990244, 0.8650633666889845, 0.9739065285171717],
        [0.2955242247147529, 0.2692667193099964, 0.2190863625159820, 0.1494513491505806, 0.0666713443086881]);

    /// <summary>The rule for a panel that the fastest function crosses in so many time constants: with four
    /// points the error of a product of two functions stays below 1e-15 up to a tenth, with ten up to
    /// two.</summary>
    public static Rule For(double timeConstants) => timeConstants <= 0.1 ? Four : Ten;

    /// <summary>The positive nodes on [-1, 1] and their weights; the negative ones mirror them.</summary>
    internal sealed record Rule(double[] Nodes, double[] Weights);
}
