namespace CircuitTransient.Numerics;

/// <summary>Scaling of a matrix by powers of two, D⁻¹ A D, so that each row is about as large as its column.
/// Exact, and what makes voltages, currents and microseconds comparable.</summary>
/// <param name="Matrix">The balanced matrix.</param>
/// <param name="Exponents">D = diag(2^exponent).</param>
/// <remarks>B. N. Parlett, C. Reinsch, "Balancing a matrix", Numerische Mathematik 13 (1969), in the 2-norm
/// as R. James, J. Langou, B. R. Lowery, "On matrix balancing and eigenvector computation" (2014) advise;
/// both from memory.</remarks>
public sealed record Balancing(DoubleDoubleMatrix Matrix, IReadOnlyList<int> Exponents)
{
    private const double WorthWhile = 0.95; // a step must shrink the norms by this at least (1969 paper)
    private const int MostSweeps = 100; // a few suffice; the bound only guards the loop
    private const int LargestExponent = 400; // keeps the low words clear of underflow

    /// <summary>Balances a copy of <paramref name="a"/>.</summary>
    public static Balancing Of(DoubleDoubleMatrix a)
    {
        ArgumentNullException.ThrowIfNull(a);
        var exponents = new int[a.Rows];
        for (var sweep = 0; sweep < MostSweeps && Sweep(a, exponents); sweep++)
        {
        }

        DoubleDoubleMatrix balanced = new(a.Rows, a.Rows);
        for (var i = 0; i < a.Rows; i++)
        {
            for (var j = 0; j < a.Rows; j++)
            {
                balanced[i, j] = DoubleDouble.ScaleByPowerOfTwo(a[i, j], exponents[j] - exponents[i]);
            }
        }

        return new(balanced, exponents);
    }

    private static bool Sweep(DoubleDoubleMatrix a, int[] exponents)
    {
        var changed = false;
        for (var i = 0; i < a.Rows; i++)
        {
            (var c, var r) = Norms(a, exponents, i);
            if (c == 0 || r == 0)
            {
                continue;
            }

            var step = (int)Math.Round(Math.Log2(r / c) / 2);
            var f = Math.ScaleB(1, step);
            if ((c * f) + (r / f) < WorthWhile * (c + r) && Math.Abs(exponents[i] + step) <= LargestExponent)
            {
                exponents[i] += step;
                changed = true;
            }
        }

        return changed;
    }

    private static (double Column, double Row) Norms(DoubleDoubleMatrix a, int[] exponents, int i)
    {
        double c = 0;
        double r = 0;
        for (var k = 0; k < a.Rows; k++)
        {
            if (k != i)
            {
                c = double.Hypot(c, Math.ScaleB(a[k, i].Hi, exponents[i] - exponents[k]));
                r = double.Hypot(r, Math.ScaleB(a[i, k].Hi, exponents[k] - exponents[i]));
            }
        }

        return (c, r);
    }
}
