using System.Collections.Immutable;
using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public sealed class SampleCurveTests
{
    [Fact]
    public void Between_sixteen_samples_a_period_a_sine_stays_a_sine()
    {
        ImmutableArray<double> times = [.. Enumerable.Range(0, 33).Select(i => i / 16.0)];
        var (refined, values) =
            SampleCurve.Refined(times, [.. times.Select(t => Math.Sin(double.Tau * t))], 0, 2);

        Assert.InRange(refined.Length, 150, 400);
        // Straight lines would be off by (2π/16)²/8 = 0.019; most is lost where the samples end.
        Assert.All(refined.Zip(values), p => Assert.Equal(Math.Sin(double.Tau * p.First), p.Second, 4e-3));
    }

    [Fact]
    public void A_parabola_is_met_exactly()
    {
        ImmutableArray<double> times = [0, 1, 3, 4, 7];
        var (refined, values) = SampleCurve.Refined(times, [.. times.Select(t => t * t)], 0, 7);

        Assert.All(refined.Zip(values), p => Assert.Equal(p.First * p.First, p.Second, 1e-12));
    }

    [Fact]
    public void A_corner_that_stands_twice_stays_sharp()
    {
        var (refined, values) = SampleCurve.Refined([0, 1, 2, 2, 3, 4], [0, 0, 0, 0, 5, 10], 0, 4);

        Assert.All(refined.Zip(values), p => Assert.Equal(Math.Max(0, 5 * (p.First - 2)), p.Second, 1e-12));
    }

    [Fact]
    public void Outside_the_window_and_beside_gaps_nothing_is_added()
    {
        var (refined, _) = SampleCurve.Refined([0, 1, 2, 3, 4], [1, 2, double.NaN, 3, 4], 0, 2.5);

        Assert.Equal([2.0, 3.0, 4.0], refined.Where(t => t > 1));
    }
}
