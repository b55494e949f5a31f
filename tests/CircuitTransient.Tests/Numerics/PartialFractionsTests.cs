using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public sealed class PartialFractionsTests
{
    [Fact]
    public void Simple_poles_have_the_residues_of_the_product() =>
        // 1/((s + 1)(s + 3)) = ½/(s + 1) - ½/(s + 3)
        Assert.Equal(
            [(-1.0, 0, 0.5), (-3.0, 0, -0.5)],
            PartialFractions.Of([-1, -3]).Select(s => (s.Pole.Re.Hi, s.Power, s.Residue.Re.Hi)));

    [Fact]
    public void A_double_pole_has_a_share_of_each_power() =>
        // 1/((s + 1)²(s + 3)) = ½/(s + 1)² - ¼/(s + 1) + ¼/(s + 3)
        Assert.Equal(
            [(-1.0, 1, 0.5), (-1.0, 0, -0.25), (-3.0, 0, 0.25)],
            PartialFractions.Of([-1, -3, -1]).Select(s => (s.Pole.Re.Hi, s.Power, s.Residue.Re.Hi)));

    [Fact]
    public void The_shares_add_up_to_the_fraction_anywhere()
    {
        DoubleDoubleComplex[] poles =
            [-1, new(-2, 3), new(-2, -3), -1, 0, new(-2, 3), -1];
        foreach (var s in new Complex[] { 1, new(0.5, 2), new(-4, 1) })
        {
            var expected = poles.Aggregate(Complex.One, (product, p) => product / (s - (Complex)p));
            var sum = PartialFractions.Of(poles).Aggregate(Complex.Zero, (total, share) =>
                total + ((Complex)share.Residue / Complex.Pow(s - (Complex)share.Pole, share.Power + 1)));
            Assert.True((sum - expected).Magnitude <= 1e-13 * expected.Magnitude);
        }
    }
}
