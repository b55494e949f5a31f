using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace CircuitTransient.Numerics;

/// <summary>I − τ (1, v, w)ᵀ (1, v, w), a reflection of three neighbouring rows or columns; of two where
/// <paramref name="Count"/> is 2.</summary>
/// <param name="Tau">τ.</param>
/// <param name="V">The second entry of the vector.</param>
/// <param name="W">The third entry.</param>
/// <param name="Count">How many rows it touches, 2 or 3.</param>
internal readonly record struct Reflection(DoubleDouble Tau, DoubleDouble V, DoubleDouble W, int Count)
{
    private const int Lanes = 4;

    /// <summary>The reflection that maps (x, y, z) on (<paramref name="alpha"/>, 0, 0).</summary>
    public static Reflection Of(
        DoubleDouble x, DoubleDouble y, DoubleDouble z, int count, out DoubleDouble alpha)
    {
        var tail = DoubleDouble.Hypotenuse(y, z);
        if (tail.IsZero)
        {
            alpha = x;
            return new(0, 0, 0, count);
        }

        var norm = DoubleDouble.Hypotenuse(x, tail);
        alpha = x.Hi > 0 ? -norm : norm;
        var divisor = x - alpha;
        return new((alpha - x) / alpha, y / divisor, z / divisor, count);
    }

    /// <summary>Rows k, k + 1 (, k + 2) of a, from column <paramref name="start"/> on.</summary>
    public void ApplyToRows(DoubleDoubleMatrix a, int k, int start)
    {
        var n = a.Columns;
        var x = k * n;
        var y = x + n;
        var z = Count == 3 ? y + n : y;
        ref var hi = ref MemoryMarshal.GetReference(a.Hi);
        ref var lo = ref MemoryMarshal.GetReference(a.Lo);
        var j = start;
        for (; j <= n - Lanes; j += Lanes)
        {
            var first = Lane.Load(ref hi, ref lo, x + j);
            var second = Lane.Load(ref hi, ref lo, y + j);
            var third = Count == 3 ? Lane.Load(ref hi, ref lo, z + j) : default;
            Apply(ref first, ref second, ref third);
            first.Store(ref hi, ref lo, x + j);
            second.Store(ref hi, ref lo, y + j);
            if (Count == 3)
            {
                third.Store(ref hi, ref lo, z + j);
            }
        }

        for (; j < n; j++)
        {
            ApplyToOne(a.Hi, a.Lo, x + j, y + j, z + j);
        }
    }

    /// <summary>Columns k, k + 1 (, k + 2) of the first <paramref name="rows"/> rows of a.</summary>
    public void ApplyToColumns(DoubleDoubleMatrix a, int k, int rows)
    {
        var n = a.Columns;
        var hi = a.Hi;
        var lo = a.Lo;
        var i = 0;
        for (; i <= rows - Lanes; i += Lanes)
        {
            var at = (i * n) + k;
            var first = Lane.Gather(hi, lo, at, n);
            var second = Lane.Gather(hi, lo, at + 1, n);
            var third = Count == 3 ? Lane.Gather(hi, lo, at + 2, n) : default;
            Apply(ref first, ref second, ref third);
            first.Scatter(hi, lo, at, n);
            second.Scatter(hi, lo, at + 1, n);
            if (Count == 3)
            {
                third.Scatter(hi, lo, at + 2, n);
            }
        }

        for (; i < rows; i++)
        {
            var at = (i * n) + k;
            ApplyToOne(hi, lo, at, at + 1, Count == 3 ? at + 2 : at + 1);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void Apply(ref Lane first, ref Lane second, ref Lane third)
    {
        var v = Lane.Repeat(V);
        var w = Lane.Repeat(W);
        var sum = first.AddProduct(v, second);
        sum = Count == 3 ? sum.AddProduct(w, third) : sum;
        sum = sum.Times(Lane.Repeat(-Tau));
        first = first.AddProduct(Lane.Repeat(1), sum);
        second = second.AddProduct(v, sum);
        third = third.AddProduct(w, sum);
    }

    private void ApplyToOne(Span<double> hi, Span<double> lo, int x, int y, int z)
    {
        DoubleDouble first = new(hi[x], lo[x]);
        DoubleDouble second = new(hi[y], lo[y]);
        var third = Count == 3 ? new(hi[z], lo[z]) : DoubleDouble.Zero;
        var sum = DoubleDoubleRow.AddProduct(DoubleDoubleRow.AddProduct(first, V, second), W, third);
        sum *= -Tau;
        first += sum;
        second = DoubleDoubleRow.AddProduct(second, V, sum);
        (hi[x], lo[x]) = (first.Hi, first.Lo);
        (hi[y], lo[y]) = (second.Hi, second.Lo);
        if (Count == 3)
        {
            third = DoubleDoubleRow.AddProduct(third, W, sum);
            (hi[z], lo[z]) = (third.Hi, third.Lo);
        }
    }
}
