using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class SpectralBlocksTests
{
    public static TheoryData<int, double> Separations
    {
        get
        {
            TheoryData<int, double> data = [];
            foreach (int multiplicity in (int[])[2, 3, 6])
            {
                data.Add(multiplicity, 0);
                for (int exponent = 1; exponent <= 16; exponent++)
                {
                    data.Add(multiplicity, Math.Pow(10, -exponent));
                }
            }

            return data;
        }
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(5)]
    [InlineData(30)]
    public void The_blocks_of_a_random_matrix_add_up_to_it(int n)
    {
        DoubleDoubleMatrix a = SampleMatrices.Random(n, n, 31 + n);

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        AssertRebuilds(a, blocks, 1e-28);
        Assert.All(blocks.Blocks, block => Assert.Equal(1, block.Size));
    }

    [Theory]
    [MemberData(nameof(Separations))]
    public void Poles_that_nearly_coincide_stay_one_block_and_the_sum_has_no_seam(
        int multiplicity, double separation)
    {
        DoubleDoubleMatrix a = SampleMatrices.NearlyDefective(multiplicity, separation);

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        // cond(S)² of the constructed matrix is about 1e4, norms of projectors 1e3
        AssertRebuilds(a, blocks, 1e-25);
        Assert.True(blocks.Blocks.Max(block => block.ProjectorNorm) < 1e4);
        if (separation <= 1e-4)
        {
            Assert.Equal(multiplicity, blocks.Blocks.Max(block => block.Size));
        }
    }

    [Fact]
    public void A_symmetric_matrix_with_repeated_poles_stays_in_single_poles()
    {
        const int N = 100;
        DoubleDoubleMatrix q = SampleMatrices.Orthogonal(N, 41);
        DoubleDoubleMatrix diagonal = new(N, N);
        for (int i = 0; i < N; i++)
        {
            diagonal[i, i] = i < 40 ? -1 : i < 80 ? -1 - (1e-10 * i) : -0.01 * i;
        }

        DoubleDoubleMatrix a = q.Times(diagonal).Times(q.Transposed());

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        Assert.Equal(N, blocks.Blocks.Length);
        AssertRebuilds(a, blocks, 1e-28);
    }

    [Fact]
    public void Poles_spread_over_twelve_decades_keep_their_digits()
    {
        double[] poles = [-1e12, -3e9, -2e9, -1e6, -50, -1, -0.7, 0];
        DoubleDoubleMatrix b = new(8, 8);
        for (int i = 0; i < 8; i++)
        {
            b[i, i] = poles[i];
        }

        DoubleDoubleMatrix a = SampleMatrices.Similar(SampleMatrices.Random(8, 8, 51), b);

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        double[] found = [.. blocks.Blocks.SelectMany(Poles).Select(z => (double)z.Re).Order()];
        Assert.Equal(8, found.Length);
        for (int i = 0; i < 7; i++)
        {
            // 1e-32 · 1e12 · condition of S, far below a double's bit
            Assert.Equal(1, found[i] / poles[i], 1e-15);
        }

        Assert.Equal(0, found[7]);
    }

    [Fact]
    public void A_chain_of_zeros_stays_a_chain_with_an_exactly_zero_diagonal()
    {
        DoubleDoubleMatrix b = new(6, 6);
        b[0, 1] = 1;
        b[1, 2] = 1;
        b[3, 3] = -1;
        b[4, 4] = -2;
        b[5, 5] = -3;
        DoubleDoubleMatrix a = SampleMatrices.Similar(SampleMatrices.Random(6, 6, 61), b);

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        SpectralBlock chain = Assert.Single(blocks.Blocks, block => block.Size > 1);
        Assert.Equal(3, chain.Size);
        Assert.All(Poles(chain), pole => Assert.True(pole.IsZero));
        AssertRebuilds(a, blocks, 1e-25);
    }

    [Fact]
    public void Zeros_without_a_chain_are_zeros_of_their_own()
    {
        DoubleDoubleMatrix b = new(6, 6);
        b[3, 3] = -1;
        b[4, 5] = 2;
        b[5, 4] = -2;
        DoubleDoubleMatrix a = SampleMatrices.Similar(SampleMatrices.Random(6, 6, 62), b);

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        Assert.Equal(3, blocks.Blocks.Count(block => block.T.FrobeniusNorm() == 0));
        Assert.All(blocks.Blocks, block => Assert.Equal(1, block.Size));
        Assert.Single(blocks.Blocks, block => !block.IsReal);
    }

    [Fact]
    public void A_matrix_of_order_zero_has_no_blocks() => Assert.Empty(SpectralBlocks.Of(new(0, 0)).Blocks);

    [Fact]
    public void A_zero_matrix_has_a_zero_pole_for_each_row()
    {
        SpectralBlocks blocks = SpectralBlocks.Of(new(4, 4));

        Assert.Equal(4, blocks.Blocks.Length);
        Assert.All(blocks.Blocks, block => Assert.True(block.Pole(0).IsZero));
    }

    [Fact]
    public void A_double_complex_pair_is_one_block_off_the_axis()
    {
        DoubleDoubleMatrix b = DoubleDoubleMatrix.From(new double[,]
        {
            { -1, 5, 1, 0, 0 }, { -5, -1, 0, 1, 0 }, { 0, 0, -1, 5, 0 }, { 0, 0, -5, -1, 0 },
            { 0, 0, 0, 0, -2 },
        });
        DoubleDoubleMatrix a = SampleMatrices.Similar(SampleMatrices.Random(5, 5, 71), b);

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        SpectralBlock pair = Assert.Single(blocks.Blocks, block => !block.IsReal);
        Assert.Equal(2, pair.Size);
        AssertRebuilds(a, blocks, 1e-26);
    }

    [Fact]
    public void Twenty_equal_sections_beside_each_other_stay_twenty_blocks()
    {
        DoubleDoubleMatrix a = Sections(20, 1);

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        Assert.Equal(20, blocks.Blocks.Length);
        Assert.All(blocks.Blocks, block => Assert.Equal(2, block.Size));
        AssertRebuilds(a, blocks, 1e-30);
    }

    [Fact]
    public void Seventy_five_equal_chains_hidden_by_a_rotation_do_not_stall_the_iteration()
    {
        DoubleDoubleMatrix q = SampleMatrices.Orthogonal(150, 5);
        DoubleDoubleMatrix a = q.Times(Sections(75, 1)).Times(q.Transposed());

        RealSchur schur = RealSchur.Of(a);

        DoubleDoubleMatrix rebuilt = schur.TransposedQ.Transposed().Times(schur.T).Times(schur.TransposedQ);
        Assert.True(rebuilt.Plus(-1, a).FrobeniusNorm() < 1e-28 * a.FrobeniusNorm());
    }

    [Theory]
    [InlineData(0.9)]
    [InlineData(1)]
    [InlineData(1.0000001)]
    [InlineData(1.001)]
    public void Twenty_equal_sections_hidden_by_a_rotation_are_still_rebuilt(double damping)
    {
        DoubleDoubleMatrix q = SampleMatrices.Orthogonal(40, 5);
        DoubleDoubleMatrix a = q.Times(Sections(20, damping)).Times(q.Transposed());

        // projectors of up to 1e6 are borne rather than make one block of forty: 1e6 · n · 1e-31
        AssertRebuilds(a, SpectralBlocks.Of(a), 4e-24);
    }

    [Fact]
    public void A_row_of_fourteen_integrators_is_one_chain_of_zeros()
    {
        DoubleDoubleMatrix a = new(14, 14);
        for (int i = 0; i + 1 < 14; i++)
        {
            a[i, i + 1] = 1 + i;
        }

        SpectralBlocks blocks = SpectralBlocks.Of(a);

        Assert.All(Poles(Assert.Single(blocks.Blocks)), pole => Assert.True(pole.IsZero));
        AssertRebuilds(a, blocks, 1e-30);
    }

    [Fact]
    public void The_blocks_of_the_frank_matrix_add_up_to_it()
    {
        DoubleDoubleMatrix a = SampleMatrices.Frank(12);

        AssertRebuilds(a, SpectralBlocks.Of(a), 1e-27); // projectors of norm up to a thousand
    }

    private static DoubleDoubleMatrix Sections(int count, double damping)
    {
        DoubleDoubleMatrix a = new(2 * count, 2 * count);
        for (int i = 0; i < 2 * count; i += 2)
        {
            a[i, i + 1] = 1;
            a[i + 1, i] = -1;
            a[i + 1, i + 1] = -2 * damping;
        }

        return a;
    }

    private static IEnumerable<DoubleDoubleComplex> Poles(SpectralBlock block) =>
        Enumerable.Range(0, block.Size).Select(block.Pole);

    private static void AssertRebuilds(DoubleDoubleMatrix a, SpectralBlocks blocks, double tolerance)
    {
        DoubleDoubleMatrix sum = new(a.Rows, a.Rows);
        DoubleDoubleMatrix identity = new(a.Rows, a.Rows);
        double imaginary = 0;
        foreach (SpectralBlock block in blocks.Blocks)
        {
            DoubleDoubleComplexMatrix share = block.V.Times(block.T).Times(block.W);
            DoubleDoubleComplexMatrix projector = block.V.Times(block.W);
            sum = sum.Plus(block.IsReal ? 1 : 2, share.Re);
            identity = identity.Plus(block.IsReal ? 1 : 2, projector.Re);
            imaginary = block.IsReal ? Math.Max(imaginary, share.Im.LargestMagnitude()) : imaginary;
        }

        double error = sum.Plus(-1, a).FrobeniusNorm() / a.FrobeniusNorm();
        double gap = identity.Plus(-1, DoubleDoubleMatrix.Identity(a.Rows)).FrobeniusNorm();
        Assert.True(error <= tolerance, $"A is rebuilt to {error:E1}");
        Assert.True(gap <= tolerance, $"the projectors add up to the identity within {gap:E1}");
        Assert.True(imaginary <= tolerance * a.FrobeniusNorm(), $"real blocks leave {imaginary:E1}");
    }
}
