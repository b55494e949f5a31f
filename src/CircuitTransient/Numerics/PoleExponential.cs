using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>e^(p t) as a double, of a pole known to double-double. The product p t keeps its low word, so
/// that the error stays near 1e-16 after a million radians.</summary>
public static class PoleExponential
{
    /// <summary>e^(p t).</summary>
    public static Complex Of(DoubleDoubleComplex p, double t)
    {
        var size = Of(p.Re, t);
        if (p.Im.IsZero)
        {
            return size;
        }

        var phase = p.Im * t;
        (var sin, var cos) = Math.SinCos(phase.Hi);
        return new(
            size * Math.FusedMultiplyAdd(-phase.Lo, sin, cos),
            size * Math.FusedMultiplyAdd(phase.Lo, cos, sin));
    }

    /// <summary>e^(p t) of a real pole.</summary>
    public static double Of(DoubleDouble p, double t)
    {
        var exponent = p * t;
        var size = Math.Exp(exponent.Hi);
        return double.IsFinite(size) ? Math.FusedMultiplyAdd(size, exponent.Lo, size) : size;
    }
}
