using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class RealEigensystemTests
{
    private const double Rounding = 1.1e-16;

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(5)]
    [InlineData(12)]
    [InlineData(30)]
    public void A_X_is_X_Lambda(int n)
    {
        var solver = new RealEigensystem(n);
        for (var seed = 0; seed < 20; seed++)
        {
            var a = SampleMatrices.Random(n, n, seed).Hi.ToArray();

            Assert.True(solver.Solve(a, n));

            Assert.True(Residual(solver, a, n) <= 60 * n * Rounding, $"{Residual(solver, a, n):E1}");
        }
    }

    [Fact]
    public void A_complex_pair_stands_with_its_positive_imaginary_part_first()
    {
        var solver = new RealEigensystem(2);

        Assert.True(solver.Solve([1, 2, -2, 1], 2));

        Assert.Equal([1, 1], solver.Real.ToArray());
        Assert.Equal(2, solver.Imaginary[0], 1e-15);
        Assert.Equal(-solver.Imaginary[0], solver.Imaginary[1]);
    }

    // Graded from large to small with couplings at the size of the smaller: each eigenvalue is that of its
    // own step but for the products of couplings, here below 1e-5 of it.
    [Fact]
    public void A_graded_matrix_keeps_its_small_eigenvalues()
    {
        var solver = new RealEigensystem(3);

        Assert.True(solver.Solve([1e12, 1, 1e-6, 1, 1, 1e-6, 1e-6, 1e-6, 1e-6], 3));

        Assert.Equal(1e12, solver.Real[0], 1e-3);
        Assert.Equal(1, solver.Real[1], 1e-11);
        Assert.Equal(1e-6 - 1e-12, solver.Real[2], 1e-18);
    }

    [Fact]
    public void A_column_of_zeros_gives_an_exact_zero()
    {
        var solver = new RealEigensystem(4);

        Assert.True(solver.Solve([0, 3, -1, 2, 0, -5, 2, 1, 0, 7, -4, 1, 0, 1, 1, -9], 4));

        Assert.Equal(0.0, solver.Real[0]);
        Assert.Equal(0.0, solver.Imaginary[0]);
        Assert.Equal([1, 0, 0, 0], Column(solver, 0, 4));
    }

    [Fact]
    public void Equal_eigenvalues_that_nothing_couples_have_independent_vectors()
    {
        var solver = new RealEigensystem(2);

        Assert.True(solver.Solve([-3, 0, 0, -3], 2));

        Assert.Equal([1, 0, 0, 1], solver.Vectors.ToArray());
    }

    private static double[] Column(RealEigensystem solver, int j, int n) =>
        [.. Enumerable.Range(0, n).Select(i => solver.Vectors[(i * n) + j])];

    private static double Residual(RealEigensystem solver, double[] a, int n)
    {
        double worst = 0;
        for (var j = 0; j < n; j++)
        {
            var x = Column(solver, j, n);
            var (re, im) = (solver.Real[j], solver.Imaginary[j]);
            var y = im > 0 ? Column(solver, j + 1, n) : im < 0 ? Column(solver, j - 1, n) : x;
            for (var i = 0; i < n; i++)
            {
                var product = Enumerable.Range(0, n).Sum(k => a[(i * n) + k] * x[k]);
                // of x + i y: A x = a x − b y; of the pair's second column A y = b x + a y
                var expected = (re * x[i]) - (im == 0 ? 0 : im * y[i]);
                worst = Math.Max(worst, Math.Abs(product - expected));
            }
        }

        return worst;
    }
}
