using System.Collections.Immutable;
using CircuitTransient.Measurements.Curves;

namespace CircuitTransient.Measurements;

/// <summary>The waveforms of a result at instants chosen by themselves.</summary>
/// <param name="Times">The instants; a boundary stands twice.</param>
/// <param name="Observations">The observations with their waveforms.</param>
/// <param name="Followed">The waveforms of what is judged or quadratic.</param>
internal sealed record SampledWaves(
    ImmutableArray<double> Times,
    ImmutableArray<ObservationResult> Observations,
    ImmutableArray<FollowedWave> Followed)
{
    private const int MostCandidates = 12; // times the samples aimed at
    private const double MostValues = 2e6; // some seconds of evaluation at most, and 16 MB

    /// <summary>Evaluates the curves at more instants than wanted and keeps those that their shapes
    /// need.</summary>
    public static SampledWaves Of(
        CurveBuilder curves,
        WindowTimes times,
        (ObservationResult Result, ImmutableArray<Curve> Curves)[] observed,
        int count,
        ImmutableArray<double> kept)
    {
        var curveCount = Math.Max(1, observed.Sum(o => o.Curves.Length));
        var candidates = SampleTimes.Of(
            curves.Solution,
            (int)Math.Clamp(MostValues / curveCount, count, (double)MostCandidates * count),
            kept);
        var all = new SampledWaves(
            candidates, Waves(curves, observed, candidates), FollowedWaves.Of(curves, times, candidates));
        return candidates.Length <= count ? all : all.At(all.Choose(count, [.. kept]));
    }

    private ImmutableArray<int> Choose(int count, HashSet<double> kept)
    {
        var mustStay = Enumerable.Range(0, Times.Length).Where(i =>
            kept.Contains(Times[i])
            || (i > 0 && Times[i - 1] == Times[i])
            || (i + 1 < Times.Length && Times[i + 1] == Times[i]));
        var waves = Observations.SelectMany(o => o.ByCause.Add(o.Total))
            .Concat(Followed.SelectMany(f => f.Terms.Select(t => t.Samples)))
            .Where(wave => double.IsFinite(wave[0]));
        return SampleThinning.Choose(Times, [.. waves], mustStay.ToHashSet(), count);
    }

    private SampledWaves At(ImmutableArray<int> chosen)
    {
        return new(
            Of(Times),
            [
                .. Observations.Select(o => o with
                {
                    Total = Of(o.Total),
                    ByCause = [.. o.ByCause.Select(Of)],
                }),
            ],
            [.. Followed.Select(f => f with
            {
                Terms = [.. f.Terms.Select(t => t with { Samples = Of(t.Samples) })],
            })]);

        ImmutableArray<double> Of(ImmutableArray<double> values) => [.. chosen.Select(i => values[i])];
    }

    private static ImmutableArray<ObservationResult> Waves(
        CurveBuilder curves,
        (ObservationResult Result, ImmutableArray<Curve> Curves)[] observed,
        ImmutableArray<double> samples)
    {
        var waves = Waveform.Of([.. observed.SelectMany(o => o.Curves)], curves.Solution, samples);
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
