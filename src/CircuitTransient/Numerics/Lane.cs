using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace CircuitTransient.Numerics;

/// <summary>Four double-double numbers side by side in vector registers.</summary>
/// <param name="Hi">High words.</param>
/// <param name="Lo">Low words.</param>
internal readonly record struct Lane(Vector256<double> Hi, Vector256<double> Lo)
{
    /// <summary>Four neighbours from memory.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lane Load(ref double hi, ref double lo, int index) =>
        new(Vector256.LoadUnsafe(ref hi, (nuint)index), Vector256.LoadUnsafe(ref lo, (nuint)index));

    /// <summary>Four neighbours to memory.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Store(ref double hi, ref double lo, int index)
    {
        Hi.StoreUnsafe(ref hi, (nuint)index);
        Lo.StoreUnsafe(ref lo, (nuint)index);
    }

    /// <summary>Four numbers a stride apart.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Lane Gather(Span<double> hi, Span<double> lo, int index, int stride) => new(
        Vector256.Create(hi[index], hi[index + stride], hi[index + (2 * stride)], hi[index + (3 * stride)]),
        Vector256.Create(lo[index], lo[index + stride], lo[index + (2 * stride)], lo[index + (3 * stride)]));

    /// <summary>Four numbers a stride apart.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Scatter(Span<double> hi, Span<double> lo, int index, int stride)
    {
        for (var k = 0; k < Vector256<double>.Count; k++)
        {
            hi[index + (k * stride)] = Hi.GetElement(k);
            lo[index + (k * stride)] = Lo.GetElement(k);
        }
    }

    /// <summary>One number four times.</summary>
    public static Lane Repeat(DoubleDouble x) => new(Vector256.Create(x.Hi), Vector256.Create(x.Lo));

    /// <summary>this + f x by the short sum.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Lane AddProduct(Vector256<double> fh, Vector256<double> fl, Lane x)
    {
        var p = fh * x.Hi;
        var e = Vector256.FusedMultiplyAdd(fh, x.Hi, -p);
        e = Vector256.FusedMultiplyAdd(fl, x.Hi, Vector256.FusedMultiplyAdd(fh, x.Lo, e));
        return Add(p, e);
    }

    /// <summary>this + f x by the short sum.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Lane AddProduct(Lane f, Lane x) => AddProduct(f.Hi, f.Lo, x);

    /// <summary>f this.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Lane Times(Lane f)
    {
        var p = f.Hi * Hi;
        var e = Vector256.FusedMultiplyAdd(f.Hi, Hi, -p);
        e = Vector256.FusedMultiplyAdd(f.Lo, Hi, Vector256.FusedMultiplyAdd(f.Hi, Lo, e));
        var hi = p + e;
        return new(hi, e - (hi - p));
    }

    /// <summary>The lane's four numbers summed.</summary>
    public DoubleDouble Total() => Element(0) + Element(1) + (Element(2) + Element(3));

    private DoubleDouble Element(int index) => new(Hi.GetElement(index), Lo.GetElement(index));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Lane Add(Vector256<double> p, Vector256<double> e)
    {
        var s = Hi + p;
        var t = s - Hi;
        var r = (Hi - (s - t)) + (p - t) + (Lo + e);
        var hi = s + r;
        return new(hi, r - (hi - s));
    }
}
