namespace CircuitTransient.Numerics;

/// <summary>P A = L U of a square complex matrix, with row exchanges for the largest pivot.</summary>
public sealed class ComplexLuFactorization
{
    private readonly DoubleDoubleComplexMatrix factors;
    private readonly int[] rowOrder;

    private ComplexLuFactorization(DoubleDoubleComplexMatrix lu, int[] order)
    {
        factors = lu;
        rowOrder = order;
    }

    /// <summary>Factorises a copy of <paramref name="a"/>.</summary>
    public static ComplexLuFactorization Of(DoubleDoubleComplexMatrix a)
    {
        ArgumentNullException.ThrowIfNull(a);
        Shape.MustAgree(a.Rows, a.Columns);
        var n = a.Rows;
        var lu = a.Copy();
        int[] order = [.. Enumerable.Range(0, n)];
        for (var k = 0; k < n; k++)
        {
            var pivot = LargestBelow(lu, k);
            (order[k], order[pivot]) = (order[pivot], order[k]);
            for (var j = 0; j < n && pivot != k; j++)
            {
                (lu[k, j], lu[pivot, j]) = (lu[pivot, j], lu[k, j]);
            }

            for (var i = k + 1; i < n && !lu[k, k].IsZero; i++)
            {
                var f = lu[i, k] / lu[k, k];
                lu.AddScaledRow(i, -f, lu, k, k + 1);
                lu[i, k] = f;
            }
        }

        return new(lu, order);
    }

    /// <summary>X of A X = <paramref name="b"/>.</summary>
    public DoubleDoubleComplexMatrix Solve(DoubleDoubleComplexMatrix b)
    {
        ArgumentNullException.ThrowIfNull(b);
        Shape.MustAgree(factors.Rows, b.Rows);
        var n = factors.Rows;
        DoubleDoubleComplexMatrix x = new(n, b.Columns);
        for (var i = 0; i < n; i++)
        {
            x.AddScaledRow(i, 1, b, rowOrder[i]);
            for (var k = 0; k < i; k++)
            {
                x.AddScaledRow(i, -factors[i, k], x, k);
            }
        }

        for (var i = n - 1; i >= 0; i--)
        {
            for (var k = i + 1; k < n; k++)
            {
                x.AddScaledRow(i, -factors[i, k], x, k);
            }

            for (var j = 0; j < b.Columns; j++)
            {
                x[i, j] /= factors[i, i];
            }
        }

        return x;
    }

    private static int LargestBelow(DoubleDoubleComplexMatrix lu, int k)
    {
        var pivot = k;
        for (var i = k + 1; i < lu.Rows; i++)
        {
            if (lu[i, k].Magnitude > lu[pivot, k].Magnitude)
            {
                pivot = i;
            }
        }

        return pivot;
    }
}
