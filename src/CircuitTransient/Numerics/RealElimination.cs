namespace CircuitTransient.Numerics;

/// <summary>Solves small real systems in double precision, in the caller's memory.</summary>
public static class RealElimination
{
    /// <summary>Overwrites B with the X of A X = B by elimination with row exchanges, and A with what is left
    /// of it.</summary>
    /// <param name="a">A, row by row.</param>
    /// <param name="n">How many rows.</param>
    /// <param name="b">B, row by row.</param>
    /// <param name="columns">How many columns B has.</param>
    /// <returns>False where a pivot is zero.</returns>
    public static bool Solve(Span<double> a, int n, Span<double> b, int columns)
    {
        for (var k = 0; k < n; k++)
        {
            var pivot = k;
            for (var i = k + 1; i < n; i++)
            {
                pivot = Math.Abs(a[(i * n) + k]) > Math.Abs(a[(pivot * n) + k]) ? i : pivot;
            }

            if (!(Math.Abs(a[(pivot * n) + k]) > 0))
            {
                return false;
            }

            if (pivot != k)
            {
                Exchange(a.Slice(k * n, n), a.Slice(pivot * n, n));
                Exchange(b.Slice(k * columns, columns), b.Slice(pivot * columns, columns));
            }

            for (var i = k + 1; i < n; i++)
            {
                var f = a[(i * n) + k] / a[(k * n) + k];
                if (f != 0)
                {
                    Subtract(f, a.Slice((k * n) + k, n - k), a.Slice((i * n) + k, n - k));
                    Subtract(f, b.Slice(k * columns, columns), b.Slice(i * columns, columns));
                }
            }
        }

        for (var k = n - 1; k >= 0; k--)
        {
            var row = b.Slice(k * columns, columns);
            for (var i = k + 1; i < n; i++)
            {
                if (a[(k * n) + i] != 0)
                {
                    Subtract(a[(k * n) + i], b.Slice(i * columns, columns), row);
                }
            }

            var pivot = a[(k * n) + k];
            foreach (ref var value in row)
            {
                value /= pivot;
            }
        }

        return true;
    }

    private static void Exchange(Span<double> x, Span<double> y)
    {
        for (var i = 0; i < x.Length; i++)
        {
            (x[i], y[i]) = (y[i], x[i]);
        }
    }

    /// <summary>y = y − f x.</summary>
    private static void Subtract(double f, ReadOnlySpan<double> x, Span<double> y)
    {
        for (var i = 0; i < x.Length; i++)
        {
            y[i] -= f * x[i];
        }
    }
}
