namespace CircuitTransient.Solutions;

/// <summary>Upper bounds of the magnitudes of a mode's functions over a stretch of time.</summary>
internal static class ModeEnvelope
{
    /// <summary>A bound of each function for a ≤ τ ≤ b.</summary>
    public static void Bound(Mode mode, double a, double b, Span<double> bounds)
    {
        var t = mode.Rounded;
        if (mode.Order == 1)
        {
            bounds[0] = Peak(t[0, 0].Real, a, b);
        }
        else if (mode.Rows == 1)
        {
            // |e[p, μ]| ≤ τ max e^(σ τ) and |e[p, μ, μ]| ≤ τ²/2 max e^(σ τ), by the mean value of divided
            // differences.
            var highest = Math.Max(Peak(t[0, 0].Real, a, b), Peak(t[1, 1].Real, a, b));
            bounds[0] = Peak(t[0, 0].Real, a, b);
            bounds[1] = b * highest;
            if (mode.Order == 3)
            {
                bounds[2] = b * b / 2 * highest;
            }
        }
        else
        {
            BoundTriangle(mode, a, b, bounds);
        }
    }

    /// <summary>|exp(T τ)| ≤ exp(N τ) element by element, N with Re of T's diagonal and the magnitudes above
    /// it; for τ in [a, b] that is at most exp(N a) exp(N⁺ (b − a)), N⁺ without the decays.</summary>
    private static void BoundTriangle(Mode mode, double a, double b, Span<double> bounds)
    {
        var n = mode.Order;
        var comparison = new double[n, n];
        var growing = new double[n, n];
        for (var i = 0; i < n; i++)
        {
            for (var j = i; j < n; j++)
            {
                comparison[i, j] = i == j ? mode.Rounded[i, i].Real : mode.Rounded[i, j].Magnitude;
                growing[i, j] = Math.Max(0, comparison[i, j]);
            }
        }

        var first = NonNegativeExponential(comparison, a);
        var second = NonNegativeExponential(growing, b - a);
        for (var i = 0; i < mode.Rows; i++)
        {
            for (var j = i; j < n; j++)
            {
                double sum = 0;
                for (var k = i; k <= j; k++)
                {
                    sum += first[i, k] * second[k, j];
                }

                bounds[mode.Carrier(i, j)] = sum * (1 + 1e-12); // rounding of sums of positive terms
            }
        }
    }

    private static double Peak(double rate, double a, double b) => Math.Exp(rate * (rate > 0 ? b : a));

    /// <summary>exp(N t) of a triangle that is non-negative off its diagonal: a sum of positive terms, so no
    /// digit is lost. Scaled and squared.</summary>
    private static double[,] NonNegativeExponential(double[,] matrix, double t)
    {
        var n = matrix.GetLength(0);
        var lowest = double.PositiveInfinity;
        double norm = 0;
        for (var i = 0; i < n; i++)
        {
            lowest = Math.Min(lowest, matrix[i, i]);
        }

        for (var i = 0; i < n; i++)
        {
            var sum = -lowest;
            for (var j = i; j < n; j++)
            {
                sum += matrix[i, j];
            }

            norm = Math.Max(norm, sum * t);
        }

        var squarings = norm > 1 ? (int)Math.Ceiling(Math.Log2(norm)) : 0;
        var step = Math.ScaleB(t, -squarings);
        var result = Series(matrix, lowest, step);
        for (var k = 0; k < squarings; k++)
        {
            result = Multiply(result, result);
        }

        return result;
    }

    private static double[,] Series(double[,] matrix, double lowest, double step)
    {
        var n = matrix.GetLength(0);
        var shifted = new double[n, n];
        var sum = new double[n, n];
        for (var i = 0; i < n; i++)
        {
            sum[i, i] = 1;
            for (var j = i; j < n; j++)
            {
                shifted[i, j] = (matrix[i, j] - (i == j ? lowest : 0)) * step;
            }
        }

        var term = (double[,])sum.Clone();
        for (var k = 1; k <= 20; k++)
        {
            term = Multiply(term, shifted);
            for (var i = 0; i < n; i++)
            {
                for (var j = i; j < n; j++)
                {
                    term[i, j] /= k;
                    sum[i, j] += term[i, j];
                }
            }
        }

        var factor = Math.Exp(lowest * step);
        for (var i = 0; i < n; i++)
        {
            for (var j = i; j < n; j++)
            {
                sum[i, j] *= factor;
            }
        }

        return sum;
    }

    private static double[,] Multiply(double[,] a, double[,] b)
    {
        var n = a.GetLength(0);
        var c = new double[n, n];
        for (var i = 0; i < n; i++)
        {
            for (var j = i; j < n; j++)
            {
                for (var k = i; k <= j; k++)
                {
                    c[i, j] += a[i, k] * b[k, j];
                }
            }
        }

        return c;
    }
}
