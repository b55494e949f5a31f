using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Statistics;

namespace CircuitTransient.Studies.Spreads;

/// <summary>The bands of the observed waveforms over the first draws.</summary>
internal static class Envelopes
{
    private const int MostDraws = 500;
    private const int MostNumbers = 4_000_000; // 32 MB

    /// <summary>How many draws the bands are made of.</summary>
    public static int DrawCount(TransientResult nominal, long draws)
    {
        var numbers = Math.Max(1, Observed(nominal.Circuit).Length)
            * EnvelopeInstants.Most;
        return (int)Math.Min(draws, Math.Clamp(MostNumbers / numbers, 20, MostDraws));
    }

    /// <summary>The bands.</summary>
    /// <param name="batch">The circuit.</param>
    /// <param name="nominal">Its nominal result, whose samples give the instants.</param>
    /// <param name="details">Stretches of time to be sampled closely, by the observation's name.</param>
    /// <param name="points">The draws, one after another.</param>
    /// <param name="threads">How many threads work.</param>
    public static ImmutableArray<WaveformBand> Of(
        PointBatch batch, TransientResult nominal, ImmutableArray<WaveformDetail> details, double[] points,
        int threads)
    {
        var observed = Observed(batch.Varied.Circuit);
        double[][] times = [.. observed.Select(o => EnvelopeInstants.Of(nominal, o, details))];
        var k = batch.ValueCount;
        double[] place = [.. batch.Varied.Values.Select(v => v.Nominal)];
        if (observed.Length == 0 || new WaveSampler(batch, observed, times).Exact(place) is not { } own)
        {
            return [];
        }

        var waves = new Waves?[points.Length / k];
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
                waves[i] = sampler.At(points.AsSpan(i * k, k)) is { } found ? new Waves(found) : null;
                return sampler;
            },
            _ => { });
        double[][][] solved = [.. waves.OfType<Waves>().Select(w => w.Values)];
        return solved.Length == 0
            ? []
            : [.. observed.Select((o, i) => Band(o, times[i], own[i], [.. solved.Select(w => w[i])]))];
    }

    private static int[] Observed(Circuit circuit) =>
        [.. Enumerable.Range(0, circuit.Observations.Length)
            .Where(o => circuit.Observations[o].Quantity is not Figure)];

    private static WaveformBand Band(
        int observation, double[] times, double[] own, double[][] solved)
    {
        var bands = new double[4][];
        for (var b = 0; b < 4; b++)
        {
            bands[b] = new double[times.Length];
        }

        for (var t = 0; t < times.Length; t++)
        {
            // Outside its window an observation has no nominal value, and no band.
            double[] values = double.IsNaN(own[t])
                ? []
                : [.. solved.Select(w => w[t]).Where(double.IsFinite).Order()];
            var isEmpty = values.Length == 0;
            bands[0][t] = isEmpty ? double.NaN : values[0];
            bands[1][t] = isEmpty ? double.NaN : QuantileRanks.Quantile(values, 0.05);
            bands[2][t] = isEmpty ? double.NaN : QuantileRanks.Quantile(values, 0.95);
            bands[3][t] = isEmpty ? double.NaN : values[^1];
        }

        return new WaveformBand(
            observation, solved.Length, [.. times], [.. own],
            [.. bands[0]], [.. bands[1]], [.. bands[2]], [.. bands[3]]);
    }

    private sealed record Waves(double[][] Values);
}
