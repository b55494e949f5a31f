using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>A dense matrix of double-doubles kept as two planes of doubles, high and low words apart, rows
/// padded to whole vectors, so that the processor works on four numbers at a time.</summary>
/// <remarks>A product is an error-free product by fused multiply-add, a sum an error-free two-sum, the small
/// words gathered apart (T. Ogita, S. M. Rump, S. Oishi, "Accurate sum and dot product", SIAM J. Sci. Comput.
/// 26 (2005), from memory). An element of a product errs by some n·2⁻¹⁰⁴ of the sum of magnitudes.</remarks>
internal sealed class SplitMatrix(int rows, int columns)
{
    private const int Lanes = 4;

    private readonly double[] hi = new double[rows * Padded(columns)];
    private readonly double[] lo = new double[rows * Padded(columns)];

    /// <summary>Number of rows.</summary>
    public int Rows { get; } = rows;

    /// <summary>Number of columns.</summary>
    public int Columns { get; } = columns;

    private int Stride { get; } = Padded(columns);

    /// <summary>An element.</summary>
    public DoubleDouble this[int row, int column]
    {
        get => new(hi[(row * Stride) + column], lo[(row * Stride) + column]);
        set => (hi[(row * Stride) + column], lo[(row * Stride) + column]) = (value.Hi, value.Lo);
    }

    /// <summary>The unit matrix.</summary>
    public static SplitMatrix Unit(int size)
    {
        var unit = new SplitMatrix(size, size);
        for (var i = 0; i < size; i++)
        {
            unit[i, i] = 1;
        }

        return unit;
    }

    /// <summary>An independent copy.</summary>
    public SplitMatrix Copy()
    {
        var copy = new SplitMatrix(Rows, Columns);
        hi.CopyTo(copy.hi, 0);
        lo.CopyTo(copy.lo, 0);
        return copy;
    }

    /// <summary>High words of a row, padding left out.</summary>
    public ReadOnlySpan<double> HighWords(int row) => hi.AsSpan(row * Stride, Columns);

    /// <summary>A B.</summary>
    public static SplitMatrix operator *(SplitMatrix a, SplitMatrix b)
    {
        if (a.Columns != b.Rows)
        {
            throw new ArgumentException($"{a.Columns} columns meet {b.Rows} rows", nameof(b));
        }

        var product = new SplitMatrix(a.Rows, b.Columns);
        for (var i = 0; i < a.Rows; i++)
        {
            for (var j = 0; j < b.Stride; j += Lanes)
            {
                MultiplyBlock(a, b, product, i, j);
            }
        }

        return product;
    }

    /// <summary>This plus <paramref name="factor"/> times another of the same shape.</summary>
    public SplitMatrix Plus(DoubleDouble factor, SplitMatrix other)
    {
        var sum = Copy();
        for (var i = 0; i < Rows; i++)
        {
            Subtract(sum, i, -factor, other, i, 0);
        }

        return sum;
    }

    /// <summary>This times a number.</summary>
    public SplitMatrix Times(DoubleDouble factor) => new SplitMatrix(Rows, Columns).Plus(factor, this);

    /// <summary>Row of <paramref name="target"/> less <paramref name="factor"/> times a row of
    /// <paramref name="other"/>, from the vector that holds <paramref name="firstColumn"/> on.</summary>
    public static void Subtract(
        SplitMatrix target, int row, DoubleDouble factor, SplitMatrix other, int otherRow, int firstColumn)
    {
        var start = firstColumn & -Lanes;
        var (size, at, from) = (target.Stride, row * target.Stride, otherRow * other.Stride);
        ref var targetHi = ref MemoryMarshal.GetReference(target.hi.AsSpan(at, size));
        ref var targetLo = ref MemoryMarshal.GetReference(target.lo.AsSpan(at, size));
        ref var otherHi = ref MemoryMarshal.GetReference(other.hi.AsSpan(from, size));
        ref var otherLo = ref MemoryMarshal.GetReference(other.lo.AsSpan(from, size));
        var factorHi = Vector256.Create(factor.Hi);
        var factorLo = Vector256.Create(factor.Lo);
        for (var j = start; j < size; j += Lanes)
        {
            var b = Vector256.LoadUnsafe(ref otherHi, (nuint)j);
            var bLow = Vector256.LoadUnsafe(ref otherLo, (nuint)j);
            var a = Vector256.LoadUnsafe(ref targetHi, (nuint)j);
            var aLow = Vector256.LoadUnsafe(ref targetLo, (nuint)j);
            var p = factorHi * b;
            var rest = Vector256.FusedMultiplyAdd(factorHi, b, -p)
                + Vector256.FusedMultiplyAdd(factorHi, bLow, factorLo * b);
            var s = a - p;
            var t = s - a;
            var small = (a - (s - t)) - (p + t) + (aLow - rest);
            var sum = s + small;
            sum.StoreUnsafe(ref targetHi, (nuint)j);
            (small - (sum - s)).StoreUnsafe(ref targetLo, (nuint)j);
        }
    }

    /// <summary>Exchanges two rows.</summary>
    public void SwapRows(int first, int second)
    {
        if (first == second)
        {
            return;
        }

        for (var j = 0; j < Stride; j++)
        {
            var (a, b) = ((first * Stride) + j, (second * Stride) + j);
            (hi[a], hi[b]) = (hi[b], hi[a]);
            (lo[a], lo[b]) = (lo[b], lo[a]);
        }
    }

    /// <summary>Greatest sum of magnitudes of a row.</summary>
    public double RowNorm()
    {
        var norm = 0.0;
        for (var i = 0; i < Rows; i++)
        {
            var sum = 0.0;
            foreach (var value in HighWords(i))
            {
                sum += Math.Abs(value);
            }

            norm = Math.Max(norm, sum);
        }

        return norm;
    }

    private static int Padded(int columns) => (columns + Lanes - 1) & -Lanes;

    private static void MultiplyBlock(SplitMatrix a, SplitMatrix b, SplitMatrix product, int i, int j)
    {
        var aHi = a.hi.AsSpan(i * a.Stride, a.Columns);
        var aLo = a.lo.AsSpan(i * a.Stride, a.Columns);
        ref var bHi = ref MemoryMarshal.GetArrayDataReference(b.hi);
        ref var bLo = ref MemoryMarshal.GetArrayDataReference(b.lo);
        var sum = Vector256<double>.Zero;
        var small = Vector256<double>.Zero;
        for (var k = 0; k < aHi.Length; k++)
        {
            var at = (nuint)((k * b.Stride) + j);
            var x = Vector256.Create(aHi[k]);
            var y = Vector256.LoadUnsafe(ref bHi, at);
            var p = x * y;
            var rest = Vector256.FusedMultiplyAdd(x, y, -p);
            rest = Vector256.FusedMultiplyAdd(x, Vector256.LoadUnsafe(ref bLo, at), rest);
            rest = Vector256.FusedMultiplyAdd(Vector256.Create(aLo[k]), y, rest);
            var s = sum + p;
            var t = s - sum;
            small += (sum - (s - t)) + (p - t) + rest;
            sum = s;
        }

        var high = sum + small;
        var index = (nuint)((i * product.Stride) + j);
        high.StoreUnsafe(ref MemoryMarshal.GetArrayDataReference(product.hi), index);
        (small - (high - sum)).StoreUnsafe(ref MemoryMarshal.GetArrayDataReference(product.lo), index);
    }
}
