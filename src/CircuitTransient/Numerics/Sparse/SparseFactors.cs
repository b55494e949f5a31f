using System.Numerics;

namespace CircuitTransient.Numerics.Sparse;

/// <summary>The factors of a sparse matrix while and after they are made, column by column: L with a unit
/// diagonal by rows of the matrix, U by pivots.</summary>
internal sealed class SparseFactors<T>(int size)
    where T : struct, INumberBase<T>
{
    private readonly List<int> lowerRows = [];
    private readonly List<T> lower = [];
    private readonly List<int> upperPivots = []; // of each column in an order in which it can be computed
    private readonly List<T> upper = [];
    private readonly int[] lowerStarts = new int[size + 1];
    private readonly int[] upperStarts = new int[size + 1];
    private readonly T[] pivots = new T[size];
    private readonly int[] rowOfPivot = new int[size];
    private readonly int[] pivotOfRow = new int[size];
    private readonly int[] reach = new int[size];
    private readonly int[] marks = new int[size];
    private readonly int[] stack = new int[size];
    private readonly int[] next = new int[size];
    private readonly T[] work = new T[size];
    private int top;
    private int done;

    /// <summary>Number of elements, the diagonal of U included.</summary>
    public long Count => lower.Count + upper.Count + size;

    /// <summary>Forgets all columns.</summary>
    public void Clear()
    {
        lowerRows.Clear();
        lower.Clear();
        upperPivots.Clear();
        upper.Clear();
        Array.Fill(pivotOfRow, -1);
        Array.Fill(marks, -1);
        done = 0;
    }

    /// <summary>Finds the rows in which the next column can have elements.</summary>
    public void Reach(ReadOnlySpan<int> rows)
    {
        top = size;
        foreach (var row in rows)
        {
            if (marks[row] != done)
            {
                Descend(row);
            }
        }
    }

    /// <summary>Computes and appends the next column, whose matrix elements stand in
    /// <paramref name="column"/>, cleared after; false where it has no pivot.</summary>
    /// <param name="column">A column by rows.</param>
    /// <param name="preferred">The row whose element is the pivot unless it is too small.</param>
    /// <param name="threshold">How small, relative to the largest.</param>
    public bool Append(T[] column, int preferred, double threshold)
    {
        var (best, largest) = (-1, 0.0);
        for (var t = top; t < size; t++)
        {
            var row = reach[t];
            var pivot = pivotOfRow[row];
            if (pivot >= 0)
            {
                upperPivots.Add(pivot);
                upper.Add(column[row]);
                Subtract(column, pivot, column[row]);
                column[row] = T.Zero;
            }
            else if (SparseLu<T>.Size(column[row]) is var magnitude && !(magnitude <= largest))
            {
                (best, largest) = (row, magnitude);
            }
        }

        if (!(largest > 0) || !double.IsFinite(largest))
        {
            return false;
        }

        var isCandidate = marks[preferred] == done && pivotOfRow[preferred] < 0;
        best = isCandidate && SparseLu<T>.Size(column[preferred]) >= threshold * largest ? preferred : best;
        AppendLower(column, best);
        return true;
    }

    /// <summary>Computes a column anew with its pivot and pattern as they are; false where the pivot has
    /// become too small for that.</summary>
    public bool Replace(int k, T[] column, double threshold)
    {
        for (var p = upperStarts[k]; p < upperStarts[k + 1]; p++)
        {
            var row = rowOfPivot[upperPivots[p]];
            var value = column[row];
            column[row] = T.Zero;
            upper[p] = value;
            Subtract(column, upperPivots[p], value);
        }

        var pivot = column[rowOfPivot[k]];
        var largest = SparseLu<T>.Size(pivot);
        for (var p = lowerStarts[k]; p < lowerStarts[k + 1]; p++)
        {
            largest = Math.Max(largest, SparseLu<T>.Size(column[lowerRows[p]]));
        }

        if (!(largest > 0) || !(SparseLu<T>.Size(pivot) >= threshold * largest) || !double.IsFinite(largest))
        {
            return false;
        }

        pivots[k] = pivot;
        column[rowOfPivot[k]] = T.Zero;
        for (var p = lowerStarts[k]; p < lowerStarts[k + 1]; p++)
        {
            lower[p] = column[lowerRows[p]] / pivot;
            column[lowerRows[p]] = T.Zero;
        }

        return true;
    }

    /// <summary>Overwrites a right-hand side by rows with the solution by columns, in the order of
    /// elimination.</summary>
    public void Solve(T[] x)
    {
        for (var k = 0; k < size; k++)
        {
            work[k] = x[rowOfPivot[k]];
            Subtract(x, k, work[k]);
        }

        for (var k = size - 1; k >= 0; k--)
        {
            work[k] /= pivots[k];
            for (var p = upperStarts[k]; p < upperStarts[k + 1]; p++)
            {
                work[upperPivots[p]] -= upper[p] * work[k];
            }
        }

        work.CopyTo(x, 0);
    }

    private void AppendLower(T[] column, int pivotRow)
    {
        var value = column[pivotRow];
        for (var t = top; t < size; t++)
        {
            var row = reach[t];
            if (pivotOfRow[row] < 0 && row != pivotRow)
            {
                lowerRows.Add(row);
                lower.Add(column[row] / value);
                column[row] = T.Zero;
            }
        }

        column[pivotRow] = T.Zero;
        pivots[done] = value;
        (rowOfPivot[done], pivotOfRow[pivotRow]) = (pivotRow, done);
        done++;
        (lowerStarts[done], upperStarts[done]) = (lower.Count, upper.Count);
    }

    // Less a multiple of a column of L.
    private void Subtract(T[] column, int k, T factor)
    {
        var rows = System.Runtime.InteropServices.CollectionsMarshal.AsSpan(lowerRows);
        var values = System.Runtime.InteropServices.CollectionsMarshal.AsSpan(lower);
        for (var p = lowerStarts[k]; p < lowerStarts[k + 1]; p++)
        {
            column[rows[p]] -= values[p] * factor;
        }
    }

    // Depth first, so that what a row depends on stands before it.
    private void Descend(int first)
    {
        var depth = 0;
        stack[0] = first;
        marks[first] = done;
        next[0] = StartOf(first);
        while (depth >= 0)
        {
            var row = stack[depth];
            var pivot = pivotOfRow[row];
            var end = pivot < 0 ? 0 : lowerStarts[pivot + 1];
            var isDeeper = false;
            while (!isDeeper && next[depth] < end)
            {
                var below = lowerRows[next[depth]++];
                if (marks[below] != done)
                {
                    marks[below] = done;
                    depth++;
                    stack[depth] = below;
                    next[depth] = StartOf(below);
                    isDeeper = true;
                }
            }

            if (!isDeeper)
            {
                reach[--top] = row;
                depth--;
            }
        }
    }

    private int StartOf(int row) => pivotOfRow[row] < 0 ? 0 : lowerStarts[pivotOfRow[row]];
}
