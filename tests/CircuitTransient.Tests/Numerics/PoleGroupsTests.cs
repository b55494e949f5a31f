using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class PoleGroupsTests
{
    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(6)]
    public void A_multiple_pole_of_a_matrix_rounded_to_doubles_is_shown_once(int multiplicity)
    {
        double[,] rounded = SampleMatrices.NearlyDefective(multiplicity, 0).ToDoubles();

        PoleGroup[] groups = [.. PoleGroups.Of(SpectralBlocks.Of(DoubleDoubleMatrix.From(rounded)).Blocks)];

        Assert.Equal([multiplicity, 1, 1], groups.Select(group => group.Multiplicity));
        Assert.Equal(-1, groups[0].Value.Real, 1e-11); // the mean of a blurred pole is not blurred
        Assert.Equal(0, groups[0].Value.Imaginary);
        Assert.Equal(-4, groups[1].Value.Real, 1e-11);
        Assert.Equal(7, groups[2].Value.Imaginary, 1e-11);
    }

    [Theory]
    [InlineData(1e-3)]
    [InlineData(-1e-3)]
    public void A_damping_a_thousandth_off_the_critical_one_is_shown_as_two_poles_or_a_pair(double offset)
    {
        DoubleDoubleMatrix a = DoubleDoubleMatrix.From(new double[,] { { 0, 1 }, { -1, -2 * (1 + offset) } });

        PoleGroup[] groups = [.. PoleGroups.Of(SpectralBlocks.Of(a).Blocks)];

        Assert.Equal(offset > 0 ? 2 : 1, groups.Length);
        Assert.All(groups, group => Assert.Equal(1, group.Multiplicity));
        double root = Math.Sqrt(Math.Abs((1 + offset) * (1 + offset) - 1)); // s² + 2 ζ s + 1
        Assert.Equal(offset > 0 ? -1 - offset + root : -1 - offset, groups[0].Value.Real, 1e-14);
        Assert.Equal(offset > 0 ? 0 : root, groups[0].Value.Imaginary, 1e-14);
    }

    [Fact]
    public void Equal_poles_of_a_symmetric_matrix_are_shown_with_their_multiplicity()
    {
        DoubleDoubleMatrix q = SampleMatrices.Orthogonal(7, 3);
        DoubleDoubleMatrix diagonal = new(7, 7);
        for (int i = 0; i < 7; i++)
        {
            diagonal[i, i] = i < 4 ? -2 : i < 6 ? 0 : -1;
        }

        DoubleDoubleMatrix a = q.Times(diagonal).Times(q.Transposed());

        PoleGroup[] groups = [.. PoleGroups.Of(SpectralBlocks.Of(a).Blocks)];

        Assert.Equal([2, 1, 4], groups.Select(group => group.Multiplicity));
        Assert.Equal(0, groups[0].Value.Magnitude);
    }

    [Fact]
    public void Two_equal_undamped_pairs_are_one_entry_of_multiplicity_two()
    {
        DoubleDoubleMatrix a = DoubleDoubleMatrix.From(new double[,]
        {
            { 0, 3, 0, 0 }, { -3, 0, 0, 0 }, { 0, 0, 0, 3 }, { 0, 0, -3, 0 },
        });

        PoleGroup group = Assert.Single(PoleGroups.Of(SpectralBlocks.Of(a).Blocks));

        Assert.Equal(new PoleGroup(new Complex(0, 3), 2), group);
    }
}
