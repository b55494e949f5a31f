namespace CircuitTransient.Numerics;

/// <summary>One block decoupled in the Schur basis: orthonormal right vectors, the left vectors dual to them,
/// and the block in that basis.</summary>
/// <param name="T">The block, upper triangular.</param>
/// <param name="Right">The right basis, a row a vector.</param>
/// <param name="Left">The left basis, a row a vector.</param>
internal sealed record InvariantBasis(
    DoubleDoubleComplexMatrix T, DoubleDoubleComplexMatrix Right, DoubleDoubleComplexMatrix Left)
{
    /// <summary>‖P‖ of the spectral projector P = Right Left, in the Frobenius norm: that of Left, since
    /// Right is orthonormal.</summary>
    public double ProjectorNorm => Left.FrobeniusNorm();

    /// <summary>The block at places start to end − 1: X = U R by Gram–Schmidt (twice is enough: W. Kahan,
    /// B. N. Parlett), then U, R Y and R T R⁻¹.</summary>
    public static InvariantBasis Of(
        DoubleDoubleComplexMatrix t, BlockSubstitution substitution, int start, int end)
    {
        var n = t.Rows;
        var m = end - start;
        var u = substitution.X.Part(0, start, n, m).Transposed();
        DoubleDoubleComplexMatrix r = new(m, m);
        for (var j = 0; j < m; j++)
        {
            for (var pass = 0; pass < 2; pass++)
            {
                for (var k = 0; k < j; k++)
                {
                    var overlap = Overlap(u, k, u, j);
                    r[k, j] += overlap;
                    u.AddScaledRow(j, -overlap, u, k);
                }
            }

            var norm = DoubleDouble.Sqrt(Overlap(u, j, u, j).Re);
            r[j, j] = norm;
            u.Re.Row(j).Scale(1 / norm);
            u.Im.Row(j).Scale(1 / norm);
        }

        var left = r.Times(substitution.Y.Part(start, 0, m, n));
        return new(Transform(t.Part(start, start, m, m), r), u, left);
    }

    /// <summary>Σ conj(x) y.</summary>
    public static DoubleDoubleComplex Overlap(
        DoubleDoubleComplexMatrix x, int xRow, DoubleDoubleComplexMatrix y, int yRow)
    {
        var xRe = x.Re.Row(xRow);
        var xIm = x.Im.Row(xRow);
        var yRe = y.Re.Row(yRow);
        var yIm = y.Im.Row(yRow);
        return new(xRe.Dot(yRe) + xIm.Dot(yIm), xRe.Dot(yIm) - xIm.Dot(yRe));
    }

    /// <summary>S = R T R⁻¹ from S R = R T, column by column; the diagonal is kept as it is.</summary>
    private static DoubleDoubleComplexMatrix Transform(
        DoubleDoubleComplexMatrix t, DoubleDoubleComplexMatrix r)
    {
        var m = t.Rows;
        var s = r.Times(t);
        for (var i = 0; i < m; i++)
        {
            for (var j = i; j < m; j++)
            {
                for (var k = i; k < j; k++)
                {
                    s[i, j] -= s[i, k] * r[k, j];
                }

                s[i, j] /= r[j, j];
            }

            s[i, i] = t[i, i];
        }

        return s;
    }
}
