using System.Collections.Immutable;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Chooses the instants of the waveforms: dense where the observed quantities move, every boundary
/// twice, every peak included.</summary>
internal static class SampleTimes
{
    /// <summary>The instants in order.</summary>
    /// <param name="solution">The solution.</param>
    /// <param name="count">How many are aimed at.</param>
    /// <param name="extra">Instants that must be among them.</param>
    public static ImmutableArray<double> Of(
        TransientSolution solution,
        int count,
        IEnumerable<double> extra)
    {
        // Steps as a part of the fastest living time constant; their number is nearly its inverse. Coming
        // from the coarse side, endless ringing never asks for many more steps than are aimed at.
        double part = 1000;
        for (var k = 0; k < 12; k++)
        {
            part = Math.Max(part * Count(solution, part) / count, 1e-6);
        }

        var times = new List<double>();
        var wanted = new SortedSet<double>(extra);
        foreach (var segment in solution.Segments)
        {
            var inner = new SortedSet<double>(Steps(segment, part).Select(tau => segment.Start + tau));
            inner.UnionWith(wanted.GetViewBetween(segment.Start, segment.End));
            inner.Add(segment.Start);
            inner.Add(segment.End);
            times.AddRange(inner.Where(t => t >= segment.Start && t <= segment.End));
        }

        return [.. times];
    }

    private static int Count(TransientSolution solution, double part) =>
        solution.Segments.Sum(segment => Steps(segment, part).Length);

    // A limit on a segment's steps would spread them evenly and leave a short inrush in a long study
    // without its due, so there is none: the part alone keeps to the count.
    private static double[] Steps(Segment segment, double part) =>
        SamplingSteps.Of(segment.Basis, segment.Length, part, int.MaxValue);
}
