using System.Collections.Immutable;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Overlays;

/// <summary>The ringing of a record against that of the model, in the stretch without switchings and corners
/// that holds the most samples.</summary>
internal sealed class RingAnalysis
{
    private const int MostSamples = 8192;
    private const int FewestSamples = 60;
    private const double SameMode = 0.002; // relative; finer than a bench tells values
    private const double SamplesAPeriod = 8;

    public RingAnalysis(ModelCurve model, Aligned aligned, double noise)
    {
        if (LongestStretch(model, aligned) is not var (index, samples))
        {
            return;
        }

        Segment = model.Solution.Segments[index];
        var modes = ModesOf(Segment, model.Coefficients(index));
        samples = Shortened(samples, modes);
        var found = new RingFit(samples, RealRates(Segment)).Find(noise);
        var free = modes.Where(m => m.Frequency > 0).ToList();
        var missing = ImmutableArray.CreateBuilder<UnexplainedMode>();
        foreach (var ring in found)
        {
            var nearest = free.Count == 0 ? null
                : free.MinBy(m => Math.Abs(Math.Log(m.Frequency / ring.Frequency)));
            var isSame = nearest is not null && Math.Abs(nearest.Frequency - ring.Frequency)
                <= Math.Max(4 * ring.FrequencyError, SameMode * ring.Frequency);
            if (Strongest is null && nearest is { IsForced: false })
            {
                Strongest = new RingComparison(ring, nearest.Frequency, nearest.Damping);
            }

            if (isSame)
            {
                free.Remove(nearest!);
            }
            else
            {
                missing.Add(new UnexplainedMode(ring, nearest?.Frequency, []));
            }
        }

        Missing = missing.ToImmutable();
    }

    /// <summary>The stretch; null where none holds enough samples.</summary>
    public Segment? Segment { get; }

    /// <summary>The record's strongest mode and the model's nearest.</summary>
    public RingComparison? Strongest { get; }

    /// <summary>Modes of the record that the model lacks.</summary>
    public ImmutableArray<UnexplainedMode> Missing { get; } = [];

    private static (int Index, RecordSamples Samples)? LongestStretch(ModelCurve model, Aligned aligned)
    {
        (int Index, RecordSamples Samples)? best = null;
        for (var i = 0; i < model.Solution.Segments.Length; i++)
        {
            var segment = model.Solution.Segments[i];
            var samples = aligned.Compared.Between(
                segment.Start + aligned.Offset, segment.End + aligned.Offset);
            if (samples.Count >= FewestSamples && samples.Count > (best?.Samples.Count ?? 0))
            {
                best = (i, samples);
            }
        }

        return best;
    }

    /// <summary>So many samples as the fit bears: neighbours averaged as far as the model's fastest visible
    /// ring allows, then cut at the end.</summary>
    private static RecordSamples Shortened(RecordSamples samples, List<ModelMode> modes)
    {
        if (samples.Count <= MostSamples)
        {
            return samples;
        }

        var interval = (samples.Times[^1] - samples.Times[0]) / (samples.Count - 1);
        var visible = modes.Where(m => m.Amplitude > 1e-3 * modes.Max(o => o.Amplitude)).ToList();
        var fastest = visible.Select(m => m.Frequency).DefaultIfEmpty().Max();
        var most = fastest > 0 ? Math.Max(1, (int)(1 / (SamplesAPeriod * fastest * interval))) : int.MaxValue;
        var group = Math.Min(most, (samples.Count + MostSamples - 1) / MostSamples);
        var count = Math.Min(MostSamples, samples.Count / group);
        var (times, values) = (new double[count], new double[count]);
        for (var k = 0; k < count; k++)
        {
            times[k] = samples.Times.AsSpan(k * group, group).ToArray().Average();
            values[k] = samples.Values.AsSpan(k * group, group).ToArray().Average();
        }

        return new RecordSamples(times, values);
    }

    private static IEnumerable<double> RealRates(Segment segment) =>
        from mode in segment.Basis.Modes
        from row in Enumerable.Range(0, mode.Rows)
        let pole = mode.Rounded[row, row]
        where pole.Imaginary == 0 && pole.Real < 0
        orderby -pole.Real
        select -pole.Real;

    private static List<ModelMode> ModesOf(Segment segment, ReadOnlySpan<double> coefficients)
    {
        var modes = new List<ModelMode>();
        for (var m = 0; m < segment.Basis.Modes.Length; m++)
        {
            var mode = segment.Basis.Modes[m];
            for (var row = 0; row < mode.Order; row++)
            {
                var pole = mode.Rounded[row, row];
                if (pole.Imaginary == 0)
                {
                    continue;
                }

                var amplitude = 0.0;
                for (var column = row; row < mode.Rows && column < mode.Order; column++)
                {
                    amplitude += segment.Basis.Coefficient(coefficients, m, mode.Carrier(row, column))
                        .Magnitude;
                }

                modes.Add(new ModelMode(
                    Math.Abs(pole.Imaginary) / (2 * Math.PI), -pole.Real / pole.Magnitude, amplitude,
                    mode.Kind == ModeKind.Forced || row >= mode.Rows));
            }
        }

        return modes;
    }

    private sealed record ModelMode(double Frequency, double Damping, double Amplitude, bool IsForced);
}
