using System.Collections.Immutable;

namespace CircuitTransient.Measurements;

/// <summary>Chooses the samples that several waveforms of one time axis need, so that straight lines between
/// them stay close to all of them.</summary>
public static class SampleThinning
{
    private const int Halvings = 12;

    /// <summary>Indices of at most about <paramref name="limit"/> samples: as close as that number
    /// allows.</summary>
    /// <param name="times">The instants; one that stands twice is a jump.</param>
    /// <param name="waves">The waveforms.</param>
    /// <param name="kept">Indices that must stay.</param>
    /// <param name="limit">How many samples are wanted at most.</param>
    public static ImmutableArray<int> Choose(
        ImmutableArray<double> times,
        ImmutableArray<ImmutableArray<double>> waves,
        IReadOnlySet<int> kept,
        int limit)
    {
        var ranges = waves.Select(Range).ToArray();
        var (close, far) = (1e-9, 0.2); // of each waveform's own range
        for (var k = 0; k < Halvings; k++)
        {
            var middle = Math.Sqrt(close * far);
            if (Within(middle).Length > limit)
            {
                close = middle;
            }
            else
            {
                far = middle;
            }
        }

        return Within(far);

        ImmutableArray<int> Within(double tolerance) => Walk(times, waves, ranges, kept, tolerance);
    }

    // A cone for every waveform from the last sample kept: when no straight line stays in all cones, the
    // sample before is kept and new cones begin (Reumann and Witkam 1974 in the variant of Williams 1978,
    // from memory).
    private static ImmutableArray<int> Walk(
        ImmutableArray<double> times,
        ImmutableArray<ImmutableArray<double>> waves,
        double[] ranges,
        IReadOnlySet<int> kept,
        double tolerance)
    {
        var chosen = ImmutableArray.CreateBuilder<int>();
        var (low, high) = (new double[waves.Length], new double[waves.Length]);
        Begin(0);
        for (var i = 1; i < times.Length; i++)
        {
            if (!Fits(i))
            {
                if (chosen[^1] != i - 1)
                {
                    Begin(i - 1);
                }

                // A jump, or the edge of where a waveform is undetermined.
                if (!Fits(i))
                {
                    Begin(i);
                    continue;
                }
            }

            if (kept.Contains(i) || i == times.Length - 1)
            {
                Begin(i);
            }
        }

        return chosen.ToImmutable();

        void Begin(int i)
        {
            chosen.Add(i);
            Array.Fill(low, double.NegativeInfinity);
            Array.Fill(high, double.PositiveInfinity);
        }

        bool Fits(int i)
        {
            var from = chosen[^1];
            var step = times[i] - times[from];
            for (var w = 0; w < waves.Length; w++)
            {
                var (rise, room) = (waves[w][i] - waves[w][from], tolerance * ranges[w]);
                if (step == 0)
                {
                    if (Math.Abs(rise) > room)
                    {
                        return false;
                    }

                    continue;
                }

                var slope = rise / step;
                if (slope < low[w] || slope > high[w] || double.IsNaN(rise))
                {
                    return false;
                }

                low[w] = Math.Max(low[w], (rise - room) / step);
                high[w] = Math.Min(high[w], (rise + room) / step);
            }

            return true;
        }
    }

    private static double Range(ImmutableArray<double> wave)
    {
        var finite = wave.Where(double.IsFinite).ToArray();
        return finite.Length == 0 ? 0 : finite.Max() - finite.Min();
    }
}
