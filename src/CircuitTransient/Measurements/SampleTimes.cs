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
        var (coarse, fine) = (4.0, 1e-4); // steps over the fastest living time constant
        for (var k = 0; k < 12; k++)
        {
            var middle = Math.Sqrt(coarse * fine);
            if (Count(solution, middle, count) > count)
            {
                fine = middle;
            }
            else
            {
                coarse = middle;
            }
        }

        var times = new List<double>();
        var wanted = new SortedSet<double>(extra);
        foreach (var segment in solution.Segments)
        {
            var inner = new SortedSet<double>(
                Steps(solution, segment, coarse, count).Select(tau => segment.Start + tau));
            inner.UnionWith(wanted.GetViewBetween(segment.Start, segment.End));
            inner.Add(segment.Start);
            inner.Add(segment.End);
            times.AddRange(inner.Where(t => t >= segment.Start && t <= segment.End));
        }

        return [.. times];
    }

    private static int Count(TransientSolution solution, double fraction, int count) =>
        solution.Segments.Sum(s => Steps(solution, s, fraction, count).Length);

    /// <summary>A segment's share of a limited number is by its count, not its length: a short inrush gets
    /// its due.</summary>
    private static double[] Steps(TransientSolution solution, Segment segment, double fraction, int count) =>
        SamplingSteps
            .Of(segment.Basis, segment.Length, fraction, Math.Max(2, count / solution.Segments.Length));
}
