using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Studies.Spreads;

/// <summary>A stretch of time in which the band of a waveform is sampled closely.</summary>
/// <param name="Observation">The observation's name.</param>
/// <param name="From">In seconds.</param>
/// <param name="To">In seconds.</param>
public sealed record WaveformDetail(string Observation, double From, double To);

/// <summary>The instants at which the band of an observed waveform is sampled: some of the nominal samples,
/// which are dense where waveforms move, some evenly over the time, and both sides of every jump.</summary>
internal static class EnvelopeInstants
{
    private const int MostSamples = 400; // of the nominal samples, in a stretch
    private const int Even = 240; // a draw may move where the nominal circuit does not
    private const int MostJumps = 60;

    // Of the study: nothing moves in so short a time, and it is more than the rounding of an instant.
    private const double Hair = 1e-13;

    /// <summary>How many there are at most: over the whole and in one detail.</summary>
    public const int Most = 2 * (MostSamples + Even + (2 * MostJumps) + 4);

    /// <summary>The instants of one observation, in order.</summary>
    /// <param name="nominal">The nominal result.</param>
    /// <param name="index">Index of the observation.</param>
    /// <param name="details">What is sampled closely.</param>
    public static double[] Of(TransientResult nominal, int index, ImmutableArray<WaveformDetail> details)
    {
        var name = nominal.Circuit.Observations[index].Name;
        var instants = new List<double>(Within(nominal, 0, nominal.Until));
        foreach (var detail in details.Where(d => d.Observation == name).Take(1))
        {
            instants.AddRange(Within(nominal, detail.From, detail.To));
        }

        var observation = nominal.Observations.FirstOrDefault(o => o.Name == name);
        double[] peaks = observation is null ? [] : [observation.Max.Time, observation.Min.Time];
        return [.. instants.Concat(peaks).Where(t => t >= 0 && t <= nominal.Until).Distinct().Order()];
    }

    private static IEnumerable<double> Within(TransientResult nominal, double from, double to)
    {
        double[] samples = [.. nominal.SampleTimes.Where(t => t >= from && t <= to)];
        // A boundary stands twice among the samples: before and after.
        double[] jumps = [.. samples.Zip(samples.Skip(1)).Where(p => p.First == p.Second)
            .Select(p => p.First).Where(t => t > 0 && t < nominal.Until)];
        return Some(samples, MostSamples)
            .Concat(Enumerable.Range(0, Even + 1).Select(i => from + ((to - from) * i / Even)))
            .Concat(Some(jumps, MostJumps).SelectMany(t => new[] { t - (Hair * nominal.Until), t }));
    }

    private static IEnumerable<double> Some(double[] all, int most)
    {
        var stride = Math.Max(1, (all.Length + most - 1) / most);
        return all.Where((_, i) => i % stride == 0);
    }
}
