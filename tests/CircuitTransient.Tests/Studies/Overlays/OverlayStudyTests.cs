using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Studies.Overlays;
using CircuitTransient.Studies.Records;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Overlays;

public class OverlayStudyTests
{
    private const string Ring = """
        source Edge at s : step of 10 V at 1 µs
        resistor R1 from s to a : 12 Ω
        inductor L1 from a to x : 10 µH
        capacitor C1 from x to ground : 1 nF
        observe voltage of x
        until 6 µs
        """;

    [Fact]
    public void Offset_gain_level_and_noise_are_found_within_their_errors()
    {
        var compared = Compare(Ring, Sampled(Ring, 600, t => t + 2.3e-6, v => 0.3 + (0.1 * v), noise: 0.01));

        Assert.True(compared.IsExplained);
        Near(2.3e-6, compared.Alignment.Offset);
        Near(0.1, compared.Alignment.Gain);
        Near(0.3, compared.Alignment.Level);
        Assert.Equal(1, compared.Noise.Value / 0.01, 0.15);
        Assert.True(compared.Differences.AreWhite);
    }

    [Fact]
    public void What_the_user_gives_is_kept()
    {
        var compared = Compare(
            Ring, Sampled(Ring, 600, t => t, v => v, noise: 0.01), new AlignmentGiven(0, 1, 0));

        Assert.Equal(
            new Alignment(new(0, 0, true), new(1, 0, true), new(0, 0, true)), compared.Alignment);
        Assert.True(compared.IsExplained);
    }

    [Fact]
    public void Clipped_samples_are_found_by_the_model_going_on_and_left_out()
    {
        var record = Sampled(Ring, 600, t => t, v => Math.Min(v, 15), noise: 0);

        var compared = Compare(Ring, record);

        Assert.Equal(record.Values.Count(v => v == 15), compared.ClippedCount);
        Assert.InRange(compared.ClippedCount, 20, 200);
        Assert.Equal(1, compared.Alignment.Gain.Value, 1e-9);
    }

    [Theory]
    [InlineData(10.1)] // most of the record stands there
    [InlineData(13)]
    [InlineData(17)]
    [InlineData(17.9)] // the first crest only
    public void However_much_is_clipped_of_a_noisy_record_it_is_left_out(double limit)
    {
        var noisy = Sampled(Ring, 600, t => t, v => v, noise: 0.05);
        var record = noisy with
        {
            Values = [.. noisy.Values.Select(v => Math.Min(Math.Round(v / 0.08) * 0.08, limit))],
        };

        var compared = Compare(Ring, record);

        Assert.True(compared.ClippedCount > 0);
        Assert.True(compared.IsExplained);
        Assert.Equal(1, compared.Alignment.Gain.Value, 0.01);
    }

    [Fact]
    public void A_flat_record_cannot_be_aligned_and_is_told_why()
    {
        var record = Sampled(Ring, 600, t => t, v => 0, noise: 0);

        Assert.Equal(
            "every sample of this record has the same value, which tells neither offset nor gain",
            Assert.Single(Outcome(Ring, record).Diagnostics).Message);
    }

    [Fact]
    public void A_record_of_two_samples_is_too_short_to_be_aligned()
    {
        var record = Sampled(Ring, 2, t => t, v => v, noise: 0.01);

        Assert.Equal(
            "this record has 2 samples, and 8 are the fewest that can be laid over the model",
            Assert.Single(Outcome(Ring, record).Diagnostics).Message);
    }

    [Fact]
    public void A_waveform_that_really_stands_at_its_ends_is_not_clipped()
    {
        const string square = """
            source Edge at x : rectangular pulse of 5 V from 1 µs to 3 µs
            resistor R1 at x : 50 Ω
            observe voltage of x
            until 6 µs
            """;

        var compared = Compare(square, Sampled(square, 600, t => t, v => v, noise: 0));

        Assert.Equal((0, 600), (compared.ClippedCount, compared.ComparedCount));
        Assert.True(compared.IsExplained);
    }

