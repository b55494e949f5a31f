namespace CircuitTransient.Numerics.Sparse;

/// <summary>Where the elements of a square sparse matrix stand, column by column.</summary>
public sealed class SparsePattern
{
    private readonly int[] starts;
    private readonly int[] rows;
    private readonly int[] slots;

    private SparsePattern(int size, int[] starts, int[] rows, int[] slots)
    {
        Size = size;
        (this.starts, this.rows, this.slots) = (starts, rows, slots);
    }

    /// <summary>Number of rows, and of columns.</summary>
    public int Size { get; }

    /// <summary>Number of places.</summary>
    public int Count => rows.Length;

    /// <summary>For each column the first of its places in <see cref="Rows"/>, and the end of the
    /// last.</summary>
    public ReadOnlySpan<int> Starts => starts;

    /// <summary>The row of each place.</summary>
    public ReadOnlySpan<int> Rows => rows;

    /// <summary>For each element the pattern was made of, its place in an array of values; elements of one
    /// row and column share a place, to be added there.</summary>
    public ReadOnlySpan<int> Slots => slots;

    /// <summary>The pattern of elements in any order.</summary>
    public static SparsePattern Of(int size, ReadOnlySpan<(int Row, int Column)> elements)
    {
        var keys = new (int Column, int Row)[elements.Length];
        var order = new int[elements.Length];
        for (var k = 0; k < keys.Length; k++)
        {
            var (row, column) = elements[k];
            if ((uint)row >= (uint)size || (uint)column >= (uint)size)
            {
                throw new ArgumentException($"({row}, {column}) lies outside {size} rows", nameof(elements));
            }

            (keys[k], order[k]) = ((column, row), k);
        }

        Array.Sort(keys, order);
        var (firsts, placeOf) = (new int[size + 1], new int[keys.Length]);
        var found = new List<int>(keys.Length);
        for (var k = 0; k < keys.Length; k++)
        {
            if (k == 0 || keys[k] != keys[k - 1])
            {
                found.Add(keys[k].Row);
                firsts[keys[k].Column + 1]++;
            }

            placeOf[order[k]] = found.Count - 1;
        }

        for (var j = 0; j < size; j++)
        {
            firsts[j + 1] += firsts[j];
        }

        return new SparsePattern(size, firsts, [.. found], placeOf);
    }
}
