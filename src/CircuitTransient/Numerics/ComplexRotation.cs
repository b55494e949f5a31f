namespace CircuitTransient.Numerics;

/// <summary>A unitary change of two neighbouring coordinates whose first column is (a, b).</summary>
/// <param name="A">First entry.</param>
/// <param name="B">Second entry; |A|² + |B|² = 1.</param>
internal readonly record struct ComplexRotation(DoubleDoubleComplex A, DoubleDoubleComplex B)
{
    /// <summary>The rotation whose first column is along (x, y), not both zero.</summary>
    public static ComplexRotation Towards(DoubleDoubleComplex x, DoubleDoubleComplex y)
    {
        var size = DoubleDouble.Hypotenuse(DoubleDoubleComplex.Abs(x), DoubleDoubleComplex.Abs(y));
        return new(x / size, y / size);
    }

    /// <summary>T = Gᴴ T G on rows and columns k, k + 1 of a triangular T, and the Schur vectors with
    /// it.</summary>
    public void Apply(ComplexSchur schur, int k)
    {
        var t = schur.T;
        for (var i = 0; i <= k + 1; i++)
        {
            (t[i, k], t[i, k + 1]) = Turn(t[i, k], t[i, k + 1]);
        }

        ComplexRotation conjugate = new(A.Conjugate, B.Conjugate);
        for (var j = k; j < t.Columns; j++)
        {
            (t[k, j], t[k + 1, j]) = conjugate.Turn(t[k, j], t[k + 1, j]);
        }

        var z = schur.Vectors;
        for (var j = 0; j < z.Columns; j++)
        {
            (z[k, j], z[k + 1, j]) = Turn(z[k, j], z[k + 1, j]);
        }
    }

    private (DoubleDoubleComplex X, DoubleDoubleComplex Y) Turn(
        DoubleDoubleComplex x, DoubleDoubleComplex y) =>
        ((A * x) + (B * y), (A.Conjugate * y) - (B.Conjugate * x));
}
