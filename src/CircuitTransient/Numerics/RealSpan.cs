namespace CircuitTransient.Numerics;

/// <summary>A real basis of a space of complex vectors that is closed under conjugation.</summary>
internal static class RealSpan
{
    /// <summary>As many orthonormal real rows as there are complex ones, from their real and imaginary parts,
    /// the largest remainder first (Gram–Schmidt, twice each).</summary>
    public static DoubleDoubleMatrix Of(DoubleDoubleComplexMatrix vectors)
    {
        var m = vectors.Rows;
        DoubleDoubleMatrix rest = new(2 * m, vectors.Columns);
        for (var i = 0; i < m; i++)
        {
            rest.Row(i).CopyFrom(vectors.Re.Row(i));
            rest.Row(m + i).CopyFrom(vectors.Im.Row(i));
        }

        DoubleDoubleMatrix basis = new(m, vectors.Columns);
        for (var k = 0; k < m; k++)
        {
            var largest = Enumerable.Range(0, 2 * m).MaxBy(i => rest.Row(i).SumOfSquares().Hi);
            var row = basis.Row(k);
            row.CopyFrom(rest.Row(largest));
            RemoveSpan(basis, k, row);
            row.Scale(1 / DoubleDouble.Sqrt(row.SumOfSquares()));
            for (var i = 0; i < 2 * m; i++)
            {
                rest.Row(i).AddScaled(-row.Dot(rest.Row(i)), row);
            }
        }

        return basis;
    }

    private static void RemoveSpan(DoubleDoubleMatrix basis, int count, DoubleDoubleRow row)
    {
        for (var pass = 0; pass < 2; pass++)
        {
            for (var k = 0; k < count; k++)
            {
                row.AddScaled(-row.Dot(basis.Row(k)), basis.Row(k));
            }
        }
    }
}
