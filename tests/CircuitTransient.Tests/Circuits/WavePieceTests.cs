using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>The pieces that waves become.</summary>
public class WavePieceTests
{
    private const double Forever = double.PositiveInfinity;

    [Fact]
    public void A_constant_has_been_on_for_ever() =>
        Assert.Equal(
            [new WavePiece(0, Forever, 540, 0, 0, 0, 0, "constant", IsPerpetual: true)],
                Checking.Wave("540 V"));

    [Fact]
    public void A_step_starts_at_its_time() =>
        Assert.Equal([new WavePiece(0.002, Forever, 5, 0, 0, 0, 0, "step at 2 ms")],
            Checking.Wave("step of 5 V at 2 ms"));

    [Fact]
    public void A_step_without_a_time_starts_at_zero() =>
        Assert.Equal([new WavePiece(0, Forever, 5, 0, 0, 0, 0, "step at 0 s")], Checking.Wave("step of 5 V"));

    [Fact]
    public void A_pulse_is_a_rise_and_a_delayed_fall() =>
        Assert.Equal(
            [
                new WavePiece(0.001, Forever, 5, 0, 0, 0, 0, "rise at 1 ms") { Pulse = "pulse from 1 ms" },
                new WavePiece(0.003, Forever, -5, 0, 0, 0, 0, "fall at 3 ms") { Pulse = "pulse from 1 ms" },
            ],
            Checking.Wave("rectangular pulse of 5 V from 1 ms to 3 ms"));

    [Fact]
    public void A_pulse_train_names_each_edge()
    {
        var pieces = Checking.Wave("pulse train of 5 V width 1 ms every 4 ms from 2 ms count 3");

        Assert.Equal([0.002, 0.003, 0.006, 0.007, 0.010, 0.011], pieces.Select(p => Math.Round(p.Start, 12)));
        Assert.Equal("fall of pulse 3 at 11 ms", pieces[^1].Label);
        Assert.Equal(0, pieces.Sum(p => p.Amplitude));
    }

    [Fact]
    public void A_ramp_rises_and_then_holds() =>
        Assert.Equal(
            [
                new WavePiece(1, 3, 0, 6, 0, 0, 0, "ramp from 1 s to 3 s"),
                new WavePiece(3, Forever, 12, 0, 0, 0, 0, "hold from 3 s") { Continues = true },
            ],
            Checking.Wave("ramp of 12 V from 1 s to 3 s"));

    [Fact]
    public void A_decay_falls_by_its_time_constant() =>
        Assert.Equal([new WavePiece(0.5, Forever, 5, 0, 4, 0, 0, "decay from 500 ms")],
            Checking.Wave("decay of 5 V in 250 ms from 500 ms"));

    [Theory]
    [InlineData("sine of 2 V at 50 Hz", 0)]
    [InlineData("sine of 2 V at 50 Hz phase 90°", 90)]
    [InlineData("sine of 2 V at 50 Hz phase 254.54°", 254.54)]
    [InlineData("sine of 2 V at 50 Hz phase 30° from 7 ms", 30)]
    [InlineData("cosine of 2 V at 50 Hz phase 30° from 1000.003 s", 120)]
    [InlineData("cosine of 2 V at 50 Hz phase 1 rad", 90 + (180 / Math.PI))]
    public void The_phase_of_a_sine_is_that_at_the_start_of_the_study(string wave, double degrees)
    {
        var piece = Assert.Single(Checking.Wave(wave));

        var t = piece.Start + 0.0123;
        var expected = 2 * Math.Sin((100 * Math.PI * t) + (degrees * Math.PI / 180));
        var actual = piece.Amplitude * Math.Cos((piece.AngularFrequency * (t - piece.Start)) + piece.Phase);

        // 1000 s of 50 Hz is 3e5 rad, whose last bit is 6e-11; that rounding is the expected value's.
        Assert.Equal(expected, actual, piece.Start > 100 ? 5e-10 : 1e-14);
    }

    [Fact]
    public void A_sine_given_by_its_rms_value_has_its_peak() =>
        Assert.Equal(230 * Math.Sqrt(2), Checking.Wave("sine of 230 V rms at 50 Hz")[0].Amplitude);

    [Theory]
    [InlineData("sine of 2 V at 50 Hz", true)]
    [InlineData("sine of 2 V at 50 Hz from 0 s", false)]
    [InlineData("sine of 2 V at 50 Hz until 1 s", false)]
    [InlineData("sine of 2 V at 50 Hz decaying in 1 s", false)]
    public void Only_a_sine_without_bounds_has_been_on_for_ever(string wave, bool isPerpetual) =>
        Assert.Equal(isPerpetual, Assert.Single(Checking.Wave(wave)).IsPerpetual);

    [Fact]
    public void A_bounded_decaying_sine_keeps_its_bounds()
    {
        var piece =
            Assert.Single(Checking.Wave("sine of 2 V at 50 Hz from 5 ms until 40 ms decaying in 10 ms"));

        Assert.Equal((0.005, 0.04, 100.0), (piece.Start, piece.End, piece.DecayRate));
        Assert.Equal("sine at 50 Hz from 5 ms until 40 ms", piece.Label);
    }

    [Fact]
    public void An_impulse_is_a_tail_less_a_front()
    {
        var pieces = Checking.Wave("impulse of 6 kV 1.2/50 µs from 1 ms");
        var wave = DoubleExponential.Solve(1.2e-6, 50e-6, isVoltage: true)!;

        Assert.Equal(
            [
                new WavePiece(0.001, Forever, 6000 * wave.Factor, 0, 1 / wave.Tail, 0, 0,
                    "impulse from 1 ms, tail"),
                new WavePiece(0.001, Forever, -6000 * wave.Factor, 0, 1 / wave.Front, 0, 0,
                    "impulse from 1 ms, front")
                { Continues = true },
            ],
            pieces);
    }

    [Fact]
    public void A_double_exponential_is_the_same_impulse() =>
        Assert.Equal<WavePiece>(
            Checking.Wave("impulse of 6 kV 1.2/50 µs"),
            Checking.Wave("double exponential of 6 kV front 1.2 µs half-value 50 µs"));

    [Fact]
    public void Straight_lines_jump_where_two_points_share_an_instant() =>
        Assert.Equal(
            [
                new WavePiece(0, 1, 0, 5, 0, 0, 0, "line from 0 s to 1 s"),
                new WavePiece(1, 2, 3, -1, 0, 0, 0, "line from 1 s to 2 s") { Continues = true },
                new WavePiece(2, Forever, 2, 0, 0, 0, 0, "hold from 2 s") { Continues = true },
            ],
            Checking.Wave("straight lines (0 s, 0 V) (1 s, 5 V), (1 s, 3 V) (2 s, 2 V)"));

    [Fact]
    public void Terms_of_a_wave_keep_their_signs() =>
        Assert.Equal([5.0, 1, -5], Checking.Wave("5 V + sine of 1 V at 1 kHz - step of 5 V at 2 ms")
            .Select(p => p.Amplitude));

    [Fact]
    public void A_wave_may_start_when_a_switch_acts()
    {
        var circuit = Checking.Circuit(
            """
            source Feed at a : step of 5 V at 1 ms after K1 closes
            switch K1 from a to b : open, closes at 2 ms
            resistor R1 at b : 1 kΩ
            """);

        Assert.Equal(0.003, circuit.Part<VoltageSource>("Feed").Wave.Pieces[0].Start);
    }
}
