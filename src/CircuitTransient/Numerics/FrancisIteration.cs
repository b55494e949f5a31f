namespace CircuitTransient.Numerics;

/// <summary>The implicit double-shift QR iteration from Hessenberg to real Schur form.</summary>
/// <remarks>J. G. F. Francis (1961, from memory); shifts, deflation and exceptional steps in the form of
/// LAPACK's dlahqr, with the deflation test of M. Ahues and F. Tisseur (LAPACK Working Note 122, 1997), both
/// from memory.</remarks>
public static class FrancisIteration
{
    private const double UnitRoundoff = 2.465190328815662e-32; // 2⁻¹⁰⁵
    private const double Tiny = 1e-290; // below any entry that a balanced matrix can mean
    // two to four are usual, a hundred with dozens of equal chains
    private const int StepsAnEigenvalue = 1000;

    // Many equal chains of poles make the iteration wander just above rounding. So after this many steps an
    // entry is judged by its neighbours only, no longer by their gap; then by the norm; then by n times the
    // norm, which is what the reduction's own rounding comes to.
    private const int StrictSteps = 15;
    private const int LocalSteps = 30;
    private const int NormSteps = 60;

    /// <summary>Overwrites the Hessenberg matrix H with its Schur form T (blocks of order two only for
    /// complex pairs), and the rows of <paramref name="qt"/> with the rotations applied to them.</summary>
    public static void Run(DoubleDoubleMatrix h, DoubleDoubleMatrix qt)
    {
        ArgumentNullException.ThrowIfNull(h);
        ArgumentNullException.ThrowIfNull(qt);
        var last = h.Rows - 1;
        var norm = h.FrobeniusNorm();
        var steps = 0;
        while (last >= 0)
        {
            var floor = steps > NormSteps ? h.Rows * norm : steps > LocalSteps ? norm : 0;
            var first = FirstOfWindow(h, last, floor, steps <= StrictSteps);
            if (first >= last - 1)
            {
                if (first == last - 1)
                {
                    RealPair.Split(h, qt, first);
                }

                last = first - 1;
                steps = 0;
                continue;
            }

            if (steps++ > StepsAnEigenvalue)
            {
                throw new ArithmeticException("the QR iteration did not converge; are all entries finite?");
            }

            Step(h, qt, first, last, FrancisShifts.Choose(h, first, last, steps));
        }
    }

    private static int FirstOfWindow(DoubleDoubleMatrix h, int last, double floor, bool isStrict)
    {
        var k = last;
        while (k > 0 && !IsNegligible(h, k, last, floor, isStrict))
        {
            k--;
        }

        if (k > 0)
        {
            h[k, k - 1] = 0;
        }

        return k;
    }

    private static bool IsNegligible(DoubleDoubleMatrix h, int k, int last, double floor, bool isStrict)
    {
        var below = Math.Abs(h[k, k - 1].Hi);
        if (below <= Math.Max(Tiny, UnitRoundoff * floor))
        {
            return true;
        }

        var size = Math.Abs(h[k - 1, k - 1].Hi) + Math.Abs(h[k, k].Hi);
        if (size == 0)
        {
            size = (k >= 2 ? Math.Abs(h[k - 1, k - 2].Hi) : 0)
                + (k + 1 <= last ? Math.Abs(h[k + 1, k].Hi) : 0);
        }

        if (below > UnitRoundoff * size)
        {
            return false;
        }

        if (!isStrict)
        {
            return true;
        }

        var above = Math.Abs(h[k - 1, k].Hi);
        var gap = Math.Abs((h[k - 1, k - 1] - h[k, k]).Hi);
        var diagonal = Math.Abs(h[k, k].Hi);
        var larger = Math.Max(diagonal, gap);
        var smaller = Math.Min(diagonal, gap);
        var sum = larger + Math.Max(below, above);
        return Math.Min(below, above) * (Math.Max(below, above) / sum)
            <= Math.Max(Tiny, UnitRoundoff * (smaller * (larger / sum)));
    }

    private static void Step(
        DoubleDoubleMatrix h, DoubleDoubleMatrix qt, int first, int last, FrancisShifts shifts)
    {
        (var start, var x, var y, var z) = StartOfBulge(h, first, last, shifts);
        for (var k = start; k < last; k++)
        {
            var count = Math.Min(3, last - k + 1);
            if (k > start)
            {
                x = h[k, k - 1];
                y = h[k + 1, k - 1];
                z = count == 3 ? h[k + 2, k - 1] : 0;
            }

            var reflection = Reflection.Of(x, y, z, count, out var alpha);
            if (k > start)
            {
                h[k, k - 1] = alpha;
                h[k + 1, k - 1] = 0;
                if (count == 3)
                {
                    h[k + 2, k - 1] = 0;
                }
            }
            else if (start > first)
            {
                h[k, k - 1] *= 1 - reflection.Tau;
            }

            reflection.ApplyToRows(h, k, k);
            reflection.ApplyToColumns(h, k, Math.Min(k + 3, last) + 1);
            reflection.ApplyToRows(qt, k, 0);
        }
    }

    /// <summary>Where two small subdiagonal entries in a row let the bulge start, and the first column of the
    /// shifted product there.</summary>
    private static (int Start, DoubleDouble X, DoubleDouble Y, DoubleDouble Z) StartOfBulge(
        DoubleDoubleMatrix h, int first, int last, FrancisShifts shifts)
    {
        for (var m = last - 2; ; m--)
        {
            (var x, var y, var z) = shifts.FirstColumn(h, m);
            if (m == first)
            {
                return (m, x, y, z);
            }

            var around = Math.Abs(h[m - 1, m - 1].Hi) + Math.Abs(h[m, m].Hi)
                + Math.Abs(h[m + 1, m + 1].Hi);
            if (Math.Abs(h[m, m - 1].Hi) * (Math.Abs(y.Hi) + Math.Abs(z.Hi))
                <= UnitRoundoff * Math.Abs(x.Hi) * around)
            {
                return (m, x, y, z);
            }
        }
    }
}
