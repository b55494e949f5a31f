namespace CircuitTransient.Numerics;

/// <summary>A vector that a square matrix maps on zero, by elimination with complete pivoting.</summary>
internal static class NullVector
{
    /// <summary>The vector as a column; null where no pivot falls to <paramref name="tolerance"/> (absolute).
    /// </summary>
    public static DoubleDoubleComplexMatrix? Of(DoubleDoubleComplexMatrix a, double tolerance)
    {
        int m = a.Rows;
        DoubleDoubleComplexMatrix u = a.Copy();
        int[] columns = [.. Enumerable.Range(0, m)];
        int rank = 0;
        while (rank < m && BringLargest(u, columns, rank) > tolerance)
        {
            for (int i = rank + 1; i < m; i++)
            {
                u.AddScaledRow(i, -(u[i, rank] / u[rank, rank]), u, rank, rank);
            }

            rank++;
        }

        return rank == m ? null : Solve(u, columns, rank);
    }

    private static double BringLargest(DoubleDoubleComplexMatrix u, int[] columns, int k)
    {
        int m = u.Rows;
        (int row, int column) = (k, k);
        for (int i = k; i < m; i++)
        {
            for (int j = k; j < m; j++)
            {
                (row, column) = u[i, j].Magnitude > u[row, column].Magnitude ? (i, j) : (row, column);
            }
        }

        for (int j = 0; j < m; j++)
        {
            (u[k, j], u[row, j]) = (u[row, j], u[k, j]);
        }

        for (int i = 0; i < m; i++)
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
        for (int i = rank - 1; i >= 0; i--)
        {
            DoubleDoubleComplex sum = u[i, rank];
            for (int k = i + 1; k < rank; k++)
            {
                sum += u[i, k] * x[columns[k], 0];
            }

            x[columns[i], 0] = -sum / u[i, i];
        }

        return x;
    }
}
