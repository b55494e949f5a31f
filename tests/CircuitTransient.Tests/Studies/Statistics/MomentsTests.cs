using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Tests.Studies.Statistics;

public class MomentsTests
{
    [Fact]
    public void A_small_spread_about_a_large_mean_keeps_its_digits()
    {
        // NIST StRD NumAcc4: 10000000.2, then 10000000.1 and 10000000.3 in turn, 1001 values; certified mean
        // 10000000.2, standard deviation 0.1 (from memory).
        var moments = Of(Enumerable.Range(0, 1001)
            .Select(i => i == 0 ? 10000000.2 : i % 2 == 1 ? 10000000.1 : 10000000.3));

        Assert.Equal(10000000.2, moments.Mean, 1e-8);
        // The data themselves are rounded to 2e-9.
        Assert.Equal(0.1, moments.StandardDeviation, 1e-8);
    }

    [Fact]
    public void Moments_are_the_sums_they_stand_for()
    {
        double[] values = [2, 3, 5, 7, 11, 13, -4];
        var mean = values.Average();
        var moments = Of(values);

        Assert.Equal(mean, moments.Mean, 1e-14);
        Assert.Equal(values.Sum(v => Math.Pow(v - mean, 2)), moments.Second, 1e-11);
        Assert.Equal(values.Sum(v => Math.Pow(v - mean, 3)), moments.Third, 1e-10);
        Assert.Equal(values.Sum(v => Math.Pow(v - mean, 4)), moments.Fourth, 1e-9);
    }

    [Fact]
    public void The_interval_of_a_mean_is_Students()
    {
        // t(0.975, 9) = 2.262157 (any table); the values 1…10 have s = 3.027650.
        var interval = Of(Enumerable.Range(1, 10).Select(i => (double)i)).MeanInterval;

        Assert.Equal(5.5 - (2.262157 * 3.027650 / Math.Sqrt(10)), interval.Low, 1e-5);
        Assert.Equal(5.5 + (2.262157 * 3.027650 / Math.Sqrt(10)), interval.High, 1e-5);
    }

    [Fact]
    public void The_interval_of_a_normal_deviation_is_wide_by_one_over_the_root_of_two_n()
    {
        // For a normal law the fourth moment is 3 σ⁴, so s varies by σ/√(2n): a law of large samples,
        // checked on the law's own quantiles.
        const int n = 20_000;
        var normal = new MathNet.Numerics.Distributions.Normal(3, 0.5);
        var moments = Of(Enumerable.Range(0, n)
            .Select(i => normal.InverseCumulativeDistribution((i + 0.5) / n)));
        var half = 1.959964 * 0.5 / Math.Sqrt(2.0 * n);

        Assert.Equal(0.5 - half, moments.DeviationInterval.Low, 2e-4);
        Assert.Equal(0.5 + half, moments.DeviationInterval.High, 2e-4);
    }

    private static Moments Of(IEnumerable<double> values) =>
        values.Aggregate(default(Moments), (moments, value) => moments.With(value));
}
