namespace CircuitTransient.Numerics;

/// <summary>A least-squares system J x ≈ r of any number of rows, kept as its triangle: rows are taken in
/// blocks and reduced by Householder reflections, so that memory does not grow with them.</summary>
/// <remarks>Sequential accumulation as in Lawson and Hanson, Solving Least Squares Problems (1974), chapter
/// 27; from memory.</remarks>
public sealed class RowTriangle
{
    private const int BlockRows = 64;

    private readonly int width;
    private readonly double[] rows;
    private int filled;
    private int rank;

    /// <summary>An empty system.</summary>
    /// <param name="columns">How many unknowns.</param>
    public RowTriangle(int columns)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(columns);
        Columns = columns;
        width = columns + 1;
        rows = new double[(width + BlockRows) * width];
    }

    /// <summary>How many unknowns.</summary>
    public int Columns { get; }

    /// <summary>How many rows were added.</summary>
    public long RowCount { get; private set; }

    /// <summary>An element of R, j ≥ i.</summary>
    public double this[int i, int j] => i <= j && i < rank ? rows[(i * width) + j] : 0;

    /// <summary>An element of Qᵀ r.</summary>
    public double Right(int i) => i < rank ? rows[(i * width) + Columns] : 0;

    /// <summary>‖r‖², the right side's own.</summary>
    public double SquareSum { get; private set; }

    /// <summary>What is left of ‖r‖² after the best x.</summary>
    public double Remainder
    {
        get
        {
            var last = rank > Columns ? rows[(Columns * width) + Columns] : 0;
            return last * last;
        }
    }

    /// <summary>Adds a row.</summary>
    public void Add(ReadOnlySpan<double> row, double right)
    {
        if (row.Length != Columns)
        {
            throw new ArgumentException("the row has another width", nameof(row));
        }

        var place = rows.AsSpan(filled * width, width);
        row.CopyTo(place);
        place[Columns] = right;
        SquareSum += right * right;
        RowCount++;
        if (++filled == width + BlockRows)
        {
            Reduce();
        }
    }

    /// <summary>Reduces what was added last; afterwards R can be read.</summary>
    public RowTriangle Reduced()
    {
        Reduce();
        return this;
    }

    /// <summary>The norm of a column of J, which is that of R.</summary>
    public double ColumnNorm(int j)
    {
        double sum = 0;
        for (var i = 0; i <= j; i++)
        {
            sum += this[i, j] * this[i, j];
        }

        return Math.Sqrt(sum);
    }

    private void Reduce()
    {
        for (var k = 0; k < Math.Min(width, filled); k++)
        {
            Reflect(k);
        }

        rank = Math.Min(width, filled);
        filled = rank;
    }

    /// <summary>Turns column k onto its first element, in the rows from k on.</summary>
    private void Reflect(int k)
    {
        double norm = 0;
        for (var i = k; i < filled; i++)
        {
            norm += rows[(i * width) + k] * rows[(i * width) + k];
        }

        norm = Math.Sqrt(norm);
        if (norm == 0)
        {
            return;
        }

        var head = rows[(k * width) + k];
        var alpha = head > 0 ? -norm : norm;
        var first = head - alpha;
        var scale = -alpha * first; // half of the reflected vector's square
        for (var j = k + 1; j < width; j++)
        {
            var dot = first * rows[(k * width) + j];
            for (var i = k + 1; i < filled; i++)
            {
                dot += rows[(i * width) + k] * rows[(i * width) + j];
            }

            var factor = dot / scale;
            rows[(k * width) + j] -= factor * first;
            for (var i = k + 1; i < filled; i++)
            {
                rows[(i * width) + j] -= factor * rows[(i * width) + k];
            }
        }

        rows[(k * width) + k] = alpha;
        for (var i = k + 1; i < filled; i++)
        {
            rows[(i * width) + k] = 0;
        }
    }
}
