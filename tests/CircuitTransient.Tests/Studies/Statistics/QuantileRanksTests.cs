using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Tests.Studies.Statistics;

public class QuantileRanksTests
{
    // Twelve resistivities of silicon wafers in Ω·cm: NIST/SEMATECH e-Handbook of Statistical Methods,
    // 7.2.6.2, opened; there the 90th percentile by definition 6, p (N + 1) = 11.7, is 95.1981.
    private static readonly double[] Wafers =
    [
        95.0610, 95.0925, 95.1065, 95.1195, 95.1442, 95.1567, 95.1591, 95.1682, 95.1772, 95.1937, 95.1959,
        95.1990,
    ];

    [Fact]
    public void A_quantile_is_interpolated_by_definition_8()
    {
        // h = (12 + 1/3) 0.9 + 1/3 = 11.4333…: a little below the handbook's 95.1981, which takes 11.7.
        var expected = 95.1959 + ((11.4 + (1.0 / 30) - 11) * (95.1990 - 95.1959));

        Assert.Equal(expected, QuantileRanks.Quantile(Wafers, 0.9), 1e-12);
    }

    [Fact]
    public void Each_value_stands_at_its_median_rank()
    {
        // p(k) = (k − 1/3)/(n + 1/3), approximately the median of F(x[k]) (SciPy's documentation of
        // mquantiles, type 8, opened).
        for (var k = 1; k <= Wafers.Length; k++)
        {
            var fraction = (k - (1.0 / 3)) / (Wafers.Length + (1.0 / 3));
            Assert.Equal(Wafers[k - 1], QuantileRanks.Quantile(Wafers, fraction), 1e-9);
        }
    }

    [Fact]
    public void Beyond_the_sample_there_is_only_its_end()
    {
        Assert.Equal(95.0610, QuantileRanks.Quantile(Wafers, 0.001));
        Assert.Equal(95.1990, QuantileRanks.Quantile(Wafers, 0.999));
    }

    [Theory]
    // A textbook's table of intervals for a median (its table A.7, a copy was opened),
    // those of the least width with at least 95 %.
    [InlineData(6, 1, 6)]
    [InlineData(9, 2, 8)]
    [InlineData(10, 2, 9)]
    [InlineData(12, 3, 10)]
    [InlineData(15, 4, 12)]
    [InlineData(17, 5, 13)]
    [InlineData(20, 6, 15)]
    public void The_values_about_a_median_are_those_of_the_table(long count, long low, long high) =>
        Assert.Equal((low, high), QuantileRanks.Enclosing(0.5, count));

    [Theory]
    // Sums of the binomial law in 30 digits (mpmath).
    [InlineData(0.99, 2000, 1971, 1989)]
    [InlineData(0.5, 2000, 956, 1045)]
    [InlineData(0.05, 2000, 81, 121)]
    public void The_values_about_a_quantile_follow_from_the_binomial_law(
        double fraction, long count, long low, long high) =>
        Assert.Equal((low, high), QuantileRanks.Enclosing(fraction, count));

    [Fact]
    public void A_sample_too_small_has_no_such_values() =>
        Assert.Equal((0, 6), QuantileRanks.Enclosing(0.5, 5));
}
