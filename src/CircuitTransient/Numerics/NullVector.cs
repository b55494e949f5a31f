namespace CircuitTransient.Numerics;

/// <summary>A vector that a square matrix maps on zero, by elimination with complete pivoting.</summary>
internal static class NullVector
{
    /// <summary>The vector as a column; null where no pivot falls to <paramref name="tolerance"/> (absolute).
    /// </summary>
    public static DoubleDoubleComplexMatrix? Of(DoubleDoubleComplexMatrix a, double tolerance)
    {
        var m = a.Rows;
        var u = a.Copy();
        int[] columns = [.. Enumerable.Range(0, m)];
        var rank = 0;
        while (rank < m && BringLargest(u, columns, rank) > tolerance)
        {
            for (var i = rank + 1; i < m; i++)
            {
                u.AddScaledRow(i, -(u[i, rank] / u[rank, rank]), u, rank, rank);
            }

            rank++;
        }

        return rank == m ? null : Solve(u, columns, rank);
    }

    private static double BringLargest(DoubleDoubleComplexMatrix u, int[] columns, int k)
    {
        var m = u.Rows;
        (var row, var column) = (k, k);
        for (var i = k; i < m; i++)
        {
            for (var j = k; j < m; j++)
            {
                (row, column) = u[i, j].Magnitude > u[row, column].Magnitude ? (i, j) : (row, column);
            }
        }

        for (var j = 0; j < m; j++)
        {
            (u[k, j], u[row, j]) = (u[row, j], u[k, j]);
        }

        for (var i = 0; i < m; i++)
        {
            (u[i, k], u[i, column]) = (u[i, column], u[i, k]);
        }

        (columns[k], columns[column]) = (columns[column], columns[k]);
        return u[k, k].Magnitude;
    }

    private static DoubleDoubleComplexMatrix Solve(DoubleDoubleComplexMatrix u, int[] columns, int rank)
    {
        DoubleDoubleComplexMatrix x = new(u.Rows, 1);
        x[columns[rank], 0] = 1;
        for (var i = rank - 1; i >= 0; i--)
        {
            var sum = u[i, rank];
            for (var k = i + 1; k < rank; k++)
            {
                sum += u[i, k] * x[columns[k], 0];
            }

            x[columns[i], 0] = -sum / u[i, i];
        }

        return x;
    }
}
