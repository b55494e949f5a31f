namespace CircuitTransient.Numerics;

/// <summary>A dense real matrix of <see cref="DoubleDouble"/>s, row by row, high and low words in planes of
/// their own. Filled by whoever makes it, then only read.</summary>
/// <param name="rows">How many rows; may be zero.</param>
/// <param name="columns">How many columns; may be zero.</param>
public sealed class DoubleDoubleMatrix(int rows, int columns)
{
    private readonly double[] hi = new double[rows * columns];
    private readonly double[] lo = new double[rows * columns];

    /// <summary>How many rows.</summary>
    public int Rows { get; } = rows;

    /// <summary>How many columns.</summary>
    public int Columns { get; } = columns;

    /// <summary>All high words, row by row.</summary>
    public Span<double> Hi => hi;

    /// <summary>All low words, row by row.</summary>
    public Span<double> Lo => lo;

    /// <summary>One entry.</summary>
    public DoubleDouble this[int row, int column]
    {
        get
        {
            var k = (row * Columns) + column;
            return new(hi[k], lo[k]);
        }

        set
        {
            var k = (row * Columns) + column;
            hi[k] = value.Hi;
            lo[k] = value.Lo;
        }
    }

    /// <summary>The identity.</summary>
    public static DoubleDoubleMatrix Identity(int n)
    {
        DoubleDoubleMatrix result = new(n, n);
        for (var i = 0; i < n; i++)
        {
            result.hi[(i * n) + i] = 1;
        }

        return result;
    }

    /// <summary>A matrix of doubles, exactly.</summary>
    public static DoubleDoubleMatrix From(double[,] values)
    {
        ArgumentNullException.ThrowIfNull(values);
        DoubleDoubleMatrix result = new(values.GetLength(0), values.GetLength(1));
        for (var i = 0; i < result.Rows; i++)
        {
            for (var j = 0; j < result.Columns; j++)
            {
                result[i, j] = values[i, j];
            }
        }

        return result;
    }

    /// <summary>A row, in this matrix's memory.</summary>
    public DoubleDoubleRow Row(int row) =>
        new(hi.AsSpan(row * Columns, Columns), lo.AsSpan(row * Columns, Columns));

    /// <summary>A row from a column on, in this matrix's memory.</summary>
    public DoubleDoubleRow Row(int row, int start) => Row(row).Slice(start);

    /// <summary>A copy.</summary>
    public DoubleDoubleMatrix Copy()
    {
        DoubleDoubleMatrix result = new(Rows, Columns);
        hi.CopyTo(result.hi.AsSpan());
        lo.CopyTo(result.lo.AsSpan());
        return result;
    }

    /// <summary>The transposed matrix.</summary>
    public DoubleDoubleMatrix Transposed()
    {
        DoubleDoubleMatrix result = new(Columns, Rows);
        for (var i = 0; i < Rows; i++)
        {
            for (var j = 0; j < Columns; j++)
            {
                result[j, i] = this[i, j];
            }
        }

        return result;
    }

    /// <summary>The matrix with every sign turned.</summary>
    public DoubleDoubleMatrix Negative()
    {
        var result = Copy();
        for (var i = 0; i < Rows; i++)
        {
            result.Row(i).Scale(-1);
        }

        return result;
    }

    /// <summary>A rectangle of entries, copied.</summary>
    public DoubleDoubleMatrix Part(int row, int column, int rows, int columns)
    {
        DoubleDoubleMatrix result = new(rows, columns);
        for (var i = 0; i < rows; i++)
        {
            result.Row(i).CopyFrom(Row(row + i).Slice(column, columns));
        }

        return result;
    }

    /// <summary>this · <paramref name="right"/>.</summary>
    public DoubleDoubleMatrix Times(DoubleDoubleMatrix right)
    {
        ArgumentNullException.ThrowIfNull(right);
        DoubleDoubleMatrix result = new(Rows, right.Columns);
        result.AddProduct(1, this, right);
        return result;
    }

    /// <summary>this + <paramref name="factor"/> · <paramref name="other"/>.</summary>
    public DoubleDoubleMatrix Plus(DoubleDouble factor, DoubleDoubleMatrix other)
    {
        ArgumentNullException.ThrowIfNull(other);
        var result = Copy();
        for (var i = 0; i < Rows; i++)
        {
            result.Row(i).AddScaled(factor, other.Row(i));
        }

        return result;
    }

    /// <summary>Adds factor · a · b to this matrix.</summary>
    public void AddProduct(DoubleDouble factor, DoubleDoubleMatrix a, DoubleDoubleMatrix b)
    {
        ArgumentNullException.ThrowIfNull(a);
        ArgumentNullException.ThrowIfNull(b);
        Shape.MustAgree(a.Columns, b.Rows);
        for (var i = 0; i < Rows; i++)
        {
            var row = Row(i);
            for (var k = 0; k < a.Columns; k++)
            {
                row.AddScaled(factor * a[i, k], b.Row(k));
            }
        }
    }

    /// <summary>The root of the sum of squares, scaled against overflow.</summary>
    public double FrobeniusNorm()
    {
        var largest = LargestMagnitude();
        if (largest == 0 || !double.IsFinite(largest))
        {
            return largest;
        }

        double sum = 0;
        foreach (var x in hi)
        {
            sum += x / largest * (x / largest);
        }

        return largest * Math.Sqrt(sum);
    }

    /// <summary>The largest magnitude of an entry; not a number where one is not.</summary>
    public double LargestMagnitude()
    {
        double largest = 0;
        foreach (var x in hi)
        {
            largest = Math.Max(largest, Math.Abs(x));
        }

        return largest;
    }

    /// <summary>The nearest doubles.</summary>
    public double[,] ToDoubles()
    {
        var result = new double[Rows, Columns];
        for (var i = 0; i < Rows; i++)
        {
            for (var j = 0; j < Columns; j++)
            {
                result[i, j] = (double)this[i, j];
            }
        }

        return result;
    }
}
