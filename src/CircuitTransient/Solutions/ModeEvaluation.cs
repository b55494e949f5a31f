using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>Values and bounds of a mode's functions.</summary>
internal static class ModeEvaluation
{
    /// <summary>The functions at τ, real ones one number each, complex ones two.</summary>
    public static void Evaluate(Mode mode, double tau, Span<double> values)
    {
        if (mode.Order == 1)
        {
            Put(mode, 0, Exponential(mode.Triangle[0, 0], tau), values);
        }
        else if (mode.Exponential is { } exponential)
        {
            var x = mode.Order <= 16 ? stackalloc Complex[mode.Order * mode.Order]
                : new Complex[mode.Order * mode.Order];
            exponential.Evaluate(tau, x);
            for (var i = 0; i < mode.Rows; i++)
            {
                for (var j = i; j < mode.Order; j++)
                {
                    Put(mode, mode.Carrier(i, j), x[(i * mode.Order) + j], values);
                }
            }
        }
        else
        {
            EvaluateChain(mode, tau, values);
        }
    }

    /// <summary>The functions at τ in double-double.</summary>
    public static DoubleDoubleComplex[] EvaluateExactly(Mode mode, DoubleDouble tau)
    {
        var values = new DoubleDoubleComplex[mode.CarrierCount];
        if (mode.Order == 1)
        {
            values[0] = DoubleDoubleComplex.Exp(mode.Triangle[0, 0] * tau);
            return values;
        }

        var x = TriangularExponential.Exact(mode.Triangle, tau);
        for (var i = 0; i < mode.Rows; i++)
        {
            for (var j = i; j < mode.Order; j++)
            {
                values[mode.Carrier(i, j)] = x[i, j];
            }
        }

        return values;
    }

    /// <summary>e^(p τ), with the low part of the phase kept: an error of u even after a million
    /// radians.</summary>
    public static Complex Exponential(DoubleDoubleComplex p, double tau)
    {
        var exponent = p.Re * tau;
        var magnitude = Math.Exp(exponent.Hi) * (1 + exponent.Lo);
        if (p.Im.IsZero)
        {
            return magnitude;
        }

        var phase = p.Im * tau;
        var (sin, cos) = Math.SinCos(phase.Hi);
        return new Complex(magnitude * (cos - (phase.Lo * sin)), magnitude * (sin + (phase.Lo * cos)));
    }

    /// <summary>Chains [μ 1; 0 μ] and [p 1 0; 0 μ 1; 0 0 μ]: divided differences of the exponential by the
    /// series of (eˣ − 1)/x and its successor, which the segment's length keeps at |x| ≤ 1.</summary>
    private static void EvaluateChain(Mode mode, double tau, Span<double> values)
    {
        Put(mode, 0, Exponential(mode.Triangle[0, 0], tau), values);
        var last = Exponential(mode.Triangle[1, 1], tau);
        var x = (Complex)(mode.Triangle[0, 0] - mode.Triangle[1, 1]) * tau;
        Put(mode, 1, last * tau * Series(x, 1), values);
        if (mode.Order == 3)
        {
            Put(mode, 2, last * (tau * tau) * Series(x, 2), values);
        }
    }

    /// <summary>Σ xᵏ/(k + n)!: φₙ near zero.</summary>
    private static Complex Series(Complex x, int n)
    {
        if (x == Complex.Zero)
        {
            return n == 1 ? 1 : 0.5;
        }

        const int terms = 18; // 1/19! is below 1e-17
        if (x.Imaginary == 0)
        {
            double real = 1;
            for (var k = terms; k >= 1; k--)
            {
                real = 1 + (x.Real * real / (k + n));
            }

            return n == 1 ? real : 0.5 * real;
        }

        var sum = Complex.One;
        for (var k = terms; k >= 1; k--)
        {
            sum = 1 + (x * sum / (k + n));
        }

        return n == 1 ? sum : 0.5 * sum;
    }

    private static void Put(Mode mode, int carrier, Complex value, Span<double> values)
    {
        if (mode.IsReal)
        {
            values[carrier] = value.Real;
        }
        else
        {
            values[2 * carrier] = value.Real;
            values[(2 * carrier) + 1] = value.Imaginary;
        }
    }
}
