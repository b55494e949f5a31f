namespace CircuitTransient.Numerics.Sparse;

/// <summary>A row for every column so that no element of the diagonal they make is missing: first the
/// largest elements whose row and column are both free, then along augmenting paths.</summary>
/// <remarks>I. S. Duff, "On algorithms for obtaining a maximum transversal", ACM Trans. Math. Software 7
/// (1981), from memory.</remarks>
internal static class RowMatching
{
    /// <summary>For each column its row; null where there is no such choice, whatever the values.</summary>
    /// <param name="pattern">Where elements stand.</param>
    /// <param name="magnitudes">How large they are; one of zero counts as missing.</param>
    public static int[]? Of(SparsePattern pattern, ReadOnlySpan<double> magnitudes)
    {
        var n = pattern.Size;
        var (rowOf, columnOf) = (new int[n], new int[n]);
        Array.Fill(rowOf, -1);
        Array.Fill(columnOf, -1);
        TakeLargest(pattern, magnitudes, rowOf, columnOf);
        var seen = new int[n];
        var next = new int[n];
        Array.Fill(seen, -1);
        for (var column = 0; column < n; column++)
        {
            if (rowOf[column] < 0 && !Augment(pattern, magnitudes, column, rowOf, columnOf, seen, next))
            {
                return null;
            }
        }

        return rowOf;
    }

    private static void TakeLargest(
        SparsePattern pattern, ReadOnlySpan<double> magnitudes, int[] rowOf, int[] columnOf)
    {
        var order = new int[pattern.Count];
        var keys = new double[pattern.Count];
        var columns = new int[pattern.Count];
        for (var column = 0; column < pattern.Size; column++)
        {
            for (var p = pattern.Starts[column]; p < pattern.Starts[column + 1]; p++)
            {
                (order[p], keys[p], columns[p]) = (p, -magnitudes[p], column);
            }
        }

        Array.Sort(keys, order);
        foreach (var p in order)
        {
            var (row, column) = (pattern.Rows[p], columns[p]);
            if (magnitudes[p] > 0 && rowOf[column] < 0 && columnOf[row] < 0)
            {
                (rowOf[column], columnOf[row]) = (row, column);
            }
        }
    }

    // Depth first without recursion: path holds the columns from the free one on.
    private static bool Augment(
        SparsePattern pattern, ReadOnlySpan<double> magnitudes, int free, int[] rowOf, int[] columnOf,
        int[] seen, int[] next)
    {
        var path = new Stack<int>([free]);
        var taken = new Stack<int>();
        seen[free] = free;
        next[free] = pattern.Starts[free];
        while (path.TryPeek(out var column))
        {
            if (next[column] == pattern.Starts[column + 1])
            {
                path.Pop();
                taken.TryPop(out _);
                continue;
            }

            var p = next[column]++;
            var row = pattern.Rows[p];
            var other = columnOf[row];
            if (!(magnitudes[p] > 0) || (other >= 0 && seen[other] == free))
            {
                continue;
            }

            taken.Push(row);
            if (other >= 0)
            {
                seen[other] = free;
                next[other] = pattern.Starts[other];
                path.Push(other);
                continue;
            }

            foreach (var (end, its) in path.Zip(taken))
            {
                (rowOf[end], columnOf[its]) = (its, end);
            }

            return true;
        }

        return false;
    }
}
