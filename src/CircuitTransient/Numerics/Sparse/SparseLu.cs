using System.Numerics;
using System.Runtime.CompilerServices;

namespace CircuitTransient.Numerics.Sparse;

/// <summary>L U = P S A T Q of a sparse matrix, real or complex, for many values on one pattern: scaled by
/// powers of two, ordered once for little fill, factorised column by column; further values follow the pivots
/// of the last ones as long as those stay large enough.</summary>
/// <remarks>J. R. Gilbert, T. Peierls, "Sparse partial pivoting in time proportional to arithmetic
/// operations", SIAM J. Sci. Stat. Comput. 9 (1988), from memory: the pattern of a column of the factors is
/// what can be reached from the matrix's column through the columns of L.</remarks>
/// <typeparam name="T">double or Complex.</typeparam>
/// <param name="pattern">Where elements stand.</param>
public sealed class SparseLu<T>(SparsePattern pattern)
    where T : struct, INumberBase<T>
{
    private const double Threshold = 0.1;    // of a column's largest: the ordered pivot is kept above it
    private const double KeptThreshold = 1e-3; // the same for pivots of other values

    private readonly int size = pattern.Size;
    private readonly SparseScale scale = new(pattern);
    private readonly double[] magnitudes = new double[pattern.Count];
    private readonly T[] scaled = new T[pattern.Count];
    private readonly SparseFactors<T> factors = new(pattern.Size);
    private readonly T[] column = new T[pattern.Size];
    private readonly T[] right = new T[pattern.Size];
    private int[]? order;
    private int[] rowOf = [];
    private bool isFactorised;

    /// <summary>Number of elements of both factors.</summary>
    public long FactorCount => factors.Count;

    /// <summary>Factorises a matrix given by the values at its places; false where it is singular.</summary>
    public bool Factorise(ReadOnlySpan<T> values)
    {
        for (var p = 0; p < magnitudes.Length; p++)
        {
            magnitudes[p] = Size(values[p]);
        }

        scale.Choose(magnitudes);
        for (var j = 0; j < size; j++)
        {
            for (var p = pattern.Starts[j]; p < pattern.Starts[j + 1]; p++)
            {
                var factor = scale.Row(pattern.Rows[p]) * scale.Column(j);
                (scaled[p], magnitudes[p]) = (Times(values[p], factor), magnitudes[p] * factor);
            }
        }

        isFactorised = (isFactorised && Follow()) || (Prepare() && Pivot());
        return isFactorised;
    }

    /// <summary>Overwrites the right-hand side with the solution.</summary>
    public void Solve(Span<T> x)
    {
        if (!isFactorised)
        {
            throw new InvalidOperationException("nothing is factorised");
        }

        for (var i = 0; i < size; i++)
        {
            right[i] = Times(x[i], scale.Row(i));
        }

        factors.Solve(right);
        for (var k = 0; k < size; k++)
        {
            x[order![k]] = Times(right[k], scale.Column(order[k]));
        }
    }

    /// <summary>The power of two by which a row was multiplied.</summary>
    internal double RowScale(int row) => scale.Row(row);

    /// <summary>The largest magnitude of a solution, each unknown in the scale of its column.</summary>
    internal double ScaledSize(ReadOnlySpan<T> x)
    {
        var largest = 0.0;
        for (var j = 0; j < size; j++)
        {
            var magnitude = Size(x[j]) / scale.Column(j);
            largest = magnitude <= largest ? largest : magnitude; // NaN stays
        }

        return largest;
    }

    /// <summary>The magnitude by which pivots are compared.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static double Size(T value)
    {
        if (typeof(T) == typeof(Complex))
        {
            var z = (Complex)(object)value;
            return Math.Abs(z.Real) + Math.Abs(z.Imaginary);
        }

        return Math.Abs((double)(object)value);
    }

    private static T Times(T value, double factor) => typeof(T) == typeof(Complex)
        ? (T)(object)((Complex)(object)value * factor)
        : (T)(object)((double)(object)value * factor);

    // Ordered once: the pattern stays, and what pivoting changes of it is small.
    private bool Prepare()
    {
        if (order is not null)
        {
            return true;
        }

        if (RowMatching.Of(pattern, magnitudes) is not { } matched)
        {
            return false;
        }

        var columnOf = new int[size];
        for (var j = 0; j < size; j++)
        {
            columnOf[matched[j]] = j;
        }

        var places = new (int, int)[pattern.Count];
        for (var j = 0; j < size; j++)
        {
            for (var p = pattern.Starts[j]; p < pattern.Starts[j + 1]; p++)
            {
                places[p] = (columnOf[pattern.Rows[p]], j);
            }
        }

        rowOf = matched;
        order = MinimumDegree.Order(size, places);
        return true;
    }

    private bool Pivot()
    {
        factors.Clear();
        for (var k = 0; k < size; k++)
        {
            var j = order![k];
            factors.Reach(pattern.Rows[pattern.Starts[j]..pattern.Starts[j + 1]]);
            Scatter(j);
            if (!factors.Append(column, rowOf[j], Threshold))
            {
                Array.Clear(column);
                return false;
            }
        }

        return true;
    }

    private bool Follow()
    {
        for (var k = 0; k < size; k++)
        {
            Scatter(order![k]);
            if (!factors.Replace(k, column, KeptThreshold))
            {
                Array.Clear(column);
                return false;
            }
        }

        return true;
    }

    private void Scatter(int j)
    {
        for (var p = pattern.Starts[j]; p < pattern.Starts[j + 1]; p++)
        {
            column[pattern.Rows[p]] = scaled[p];
        }
    }
}
