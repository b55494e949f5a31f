namespace CircuitTransient.Numerics;

/// <summary>The complex Schur form of a real matrix, A = Z T Zᴴ: T upper triangular with complex pairs as
/// exact conjugates, and Z unitary.</summary>
/// <param name="T">The triangle, overwritten by reordering.</param>
/// <param name="Vectors">Row k is the k-th column of Z, not conjugated.</param>
public sealed record ComplexSchur(DoubleDoubleComplexMatrix T, DoubleDoubleComplexMatrix Vectors)
{
    /// <summary>The complex form of a real one, each pair split by a rotation, the pole of positive imaginary
    /// part first. A block of order two whose couplings are both at most <paramref name="negligible"/> is two
    /// real poles that rounding has turned into a pair.</summary>
    public static ComplexSchur Of(RealSchur real, double negligible = 0)
    {
        ArgumentNullException.ThrowIfNull(real);
        ComplexSchur schur = new(
            DoubleDoubleComplexMatrix.From(real.T.Copy()),
            DoubleDoubleComplexMatrix.From(real.TransposedQ.Copy()));
        for (var k = 0; k + 1 < schur.T.Rows; k++)
        {
            var below = schur.T[k + 1, k].Magnitude;
            if (below > 0 && Math.Max(below, schur.T[k, k + 1].Magnitude) <= negligible)
            {
                schur.T[k + 1, k] = 0;
            }
            else if (below > 0)
            {
                schur.SplitPair(k);
            }
        }

        return schur;
    }

    /// <summary>A copy, to be reordered by itself.</summary>
    public ComplexSchur Copy() => new(T.Copy(), Vectors.Copy());

    /// <summary>Exchanges the neighbours k and k + 1 on the diagonal. Equal ones are exchanged only where
    /// their coupling is at most <paramref name="negligible"/>; a chain of equal poles has no other
    /// order.</summary>
    public void Swap(int k, double negligible = 0)
    {
        var first = T[k, k];
        var second = T[k + 1, k + 1];
        var coupling = T[k, k + 1];
        var gap = second - first;
        if (gap.IsZero && coupling.Magnitude > negligible)
        {
            return;
        }

        var rotation = gap.IsZero ? new(0, 1) : ComplexRotation.Towards(coupling, gap);
        rotation.Apply(this, k);
        SetDiagonal(k, second, first);
    }

    private void SplitPair(int k)
    {
        var a = T[k, k].Re;
        var b = T[k, k + 1].Re;
        var c = T[k + 1, k].Re;
        var d = T[k + 1, k + 1].Re;
        var p = (a - d) * 0.5;
        var scale = Math.Max(Math.Abs(p.Hi), Math.Max(Math.Abs(b.Hi), Math.Abs(c.Hi)));
        var square = (p / scale * p) + (b / scale * c);
        var frequency = DoubleDouble.Sqrt(-square) * DoubleDouble.Sqrt(scale);
        DoubleDoubleComplex pole = new((a + d) * 0.5, frequency);
        var rotation = Math.Abs(b.Hi) >= Math.Abs(c.Hi)
            ? ComplexRotation.Towards(b, pole - a)
            : ComplexRotation.Towards(pole - d, c);
        rotation.Apply(this, k);
        SetDiagonal(k, pole, pole.Conjugate);
    }

    private void SetDiagonal(int k, DoubleDoubleComplex first, DoubleDoubleComplex second)
    {
        T[k, k] = first;
        T[k + 1, k + 1] = second;
        T[k + 1, k] = 0;
    }
}
