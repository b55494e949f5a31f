using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Studies.Spreads;

/// <summary>The bands of the observed waveforms over the first draws.</summary>
internal static class Envelopes
{
    private const int MostDraws = 500;
    private const int MostInstants = 640;
    private const int MostPeaks = 8;
    private const int AboutPeak = 40; // samples before and after a peak
    private const int MostNumbers = 4_000_000; // 32 MB

    /// <summary>How many draws the bands are made of.</summary>
    public static int DrawCount(TransientResult nominal, long draws)
    {
        var numbers = Math.Max(1, Observed(nominal.Circuit).Length)
            * (MostInstants + (2 * AboutPeak * MostPeaks));
        return (int)Math.Min(draws, Math.Clamp(MostNumbers / numbers, 20, MostDraws));
    }

    /// <summary>The bands.</summary>
    /// <param name="batch">The circuit.</param>
    /// <param name="nominal">Its nominal result, whose samples give the instants.</param>
    /// <param name="points">The draws, one after another.</param>
    /// <param name="threads">How many threads work.</param>
    public static ImmutableArray<WaveformBand> Of(
        PointBatch batch, TransientResult nominal, double[] points, int threads)
    {
        var observed = Observed(batch.Varied.Circuit);
        var times = Instants(nominal);
        var k = batch.ValueCount;
        double[] place = [.. batch.Varied.Values.Select(v => v.Nominal)];
        if (observed.Length == 0 || new WaveSampler(batch, observed, times).Exact(place) is not { } own)
        {
            return [];
        }

        var waves = new double[]?[points.Length / k];
        var options = new ParallelOptions
        {
            MaxDegreeOfParallelism = threads,
            CancellationToken = batch.Cancellation,
        };
        Parallel.For(
            0, waves.Length, options,
            () => new WaveSampler(batch, observed, times),
            (i, _, sampler) =>
            {
                waves[i] = sampler.At(points.AsSpan(i * k, k));
                return sampler;
            },
            _ => { });
        double[][] solved = [.. waves.OfType<double[]>()];
        return solved.Length == 0
            ? []
            : [.. observed.Select((o, i) => Band(o, i, times, own, solved))];
    }

    private static int[] Observed(Circuit circuit) =>
        [.. Enumerable.Range(0, circuit.Observations.Length)
            .Where(o => circuit.Observations[o].Quantity is not Figure)];

    /// <summary>Instants among the nominal samples, which are dense where the waveforms move: some over the
    /// whole study, and those about every nominal peak.</summary>
    private static double[] Instants(TransientResult nominal)
    {
        var samples = nominal.SampleTimes;
        var stride = Math.Max(1, (samples.Length + MostInstants - 1) / MostInstants);
        var peaks = nominal.Observations.SelectMany(o => new[] { o.Max.Time, o.Min.Time }).ToArray();
        var about = peaks.Take(MostPeaks).SelectMany(peak =>
        {
            var place = samples.BinarySearch(peak);
            place = place < 0 ? ~place : place;
            return samples.Skip(place - AboutPeak).Take(2 * AboutPeak);
        });
        return
        [
            .. samples.Where((_, i) => i % stride == 0).Concat(about).Concat(peaks).Append(nominal.Until)
                .Where(t => t <= nominal.Until)
                .Distinct().Order(),
        ];
    }

    private static WaveformBand Band(
        int observation, int place, double[] times, double[] own, double[][] solved)
    {
        var bands = new double[4][];
        for (var b = 0; b < 4; b++)
        {
            bands[b] = new double[times.Length];
        }

        for (var t = 0; t < times.Length; t++)
        {
            var at = (place * times.Length) + t;
            // Outside its window an observation has no nominal value, and no band.
            double[] values = double.IsNaN(own[at])
                ? []
                : [.. solved.Select(w => w[at]).Where(double.IsFinite).Order()];
            var isEmpty = values.Length == 0;
            bands[0][t] = isEmpty ? double.NaN : values[0];
            bands[1][t] = isEmpty ? double.NaN : QuantileRanks.Quantile(values, 0.05);
            bands[2][t] = isEmpty ? double.NaN : QuantileRanks.Quantile(values, 0.95);
            bands[3][t] = isEmpty ? double.NaN : values[^1];
        }

        return new WaveformBand(
            observation, solved.Length, [.. times], [.. own.AsSpan(place * times.Length, times.Length)],
            [.. bands[0]], [.. bands[1]], [.. bands[2]], [.. bands[3]]);
    }
}
