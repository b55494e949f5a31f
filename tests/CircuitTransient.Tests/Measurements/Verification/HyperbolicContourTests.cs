using System.Numerics;
using CircuitTransient.Measurements.Verification;

namespace CircuitTransient.Tests.Measurements.Verification;

public sealed class HyperbolicContourTests
{
    // The rational ones of the pairs of Davies and Martin, J. Comput. Phys. 33 (1979) (list from memory);
    // values computed with 40 digits (mpmath 1.3.0).
    public static TheoryData<string, double, double> Pairs => new()
    {
        { "1/(s+½)", 0.6065306597126334, 0.0820849986238988 },
        { "1/((s+0.2)²+1)", 0.6889381730850401, -0.352768526288806 },
        { "1/(s+1)²", 0.3678794411714423, 0.03368973499542734 },
        { "1/(s²+1)", 0.8414709848078965, -0.9589242746631385 },
        { "(s²−1)/(s²+1)²", 0.5403023058681397, 1.418310927316131 },
    };

    [Theory]
    [MemberData(nameof(Pairs))]
    public void Known_transforms_come_back(string name, double atOne, double atFive)
    {
        // Poles on the axis at |p|t = 5 lie nearer the contour and need more points. Measured: 1e-11 and
        // 2e-10, both at the double pole on the axis.
        Assert.Equal(atOne, Inverted(name, 1, 16), 1e-10);
        Assert.Equal(atFive, Inverted(name, 5, 24), 1e-9);
    }

    [Fact]
    public void More_points_make_a_smaller_error()
    {
        var few = Math.Abs(Inverted("1/(s+1)²", 1, 5) - 0.3678794411714423);
        var more = Math.Abs(Inverted("1/(s+1)²", 1, 9) - 0.3678794411714423);
        Assert.InRange(more, 0, few * 1e-3); // 10.2⁻⁴ by theory
    }

    [Fact]
    public void A_pole_outside_the_contour_is_lost_without_a_sign_of_it()
    {
        // 1/(s²+1) at t = 100: both numbers of points agree on a wrong value, which is why samples need a
        // probe.
        var coarser = Inverted("1/(s²+1)", 100, 12);
        var finer = Inverted("1/(s²+1)", 100, 16);
        Assert.Equal(coarser, finer, 1e-3);
        Assert.True(Math.Abs(finer - Math.Sin(100)) > 0.1);
    }

    private static double Inverted(string name, double time, int count) =>
        HyperbolicContour.For(time, count)
            .Sum(point => (point.Weight * Transform(name, point.Point)).Imaginary);

    private static Complex Transform(string name, Complex s) => name switch
    {
        "1/(s+½)" => 1 / (s + 0.5),
        "1/((s+0.2)²+1)" => 1 / (((s + 0.2) * (s + 0.2)) + 1),
        "1/(s+1)²" => 1 / ((s + 1) * (s + 1)),
        "1/(s²+1)" => 1 / ((s * s) + 1),
        _ => ((s * s) - 1) / (((s * s) + 1) * ((s * s) + 1)),
    };
}
