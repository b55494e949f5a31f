using System.Collections.Immutable;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Instants dense where a solution may move: every step is the same fraction of the fastest time
/// constant still alive, every boundary stands twice.</summary>
internal static class SampleTimes
{
    private const double Slowest = 4; // steps' worth of motion in a segment where nothing moves by itself

    /// <summary>The instants in order.</summary>
    /// <param name="solution">The solution.</param>
    /// <param name="count">How many are aimed at.</param>
    /// <param name="extra">Instants that must be among them.</param>
    /// <param name="shows">For each segment and mode, for how many of its decay times it shows.</param>
    public static ImmutableArray<double> Of(
        TransientSolution solution, int count, IEnumerable<double> extra, ImmutableArray<double[]> shows)
    {
        var paces = solution.Segments.Select((s, k) => Paces(s, shows[k])).ToArray();
        var motions = paces.Select(p => p.Sum(pace => pace.Length * pace.Speed)).ToArray();
        var most = 2.0 * count / motions.Length; // a short inrush gets its due beside a long ringing
        var fraction = Fraction(motions, count, most);
        var times = new List<double>();
        var wanted = new SortedSet<double>(extra);
        for (var s = 0; s < motions.Length; s++)
        {
            var segment = solution.Segments[s];
            var inner = new SortedSet<double>(Steps(paces[s], Math.Max(fraction, motions[s] / most))
                .Select(tau => segment.Start + tau));
            inner.UnionWith(wanted.GetViewBetween(segment.Start, segment.End));
            inner.Add(segment.Start);
            inner.Add(segment.End);
            times.AddRange(inner.Where(t => t >= segment.Start && t <= segment.End));
        }

        return [.. times];
    }

    // The fraction for which the segments, none beyond its most, have the count together.
    private static double Fraction(double[] motions, int count, double most)
    {
        var (fine, coarse) = (1e-9, motions.Max());
        for (var k = 0; k < 60; k++)
        {
            var middle = Math.Sqrt(fine * coarse);
            (fine, coarse) = motions.Sum(m => Math.Min(most, m / middle)) > count
                ? (middle, coarse)
                : (fine, middle);
        }

        return coarse;
    }

    private static IEnumerable<double> Steps((double Length, double Speed)[] paces, double fraction)
    {
        double start = 0;
        foreach (var (length, speed) in paces)
        {
            var steps = Math.Max(1, (int)Math.Round(length * speed / fraction));
            for (var k = 0; k < steps; k++)
            {
                yield return start + (length * k / steps);
            }

            start += length;
        }
    }

    // From death to death of the fast modes, in order: how long, and the fastest speed alive.
    private static (double Length, double Speed)[] Paces(Segment segment, double[] shows)
    {
        var modes = segment.Basis.Modes;
        var ends = new double[modes.Length];
        for (var m = 0; m < ends.Length; m++)
        {
            ends[m] = shows[m] < 0 ? 0
                : modes[m].Decay > 0 ? shows[m] / modes[m].Decay
                : double.PositiveInfinity;
        }

        var paces = new List<(double, double)>();
        double start = 0;
        var changes = ends.Where(t => t > 0 && t < segment.Length).Append(segment.Length).Distinct();
        foreach (var end in changes.Order())
        {
            var living =
                Enumerable.Range(0, ends.Length).Where(m => ends[m] > start).Select(m => modes[m].Speed);
            paces.Add((end - start, living.Append(Slowest / segment.Length).Max()));
            start = end;
        }

        return [.. paces];
    }
}
