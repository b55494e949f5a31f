using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace CircuitTransient.Numerics;

/// <summary>A run of double-double numbers in somebody's memory, high and low words apart, and the vector
/// kernels on it. Four lanes whatever the machine, so that the bits do not depend on it.</summary>
/// <param name="hi">The high words.</param>
/// <param name="lo">The low words, as many.</param>
/// <remarks>Products are added by the short form of the double-double sum: its error is 2⁻¹⁰⁴ of |x| + |y|,
/// not of |x + y|, which is all that a backward stable elimination or rotation asks.</remarks>
public readonly ref struct DoubleDoubleRow(Span<double> hi, Span<double> lo)
{
    private const int Lanes = 4;

    /// <summary>High words.</summary>
    public Span<double> Hi { get; } = hi;

    /// <summary>Low words.</summary>
    public Span<double> Lo { get; } = lo;

    /// <summary>How many numbers.</summary>
    public int Length => Hi.Length;

    /// <summary>One number.</summary>
    public DoubleDouble this[int index]
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get => new(Hi[index], Lo[index]);

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        set
        {
            Hi[index] = value.Hi;
            Lo[index] = value.Lo;
        }
    }

    /// <summary>The numbers from <paramref name="start"/> on.</summary>
    public DoubleDoubleRow Slice(int start) => new(Hi[start..], Lo[start..]);

    /// <summary>Some of the numbers.</summary>
    public DoubleDoubleRow Slice(int start, int length) =>
        new(Hi.Slice(start, length), Lo.Slice(start, length));

    /// <summary>All numbers zero.</summary>
    public void Clear()
    {
        Hi.Clear();
        Lo.Clear();
    }

    /// <summary>The same numbers as another row's.</summary>
    public void CopyFrom(DoubleDoubleRow x)
    {
        x.Hi.CopyTo(Hi);
        x.Lo.CopyTo(Lo);
    }

    /// <summary>this = this + f x.</summary>
    public void AddScaled(DoubleDouble f, DoubleDoubleRow x)
    {
        var n = Length;
        Shape.MustAgree(n, x.Hi.Length);
        if (f.Hi == 0)
        {
            return;
        }

        ref var yh = ref MemoryMarshal.GetReference(Hi);
        ref var yl = ref MemoryMarshal.GetReference(Lo);
        ref var xh = ref MemoryMarshal.GetReference(x.Hi);
        ref var xl = ref MemoryMarshal.GetReference(x.Lo);
        var fh = Vector256.Create(f.Hi);
        var fl = Vector256.Create(f.Lo);
        var i = 0;
        for (; i <= n - Lanes; i += Lanes)
        {
            var y = Lane.Load(ref yh, ref yl, i);
            y.AddProduct(fh, fl, Lane.Load(ref xh, ref xl, i)).Store(ref yh, ref yl, i);
        }

        for (; i < n; i++)
        {
            this[i] = AddProduct(this[i], f, x[i]);
        }
    }

    /// <summary>this = f this.</summary>
    public void Scale(DoubleDouble f)
    {
        for (var i = 0; i < Length; i++)
        {
            this[i] *= f;
        }
    }

    /// <summary>Σ this x.</summary>
    public DoubleDouble Dot(DoubleDoubleRow x)
    {
        var n = Length;
        Shape.MustAgree(n, x.Hi.Length);
        ref var yh = ref MemoryMarshal.GetReference(Hi);
        ref var yl = ref MemoryMarshal.GetReference(Lo);
        ref var xh = ref MemoryMarshal.GetReference(x.Hi);
        ref var xl = ref MemoryMarshal.GetReference(x.Lo);
        Lane sum = default;
        var i = 0;
        for (; i <= n - Lanes; i += Lanes)
        {
            var y = Lane.Load(ref yh, ref yl, i);
            sum = sum.AddProduct(y.Hi, y.Lo, Lane.Load(ref xh, ref xl, i));
        }

        var total = sum.Total();
        for (; i < n; i++)
        {
            total = AddProduct(total, this[i], x[i]);
        }

        return total;
    }

    /// <summary>(x, y) = (c x + s y, c y − s x), a plane rotation of two rows.</summary>
    public static void Rotate(DoubleDoubleRow x, DoubleDoubleRow y, DoubleDouble c, DoubleDouble s)
    {
        for (var i = 0; i < x.Length; i++)
        {
            var a = x[i];
            var b = y[i];
            x[i] = (c * a) + (s * b);
            y[i] = (c * b) - (s * a);
        }
    }

    /// <summary>The sum of squares.</summary>
    public DoubleDouble SumOfSquares() => Dot(this);

    /// <summary>y + f x by the short sum.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static DoubleDouble AddProduct(DoubleDouble y, DoubleDouble f, DoubleDouble x)
    {
        var p = f.Hi * x.Hi;
        var e = Math.FusedMultiplyAdd(f.Hi, x.Hi, -p);
        e = Math.FusedMultiplyAdd(f.Lo, x.Hi, Math.FusedMultiplyAdd(f.Hi, x.Lo, e));
        var s = y.Hi + p;
        var t = s - y.Hi;
        var r = (y.Hi - (s - t)) + (p - t) + (y.Lo + e);
        var hi = s + r;
        return new(hi, r - (hi - s));
    }
}
