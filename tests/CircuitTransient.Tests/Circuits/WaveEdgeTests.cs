using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>Waves cut into what an engineer calls their edges.</summary>
public class WaveEdgeTests
{
    [Theory]
    [InlineData("540 V", "constant")]
    [InlineData("step of 5 V at 2 ms", "step at 2 ms")]
    [InlineData("rectangular pulse of 5 V from 1 ms to 3 ms", "rise at 1 ms", "fall at 3 ms")]
    [InlineData("pulse train of 5 V width 1 ms every 4 ms from 2 ms count 2",
        "rise of pulse 1 at 2 ms", "fall of pulse 1 at 3 ms", "rise of pulse 2 at 6 ms",
        "fall of pulse 2 at 7 ms")]
    [InlineData("ramp of 12 V from 1 s to 3 s", "ramp from 1 s to 3 s")]
    [InlineData("impulse of 6 kV 1.2/50 µs from 1 ms", "impulse from 1 ms")]
    [InlineData("5 V + sine of 1 V at 1 kHz - step of 5 V at 2 ms",
        "constant", "sine at 1 kHz", "step at 2 ms")]
    [InlineData("5 V + 3 V", "constant")]
    [InlineData("straight lines (0 s, 0 V) (1 s, 5 V) (3 s, 5 V) (3 s, 2 V) (4 s, 0 V)",
        "line from 0 s to 1 s", "step at 3 s", "line from 3 s to 4 s")]
    [InlineData("straight lines (1 s, 4 V) (2 s, 4 V) (2 s, 0 V) (3 s, 0 V) (4 s, 1 V)",
        "step at 1 s", "step at 2 s", "line from 3 s to 4 s")]
    public void A_wave_has_the_edges_a_reader_sees(string wave, params string[] edges) =>
        Assert.Equal(edges, WaveEdge.Of(new Wave(Checking.Wave(wave), 1)).Select(e => e.Label));

    [Theory]
    [InlineData("pulse train of 5 V width 1 ms every 4 ms from 2 ms count 3")]
    [InlineData("ramp of 12.3 V from 1.1 ms to 3.7 ms - sine of 2 V at 300 Hz until 5 ms")]
    [InlineData("straight lines (1 ms, 4 V) (2 ms, 4.7 V) (2 ms, 0 V) (3 ms, 0 V) (4 ms, 1 V) (7 ms, 0 V)")]
    [InlineData("impulse of 6 V 1.2/50 µs from 1 ms + decay of 3 V in 2 ms from 4 ms")]
    public void The_edges_of_a_wave_add_up_to_it(string text)
    {
        var wave = new Wave(Checking.Wave(text), 1);
        var edges = WaveEdge.Of(wave);
        for (var t = 0.13e-3; t < 12e-3; t += 0.37e-3)
        {
            // a slope times a time and back leaves a rounding or two of 12 V
            Assert.Equal(ValueAt(wave.Pieces, t), edges.Sum(e => ValueAt(e.Pieces, t)), 1e-14);
        }
    }

    private static double ValueAt(IEnumerable<WavePiece> pieces, double t) =>
        pieces.Where(p => p.Start <= t && t < p.End).Sum(p => (p.Amplitude + (p.Slope * (t - p.Start)))
            * Math.Exp(-p.DecayRate * (t - p.Start))
            * Math.Cos((p.AngularFrequency * (t - p.Start)) + p.Phase));
}
