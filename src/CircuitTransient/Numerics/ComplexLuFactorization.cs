namespace CircuitTransient.Numerics;

/// <summary>P A = L U of a square complex matrix, with row exchanges for the largest pivot.</summary>
public sealed class ComplexLuFactorization
{
    private readonly DoubleDoubleComplexMatrix _lu;
    private readonly int[] _order;

    private ComplexLuFactorization(DoubleDoubleComplexMatrix lu, int[] order)
    {
        _lu = lu;
        _order = order;
    }

    /// <summary>Factorises a copy of <paramref name="a"/>.</summary>
    public static ComplexLuFactorization Of(DoubleDoubleComplexMatrix a)
    {
        ArgumentNullException.ThrowIfNull(a);
        Shape.MustAgree(a.Rows, a.Columns);
        int n = a.Rows;
        DoubleDoubleComplexMatrix lu = a.Copy();
        int[] order = [.. Enumerable.Range(0, n)];
        for (int k = 0; k < n; k++)
        {
            int pivot = LargestBelow(lu, k);
            (order[k], order[pivot]) = (order[pivot], order[k]);
            for (int j = 0; j < n && pivot != k; j++)
            {
                (lu[k, j], lu[pivot, j]) = (lu[pivot, j], lu[k, j]);
            }

            for (int i = k + 1; i < n && !lu[k, k].IsZero; i++)
            {
                DoubleDoubleComplex f = lu[i, k] / lu[k, k];
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
        Shape.MustAgree(_lu.Rows, b.Rows);
        int n = _lu.Rows;
        DoubleDoubleComplexMatrix x = new(n, b.Columns);
        for (int i = 0; i < n; i++)
        {
            x.AddScaledRow(i, 1, b, _order[i]);
            for (int k = 0; k < i; k++)
            {
                x.AddScaledRow(i, -_lu[i, k], x, k);
            }
        }

        for (int i = n - 1; i >= 0; i--)
        {
            for (int k = i + 1; k < n; k++)
            {
                x.AddScaledRow(i, -_lu[i, k], x, k);
            }

            for (int j = 0; j < b.Columns; j++)
            {
                x[i, j] /= _lu[i, i];
            }
        }

        return x;
    }

    private static int LargestBelow(DoubleDoubleComplexMatrix lu, int k)
    {
        int pivot = k;
        for (int i = k + 1; i < lu.Rows; i++)
        {
            if (lu[i, k].Magnitude > lu[pivot, k].Magnitude)
            {
                pivot = i;
            }
        }

        return pivot;
    }
}
