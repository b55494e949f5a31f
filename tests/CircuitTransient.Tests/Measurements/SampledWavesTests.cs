using CircuitTransient.Measurements;
using CircuitTransient.Tests.Reports.Html;

namespace CircuitTransient.Tests.Measurements;

/// <summary>Samples go where the waveforms need them, and terms add up to what they were
/// taken from.</summary>
public class SampledWavesTests
{
    private static readonly TransientResult Bypass = SolvedPages.Demo("bullwheel-bus");

    [Fact]
    public void A_short_inrush_in_a_long_study_gets_its_samples()
    {
        // The bypass rings for some 80 ms of 14 s.
        var ringing = Bypass.SampleTimes.Count(t => t is > 1.8 and < 1.88);

        // 2000 are aimed at; boundaries and peaks come on top.
        Assert.InRange(Bypass.SampleTimes.Length, 1500, 2050);
        Assert.InRange(ringing, 500, 2000);
    }

    [Fact]
    public void Every_boundary_stands_twice_and_every_peak_is_a_sample()
    {
        Assert.All(Bypass.Events, e => Assert.Equal(2, Bypass.SampleTimes.Count(t => t == e.Time)));
        Assert.All(Bypass.Observations, o => Assert.Contains(o.Max.Time, Bypass.SampleTimes));
        Assert.All(Bypass.Observations, o => Assert.Contains(o.Min.Time, Bypass.SampleTimes));
    }

    [Fact]
    public void The_factors_of_a_power_multiply_to_it()
    {
        var declared = Bypass.Circuit.Observations.Single(o => o.Name == "power in Rpre");
        var power = Bypass.Observations.Single(o => o.Name == "power in Rpre");
        var followed = Bypass.Followed.Single(f => f.Quantity == declared.Quantity);

        // Voltage and current, each by two causes.
        Assert.Equal(
            [(0, null), (1, null), (0, null), (1, null)],
            followed.Terms.Select(t => (t.Cause, t.WithCause)));
        Assert.Equal(1, followed.Factor);
        for (var i = 0; i < Bypass.SampleTimes.Length; i += 50)
        {
            // Products of sums of a dozen terms of that size round within a few hundred units.
            var voltage = followed.Terms[0].Samples[i] + followed.Terms[1].Samples[i];
            var current = followed.Terms[2].Samples[i] + followed.Terms[3].Samples[i];
            Assert.Equal(power.Total[i], voltage * current, 1e-9 * power.Max.Value!.Value);
        }
    }

    [Fact]
    public void Straight_lines_need_two_samples_and_a_jump_keeps_both_sides()
    {
        var chosen = SampleThinning.Choose(
            [0, 1, 2, 3, 3, 4, 5], [[0, 1, 2, 3, 7, 8, 9], [5, 5, 5, 5, 5, 5, 5]], new HashSet<int>(), 7);

        Assert.Equal([0, 3, 4, 6], chosen);
    }
}
