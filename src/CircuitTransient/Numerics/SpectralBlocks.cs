using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

/// <summary>A real matrix taken apart into invariant blocks as small as good conditioning allows: simple
/// poles stand alone, poles too nearly defective to be parted stay together.</summary>
/// <param name="Order">Rows of the matrix.</param>
/// <param name="Blocks">The blocks; of a conjugate pair of blocks the one with positive imaginary
/// parts.</param>
public sealed record SpectralBlocks(int Order, ImmutableArray<SpectralBlock> Blocks)
{
    /// <summary>Takes a square matrix of finite entries apart.</summary>
    public static SpectralBlocks Of(DoubleDoubleMatrix a)
    {
        ArgumentNullException.ThrowIfNull(a);
        Shape.MustAgree(a.Rows, a.Columns);
        Balancing balancing = Balancing.Of(a);
        double norm = balancing.Matrix.FrobeniusNorm();
        ComplexSchur schur = ComplexSchur.Of(RealSchur.Of(balancing.Matrix));
        ClearZeroPoles(schur.T, BlockSubstitution.ZeroPole * norm);
        IReadOnlyList<(InvariantBasis Basis, bool IsReal)> clusters = PoleClusters.Of(schur, norm);

        DoubleDoubleComplexMatrix conjugate = schur.Vectors.Copy();
        conjugate.Im.Negate();
        return new(
            a.Rows,
            [
                .. clusters.Select(cluster => Finished(
                    NilpotentForm.Of(cluster.Basis, BlockSubstitution.ZeroPole * norm),
                    cluster.IsReal,
                    schur.Vectors,
                    conjugate,
                    balancing.Exponents)),
            ]);
    }

    private static void ClearZeroPoles(DoubleDoubleComplexMatrix t, double limit)
    {
        for (int i = 0; i < t.Rows; i++)
        {
            t[i, i] = t[i, i].Magnitude <= limit ? 0 : t[i, i];
        }
    }

    /// <summary>From the Schur basis of the balanced matrix to the coordinates of A.</summary>
    private static SpectralBlock Finished(
        InvariantBasis basis,
        bool isReal,
        DoubleDoubleComplexMatrix z,
        DoubleDoubleComplexMatrix conjugateZ,
        IReadOnlyList<int> exponents)
    {
        DoubleDoubleComplexMatrix v = basis.Right.Times(z);
        DoubleDoubleComplexMatrix w = basis.Left.Times(conjugateZ);
        if (basis.T.Rows == 1)
        {
            Normalise(v, w, isReal);
        }

        for (int j = 0; j < exponents.Count; j++)
        {
            for (int i = 0; i < basis.T.Rows; i++)
            {
                v[i, j] = v[i, j].ScaleByPowerOfTwo(exponents[j]);
                w[i, j] = w[i, j].ScaleByPowerOfTwo(-exponents[j]);
            }
        }

        return new(isReal, basis.T, v.Transposed(), w, basis.ProjectorNorm);
    }

    /// <summary>Turns the phase of a single vector so that its largest entry is positive; a real pole's
    /// vectors are then real, and the rounding in their imaginary parts is dropped.</summary>
    private static void Normalise(DoubleDoubleComplexMatrix v, DoubleDoubleComplexMatrix w, bool isReal)
    {
        int largest = Enumerable.Range(0, v.Columns).MaxBy(j => v[0, j].Magnitude);
        DoubleDoubleComplex phase = v[0, largest].Conjugate / DoubleDoubleComplex.Abs(v[0, largest]);
        for (int j = 0; j < v.Columns; j++)
        {
            v[0, j] *= phase;
            w[0, j] *= phase.Conjugate;
            if (isReal)
            {
                v[0, j] = v[0, j].Re;
                w[0, j] = w[0, j].Re;
            }
        }
    }
}
