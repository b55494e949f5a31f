using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Studies.Draws;

/// <summary>Waveforms of a draw on a grid of instants.</summary>
public sealed class DrawSampleTests
{
    // 5 V into 1 kΩ and 1 µF from 1 ms on: 5 (1 − e^(−(t − 1 ms)/1 ms)) V, and its power in R.
    [Fact]
    public void Samples_follow_the_closed_form_and_take_the_value_after_a_jump()
    {
        var drawn = DrawnText.Of(
            """
            source E at s : 5 V ±20 %
            switch S from s to a : open, closes at 1 ms
            resistor R from a to b : 1 kΩ ±10 %
            capacitor C from b to ground : 1 µF ±10 %
            observe voltage of b
            observe power in R
            observe energy in R
            until 10 ms
            """);
        var workspace = drawn.Kernel!.CreateWorkspace();
        drawn.Evaluate([5.5, 1100, 1e-6], workspace);
        double[] times = [0, 0.5e-3, 1e-3, 2e-3, 7e-3, 10e-3];
        double[] samples = new double[times.Length];

        Assert.True(drawn.Kernel.Sample(workspace, 0, times, samples));
        foreach (var (i, t) in times.Index())
        {
            Close.OfScale(5.5, t < 1e-3 ? 0 : -5.5 * (Math.Exp(-(t - 1e-3) / 1.1e-3) - 1), samples[i], 1e-14);
        }

        Assert.True(drawn.Kernel.Sample(workspace, 1, times, samples));
        Close.To(5.5 * 5.5 / 1100, samples[2], 1e-14);
        Assert.False(drawn.Kernel.Sample(workspace, 2, times, samples));
    }
}
