namespace CircuitTransient.Numerics;

/// <summary>P A = L U of a square real matrix, with row exchanges for the largest pivot.</summary>
public sealed class LuFactorization
{
    private readonly DoubleDoubleMatrix factors;
    private readonly int[] rowOrder;

    private LuFactorization(DoubleDoubleMatrix lu, int[] order)
    {
        factors = lu;
        rowOrder = order;
    }

    /// <summary>Factorises a copy of <paramref name="a"/>.</summary>
    public static LuFactorization Of(DoubleDoubleMatrix a)
    {
        ArgumentNullException.ThrowIfNull(a);
        Shape.MustAgree(a.Rows, a.Columns);
        var n = a.Rows;
        var lu = a.Copy();
        int[] order = [.. Enumerable.Range(0, n)];
        for (var k = 0; k < n; k++)
        {
            var pivot = LargestBelow(lu, k);
            if (pivot != k)
            {
                Exchange(lu, k, pivot);
                (order[k], order[pivot]) = (order[pivot], order[k]);
            }

            Eliminate(lu, k);
        }

        return new(lu, order);
    }

    /// <summary>X of A X = <paramref name="b"/>.</summary>
    public DoubleDoubleMatrix Solve(DoubleDoubleMatrix b)
    {
        ArgumentNullException.ThrowIfNull(b);
        Shape.MustAgree(factors.Rows, b.Rows);
        var n = factors.Rows;
        DoubleDoubleMatrix x = new(n, b.Columns);
        for (var i = 0; i < n; i++)
        {
            x.Row(i).CopyFrom(b.Row(rowOrder[i]));
            for (var k = 0; k < i; k++)
            {
                x.Row(i).AddScaled(-factors[i, k], x.Row(k));
            }
        }

        for (var i = n - 1; i >= 0; i--)
        {
            for (var k = i + 1; k < n; k++)
            {
                x.Row(i).AddScaled(-factors[i, k], x.Row(k));
            }

            x.Row(i).Scale(1.0 / factors[i, i]);
        }

        return x;
    }

    private static int LargestBelow(DoubleDoubleMatrix lu, int k)
    {
        var pivot = k;
        for (var i = k + 1; i < lu.Rows; i++)
        {
            if (Math.Abs(lu[i, k].Hi) > Math.Abs(lu[pivot, k].Hi))
            {
                pivot = i;
            }
        }

        return pivot;
    }

    private static void Exchange(DoubleDoubleMatrix lu, int i, int k)
    {
        for (var j = 0; j < lu.Columns; j++)
        {
            (lu[i, j], lu[k, j]) = (lu[k, j], lu[i, j]);
        }
    }

    private static void Eliminate(DoubleDoubleMatrix lu, int k)
    {
        var pivot = lu[k, k];
        if (pivot.IsZero)
        {
            return;
        }

        for (var i = k + 1; i < lu.Rows; i++)
        {
            if (lu[i, k].IsZero)
            {
                continue;
            }

            var f = lu[i, k] / pivot;
            lu[i, k] = f;
            lu.Row(i, k + 1).AddScaled(-f, lu.Row(k, k + 1));
        }
    }
}
