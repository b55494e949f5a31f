using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class RangeCrossingTests
{
    [Fact]
    public void Newton_steps_reach_a_root_to_rounding_in_a_few_looks()
    {
        var looks = 0;
        var crossing = RangeCrossing.Between(Cube(0), Cube(5), x =>
        {
            looks++;
            return Cube(x);
        })!;

        Assert.Equal(Math.Cbrt(2), crossing.X, 1e-14);
        Assert.True(crossing.IsBySlope);
        Assert.True(looks < 25, $"{looks} looks");
    }

    [Fact]
    public void Without_slopes_the_root_is_found_by_secants()
    {
        static SlopedSample Plain(double x) => Cube(x) with { Slope = double.NaN };
        var crossing = RangeCrossing.Between(Plain(0), Plain(5), Plain)!;

        Assert.Equal(Math.Cbrt(2), crossing.X, 1e-12);
        Assert.False(crossing.IsBySlope);
    }

    [Fact]
    public void A_jump_over_zero_is_told_from_a_root()
    {
        static SlopedSample Step(double x) => new(x, x < 0.3 ? 1 : -2, 0);
        var crossing = RangeCrossing.Between(Step(0), Step(1), Step)!;

        Assert.True(crossing.IsJump);
        Assert.Equal(0.3, crossing.X, 1e-15);
        Assert.Equal((-2, 1), (crossing.Below.Y, crossing.NotBelow.Y));
    }

    [Fact]
    public void A_place_without_a_value_hides_the_root()
    {
        static SlopedSample Hidden(double x) => new(x, Math.Abs(x) < 0.4 ? double.NaN : x, 1);

        Assert.Null(RangeCrossing.Between(Hidden(-1), Hidden(0.9), Hidden));
    }

    private static SlopedSample Cube(double x) => new(x, (x * x * x) - 2, 3 * x * x);
}
