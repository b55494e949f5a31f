using System.Numerics;
using System.Runtime.CompilerServices;

namespace CircuitTransient.Numerics;

/// <summary>A complex number of two <see cref="DoubleDouble"/>s.</summary>
/// <param name="Re">Real part.</param>
/// <param name="Im">Imaginary part.</param>
public readonly record struct DoubleDoubleComplex(DoubleDouble Re, DoubleDouble Im)
{
    /// <summary>0.</summary>
    public static DoubleDoubleComplex Zero => default;

    /// <summary>1.</summary>
    public static DoubleDoubleComplex One => new(1, 0);

    /// <summary>Whether the number is exactly zero.</summary>
    public bool IsZero => Re.Hi == 0 && Im.Hi == 0;

    /// <summary>Whether both parts are finite.</summary>
    public bool IsFinite => Re.IsFinite && Im.IsFinite;

    /// <summary>The number with its imaginary part turned.</summary>
    public DoubleDoubleComplex Conjugate => new(Re, -Im);

    /// <summary>|z| as a double, for comparisons of size.</summary>
    public double Magnitude => double.Hypot(Re.Hi, Im.Hi);

    /// <summary>A real number.</summary>
    public static implicit operator DoubleDoubleComplex(DoubleDouble value) => new(value, 0);

    /// <summary>A real number.</summary>
    public static implicit operator DoubleDoubleComplex(double value) => new(value, 0);

    /// <summary>The same number.</summary>
    public static implicit operator DoubleDoubleComplex(Complex value) => new(value.Real, value.Imaginary);

    /// <summary>The nearest number in doubles.</summary>
    public static explicit operator Complex(DoubleDoubleComplex value) =>
        new((double)value.Re, (double)value.Im);

    /// <summary>The number with its sign turned.</summary>
    public static DoubleDoubleComplex operator -(DoubleDoubleComplex x) => new(-x.Re, -x.Im);

    /// <summary>Sum.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDoubleComplex operator +(DoubleDoubleComplex x, DoubleDoubleComplex y) =>
        new(x.Re + y.Re, x.Im + y.Im);

    /// <summary>Difference.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static DoubleDoubleComplex operator -(DoubleDoubleComplex x, DoubleDoubleComplex y) =>
        new(x.Re - y.Re, x.Im - y.Im);

    /// <summary>Product.</summary>
    public static DoubleDoubleComplex operator *(DoubleDoubleComplex x, DoubleDoubleComplex y) =>
        new((x.Re * y.Re) - (x.Im * y.Im), (x.Re * y.Im) + (x.Im * y.Re));

    /// <summary>Product.</summary>
    public static DoubleDoubleComplex operator *(DoubleDoubleComplex x, DoubleDouble y) =>
        new(x.Re * y, x.Im * y);

    /// <summary>Product.</summary>
    public static DoubleDoubleComplex operator *(DoubleDouble x, DoubleDoubleComplex y) =>
        new(x * y.Re, x * y.Im);

    /// <summary>Quotient.</summary>
    public static DoubleDoubleComplex operator /(DoubleDoubleComplex x, DoubleDouble y) =>
        new(x.Re / y, x.Im / y);

    /// <summary>Quotient, scaled by a power of two so that the square of the divisor neither overflows nor
    /// vanishes.</summary>
    public static DoubleDoubleComplex operator /(DoubleDoubleComplex x, DoubleDoubleComplex y)
    {
        var largest = Math.Max(Math.Abs(y.Re.Hi), Math.Abs(y.Im.Hi));
        if (largest == 0 || !double.IsFinite(largest))
        {
            return (Complex)x / (Complex)y;
        }

        var n = -Math.ILogB(largest);
        var d = y.ScaleByPowerOfTwo(n);
        return (x * d.Conjugate / ((d.Re * d.Re) + (d.Im * d.Im))).ScaleByPowerOfTwo(n);
    }

    /// <summary>|z|.</summary>
    public static DoubleDouble Abs(DoubleDoubleComplex z) => DoubleDouble.Hypotenuse(z.Re, z.Im);

    /// <summary>e^z.</summary>
    public static DoubleDoubleComplex Exp(DoubleDoubleComplex z)
    {
        var size = DoubleDouble.Exp(z.Re);
        if (z.Im.IsZero)
        {
            return size;
        }

        (var sin, var cos) = DoubleDouble.SinCos(z.Im);
        return new(size * cos, size * sin);
    }

    /// <summary>√z with non-negative real part.</summary>
    public static DoubleDoubleComplex Sqrt(DoubleDoubleComplex z)
    {
        if (z.IsZero)
        {
            return Zero;
        }

        var half = DoubleDouble.Sqrt((Abs(z) + DoubleDouble.Abs(z.Re)) * 0.5);
        var other = DoubleDouble.Abs(z.Im) / (half * 2.0);
        (var re, var im) = z.Re.Hi >= 0 ? (half, other) : (other, half);
        return new(re, z.Im.Hi < 0 ? -im : im);
    }

    /// <summary>Both parts; what a record would write of itself has no end, its conjugate being another
    /// one.</summary>
    public override string ToString() => $"({Re}) + ({Im}) i";

    /// <summary>z · 2ⁿ.</summary>
    public DoubleDoubleComplex ScaleByPowerOfTwo(int n) =>
        new(DoubleDouble.ScaleByPowerOfTwo(Re, n), DoubleDouble.ScaleByPowerOfTwo(Im, n));
}
