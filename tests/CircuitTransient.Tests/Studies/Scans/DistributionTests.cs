using CircuitTransient.Numerics;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Tests.Numerics;

namespace CircuitTransient.Tests.Studies.Scans;

public class DistributionTests
{
    // The sine of a uniform angle has the arcsine distribution: the quantile of p is sin(π (p − 1/2)).
    [Theory]
    [InlineData(0.05)]
    [InlineData(0.5)]
    [InlineData(0.9)]
    [InlineData(0.99)]
    public void A_sine_is_distributed_by_the_arcsine_law(double fraction)
    {
        var law = Distribution.Of(RangeExtremeSearchTests.Samples(Sine, -Math.PI, Math.PI, 100))!;

        Assert.Equal(Math.Sin(Math.PI * (fraction - 0.5)), law.Quantile(fraction), 1e-5);
        Assert.Equal(fraction, law.Below(Math.Sin(Math.PI * (fraction - 0.5))), 1e-5);
        Assert.Equal(0, law.Mean, 1e-12);
    }

    [Fact]
    public void Places_without_a_value_are_left_out()
    {
        static SlopedSample Half(double x) => new(x, x <= 0.5 ? x : double.NaN, 1);
        var law = Distribution.Of(RangeExtremeSearchTests.Samples(Half, 0, 1, 10))!;

        Assert.Equal(0.25, law.Mean, 1e-12);
        Assert.Null(Distribution.Of([new(0, double.NaN, 0), new(1, double.NaN, 0)]));
    }

    private static SlopedSample Sine(double x) => new(x, Math.Sin(x), Math.Cos(x));
}
