using System.Collections.Immutable;
using System.Runtime.InteropServices;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Waveforms at chosen instants.</summary>
internal static class Waveform
{
    /// <summary>The values of many curves; an instant that stands twice is a jump: the value before, then
    /// after.</summary>
    public static ImmutableArray<ImmutableArray<double>> Of(
        ImmutableArray<Curve> curves, TransientSolution solution, ImmutableArray<double> times)
    {
        var values = new double[curves.Length][];
        for (var c = 0; c < values.Length; c++)
        {
            values[c] = new double[times.Length];
        }

        var index = 0;
        var phi = new double[solution.Segments.Max(s => s.Basis.Width)];
        var gathered = new GatheredIntegrals(curves);
        for (var k = 0; k < times.Length; k++)
        {
            var isBefore = k + 1 < times.Length && times[k + 1] == times[k];
            while (index + 1 < solution.Segments.Length
                && (solution.Segments[index].End < times[k]
                    || (!isBefore && solution.Segments[index].End == times[k])))
            {
                index++;
            }

            var segment = solution.Segments[index];
            var tau = Math.Clamp(times[k] - segment.Start, 0, segment.Length);
            var now = phi.AsSpan(0, segment.Basis.Width);
            segment.Basis.Evaluate(tau, now);
            gathered.MoveTo(index, tau);
            for (var c = 0; c < values.Length; c++)
            {
                values[c][k] = gathered.ValueOf(c) ?? curves[c].Pieces[index].ValueAt(tau, now);
            }
        }

        return [.. values.Select(ImmutableCollectionsMarshal.AsImmutableArray)];
    }
}
