namespace CircuitTransient.Numerics.Sparse;

/// <summary>An order of elimination that keeps fill small in a matrix whose pattern is symmetric: always the
/// row of the least degree, where a row already eliminated stands for all the fill it made.</summary>
/// <remarks>Quotient graph with element absorption and approximate degrees: P. R. Amestoy, T. A. Davis,
/// I. S. Duff, "An approximate minimum degree ordering algorithm", SIAM J. Matrix Anal. Appl. 17 (1996), from
/// memory; without its supervariables.</remarks>
internal sealed class MinimumDegree
{
    private readonly int size;
    private readonly List<int>[] rows; // neighbours not yet reached through an element
    private readonly List<int>[] elements; // eliminated rows whose fill holds this row
    private readonly int[][] fill; // of each eliminated row: those it made neighbours; none once absorbed
    private readonly int[] degree;
    private readonly bool[] isEliminated;
    private readonly PriorityQueue<int, (int Degree, int Row)> waiting = new();
    private readonly int[] mark;
    private readonly int[] outside;
    private readonly int[] outsideMark;

    private MinimumDegree(int size, ReadOnlySpan<(int Row, int Column)> places)
    {
        this.size = size;
        rows = new List<int>[size];
        elements = new List<int>[size];
        fill = new int[size][];
        (degree, mark, outside, outsideMark) = (new int[size], new int[size], new int[size], new int[size]);
        isEliminated = new bool[size];
        Array.Fill(mark, -1);
        Array.Fill(outsideMark, -1);
        for (var i = 0; i < size; i++)
        {
            (rows[i], elements[i]) = ([], []);
        }

        foreach (var (row, column) in places)
        {
            if (row != column)
            {
                rows[row].Add(column);
                rows[column].Add(row);
            }
        }

        for (var i = 0; i < size; i++)
        {
            rows[i] = [.. rows[i].Distinct()];
            degree[i] = rows[i].Count;
            waiting.Enqueue(i, (degree[i], i));
        }
    }

    /// <summary>The order in which to eliminate, from places of a matrix, which count with their mirror
    /// images.</summary>
    public static int[] Order(int size, ReadOnlySpan<(int Row, int Column)> places)
    {
        var work = new MinimumDegree(size, places);
        var order = new int[size];
        for (var k = 0; k < size; k++)
        {
            order[k] = work.Next();
            work.Eliminate(order[k], size - k - 1);
        }

        return order;
    }

    private int Next()
    {
        while (true)
        {
            waiting.TryDequeue(out var row, out var key);
            if (!isEliminated[row] && degree[row] == key.Degree)
            {
                return row;
            }
        }
    }

    private void Eliminate(int pivot, int left)
    {
        isEliminated[pivot] = true;
        var neighbours = Neighbours(pivot);
        foreach (var element in elements[pivot])
        {
            fill[element] = [];
        }

        fill[pivot] = neighbours;
        foreach (var row in neighbours)
        {
            Weigh(row, pivot);
        }

        foreach (var row in neighbours)
        {
            Update(row, pivot, left);
        }

        (rows[pivot], elements[pivot]) = ([], []);
    }

    private int[] Neighbours(int pivot)
    {
        var found = new List<int>();
        mark[pivot] = pivot;
        foreach (var row in rows[pivot])
        {
            Take(row);
        }

        foreach (var element in elements[pivot])
        {
            foreach (var row in fill[element])
            {
                Take(row);
            }
        }

        return [.. found];

        void Take(int row)
        {
            if (!isEliminated[row] && mark[row] != pivot)
            {
                mark[row] = pivot;
                found.Add(row);
            }
        }
    }

    // Counts, for every element that shares rows with the new one, how many it has beside them.
    private void Weigh(int row, int pivot)
    {
        foreach (var element in elements[row])
        {
            if (outsideMark[element] != pivot)
            {
                outsideMark[element] = pivot;
                outside[element] = fill[element].Count(r => !isEliminated[r]);
            }

            outside[element]--;
        }
    }

    private void Update(int row, int pivot, int left)
    {
        rows[row].RemoveAll(r => mark[r] == pivot || isEliminated[r]);
        elements[row].RemoveAll(e => fill[e].Length == 0 || outside[e] == 0);
        elements[row].Add(pivot);
        var bound = rows[row].Count + fill[pivot].Length - 1;
        foreach (var element in elements[row])
        {
            bound += element == pivot ? 0 : outside[element];
        }

        degree[row] = Math.Min(bound, left - 1);
        waiting.Enqueue(row, (degree[row], row));
    }
}
