using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.ClosedForms;

/// <summary>An amplitude times the divided difference of e^(p τ) over some nodes.</summary>
/// <param name="Amplitude">The amplitude.</param>
/// <param name="Nodes">The nodes.</param>
/// <param name="PoleCount">How many of the first nodes are poles of the network.</param>
internal sealed record NewtonTerm(
    DoubleDoubleComplex Amplitude, ImmutableArray<DoubleDoubleComplex> Nodes, int PoleCount)
{
    /// <summary>A bound of the term's magnitude for 0 ≤ τ ≤ length: of k nodes the divided difference stays
    /// below τᵏ⁻¹/(k − 1)! e^(σ τ), σ the rightmost real part (the mean value theorem).</summary>
    public double Bound(double length) => Amplitude.Magnitude * BoundOf(Nodes, length);

    private static double BoundOf(ImmutableArray<DoubleDoubleComplex> nodes, double length)
    {
        var rightmost = nodes.Max(p => p.Re.Hi);
        var n = nodes.Length - 1;
        var tau = rightmost < 0 ? Math.Min(length, n / -rightmost) : length;
        double power = 1;
        for (var k = 1; k <= n; k++)
        {
            power *= tau / k;
        }

        return power * Math.Exp(rightmost * tau);
    }
}

/// <summary>Writes a mode's functions, the elements of exp(T τ), in Newton's form: exp(T τ) = Σₖ e_τ[x₁ … xₖ]
/// (T − x₁)…(T − xₖ₋₁), exact with the diagonal of T as nodes (N. J. Higham, "Functions of Matrices", 2008,
/// section 1.2, from memory).</summary>
internal static class NewtonTerms
{
    private const double Coincidence = 1e-12; // of the terms: what taking near poles for one may cost
    private const int Further = 3; // terms past the last, which tell what that costs

    /// <summary>The terms of one mode; poles that coincide to working accuracy are written as one.</summary>
    public static ImmutableArray<NewtonTerm> Of(
        Mode mode, Func<int, Complex> coefficient, double length)
    {
        DoubleDoubleComplex[] nodes = [.. Enumerable.Range(0, mode.Order).Select(i => mode.Triangle[i, i])];
        if (mode.Kind == ModeKind.Forced || mode.Order == 1)
        {
            return Terms(mode, coefficient, nodes, mode.Kind == ModeKind.Forced ? 0 : 1);
        }

        // A lone pole beside a source's exponent goes to that, a block to its mean.
        var place = mode.Rows == 1 ? nodes[1] : Mean(nodes.AsSpan(0, mode.Rows));
        DoubleDoubleComplex[] together =
        [
            .. Enumerable.Repeat(place, mode.Rows), .. nodes[mode.Rows..],
            .. Enumerable.Repeat(place, Further),
        ];
        var merged = Terms(mode, coefficient, together, mode.Rows);
        var cost = merged.Skip(mode.Order).Sum(t => t.Bound(length));
        var whole = merged.Take(mode.Order).Sum(t => t.Bound(length));
        return cost <= Coincidence * whole
            ? merged[..mode.Order]
            : Terms(mode, coefficient, nodes, mode.Rows);
    }

    private static DoubleDoubleComplex Mean(ReadOnlySpan<DoubleDoubleComplex> poles)
    {
        var mean = DoubleDoubleComplex.Zero;
        foreach (var pole in poles)
        {
            mean += pole / (DoubleDouble)poles.Length;
        }

        return mean;
    }

    private static ImmutableArray<NewtonTerm> Terms(
        Mode mode, Func<int, Complex> coefficient, DoubleDoubleComplex[] nodes, int poles)
    {
        var t = DoubleDoubleComplexMatrix.From(mode.Triangle);
        var product = DoubleDoubleComplexMatrix.Identity(mode.Order);
        var terms = ImmutableArray.CreateBuilder<NewtonTerm>(nodes.Length);
        for (var k = 0; k < nodes.Length; k++)
        {
            var amplitude = DoubleDoubleComplex.Zero;
            for (var i = 0; i < mode.Rows; i++)
            {
                for (var j = i; j < mode.Order; j++)
                {
                    amplitude += product[i, j] * (DoubleDoubleComplex)coefficient(mode.Carrier(i, j));
                }
            }

            terms.Add(new NewtonTerm(amplitude, [.. nodes[..(k + 1)]], Math.Min(poles, k + 1)));
            var shifted = t.Copy();
            for (var i = 0; i < mode.Order; i++)
            {
                shifted[i, i] -= nodes[k];
            }

            product = product.Times(shifted);
        }

        return terms.ToImmutable();
    }
}
