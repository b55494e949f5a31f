using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

/// <summary>Matrices that several tests start from.</summary>
internal static class SampleMatrices
{
    /// <summary>Entries even in ±1, both words filled; the same for the same seed.</summary>
    public static DoubleDoubleMatrix Random(int rows, int columns, int seed)
    {
        Random random = new(seed);
        DoubleDoubleMatrix result = new(rows, columns);
        for (int i = 0; i < rows; i++)
        {
            for (int j = 0; j < columns; j++)
            {
                double hi = (2 * random.NextDouble()) - 1;
                result[i, j] = DoubleDouble.FromSum(hi, hi * (random.NextDouble() - 0.5) * 2e-16);
            }
        }

        return result;
    }

    /// <summary>The Frank matrix: a_ij = n + 1 − max(i, j) for j ≥ i − 1, else 0 (W. L. Frank
    /// 1958, from memory).</summary>
    public static DoubleDoubleMatrix Frank(int n)
    {
        DoubleDoubleMatrix result = new(n, n);
        for (int i = 1; i <= n; i++)
        {
            for (int j = Math.Max(1, i - 1); j <= n; j++)
            {
                result[i - 1, j - 1] = n + 1 - Math.Max(i, j);
            }
        }

        return result;
    }

    /// <summary>A random orthogonal matrix: reflections of random vectors, multiplied out in
    /// double-double.</summary>
    public static DoubleDoubleMatrix Orthogonal(int n, int seed)
    {
        DoubleDoubleMatrix result = DoubleDoubleMatrix.Identity(n);
        for (int k = 0; k < Math.Min(n, 5); k++)
        {
            DoubleDoubleMatrix v = Random(1, n, seed + (1000 * k));
            DoubleDoubleMatrix product = result.Times(v.Transposed());
            DoubleDouble scale = -2.0 / v.Row(0).SumOfSquares();
            for (int i = 0; i < n; i++)
            {
                result.Row(i).AddScaled(product[i, 0] * scale, v.Row(0));
            }
        }

        return result;
    }

    /// <summary>S B S⁻¹, multiplied out and solved in double-double.</summary>
    public static DoubleDoubleMatrix Similar(DoubleDoubleMatrix s, DoubleDoubleMatrix b) =>
        LuFactorization.Of(s.Transposed()).Solve(s.Times(b).Transposed()).Transposed();

    /// <summary>A chain of m poles −1, −1 − δ, −1 − 2δ, … coupled by ones, three other poles, turned by a
    /// random similarity.</summary>
    public static DoubleDoubleMatrix NearlyDefective(int m, double separation)
    {
        DoubleDoubleMatrix b = new(m + 3, m + 3);
        for (int i = 0; i < m; i++)
        {
            b[i, i] = (DoubleDouble)(-1) - (separation * i);
            b[i, i + 1] = i + 1 < m ? 1 : 0;
        }

        b[m, m] = -4;
        b[m + 1, m + 2] = 7;
        b[m + 2, m + 1] = -7;
        return Similar(Random(m + 3, m + 3, 100 + m), b);
    }

    /// <summary>e^(A t) by Taylor's series of the whole matrix, scaled to a norm below one half and squared.
    /// </summary>
    public static DoubleDoubleMatrix Exponential(DoubleDoubleMatrix a, double t)
    {
        double norm = a.FrobeniusNorm() * Math.Abs(t);
        int squarings = norm > 0.5 ? Math.ILogB(norm) + 2 : 0;
        DoubleDouble scaled = DoubleDouble.ScaleByPowerOfTwo(t, -squarings);
        DoubleDoubleMatrix sum = DoubleDoubleMatrix.Identity(a.Rows);
        DoubleDoubleMatrix term = sum;
        for (int k = 1; k < 30; k++)
        {
            term = new DoubleDoubleMatrix(a.Rows, a.Rows).Plus(scaled / k, term.Times(a));
            sum = sum.Plus(1, term);
        }

        for (int k = 0; k < squarings; k++)
        {
            sum = sum.Times(sum);
        }

        return sum;
    }
}
