using System.Collections.Immutable;

namespace CircuitTransient.Reports;

/// <summary>A waveform between its samples, which are as dense as it moves: a cubic with the slopes of the
/// parabolas through each sample and its neighbours. A corner stands twice among the samples, so that nothing
/// is rounded off.</summary>
internal static class SampleCurve
{
    private const int FinestStep = 150; // steps of a window that a line of straight pieces looks curved with
    private const int MostBetween = 40;

    /// <summary>The samples with others between them where they lie far apart within a window.</summary>
    public static (ImmutableArray<double> Times, ImmutableArray<double> Values) Refined(
        ImmutableArray<double> times, ImmutableArray<double> values, double from, double to)
    {
        var step = (to - from) / FinestStep;
        var refined = ImmutableArray.CreateBuilder<double>();
        var curve = ImmutableArray.CreateBuilder<double>();
        for (var i = 0; i < times.Length; i++)
        {
            refined.Add(times[i]);
            curve.Add(values[i]);
            var gap = i + 1 < times.Length ? times[i + 1] - times[i] : 0;
            if (gap <= step || times[i] >= to || times[i + 1] <= from
                || !double.IsFinite(values[i]) || !double.IsFinite(values[i + 1]))
            {
                continue;
            }

            var count = Math.Min(MostBetween, (int)Math.Ceiling(gap / step));
            for (var k = 1; k < count; k++)
            {
                refined.Add(times[i] + (gap * k / count));
                curve.Add(Between(times, values, i, (double)k / count));
            }
        }

        return (refined.ToImmutable(), curve.ToImmutable());
    }

    /// <summary>The cubic from sample i to the next, at a share of the way.</summary>
    private static double Between(
        ImmutableArray<double> times, ImmutableArray<double> values, int i, double share)
    {
        var h = times[i + 1] - times[i];
        var (v0, v1) = (values[i], values[i + 1]);
        var (s0, s1) = (h * Slope(times, values, i, 1), h * Slope(times, values, i + 1, -1));
        return v0 + (share * (s0 + (share * ((3 * (v1 - v0)) - (2 * s0) - s1
            + (share * ((2 * (v0 - v1)) + s0 + s1))))));
    }

    /// <summary>The slope at a sample, seen from one side where it jumps or ends there.</summary>
    private static double Slope(
        ImmutableArray<double> times, ImmutableArray<double> values, int i, int side)
    {
        var (left, right) = (Rise(i - 1), Rise(i));
        if (double.IsFinite(left) && double.IsFinite(right))
        {
            var (a, b) = (times[i] - times[i - 1], times[i + 1] - times[i]);
            return ((left * b) + (right * a)) / (a + b);
        }

        var (near, far) = side > 0 ? (right, Rise(i + 1)) : (left, Rise(i - 2));
        if (!double.IsFinite(near) || !double.IsFinite(far))
        {
            return double.IsFinite(near) ? near : 0;
        }

        var (first, second) = side > 0
            ? (times[i + 1] - times[i], times[i + 2] - times[i + 1])
            : (times[i] - times[i - 1], times[i - 1] - times[i - 2]);
        return near + ((near - far) * first / (first + second));

        double Rise(int k) => k >= 0 && k + 1 < times.Length && times[k + 1] > times[k]
            ? (values[k + 1] - values[k]) / (times[k + 1] - times[k])
            : double.NaN;
    }
}
