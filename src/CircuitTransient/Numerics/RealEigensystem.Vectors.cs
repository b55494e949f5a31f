namespace CircuitTransient.Numerics;

public sealed partial class RealEigensystem
{
    private double largestEntry;

    private void FindVectors()
    {
        largestEntry = Tiny;
        for (var i = 0; i < n * n; i++)
        {
            largestEntry = Math.Max(largestEntry, Math.Abs(t[i]));
        }

        for (var k = n - 1; k >= 0; k--)
        {
            if (im[k] == 0)
            {
                FindReal(k);
            }
            else
            {
                k--;
                FindPair(k);
            }
        }
    }

    /// <summary>(T − λ) y = 0 with y = 1 at k, from row k − 1 upwards, then x = Q y.</summary>
    private void FindReal(int k)
    {
        var y = work.AsSpan(0, n);
        y.Clear();
        y[k] = 1;
        for (var i = k - 1; i >= 0; i--)
        {
            if (im[i] == 0)
            {
                y[i] = -Sum(i, i + 1, k, y) / Divisor(t[(i * n) + i] - re[k]);
                continue;
            }

            var (r0, r1) = (-Sum(i - 1, i + 1, k, y), -Sum(i, i + 1, k, y));
            var (a, b) = (t[((i - 1) * n) + i - 1] - re[k], t[((i - 1) * n) + i]);
            var (c, d) = (t[(i * n) + i - 1], t[(i * n) + i] - re[k]);
            var determinant = (a * d) - (b * c); // of a block with complex eigenvalues: never zero
            y[i] = ((a * r1) - (c * r0)) / determinant;
            y[i - 1] = ((d * r0) - (b * r1)) / determinant;
            i--;
        }

        Put(y, k, k, 1 / Math.Sqrt(Square(y)));
    }

    /// <summary>The same for λ = a + i b, whose own block is at k.</summary>
    private void FindPair(int k)
    {
        var y = work.AsSpan(0, n);
        var z = work.AsSpan(n, n);
        y.Clear();
        z.Clear();
        var (b, c) = (t[(k * n) + k + 1], t[((k + 1) * n) + k]);
        if (Math.Abs(c) >= Math.Abs(b))
        {
            y[k + 1] = 1;
            (y[k], z[k]) = ((re[k] - t[((k + 1) * n) + k + 1]) / c, im[k] / c);
        }
        else
        {
            y[k] = 1;
            (y[k + 1], z[k + 1]) = ((re[k] - t[(k * n) + k]) / b, im[k] / b);
        }

        for (var i = k - 1; i >= 0; i--)
        {
            if (im[i] == 0)
            {
                (y[i], z[i]) = Quotient(
                    -Sum(i, i + 1, k + 1, y), -Sum(i, i + 1, k + 1, z), t[(i * n) + i] - re[k], -im[k]);
            }
            else
            {
                SolveBlock(i - 1, k, y, z);
                i--;
            }
        }

        var factor = 1 / Math.Sqrt(Square(y) + Square(z));
        Put(y, k, k + 1, factor);
        Put(z, k + 1, k + 1, factor);
    }

    private void SolveBlock(int i, int k, Span<double> y, Span<double> z)
    {
        var (a, b) = (t[(i * n) + i] - re[k], t[(i * n) + i + 1]);
        var (c, d) = (t[((i + 1) * n) + i], t[((i + 1) * n) + i + 1] - re[k]);
        var s = -im[k];
        var (p0, p1) = (-Sum(i, i + 2, k + 1, y), -Sum(i + 1, i + 2, k + 1, y));
        var (q0, q1) = (-Sum(i, i + 2, k + 1, z), -Sum(i + 1, i + 2, k + 1, z));
        // (a + i s)(d + i s) − b c
        var (detRe, detIm) = ((a * d) - (s * s) - (b * c), s * (a + d));
        (y[i], z[i]) = Quotient(
            (d * p0) - (s * q0) - (b * p1), (d * q0) + (s * p0) - (b * q1), detRe, detIm, largestEntry);
        (y[i + 1], z[i + 1]) = Quotient(
            (a * p1) - (s * q1) - (c * p0), (a * q1) + (s * p1) - (c * q0), detRe, detIm, largestEntry);
    }

    private double Sum(int row, int from, int to, ReadOnlySpan<double> y)
    {
        double sum = 0;
        for (var j = from; j <= to; j++)
        {
            sum += t[(row * n) + j] * y[j];
        }

        return sum;
    }

    /// <summary>A divisor that equal eigenvalues make zero is put at rounding: their vectors come out
    /// parallel to rounding, or independent where nothing couples them.</summary>
    private double Divisor(double value) =>
        Math.Abs(value) >= Rounding * Rounding * largestEntry ? value : Rounding * Rounding * largestEntry;

    private (double Re, double Im) Quotient(double a, double b, double c, double d, double factor = 1)
    {
        var size = Math.Max(Math.Abs(c), Math.Abs(d));
        if (size < Rounding * Rounding * largestEntry * factor)
        {
            (c, d) = (Rounding * Rounding * largestEntry * factor, 0);
            size = c;
        }

        var (cs, ds) = (c / size, d / size);
        var square = ((cs * cs) + (ds * ds)) * size;
        return (((a * cs) + (b * ds)) / square, ((b * cs) - (a * ds)) / square);
    }

    private static double Square(ReadOnlySpan<double> y)
    {
        double sum = 0;
        foreach (var value in y)
        {
            sum += value * value;
        }

        return sum;
    }

    private void Put(ReadOnlySpan<double> y, int column, int last, double factor)
    {
        for (var i = 0; i < n; i++)
        {
            double sum = 0;
            for (var j = 0; j <= last; j++)
            {
                sum += q[(i * n) + j] * y[j];
            }

            x[(i * n) + column] = sum * factor;
        }
    }
}
