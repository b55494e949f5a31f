using System.Collections.Immutable;
using CircuitTransient.Measurements.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Chooses the instants of the waveforms: dense where the observed quantities move, every boundary
/// twice,
/// every peak included.</summary>
internal static class SampleTimes
{
    /// <summary>The instants in order.</summary>
    /// <param name="solution">The solution.</param>
    /// <param name="count">How many are aimed at.</param>
    /// <param name="extra">Instants that must be among them.</param>
    public static ImmutableArray<double> Of(TransientSolution solution, int count, IEnumerable<double> extra)
    {
        double coarse = 0.5; // of the fastest living time constant; the number of steps is nearly its inverse
        for (var k = 0; k < 6; k++)
        {
            coarse = Math.Max(coarse * Count(solution, coarse, count) / count, 1e-6);
        }

        var times = new List<double>();
        var wanted = new SortedSet<double>(extra);
        foreach (var segment in solution.Segments)
        {
            var inner = new SortedSet<double>(
                Steps(segment, coarse, count).Select(tau => segment.Start + tau));
            inner.UnionWith(wanted.GetViewBetween(segment.Start, segment.End));
            inner.Add(segment.Start);
            inner.Add(segment.End);
            times.AddRange(inner.Where(t => t >= segment.Start && t <= segment.End));
        }

        return [.. times];
    }

    private static int Count(TransientSolution solution, double fraction, int count) =>
        solution.Segments.Sum(s => Steps(s, fraction, count).Length);

    // The fraction is what keeps to the count. The limit only guards against endless ringing; were it near the
    // count, it would spread the samples evenly and leave a short inrush in a long study without its due.
    private static double[] Steps(Segment segment, double fraction, int count) =>
        SamplingSteps.Of(segment.Basis, segment.Length, fraction, 100 * count);
}
