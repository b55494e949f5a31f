namespace CircuitTransient.Numerics;

/// <summary>A block whose poles are all zero but for rounding, turned so that its diagonal is exactly zero. A
/// zero pole of a chain is blurred to a root of the rounding, which would drift; the chain itself is not
/// blurred.</summary>
/// <remarks>The staircase of V. N. Kublanovskaya (1966), from memory: a null vector first, then the
/// rest.</remarks>
internal static class NilpotentForm
{
    // inverse iteration gains the whole gap to the next singular value each time
    private const int Refinements = 3;

    /// <summary>The turned basis where the block is nilpotent to <paramref name="tolerance"/> (absolute), the
    /// same one where it is not.</summary>
    public static InvariantBasis Of(InvariantBasis basis, double tolerance)
    {
        DoubleDoubleComplexMatrix t = basis.T;
        int m = t.Rows;
        if (!MayBeNilpotent(t, tolerance))
        {
            return basis;
        }

        DoubleDoubleComplexMatrix total = DoubleDoubleComplexMatrix.Identity(m);
        for (int k = 0; k < m; k++)
        {
            DoubleDoubleComplexMatrix q = Embedded(NullDirection(t.Part(k, k, m - k, m - k), tolerance), m);
            t = q.Adjoint().Times(t).Times(q);
            total = total.Times(q);
            for (int i = k; i < m; i++)
            {
                if (t[i, k].Magnitude > tolerance)
                {
                    return basis;
                }

                t[i, k] = 0;
            }
        }

        for (int i = 0; i < m; i++)
        {
            for (int j = i + 1; j < m; j++)
            {
                t[i, j] = t[i, j].Magnitude > tolerance ? t[i, j] : 0;
            }
        }

        return basis.Turn(total, t);
    }

    private static bool MayBeNilpotent(DoubleDoubleComplexMatrix t, double tolerance)
    {
        double size = Math.Max(t.FrobeniusNorm(), tolerance);
        double product = tolerance;
        for (int i = 0; i < t.Rows; i++)
        {
            product *= t[i, i].Magnitude / (i == 0 ? tolerance : size);
        }

        return product <= tolerance;
    }

    /// <summary>A unitary matrix whose first column is the direction that T shrinks most.</summary>
    private static DoubleDoubleComplexMatrix NullDirection(DoubleDoubleComplexMatrix t, double tolerance)
    {
        int m = t.Rows;
        DoubleDoubleComplexMatrix shifted = t.Copy();
        for (int i = 0; i < m; i++)
        {
            shifted[i, i] += tolerance * 1e-6; // only to keep the factors regular
        }

        ComplexLuFactorization right = ComplexLuFactorization.Of(shifted);
        ComplexLuFactorization left = ComplexLuFactorization.Of(shifted.Adjoint());
        DoubleDoubleComplexMatrix z = new(m, 1);
        for (int i = 0; i < m; i++)
        {
            z[i, 0] = 1;
        }

        for (int k = 0; k < Refinements; k++)
        {
            z = right.Solve(Normalised(left.Solve(z)));
            z = Normalised(z);
        }

        return Completed(z);
    }

    private static DoubleDoubleComplexMatrix Normalised(DoubleDoubleComplexMatrix z)
    {
        DoubleDoubleComplexMatrix result = z.Copy();
        DoubleDouble largest = z.FrobeniusNorm();
        for (int i = 0; i < z.Rows; i++)
        {
            result[i, 0] /= largest;
        }

        return result;
    }

    /// <summary>Columns: z, then unit vectors made orthogonal to it and to each other.</summary>
    private static DoubleDoubleComplexMatrix Completed(DoubleDoubleComplexMatrix z)
    {
        int m = z.Rows;
        DoubleDoubleComplexMatrix rows = new(m, m);
        rows.AddScaledRow(0, 1, z.Transposed(), 0);
        int skipped = Enumerable.Range(0, m).MaxBy(i => z[i, 0].Magnitude);
        int next = 0;
        for (int k = 0; k < m; k++)
        {
            if (k > 0)
            {
                next += next == skipped ? 1 : 0;
                rows[k, next++] = 1;
            }

            for (int pass = 0; pass < 2; pass++)
            {
                for (int l = 0; l < k; l++)
                {
                    rows.AddScaledRow(k, -InvariantBasis.Overlap(rows, l, rows, k), rows, l);
                }
            }

            DoubleDouble norm = DoubleDouble.Sqrt(InvariantBasis.Overlap(rows, k, rows, k).Re);
            rows.Re.Row(k).Scale(1 / norm);
            rows.Im.Row(k).Scale(1 / norm);
        }

        return rows.Transposed();
    }

    private static DoubleDoubleComplexMatrix Embedded(DoubleDoubleComplexMatrix q, int m)
    {
        DoubleDoubleComplexMatrix result = DoubleDoubleComplexMatrix.Identity(m);
        int k = m - q.Rows;
        for (int i = 0; i < q.Rows; i++)
        {
            for (int j = 0; j < q.Rows; j++)
            {
                result[k + i, k + j] = q[i, j];
            }
        }

        return result;
    }
}
