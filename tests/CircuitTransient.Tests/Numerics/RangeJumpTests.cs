using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class RangeJumpTests
{
    [Fact]
    public void A_jump_is_narrowed_down_between_two_samples()
    {
        static SlopedSample Saw(double x) => new(x, x - (x < 0.37 ? 0 : 1), 1);
        var jump = Assert.Single(RangeJump.Find(RangeExtremeSearchTests.Samples(Saw, 0, 1, 10), Saw));

        Assert.Equal(0.37, jump.Before.X, 1e-10);
        Assert.Equal(-1, jump.After.Y - jump.Before.Y, 1e-9);
    }

    [Fact]
    public void A_steep_slope_is_no_jump()
    {
        // a step smoothed over a thousandth of the spacing of the samples
        static SlopedSample Steep(double x)
        {
            var t = Math.Tanh((x - 0.37) / 1e-4);
            return new(x, t, (1 - (t * t)) / 1e-4);
        }

        Assert.Empty(RangeJump.Find(RangeExtremeSearchTests.Samples(Steep, 0, 1, 10), Steep));
    }

    [Fact]
    public void A_jump_shows_without_slopes_too()
    {
        static SlopedSample Step(double x) => new(x, x < 0.5001 ? 7 : 25, double.NaN);

        var jump = Assert.Single(RangeJump.Find(RangeExtremeSearchTests.Samples(Step, 0, 1, 3), Step));
        Assert.Equal(0.5001, jump.After.X, 1e-10);
    }
}