    [Fact]
    public void A_record_that_is_upside_down_is_told_so()
    {
        var compared = Compare(Ring, Sampled(Ring, 600, t => t, v => -v, noise: 0.01));

        Assert.False(compared.IsExplained);
        Assert.Contains("the record looks like the model upside down: is the probe the wrong way round? "
            + "`--gain -1`", compared.Remarks);
    }

    [Theory]
    [InlineData("capacitor C9 from x to ground : 470 pF", "470 pF from x to ground")]
    [InlineData("capacitor C9 from a to x : 300 pF", "300 pF from a to x")]
    public void A_stray_capacitance_is_named_with_its_place_and_value(string part, string words)
    {
        var compared = Compare(Ring, Sampled($"{Ring}\n{part}\n", 600, t => t, v => v, noise: 0.02));

        Assert.False(compared.IsExplained);
        var stray = Assert.Single(compared.Unexplained).Strays[0];
        Assert.Equal(words, stray.Words);
        Assert.InRange(stray.Ratio, 0.8, 1.2);
    }

    [Fact]
    public void A_stray_inductance_is_named_with_the_part_it_is_in_series_with()
    {
        // In series with the capacitor it lets the node jump; elsewhere in the loop it would not.
        var bench = Ring.Replace("C1 from x to ground", "C1 from y to ground")
            + "\ninductor L9 from x to y : 2 µH\n";

        var compared = Compare(Ring, Sampled(bench, 600, t => t, v => v, noise: 0.02));

        Assert.Equal("2.00 µH in series with C1", Assert.Single(compared.Unexplained).Strays[0].Words);
    }

    [Fact]
    public void The_ring_of_record_and_model_is_that_of_the_network()
    {
        var ring = Compare(Ring, Sampled(Ring, 600, t => t, v => v, noise: 0.02)).Ring!;

        // ω² = 1/LC − (R/2L)² of a series circuit.
        var expected = Math.Sqrt((1 / (10e-6 * 1e-9)) - Math.Pow(12 / 20e-6, 2)) / (2 * Math.PI);
        Assert.Equal(1, ring.ModelFrequency / expected, 1e-9);
        Assert.InRange(ring.Record.Frequency - expected, -4 * ring.Record.FrequencyError,
            4 * ring.Record.FrequencyError);
        Assert.InRange(ring.Record.Decay - 6e5, -4 * ring.Record.DecayError, 4 * ring.Record.DecayError);
        Assert.InRange(ring.Record.FrequencyError / expected, 0, 1e-3);
    }

    private static void Near(double expected, Estimate estimate) =>
        Assert.InRange(
            estimate.Value - expected, -4 * estimate.StandardError, 4 * estimate.StandardError);

    private static RecordComparison Compare(
        string text, OscilloscopeRecord record, AlignmentGiven? given = null) =>
        Assert.Single(Outcome(text, record, given).Value!.Records);

    private static Outcome<OverlayResult> Outcome(
        string text, OscilloscopeRecord record, AlignmentGiven? given = null)
    {
        var circuit = Check(text);
        var placed = RecordPlacement.Place(
            circuit, new RecordRequest(record, null, [], null, null, given ?? new AlignmentGiven()),
            NoFile).Value!;
        return OverlayStudy.Compare(circuit, [placed]);
    }

    private static OscilloscopeRecord Sampled(
        string text, int count, Func<double, double> time, Func<double, double> seen, double noise)
    {
        var circuit = Check(text);
        var model = ModelCurve.Solve(circuit, circuit.Observations[0], CancellationToken.None).Value!;
        var times = Enumerable.Range(0, count).Select(k => k * model.Until / count).ToArray();
        var values = new double[count];
        model.Evaluate(times, values, null);
        var random = new SeededNoise(7);
        ImmutableArray<string> channels = ["voltage of x"];
        return new OscilloscopeRecord(
            "bench.csv", "", channels[0], channels, "V", Array.ConvertAll(times, t => time(t)),
            Array.ConvertAll(values, v => seen(v) + (noise * random.Next())), null, count, []);
    }

    private static Circuit Check(string text) =>
        TransientAnalysis.Check(new SourceText("ring.cause", text), NoFile).Value!;

    private static Outcome<SourceText> NoFile(string name) => new(null, []);
}
