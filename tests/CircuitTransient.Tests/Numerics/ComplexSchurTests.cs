using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class ComplexSchurTests
{
    private const int N = 24;

    [Fact]
    public void Z_T_Zh_is_the_matrix_after_any_number_of_swaps()
    {
        DoubleDoubleMatrix a = SampleMatrices.Random(N, N, 21);
        ComplexSchur schur = ComplexSchur.Of(RealSchur.Of(a));
        for (int sweep = 0; sweep < 6; sweep++)
        {
            for (int k = sweep % 3; k + 1 < N; k += 2)
            {
                schur.Swap(k);
            }
        }

        DoubleDoubleComplexMatrix z = schur.Vectors.Transposed();
        DoubleDoubleMatrix turned = new DoubleDoubleMatrix(N, N).Plus(-1, schur.Vectors.Im);
        DoubleDoubleComplexMatrix adjoint = new(schur.Vectors.Re, turned);
        DoubleDoubleComplexMatrix product = z.Times(schur.T).Times(adjoint);

        Assert.True(product.Re.Plus(-1, a).LargestMagnitude() < N * N * DoubleDouble.Rounding);
        Assert.True(product.Im.LargestMagnitude() < N * N * DoubleDouble.Rounding);
        Assert.True(
            z.Times(adjoint).Re.Plus(-1, DoubleDoubleMatrix.Identity(N)).LargestMagnitude()
            < 20 * N * DoubleDouble.Rounding);
    }

    [Fact]
    public void Swaps_carry_the_poles_along_unchanged()
    {
        ComplexSchur schur = ComplexSchur.Of(RealSchur.Of(SampleMatrices.Random(N, N, 22)));
        DoubleDoubleComplex first = schur.T[0, 0];
        for (int k = 0; k + 1 < N; k++)
        {
            schur.Swap(k);
        }

        Assert.Equal(first, schur.T[N - 1, N - 1]);
    }

    [Fact]
    public void A_pair_is_two_exact_conjugates()
    {
        ComplexSchur schur = ComplexSchur.Of(RealSchur.Of(SampleMatrices.Random(N, N, 23)));

        int pairs = 0;
        for (int k = 0; k + 1 < N; k++)
        {
            if (schur.T[k, k].Im.Hi > 0)
            {
                Assert.Equal(schur.T[k, k].Conjugate, schur.T[k + 1, k + 1]);
                pairs++;
            }
        }

        Assert.True(pairs > 3);
    }
}
