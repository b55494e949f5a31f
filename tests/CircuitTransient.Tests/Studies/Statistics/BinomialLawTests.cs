using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Tests.Studies.Statistics;

public class BinomialLawTests
{
    [Theory]
    // SciPy's documentation of BinomTestResult.proportion_ci, opened: 7 of 50 at 95 %, its roots good to
    // 1e-12.
    [InlineData(7, 50, 0.95, 0.05819170033997342, 0.26739600249700846, 1e-12)]
    // A public table of exact intervals (codingace.net, Clopper-Pearson interval), opened: four digits.
    [InlineData(3, 20, 0.95, 0.0321, 0.3789, 5e-5)]
    [InlineData(12, 30, 0.90, 0.2495, 0.5661, 5e-5)]
    [InlineData(42, 100, 0.95, 0.3220, 0.5229, 5e-5)]
    [InlineData(85, 120, 0.99, 0.5904, 0.8092, 5e-5)]
    // Sums of the binomial law itself in 30 digits (mpmath): where the incomplete beta function is hardest.
    [InlineData(7, 50, 0.95, 0.0581917003403721, 0.267396002497008, 1e-14)]
    [InlineData(1999, 2000, 0.95, 0.99721736016534, 0.99998734117613, 1e-13)]
    [InlineData(999_000, 1_000_000, 0.95, 0.99893608189268, 0.99906099879205, 1e-11)]
    public void The_exact_interval_is_the_published_one(
        long successes, long trials, double confidence, double low, double high, double tolerance)
    {
        var interval = BinomialLaw.Interval(successes, trials, confidence);

        Assert.Equal(low, interval.Low, tolerance);
        Assert.Equal(high, interval.High, tolerance);
    }

    [Fact]
    public void Without_a_failure_the_interval_is_the_rule_of_three()
    {
        var interval = BinomialLaw.Interval(2000, 2000);

        // (α/2)^(1/n), in closed form.
        Assert.Equal(Math.Pow(0.025, 1.0 / 2000), interval.Low, 1e-14);
        Assert.Equal(1, interval.High);
    }

    [Fact]
    public void Without_a_success_it_begins_at_nothing()
    {
        var interval = BinomialLaw.Interval(0, 10);

        Assert.Equal(0, interval.Low);
        Assert.Equal(1 - Math.Pow(0.025, 0.1), interval.High, 1e-14);
    }

    [Theory]
    // 1, 4, 6, 4, 1 over 16.
    [InlineData(0, 0.0625)]
    [InlineData(1, 0.3125)]
    [InlineData(2, 0.6875)]
    [InlineData(3, 0.9375)]
    [InlineData(4, 1)]
    public void Four_coins_fall_as_counted(long heads, double probability) =>
        Assert.Equal(probability, BinomialLaw.AtMost(heads, 4, 0.5), 1e-15);
}
