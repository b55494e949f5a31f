using System.Runtime.CompilerServices;

namespace CircuitTransient.Numerics;

/// <summary>A real number held as the unevaluated sum of two doubles, about 106 bits (relative rounding
/// 2⁻¹⁰⁴).</summary>
/// <param name="Hi">The nearest double.</param>
/// <param name="Lo">What <paramref name="Hi"/> leaves, at most half its last bit.</param>
/// <remarks>Sum, product and quotient after M. Joldeş, J.-M. Muller, V. Popescu, "Tight and rigorous error
/// bounds for basic building blocks of double-word arithmetic", ACM TOMS 44 (2017), algorithms 6, 12 and 17
/// (from memory).</remarks>
public readonly partial record struct DoubleDouble(double Hi, double Lo) : IComparable<DoubleDouble>
{
    /// <summary>Relative rounding of one operation, 2⁻¹⁰⁴.</summary>
    public const double Rounding = 4.930380657631324e-32;

    /// <summary>0.</summary>
    public static DoubleDouble Zero => default;

    /// <summary>1.</summary>
    public static DoubleDouble One => new(1, 0);

    /// <summary>Whether the number is exactly zero.</summary>
    public bool IsZero => Hi == 0;

    /// <summary>Whether the number is neither infinite nor undefined.</summary>
    public bool IsFinite => double.IsFinite(Hi) && double.IsFinite(Lo);

    /// <summary>Whether the number is below zero.</summary>
    public bool IsNegative => Hi < 0;

    /// <summary>a + b without rounding (Knuth's two-sum).</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDouble FromSum(double a, double b)
    {
        var s = a + b;
        var t = s - a;
        return new(s, (a - (s - t)) + (b - t));
    }

    /// <summary>a · b without rounding, barring underflow.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDouble FromProduct(double a, double b)
    {
        var p = a * b;
        return new(p, Math.FusedMultiplyAdd(a, b, -p));
    }

    /// <summary>a + b without rounding, for |a| ≥ |b| or a = 0.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static DoubleDouble FromOrderedSum(double a, double b)
    {
        var s = a + b;
        return new(s, b - (s - a));
    }

    /// <summary>The same number.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static implicit operator DoubleDouble(double value) => new(value, 0);

    /// <summary>The nearest double.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static explicit operator double(DoubleDouble value) => value.Hi + value.Lo;

    /// <summary>The number with its sign turned.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDouble operator -(DoubleDouble x) => new(-x.Hi, -x.Lo);

    /// <summary>Sum.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDouble operator +(DoubleDouble x, DoubleDouble y)
    {
        var s = FromSum(x.Hi, y.Hi);
        var t = FromSum(x.Lo, y.Lo);
        var v = FromOrderedSum(s.Hi, s.Lo + t.Hi);
        return FromOrderedSum(v.Hi, t.Lo + v.Lo);
    }

    /// <summary>Difference.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDouble operator -(DoubleDouble x, DoubleDouble y) => x + (-y);

    /// <summary>Product.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDouble operator *(DoubleDouble x, DoubleDouble y)
    {
        var c = FromProduct(x.Hi, y.Hi);
        var t = Math.FusedMultiplyAdd(x.Hi, y.Lo, x.Lo * y.Lo);
        return FromOrderedSum(c.Hi, c.Lo + Math.FusedMultiplyAdd(x.Lo, y.Hi, t));
    }

    /// <summary>Product.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDouble operator *(DoubleDouble x, double y)
    {
        var c = FromProduct(x.Hi, y);
        return FromOrderedSum(c.Hi, Math.FusedMultiplyAdd(x.Lo, y, c.Lo));
    }

    /// <summary>Product.</summary>
    public static DoubleDouble operator *(double x, DoubleDouble y) => y * x;

    /// <summary>Quotient; infinite or undefined as for doubles where <paramref name="y"/> is zero.</summary>
    public static DoubleDouble operator /(DoubleDouble x, DoubleDouble y)
    {
        var t = x.Hi / y.Hi;
        if (!double.IsFinite(t) || double.IsInfinity(y.Hi))
        {
            return t;
        }

        var r = y * t;
        var d = (x.Hi - r.Hi) + (x.Lo - r.Lo);
        return FromOrderedSum(t, d / y.Hi);
    }

    /// <summary>Whether x is below y.</summary>
    public static bool operator <(DoubleDouble x, DoubleDouble y) =>
        x.Hi < y.Hi || (x.Hi == y.Hi && x.Lo < y.Lo);

    /// <summary>Whether x is above y.</summary>
    public static bool operator >(DoubleDouble x, DoubleDouble y) => y < x;

    /// <summary>Whether x is at most y.</summary>
    public static bool operator <=(DoubleDouble x, DoubleDouble y) =>
        x.Hi < y.Hi || (x.Hi == y.Hi && x.Lo <= y.Lo);

    /// <summary>Whether x is at least y.</summary>
    public static bool operator >=(DoubleDouble x, DoubleDouble y) => y <= x;

    /// <inheritdoc/>
    public int CompareTo(DoubleDouble other) =>
        Hi == other.Hi ? Lo.CompareTo(other.Lo) : Hi.CompareTo(other.Hi);

    /// <summary>Both words, as "hi + lo".</summary>
    public override string ToString() => Lo == 0 ? $"{Hi:R}" : $"{Hi:R} + {Lo:R}";
}
