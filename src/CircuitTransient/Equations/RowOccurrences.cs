namespace CircuitTransient.Equations;

/// <summary>The rows of a reduction with an index of where each unknown occurs, so that a step touches only
/// the rows it changes, and the next row is found without looking at all.</summary>
internal sealed class RowOccurrences
{
    private readonly EquationRow[] rows;
    private readonly bool[] isPresent;
    private readonly List<int>[] places; // of each unknown: rows that hold it, or once did
    private readonly int[] uses;
    private readonly int[] derivatives;
    private readonly PriorityQueue<int, (int Length, int Place)> algebraic = new();

    /// <summary>Indexes rows.</summary>
    public RowOccurrences(List<EquationRow> rows, int unknownCount)
    {
        this.rows = [.. rows];
        isPresent = new bool[rows.Count];
        places = new List<int>[unknownCount];
        uses = new int[unknownCount];
        derivatives = new int[unknownCount];
        for (var i = 0; i < unknownCount; i++)
        {
            places[i] = [];
        }

        for (var place = 0; place < rows.Count; place++)
        {
            isPresent[place] = true;
            Count(place, SparseVector.Empty, this.rows[place].E, derivatives);
            Count(place, SparseVector.Empty, this.rows[place].G, uses);
            Offer(place);
        }
    }

    /// <summary>The rows that are left, in their first order.</summary>
    public List<EquationRow> Rows => [.. rows.Where((_, place) => isPresent[place])];

    /// <summary>How many rows have an unknown without a derivative.</summary>
    public int Uses(int unknown) => uses[unknown];

    /// <summary>Whether some row has an unknown's derivative.</summary>
    public bool IsDifferentiated(int unknown) => derivatives[unknown] > 0;

    /// <summary>Takes out the shortest algebraic row, of several the first; null where there is
    /// none.</summary>
    public EquationRow? TakeAlgebraic()
    {
        while (algebraic.TryDequeue(out var place, out var key))
        {
            var row = rows[place];
            if (isPresent[place] && row.IsAlgebraic && row.G.Count == key.Length)
            {
                isPresent[place] = false;
                Count(place, row.G, SparseVector.Empty, uses);
                return row;
            }
        }

        return null;
    }

    /// <summary>Puts an algebraic row, solved for an unknown, into every row left.</summary>
    public void Substitute(int unknown, EquationRow by)
    {
        foreach (var place in Holding(unknown))
        {
            Change(place, row => row.Substitute(unknown, by));
        }
    }

    /// <summary>Brings E to echelon form, shortest rows first and of several the first; true where a row's
    /// derivatives prove to be a sum of others'.</summary>
    /// <param name="pivot">Chooses the unknown a row is to clear from the rows after it.</param>
    public bool DerivativesDepend(Func<EquationRow, int> pivot)
    {
        var waiting = new PriorityQueue<int, (int Length, int Place)>();
        var isWaiting = (bool[])isPresent.Clone();
        for (var place = 0; place < rows.Length; place++)
        {
            if (isWaiting[place])
            {
                waiting.Enqueue(place, (rows[place].E.Count, place));
            }
        }

        var found = false;
        while (waiting.TryDequeue(out var place, out var key))
        {
            var row = rows[place];
            if (!isWaiting[place] || row.E.Count != key.Length)
            {
                continue;
            }

            isWaiting[place] = false;
            if (row.IsAlgebraic)
            {
                found = true;
                continue;
            }

            var unknown = pivot(row);
            foreach (var other in Holding(unknown).Where(p => isWaiting[p]))
            {
                Change(other, r => r.ClearDerivative(unknown, row));
                waiting.Enqueue(other, (rows[other].E.Count, other));
            }
        }

        return found;
    }

    private int[] Holding(int unknown) => [.. places[unknown].Where(place => isPresent[place])];

    private void Change(int place, Action<EquationRow> change)
    {
        var row = rows[place];
        var (e, g) = (row.E, row.G);
        change(row);
        Count(place, e, row.E, derivatives);
        Count(place, g, row.G, uses);
        Offer(place);
    }

    private void Offer(int place)
    {
        if (rows[place].IsAlgebraic)
        {
            algebraic.Enqueue(place, (rows[place].G.Count, place));
        }
    }

    // Both vectors are in order of their unknowns.
    private void Count(int place, SparseVector before, SparseVector after, int[] counts)
    {
        var old = before.Terms;
        var now = after.Terms;
        int i = 0, j = 0;
        while (i < old.Length || j < now.Length)
        {
            if (j == now.Length || (i < old.Length && old[i].Index < now[j].Index))
            {
                counts[old[i++].Index]--;
            }
            else if (i == old.Length || now[j].Index < old[i].Index)
            {
                counts[now[j].Index]++;
                places[now[j++].Index].Add(place);
            }
            else
            {
                i++;
                j++;
            }
        }
    }
}
