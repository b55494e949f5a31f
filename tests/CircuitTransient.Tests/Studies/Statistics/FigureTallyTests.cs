using CircuitTransient.Studies.Designs;
using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Tests.Studies.Statistics;

public class FigureTallyTests
{
    private const int Count = 3000;

    [Fact]
    public void Classes_tell_quantiles_to_their_own_width()
    {
        var kept = Statistics(Count);
        var counted = Statistics(0);

        Assert.Equal(0, kept.Resolution);
        Assert.Equal(2.0 / 65536, counted.Resolution, 1e-15);
        Assert.All(kept.Quantiles.Zip(counted.Quantiles), pair =>
        {
            Assert.Equal(pair.First.Value, pair.Second.Value, counted.Resolution);
            Assert.InRange(pair.First.Interval.Low - pair.Second.Interval.Low, 0, counted.Resolution);
            Assert.InRange(pair.Second.Interval.High - pair.First.Interval.High, 0, counted.Resolution);
        });
        Assert.Equal(kept.Mean, counted.Mean);
        Assert.Equal(Count, counted.Histogram.Counts.Sum());
    }

    [Theory]
    [InlineData(1)]
    [InlineData(3)]
    [InlineData(5)]
    public void An_interval_holds_the_quantile_in_19_of_20_samples(int quantile)
    {
        const int samples = 400;
        var held = Enumerable.Range(0, samples).Count(s =>
        {
            var tally = new FigureTally(200, 0, 1, null);
            for (ulong i = 0; i < 200; i++)
            {
                tally.Add(new CounterGenerator(11).Uniform((ulong)s, i));
            }

            var estimate = tally.Statistics(200).Quantiles[quantile];
            return estimate.Fraction >= estimate.Interval.Low && estimate.Fraction <= estimate.Interval.High;
        });

        // At least 95 %, and of 400 samples at least that less three times √(0.95·0.05/400).
        Assert.InRange(held / (double)samples, 0.95 - 0.0327, 1);
    }

    [Fact]
    public void What_is_missing_or_infinite_is_counted_and_never_holds()
    {
        var tally = new FigureTally(10, 0, 1, value => value >= 0);
        foreach (var value in (double[])[1, double.NaN, 2, double.NegativeInfinity, -3])
        {
            tally.Add(value);
        }

        var statistics = tally.Statistics(6);

        Assert.Equal((3, 1, 1), (statistics.Count, statistics.None, statistics.Infinite));
        Assert.Equal((2, 6), (statistics.Holding!.Holding, statistics.Holding.All));
        Assert.Equal(0, statistics.Mean);
    }

    [Theory]
    [InlineData(Count)]
    [InlineData(0)]
    public void A_saved_tally_goes_on_as_if_it_had_not_stopped(int capacity)
    {
        var whole = new FigureTally(capacity, -1, 1, null);
        var first = new FigureTally(capacity, -1, 1, null);
        var second = new FigureTally(capacity, -1, 1, null);
        foreach (var value in Values().Take(1000))
        {
            first.Add(value);
        }

        using var memory = new MemoryStream();
        using (var to = new BinaryWriter(memory, System.Text.Encoding.UTF8, leaveOpen: true))
        {
            first.Save(to);
        }

        memory.Position = 0;
        second.Load(new BinaryReader(memory));
        foreach (var value in Values().Skip(1000))
        {
            second.Add(value);
        }

        foreach (var value in Values())
        {
            whole.Add(value);
        }

        Assert.Equivalent(whole.Statistics(Count), second.Statistics(Count), strict: true);
    }

    private static FigureStatistics Statistics(int capacity)
    {
        var tally = new FigureTally(capacity, -1, 1, null);
        foreach (var value in Values())
        {
            tally.Add(value);
        }

        return tally.Statistics(Count);
    }

    private static IEnumerable<double> Values() =>
        Enumerable.Range(0, Count).Select(i => (2 * new CounterGenerator(5).Uniform(0, (ulong)i)) - 1);
}
