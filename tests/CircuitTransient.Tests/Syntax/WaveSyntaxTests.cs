namespace CircuitTransient.Tests.Syntax;

/// <summary>Waves as read.</summary>
public class WaveSyntaxTests
{
    [Theory]
    [InlineData(
        "source Feed at rail : 932 V -20 % +10 % normal",
        "Source(Feed, Terminals(rail, -), Wave([WaveTerm(False, Constant(932V))], Tolerance((-0.2), "
        + "0.1, False, True)), [])")]
    [InlineData(
        "source Load from bus to minus : step of 8 A at 400 ms",
        "Source(Load, Terminals(bus, minus), Wave([WaveTerm(False, Step(8A, TimeValue(0.4s)))], -), "
        + "[])")]
    [InlineData(
        "source S at n : 540 V",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Constant(540V))], -), [])")]
    [InlineData(
        "source S at n : rectangular pulse of 5 V from 1 ms to 2 ms",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Pulse(5V, TimeValue(0.001s), "
        + "TimeValue(0.002s)))], -), [])")]
    [InlineData(
        "source S at n : rectangular pulse of 5 V to 2 ms",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Pulse(5V, -, TimeValue(0.002s)))], -), [])")]
    [InlineData(
        "source S at n : pulse train of 5 V width 1 ms every 5 ms from 2 ms count 10",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, PulseTrain(5V, 0.001s, 0.005s, "
        + "TimeValue(0.002s), 10?))], -), [])")]
    [InlineData(
        "source S at n : ramp of 12 V from 40 ns to 42.5 ns",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Ramp(12V, TimeValue(4E-08s), "
        + "TimeValue(4.25E-08s)))], -), [])")]
    [InlineData(
        "source S at n : sine of 325 V at 50 Hz phase 30°",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Sine(False, 325V, False, 50Hz, "
        + "0.5235987755982988, -, -, -))], -), [])")]
    [InlineData(
        "source S at n : cosine of 230 V rms at 50 Hz from 1 ms until 2 ms decaying in 3 ms",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Sine(True, 230V, True, 50Hz, -, "
        + "TimeValue(0.001s), TimeValue(0.002s), 0.003s))], -), [])")]
    [InlineData(
        "source S at n : decay of 5 V in 1 ms from 2 ms",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Decay(5V, 0.001s, TimeValue(0.002s)))], "
        + "-), [])")]
    [InlineData(
        "source S at n : double exponential of 6 kV front 1.2 µs half-value 50 µs from 1 ms",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Impulse(6000V, 1.2E-06s, 5E-05s, "
        + "TimeValue(0.001s)))], -), [])")]
    [InlineData(
        "source S at n : impulse of 6 kV 1.2/50 µs from 1 ms",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Impulse(6000V, 1.2E-06s, 5E-05s, "
        + "TimeValue(0.001s)))], -), [])")]
    [InlineData(
        "source S at n : impulse of 2 * Vpk 8 µs/20 µs",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Impulse((2? * Vpk), 8E-06s, 2E-05s, -))], "
        + "-), [])")]
    [InlineData(
        "source S at n : straight lines (0 s, 0 V) (1 ms, 5 V), (2 ms, -5 V), rated 3 W",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, StraightLines([Point(0s, 0V), "
        + "Point(0.001s, 5V), Point(0.002s, (-5V))]))], -), [Rated(3W)])")]
    [InlineData(
        "source S at n : straight lines in file \"surge.csv\"",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, StraightLinesFile('surge.csv'))], -), [])")]
    [InlineData(
        "source S at n : 5 V + sine of 1 V at 1 kHz - step of 5 V at 2 ms",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Constant(5V)), WaveTerm(False, Sine(False, "
        + "1V, False, 1000Hz, -, -, -, -)), WaveTerm(True, Step(5V, TimeValue(0.002s)))], -), [])")]
    [InlineData(
        "source S at n : -step of (5 V + 3 V) when K closes",
        "Source(S, Terminals(n, -), Wave([WaveTerm(True, Step((5V + 3V), TimeAfter(-, K, True)))], "
        + "-), [])")]
    [InlineData(
        "source S at n : -5 V",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Constant((-5V)))], -), [])")]
    [InlineData(
        "source S at n : 2 * Vdc - 3 V",
        "Source(S, Terminals(n, -), Wave([WaveTerm(False, Constant((2? * Vdc))), WaveTerm(True, "
        + "Constant(3V))], -), [])")]
    public void A_wave_is_read_piece_by_piece(string text, string expected) =>
        Assert.Equal(expected, Reading.Of(text));
}
