using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class LuFactorizationTests
{
    // Inverse of the Hilbert matrix: integers (M.-D. Choi, "Tricks or treats with the Hilbert matrix",
    // American Mathematical Monthly 90 (1983), from memory). Its condition number at order 10 is 1.6e13.
    [Fact]
    public void The_inverse_of_the_hilbert_matrix_comes_out_in_its_known_integers()
    {
        const int N = 10;
        DoubleDoubleMatrix hilbert = new(N, N);
        for (int i = 0; i < N; i++)
        {
            for (int j = 0; j < N; j++)
            {
                hilbert[i, j] = DoubleDouble.One / (i + j + 1);
            }
        }

        DoubleDoubleMatrix inverse = LuFactorization.Of(hilbert).Solve(DoubleDoubleMatrix.Identity(N));

        for (int i = 1; i <= N; i++)
        {
            for (int j = 1; j <= N; j++)
            {
                double expected = ((i + j) % 2 == 0 ? 1 : -1) * (i + j - 1) * Choose(N + i - 1, N - j)
                    * Choose(N + j - 1, N - i) * Choose(i + j - 2, i - 1) * Choose(i + j - 2, i - 1);
                Assert.Equal(1, (double)(inverse[i - 1, j - 1] / expected), 1e-16); // 1.6e13 · 5e-32 · n
            }
        }
    }

    [Fact]
    public void A_system_of_order_zero_has_an_empty_solution() =>
        Assert.Equal(0, LuFactorization.Of(new(0, 0)).Solve(new(0, 3)).Rows);

    [Fact]
    public void A_complex_system_is_solved_to_rounding()
    {
        const int N = 17;
        DoubleDoubleComplexMatrix a = new(SampleMatrices.Random(N, N, 1), SampleMatrices.Random(N, N, 2));
        DoubleDoubleComplexMatrix x = new(SampleMatrices.Random(N, 3, 3), SampleMatrices.Random(N, 3, 4));

        DoubleDoubleComplexMatrix solved = ComplexLuFactorization.Of(a).Solve(a.Times(x));

        for (int i = 0; i < N; i++)
        {
            for (int j = 0; j < 3; j++)
            {
                // n · condition (about 100) · 5e-32, with room
                Assert.True((solved[i, j] - x[i, j]).Magnitude < 1e-27);
            }
        }
    }

    private static double Choose(int n, int k)
    {
        double result = 1;
        for (int i = 1; i <= k; i++)
        {
            result = result * (n - k + i) / i;
        }

        return result;
    }
}
