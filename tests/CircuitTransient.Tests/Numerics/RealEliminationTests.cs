using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class RealEliminationTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(4)]
    [InlineData(12)]
    public void X_solves_A_X_equal_B(int n)
    {
        var a = SampleMatrices.Random(n, n, 3 + n).Hi.ToArray();
        var b = SampleMatrices.Random(n, 2, 5 + n).Hi.ToArray();
        var x = b.ToArray();

        Assert.True(RealElimination.Solve(a.ToArray(), n, x, 2));

        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < 2; j++)
            {
                var product = Enumerable.Range(0, n).Sum(k => a[(i * n) + k] * x[(k * 2) + j]);
                Assert.Equal(b[(i * 2) + j], product, 1e-12); // entries of one, well conditioned
            }
        }
    }

    [Fact]
    public void Rows_are_exchanged_where_a_pivot_is_zero()
    {
        double[] x = [3, 5];

        Assert.True(RealElimination.Solve([0, 1, 2, 0], 2, x, 1));

        Assert.Equal([2.5, 3], x);
    }

    [Fact]
    public void A_singular_matrix_is_told() =>
        Assert.False(RealElimination.Solve([1, 2, 2, 4], 2, new double[2], 1));
}
