using System.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>∫ f g dτ of two functions of a segment in closed form: every pair of exponents gives ∫ τᵏ e^(s τ)
/// dτ.</summary>
internal static class ProductIntegral
{
    private const double SeriesBelow = 1; // |s| times the latest instant; above it the recursion loses little

    /// <summary>The integral from a to b, and what it would be without cancellation.</summary>
    public static (double Sum, double Size) Of(DrawSegment segment, int first, int second, double a, double b)
    {
        double sum = 0, size = 0;
        for (var j = 0; j < segment.Units; j++)
        {
            for (var k = 0; k < segment.Units; k++)
            {
                var pair = Pair(segment, first, j, second, k, a, b);
                sum += pair;
                size += Math.Abs(pair);
            }
        }

        return (sum, size);
    }

    private static double Pair(
        DrawSegment segment, int first, int j, int second, int k, double a, double b)
    {
        var x = new Complex(segment.Re[j], segment.Im[j]);
        var y = new Complex(segment.Re[k], segment.Im[k]);
        double sum = 0;
        for (var p = 0; p <= segment.Degree[j]; p++)
        {
            var c = segment.Coefficient(first, j, p);
            if (c == Complex.Zero)
            {
                continue;
            }

            for (var q = 0; q <= segment.Degree[k]; q++)
            {
                var d = segment.Coefficient(second, k, q);
                if (d == Complex.Zero)
                {
                    continue;
                }

                // Re(C e^x) Re(D e^y) = ½ Re(C D e^(x + y) + C D̄ e^(x + ȳ))
                sum += segment.Im[j] == 0 || segment.Im[k] == 0
                    ? (c * d * Moment(p + q, x + y, a, b)).Real
                    : 0.5 * ((c * d * Moment(p + q, x + y, a, b))
                        + (c * Complex.Conjugate(d) * Moment(p + q, x + Complex.Conjugate(y), a, b))).Real;
            }
        }

        return sum;
    }

    /// <summary>∫ τᵖ e^(s τ) dτ from a to b.</summary>
    private static Complex Moment(int p, Complex s, double a, double b)
    {
        if (p == 0)
        {
            var w = s * (b - a);
            return Complex.Exp(s * a) * (b - a) * (w.Magnitude < 0.5 ? Ratio(w) : (Complex.Exp(w) - 1) / w);
        }

        if (s.Magnitude * b <= SeriesBelow)
        {
            return Series(p, s, a, b);
        }

        var (atA, atB) = (Complex.Exp(s * a), Complex.Exp(s * b));
        var moment = (atB - atA) / s;
        for (var k = 1; k <= p; k++)
        {
            moment = ((Math.Pow(b, k) * atB) - (Math.Pow(a, k) * atA) - (k * moment)) / s;
        }

        return moment;
    }

    /// <summary>(e^w − 1) / w by its series.</summary>
    private static Complex Ratio(Complex w)
    {
        Complex term = 1, sum = 1;
        for (var k = 2; k < 16; k++)
        {
            term *= w / k;
            sum += term;
        }

        return sum;
    }

    private static Complex Series(int p, Complex s, double a, double b)
    {
        Complex sum = 0, power = 1;
        for (var k = 0; k < 22; k++)
        {
            sum += power * ((Math.Pow(b, p + k + 1) - Math.Pow(a, p + k + 1)) / (p + k + 1));
            power *= s / (k + 1);
        }

        return sum;
    }
}
