namespace CircuitTransient.Numerics;

public sealed partial class RealEigensystem
{
    private const double Rounding = 1.1e-16; // 2⁻⁵³
    private const double Tiny = 1e-290; // below any entry that a balanced matrix can mean
    private const int StepsAnEigenvalue = 60; // two to four are usual
    private const int ExceptionalEvery = 10;

    private bool Iterate()
    {
        var last = n - 1;
        var steps = 0;
        while (last >= 0)
        {
            var first = FirstOfWindow(last);
            if (first >= last - 1)
            {
                if (first == last - 1)
                {
                    Split(first);
                }
                else
                {
                    (re[last], im[last]) = (t[(last * n) + last], 0);
                }

                last = first - 1;
                steps = 0;
                continue;
            }

            if (++steps > StepsAnEigenvalue)
            {
                return false;
            }

            Step(first, last, steps);
        }

        return true;
    }

    private int FirstOfWindow(int last)
    {
        var k = last;
        while (k > 0 && !IsNegligible(k, last))
        {
            k--;
        }

        if (k > 0)
        {
            t[(k * n) + k - 1] = 0;
        }

        return k;
    }

    private bool IsNegligible(int k, int last)
    {
        var below = Math.Abs(t[(k * n) + k - 1]);
        if (below <= Tiny)
        {
            return true;
        }

        var (upper, lower) = (t[((k - 1) * n) + k - 1], t[(k * n) + k]);
        var size = Math.Abs(upper) + Math.Abs(lower);
        if (size == 0)
        {
            size = (k >= 2 ? Math.Abs(t[((k - 1) * n) + k - 2]) : 0)
                + (k + 1 <= last ? Math.Abs(t[((k + 1) * n) + k]) : 0);
        }

        if (below > Rounding * size)
        {
            return false;
        }

        var above = Math.Abs(t[((k - 1) * n) + k]);
        var (gap, diagonal) = (Math.Abs(upper - lower), Math.Abs(lower));
        var (larger, smaller) = (Math.Max(diagonal, gap), Math.Min(diagonal, gap));
        var sum = larger + Math.Max(below, above);
        return Math.Min(below, above) * (Math.Max(below, above) / sum)
            <= Math.Max(Tiny, Rounding * (smaller * (larger / sum)));
    }

    /// <summary>Sum and product of the two shifts.</summary>
    private (double Sum, double Product) Shifts(int first, int last, int step)
    {
        if (step % ExceptionalEvery == 0)
        {
            var s = Math.Abs(t[(last * n) + last - 1]) + Math.Abs(t[((last - 1) * n) + last - 2]);
            var corner = (0.75 * s) + t[(last * n) + last];
            return (2 * corner, (corner * corner) + (0.4375 * s * s));
        }

        var (a, b) = (t[((last - 1) * n) + last - 1], t[((last - 1) * n) + last]);
        var (c, d) = (t[(last * n) + last - 1], t[(last * n) + last]);
        var half = (a - d) / 2;
        var square = (half * half) + (b * c);
        if (square < 0)
        {
            return (a + d, (a * d) - (b * c));
        }

        // the real one nearer the corner, twice
        var z = half >= 0 ? half + Math.Sqrt(square) : half - Math.Sqrt(square);
        var nearer = z == 0 ? d : d - (b * c / z);
        return (2 * nearer, nearer * nearer);
    }

