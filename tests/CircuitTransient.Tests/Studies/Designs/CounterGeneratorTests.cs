using CircuitTransient.Studies.Designs;

namespace CircuitTransient.Tests.Studies.Designs;

public class CounterGeneratorTests
{
    [Fact]
    public void The_mixing_is_the_published_one()
    {
        // The first outputs from the state 0x0123456789ABCDEF, which counts on by the golden number: as
        // stated in a public implementation of the generator, opened (the first whole, the second in its
        // upper digits).
        const ulong golden = 0x9E3779B97F4A7C15;
        const ulong state = 0x0123456789ABCDEF;

        Assert.Equal(0x157A3807A48FAA9DUL, CounterGenerator.Mix(unchecked(state + golden)));
        Assert.Equal(0xD573529B34UL, CounterGenerator.Mix(unchecked(state + (2 * golden))) >> 24);
    }

    [Fact]
    public void Numbers_fill_the_unit_interval_evenly()
    {
        const int count = 100_000;
        var generator = new CounterGenerator(1);
        var counts = new int[100];
        for (ulong i = 0; i < count; i++)
        {
            counts[(int)(100 * generator.Uniform(3, i))]++;
        }

        // χ² with 99 degrees of freedom lies between 57 and 157 in all but one of ten thousand cases.
        Assert.InRange(counts.Sum(c => Math.Pow(c - 1000, 2) / 1000), 57, 157);
    }

    [Fact]
    public void Streams_and_seeds_are_strangers_to_each_other()
    {
        const int count = 20_000;
        var (one, other) = (new CounterGenerator(1), new CounterGenerator(2));
        double streams = 0, seeds = 0, neighbours = 0;
        for (ulong i = 0; i < count; i++)
        {
            var own = one.Uniform(0, i) - 0.5;
            streams += 12 * own * (one.Uniform(1, i) - 0.5);
            seeds += 12 * own * (other.Uniform(0, i) - 0.5);
            neighbours += 12 * own * (one.Uniform(0, i + 1) - 0.5);
        }

        // Each mean is that of a correlation: 1/√n = 0.0071 wide; four times that.
        Assert.All(
            (double[])[streams, seeds, neighbours], sum => Assert.InRange(sum / count, -0.0283, 0.0283));
    }

    [Fact]
    public void Whole_numbers_stay_below_their_bound()
    {
        var generator = new CounterGenerator(9);
        var seen = Enumerable.Range(0, 1000).Select(i => generator.Below(7, 0, (ulong)i)).ToArray();

        Assert.Equal(Enumerable.Range(0, 7), seen.Distinct().Order());
    }
}
