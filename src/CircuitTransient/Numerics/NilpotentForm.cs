namespace CircuitTransient.Numerics;

/// <summary>A block whose poles are all zero but for rounding, turned so that its diagonal is exactly zero. A
/// zero pole of a chain is blurred to a root of the rounding, which would drift; the chain itself is not
/// blurred.</summary>
/// <remarks>The staircase of V. N. Kublanovskaya (1966), from memory: a null vector first, then the
/// rest.</remarks>
internal static class NilpotentForm
{
    /// <summary>The form Qᴴ T Q and Q where T is nilpotent to <paramref name="tolerance"/> (absolute); T
    /// itself and the identity where it is not.</summary>
    public static (DoubleDoubleComplexMatrix T, DoubleDoubleComplexMatrix Q) Of(
        DoubleDoubleComplexMatrix original, double tolerance)
    {
        var t = original;
        var m = t.Rows;
        if (!MayBeNilpotent(t, tolerance))
        {
            return (original, DoubleDoubleComplexMatrix.Identity(m));
        }

        var total = DoubleDoubleComplexMatrix.Identity(m);
        for (var k = 0; k < m; k++)
        {
            if (NullVector.Of(t.Part(k, k, m - k, m - k), tolerance) is not { } z)
            {
                return (original, DoubleDoubleComplexMatrix.Identity(m));
            }

            var q = Embedded(Completed(z), m);
            t = q.Adjoint().Times(t).Times(q);
            total = total.Times(q);
            for (var i = k; i < m; i++)
            {
                if (t[i, k].Magnitude > tolerance)
                {
                    return (original, DoubleDoubleComplexMatrix.Identity(m));
                }

                t[i, k] = 0;
            }
        }

        for (var i = 0; i < m; i++)
        {
            for (var j = i + 1; j < m; j++)
            {
                t[i, j] = t[i, j].Magnitude > tolerance ? t[i, j] : 0;
            }
        }

        return (t, total);
    }

    private static bool MayBeNilpotent(DoubleDoubleComplexMatrix t, double tolerance)
    {
        var size = Math.Max(t.FrobeniusNorm(), tolerance);
        var product = tolerance;
        for (var i = 0; i < t.Rows; i++)
        {
            product *= t[i, i].Magnitude / (i == 0 ? tolerance : size);
        }

        return product <= tolerance;
    }

    /// <summary>Columns: z, then unit vectors made orthogonal to it and to each other.</summary>
    private static DoubleDoubleComplexMatrix Completed(DoubleDoubleComplexMatrix z)
    {
        var m = z.Rows;
        DoubleDoubleComplexMatrix rows = new(m, m);
        rows.AddScaledRow(0, 1, z.Transposed(), 0);
        var skipped = Enumerable.Range(0, m).MaxBy(i => z[i, 0].Magnitude);
        var next = 0;
        for (var k = 0; k < m; k++)
        {
            if (k > 0)
            {
                next += next == skipped ? 1 : 0;
                rows[k, next++] = 1;
            }

            for (var pass = 0; pass < 2; pass++)
            {
                for (var l = 0; l < k; l++)
                {
                    rows.AddScaledRow(k, -InvariantBasis.Overlap(rows, l, rows, k), rows, l);
                }
            }

            var norm = DoubleDouble.Sqrt(InvariantBasis.Overlap(rows, k, rows, k).Re);
            rows.Re.Row(k).Scale(1 / norm);
            rows.Im.Row(k).Scale(1 / norm);
        }

        return rows.Transposed();
    }

    private static DoubleDoubleComplexMatrix Embedded(DoubleDoubleComplexMatrix q, int m)
    {
        var result = DoubleDoubleComplexMatrix.Identity(m);
        var k = m - q.Rows;
        for (var i = 0; i < q.Rows; i++)
        {
            for (var j = 0; j < q.Rows; j++)
            {
                result[k + i, k + j] = q[i, j];
            }
        }

        return result;
    }
}