    private void Step(int first, int last, int step)
    {
        var (sum, product) = Shifts(first, last, step);
        var (a, b) = (t[(first * n) + first], t[(first * n) + first + 1]);
        var (c, d) = (t[((first + 1) * n) + first], t[((first + 1) * n) + first + 1]);
        // the first column of (T − s₁)(T − s₂), up to a factor
        var x0 = (((a * (a - sum)) + product) / c) + b;
        var (x1, x2) = (a + d - sum, t[((first + 2) * n) + first + 1]);
        for (var k = first; k < last; k++)
        {
            var count = Math.Min(3, last - k + 1);
            if (k > first)
            {
                x0 = t[(k * n) + k - 1];
                x1 = t[((k + 1) * n) + k - 1];
                x2 = count == 3 ? t[((k + 2) * n) + k - 1] : 0;
            }

            var size = Math.Abs(x0) + Math.Abs(x1) + (count == 3 ? Math.Abs(x2) : 0);
            if (size == 0)
            {
                continue;
            }

            (x0, x1, x2) = (x0 / size, x1 / size, count == 3 ? x2 / size : 0);
            var norm = Math.Sqrt((x0 * x0) + (x1 * x1) + (x2 * x2));
            var alpha = x0 > 0 ? -norm : norm;
            var (tau, v, w) = ((alpha - x0) / alpha, x1 / (x0 - alpha), x2 / (x0 - alpha));
            if (k > first)
            {
                t[(k * n) + k - 1] = alpha * size;
                t[((k + 1) * n) + k - 1] = 0;
                if (count == 3)
                {
                    t[((k + 2) * n) + k - 1] = 0;
                }
            }

            Apply(k, count, Math.Min(k + 3, last), tau, v, w);
        }
    }

    /// <summary>I − τ (1, v, w)ᵀ (1, v, w) on rows and columns k, k + 1 (, k + 2).</summary>
    private void Apply(int k, int count, int lastRow, double tau, double v, double w)
    {
        var third = count == 3;
        for (var j = k; j < n; j++)
        {
            var i = (k * n) + j;
            var sum = tau * (t[i] + (v * t[i + n]) + (third ? w * t[i + n + n] : 0));
            t[i] -= sum;
            t[i + n] -= sum * v;
            if (third)
            {
                t[i + n + n] -= sum * w;
            }
        }

        ApplyToColumns(t, lastRow, k, third, tau, v, w);
        ApplyToColumns(q, n - 1, k, third, tau, v, w);
    }

    private void ApplyToColumns(double[] a, int lastRow, int k, bool third, double tau, double v, double w)
    {
        for (var i = (lastRow * n) + k; i >= 0; i -= n)
        {
            var sum = tau * (a[i] + (v * a[i + 1]) + (third ? w * a[i + 2] : 0));
            a[i] -= sum;
            a[i + 1] -= sum * v;
            if (third)
            {
                a[i + 2] -= sum * w;
            }
        }
    }

    /// <summary>The eigenvalues of the block at k; where they are real it is rotated to triangular
    /// form.</summary>
    private void Split(int k)
    {
        var (i, j) = ((k * n) + k, ((k + 1) * n) + k);
        var (a, b, c, d) = (t[i], t[i + 1], t[j], t[j + 1]);
        var p = (a - d) / 2;
        var scale = Math.Max(Math.Abs(p), Math.Max(Math.Abs(b), Math.Abs(c)));
        var square = scale == 0 ? 0 : (p / scale * p) + (b / scale * c);
        var root = Math.Sqrt(Math.Abs(square)) * Math.Sqrt(scale);
        if (square < 0)
        {
            (re[k], im[k], re[k + 1], im[k + 1]) = (d + p, root, d + p, -root);
            return;
        }

        var z = p < 0 ? p - root : p + root;
        var (upper, lower) = z == 0 ? (d, a) : (d + z, d - (b / z * c));
        var size = double.Hypot(c, z);
        var (cos, sin) = z == 0 ? (0.0, 1.0) : (z / size, c / size);
        for (var column = k; column < n; column++)
        {
            var (x0, y0) = (t[(k * n) + column], t[((k + 1) * n) + column]);
            t[(k * n) + column] = (cos * x0) + (sin * y0);
            t[((k + 1) * n) + column] = (cos * y0) - (sin * x0);
        }

        RotateColumns(t, k + 2, k, cos, sin);
        RotateColumns(q, n, k, cos, sin);
        (t[i], t[i + 1], t[j], t[j + 1]) = (upper, b - c, 0, lower);
        (re[k], im[k], re[k + 1], im[k + 1]) = (upper, 0, lower, 0);
    }

    private void RotateColumns(double[] a, int rows, int k, double cos, double sin)
    {
        for (var i = k; i < rows * n; i += n)
        {
            var (x0, y0) = (a[i], a[i + 1]);
            a[i] = (cos * x0) + (sin * y0);
            a[i + 1] = (cos * y0) - (sin * x0);
        }
    }
}
