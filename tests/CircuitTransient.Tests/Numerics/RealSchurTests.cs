using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class RealSchurTests
{
    // The lower six eigenvalues of the Frank matrix of order 12, the others being their reciprocals; these
    // digits computed with 60 places by mpmath 1.3.0.
    private static readonly double[] Frank =
    [
        0.03102806064401, 0.049507429185278, 0.081227659240405, 0.14364651976922, 0.28474972055848,
        0.64350531900486,
    ];

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(7)]
    [InlineData(40)]
    public void Q_T_Qt_is_the_matrix_and_Q_is_orthogonal(int n)
    {
        DoubleDoubleMatrix a = SampleMatrices.Random(n, n, 11 + n);

        RealSchur schur = RealSchur.Of(a);

        DoubleDoubleMatrix q = schur.TransposedQ.Transposed();
        AssertSmall(q.Times(schur.T).Times(schur.TransposedQ).Plus(-1, a), n * n * DoubleDouble.Rounding);
        AssertSmall(
            q.Times(schur.TransposedQ).Plus(-1, DoubleDoubleMatrix.Identity(n)),
            10 * n * DoubleDouble.Rounding);
    }

    [Fact]
    public void T_is_triangular_but_for_complex_pairs()
    {
        DoubleDoubleMatrix t = RealSchur.Of(SampleMatrices.Random(30, 30, 5)).T;

        for (int i = 1; i < 30; i++)
        {
            for (int j = 0; j < i - 1; j++)
            {
                Assert.True(t[i, j].IsZero);
            }

            if (!t[i, i - 1].IsZero)
            {
                Assert.True(i < 2 || t[i - 1, i - 2].IsZero);
                DoubleDouble p = (t[i, i] - t[i - 1, i - 1]) * 0.5;
                Assert.True(((p * p) + (t[i, i - 1] * t[i - 1, i])).IsNegative);
            }
        }
    }

    [Fact]
    public void The_frank_matrix_of_order_12_has_its_published_eigenvalues()
    {
        DoubleDoubleMatrix t = RealSchur.Of(SampleMatrices.Frank(12)).T;

        DoubleDouble[] poles = [.. Enumerable.Range(0, 12).Select(i => t[i, i]).Order()];

        for (int i = 0; i < 6; i++)
        {
            Assert.Equal(1, (double)poles[i] / Frank[i], 1e-13); // the printed digits
            Assert.Equal(1, (double)(poles[i] * poles[11 - i]), 1e-15); // they come in reciprocal pairs
        }
    }

    [Fact]
    public void A_cyclic_shift_needs_the_exceptional_shifts_and_gets_them()
    {
        DoubleDoubleMatrix a = new(4, 4);
        a[0, 3] = a[1, 0] = a[2, 1] = a[3, 2] = 1;

        ComplexSchur schur = ComplexSchur.Of(RealSchur.Of(a));

        for (int i = 0; i < 4; i++)
        {
            DoubleDoubleComplex fourth = schur.T[i, i] * schur.T[i, i] * schur.T[i, i] * schur.T[i, i];
            Assert.True((fourth - 1).Magnitude < 100 * DoubleDouble.Rounding);
        }
    }

    private static void AssertSmall(DoubleDoubleMatrix a, double limit) =>
        Assert.True(a.LargestMagnitude() <= limit, $"{a.LargestMagnitude():E2} over {limit:E2}");
}
