using System.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The limit, for t → ∞, of a sum of a segment's functions and those they drive.</summary>
internal static class FinalSlopes
{
    private const double Rounding = 1e-12; // of the largest function in the sum

    /// <summary>The limit; null where there is none.</summary>
    public static double? Of(SegmentBasis basis, double[] coefficients, double length)
    {
        var envelope = new double[basis.Width];
        basis.Envelope(0, length, envelope);
        var scale = coefficients.Zip(envelope, (c, e) => Math.Abs(c) * e).DefaultIfEmpty(0).Max();
        double limit = 0;
        for (var m = 0; m < basis.Modes.Length; m++)
        {
            if (basis.Modes[m].Decay > 0 || IsNothing(basis, m, coefficients, envelope, Rounding * scale))
            {
                continue;
            }

            if (ModeLimit(basis, m, coefficients) is not { } own)
            {
                return null;
            }

            limit += own;
        }

        return limit;
    }

    private static bool IsNothing(
        SegmentBasis basis, int m, double[] coefficients, double[] envelope, double limit)
    {
        for (var k = 0; k < basis.Modes[m].Width; k++)
        {
            var place = basis.Place(m) + k;
            if (Math.Abs(coefficients[place]) * envelope[place] > limit)
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>The limit of functions e^(T t) whose last exponent is zero and whose others decay: the last
    /// column tends to (−N⁻¹ b, 1), all others to nothing.</summary>
    private static double? ModeLimit(SegmentBasis basis, int m, double[] coefficients)
    {
        var mode = basis.Modes[m];
        var t = mode.Rounded;
        var last = mode.Order - 1;
        if (t[last, last] != Complex.Zero || Enumerable.Range(0, last).Any(i => t[i, i].Real >= 0))
        {
            return null;
        }

        var column = new Complex[mode.Order];
        column[last] = Complex.One;
        for (var i = last - 1; i >= 0; i--)
        {
            var sum = Complex.Zero;
            for (var j = i + 1; j <= last; j++)
            {
                sum += t[i, j] * column[j];
            }

            column[i] = -sum / t[i, i];
        }

        var limit = Complex.Zero;
        for (var i = 0; i < mode.Rows; i++)
        {
            limit += basis.Coefficient(coefficients, m, mode.Carrier(i, last)) * column[i];
        }

        return limit.Real;
    }
}
