using System.Collections.Immutable;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>The waveforms of a result at instants chosen by themselves.</summary>
/// <param name="Times">The instants; a boundary stands twice.</param>
/// <param name="Observations">The observations with their waveforms.</param>
internal sealed record SampledWaves(
    ImmutableArray<double> Times,
    ImmutableArray<ObservationResult> Observations)
{
    /// <summary>Chooses instants and evaluates the observed curves there.</summary>
    public static SampledWaves Of(
        TransientSolution solution,
        (ObservationResult Result, ImmutableArray<Curve> Curves)[] observed,
        int count,
        ImmutableArray<double> kept)
    {
        var shows = ModeRelevance.Of(solution, [.. observed.SelectMany(o => o.Curves)]);
        var times = SampleTimes.Of(solution, count, kept, shows);
        return new SampledWaves(times, Waves(solution, observed, times));
    }

    private static ImmutableArray<ObservationResult> Waves(
        TransientSolution solution,
        (ObservationResult Result, ImmutableArray<Curve> Curves)[] observed,
        ImmutableArray<double> samples)
    {
        var waves = Waveform.Of([.. observed.SelectMany(o => o.Curves)], solution, samples);
        var blank = Enumerable.Repeat(double.NaN, samples.Length).ToImmutableArray();
        var next = 0;
        var filled = ImmutableArray.CreateBuilder<ObservationResult>();
        foreach (var (result, own) in observed)
        {
            if (own.IsEmpty)
            {
                filled.Add(result with
                {
                    Total = blank,
                    ByCause = [.. result.Contributions.Select(_ => blank)],
                });
                continue;
            }

            filled.Add(result with
            {
                Total = waves[next],
                ByCause = [.. Enumerable.Range(next + 1, own.Length - 1).Select(k => waves[k])],
            });
            next += own.Length;
        }

        return filled.ToImmutable();
    }
}
