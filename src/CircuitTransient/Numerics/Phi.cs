using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>eˣ − 1 and φ(x) = (eˣ − 1) / x, the integral of e^(x s) over s from 0 to 1, accurate near
/// zero.</summary>
/// <remarks>The real double form divides by the logarithm of the rounded exponential, whose error cancels
/// that of the numerator (W. Kahan's trick: N. J. Higham, "Accuracy and Stability of Numerical Algorithms",
/// section 1.14.1, from memory). .NET's own ExpM1 subtracts and loses everything there.</remarks>
public static class Phi
{
    /// <summary>eˣ − 1.</summary>
    public static double ExpM1(double x)
    {
        double y = Math.Exp(x);
        return y == 1 ? x
            : Math.Abs(x) < 1 ? (y - 1) * (x / Math.Log(y))
            : y - 1;
    }

    /// <summary>e^z − 1; the error is small beside |e^z − 1|.</summary>
    public static Complex ExpM1(Complex z)
    {
        (double sin, double cos) = Math.SinCos(z.Imaginary);
        double half = Math.Sin(z.Imaginary / 2);
        return new(
            Math.FusedMultiplyAdd(ExpM1(z.Real), cos, -2 * half * half),
            Math.Exp(z.Real) * sin);
    }

    /// <summary>e^z − 1; the error is small beside |e^z − 1|.</summary>
    public static DoubleDoubleComplex ExpM1(DoubleDoubleComplex z)
    {
        (DoubleDouble sin, DoubleDouble cos) = DoubleDouble.SinCos(z.Im);
        DoubleDouble half = DoubleDouble.SinCos(z.Im * 0.5).Sin;
        return new(
            (DoubleDouble.ExpM1(z.Re) * cos) - (half * half * 2.0),
            DoubleDouble.Exp(z.Re) * sin);
    }

    /// <summary>(eˣ − 1) / x; 1 at zero.</summary>
    public static double Of(double x) => x == 0 ? 1 : ExpM1(x) / x;

    /// <summary>(e^z − 1) / z; 1 at zero.</summary>
    public static Complex Of(Complex z) => z == Complex.Zero ? Complex.One : ExpM1(z) / z;

    /// <summary>(eˣ − 1) / x; 1 at zero.</summary>
    public static DoubleDouble Of(DoubleDouble x) => x.IsZero ? 1 : DoubleDouble.ExpM1(x) / x;

    /// <summary>(e^z − 1) / z; 1 at zero.</summary>
    public static DoubleDoubleComplex Of(DoubleDoubleComplex z) => z.IsZero ? 1 : ExpM1(z) / z;
}
