using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class TriangularExponentialTests
{
    // C. B. Moler, C. F. Van Loan, "Nineteen dubious ways to compute the exponential of a matrix" (1978), the
    // matrix of eigenvalues −1 and −17, and two of the four tests of R. C. Ward (1977): papers and matrices
    // from memory, results computed with 80 digits by mpmath 1.3.0.
    [Fact]
    public void The_exponential_of_moler_and_van_loan_is_as_in_print() => AssertExponential(
        new double[,] { { -49, 24 }, { -64, 31 } },
        new double[,]
        {
            { -0.7357587581447531, 0.5518190996580977 },
            { -1.471517599088261, 1.103638240715573 },
        });

    [Fact]
    public void The_first_test_of_ward_is_as_in_print() => AssertExponential(
        new double[,] { { 4, 2, 0 }, { 1, 4, 1 }, { 1, 1, 4 } },
        new double[,]
        {
            { 147.8666224463702, 183.7651386463684, 71.79703239999654 },
            { 127.7810855231825, 183.7651386463684, 91.88256932318421 },
            { 127.7810855231825, 163.6796017231808, 111.9681062463719 },
        });

    [Fact]
    public void The_third_test_of_ward_is_as_in_print() => AssertExponential(
        new double[,] { { -131, 19, 18 }, { -390, 56, 54 }, { -387, 57, 52 } },
        new double[,]
        {
            { -1.50964415879609, 0.3678794391102887, 0.1353352811754591 },
            { -5.632570799902596, 1.471517758502308, 0.4060058435263772 },
            { -4.934938326098107, 1.103638317330866, 0.5413411267629899 },
        });

    [Theory]
    [InlineData(2, 0)]
    [InlineData(2, 1e-15)]
    [InlineData(2, 1e-7)]
    [InlineData(2, 1e-1)]
    [InlineData(3, 1e-9)]
    [InlineData(3, 1e-3)]
    [InlineData(6, 0)]
    [InlineData(6, 1e-16)]
    [InlineData(6, 1e-6)]
    [InlineData(6, 1e-2)]
    [InlineData(6, 1e-1)]
    public void Blocks_near_a_multiple_pole_agree_with_the_series_of_the_whole_matrix(
        int multiplicity, double separation)
    {
        DoubleDoubleMatrix a = SampleMatrices.NearlyDefective(multiplicity, separation);
        foreach (double t in (double[])[0, 1e-6, 0.3, 2.5, 20])
        {
            DoubleDoubleMatrix expected = SampleMatrices.Exponential(a, t);
            double norm = expected.FrobeniusNorm();
            (DoubleDoubleMatrix fine, double[,] coarse) = ByBlocks(a, t);

            double fineError = fine.Plus(-1, expected).FrobeniusNorm() / norm;
            double coarseError = DoubleDoubleMatrix.From(coarse).Plus(-1, expected).FrobeniusNorm() / norm;
            Assert.True(fineError < 1e-24, $"t = {t}: {fineError:E1}");
            // projector norms of up to 1e3, times 1e-16
            Assert.True(coarseError < 2e-12, $"t = {t}: {coarseError:E1}");
        }
    }

    [Fact]
    public void A_wide_block_stays_finite_long_after_its_time()
    {
        DoubleDoubleComplexMatrix t = new(2, 2);
        t[0, 0] = -1;
        t[1, 1] = -3;
        t[0, 1] = 100;
        Complex[] result = new Complex[4];

        new BlockExponential(t).Evaluate(600, result);

        Assert.Equal(1, result[0].Real / Math.Exp(-600), 1e-12);
        Assert.Equal(1, result[1].Real / (50 * Math.Exp(-600)), 1e-11); // 100 (e^−t − e^−3t) / 2
        Assert.Equal(
            1, (TriangularExponential.Of(t, 600)[0, 1].Re / (DoubleDouble.Exp(-600) * 50.0)).Hi, 1e-15);
    }

    private static (DoubleDoubleMatrix Fine, double[,] Coarse) ByBlocks(DoubleDoubleMatrix a, double t)
    {
        int n = a.Rows;
        DoubleDoubleMatrix fine = new(n, n);
        double[,] coarse = new double[n, n];
        foreach (SpectralBlock block in SpectralBlocks.Of(a).Blocks)
        {
            double weight = block.IsReal ? 1 : 2;
            DoubleDoubleComplexMatrix exponential = TriangularExponential.Of(block.T, t);
            DoubleDoubleComplexMatrix share = block.V.Times(exponential).Times(block.W);
            fine = fine.Plus(weight, share.Re);
            Add(coarse, weight, block, t);
        }

        return (fine, coarse);
    }

    private static void Add(double[,] sum, double weight, SpectralBlock block, double t)
    {
        int m = block.Size;
        Complex[] e = new Complex[m * m];
        new BlockExponential(block.T).Evaluate(t, e);
        Complex[,] v = block.V.ToComplex();
        Complex[,] w = block.W.ToComplex();
        for (int i = 0; i < sum.GetLength(0); i++)
        {
            for (int j = 0; j < sum.GetLength(1); j++)
            {
                for (int k = 0; k < m * m; k++)
                {
                    sum[i, j] += weight * (v[i, k / m] * e[k] * w[k % m, j]).Real;
                }
            }
        }
    }

    private static void AssertExponential(double[,] matrix, double[,] expected)
    {
        (DoubleDoubleMatrix fine, double[,] coarse) = ByBlocks(DoubleDoubleMatrix.From(matrix), 1);
        double norm = DoubleDoubleMatrix.From(expected).FrobeniusNorm();
        for (int i = 0; i < expected.GetLength(0); i++)
        {
            for (int j = 0; j < expected.GetLength(0); j++)
            {
                Assert.Equal(1, (double)fine[i, j] / expected[i, j], 2e-15); // the printed digits
                Assert.Equal(expected[i, j], coarse[i, j], 1e-12 * norm); // projectors of norm 1e2 to 1e3
            }
        }
    }
}
