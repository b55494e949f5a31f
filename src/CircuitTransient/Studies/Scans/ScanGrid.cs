using System.Collections.Immutable;
using System.Runtime.InteropServices;

namespace CircuitTransient.Studies.Scans;

/// <summary>Solves the points of a scan on all cores; their order is that of the ranges, whatever core solved
/// them.</summary>
internal static class ScanGrid
{
    /// <summary>Every combination of the axes' values, the last axis running fastest.</summary>
    public static ImmutableArray<ImmutableArray<double>> Places(ImmutableArray<ScanAxis> axes)
    {
        ImmutableArray<ImmutableArray<double>> places = [[]];
        foreach (var axis in axes)
        {
            places = [.. places.SelectMany(_ => axis.Values, (place, value) => place.Add(value))];
        }

        return places;
    }

    /// <summary>Solves all of them.</summary>
    /// <param name="places">The scanned values of each point.</param>
    /// <param name="axis">The value whose slopes are wanted; −1 for none.</param>
    /// <param name="put">All values at a point.</param>
    /// <param name="function">Remembers or solves it.</param>
    /// <param name="solved">Told how many are known beforehand, then of each one solved, from any
    /// thread.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static ImmutableArray<ScanPoint> Solve(
        ImmutableArray<ImmutableArray<double>> places, int axis,
        Func<ImmutableArray<double>, double[]> put, ScanFunction function, Action<int> solved,
        CancellationToken cancellation)
    {
        var points = new ScanPoint[places.Length];
        var left = new List<int>();
        for (var i = 0; i < points.Length; i++)
        {
            if (function.Recalled(put(places[i]), places[i], axis) is { } known)
            {
                points[i] = known;
            }
            else
            {
                left.Add(i);
            }
        }

        solved(points.Length - left.Count);
        Parallel.ForEach(left, new ParallelOptions { CancellationToken = cancellation }, i =>
        {
            points[i] = function.Point(put(places[i]), places[i], axis);
            solved(1);
        });
        return ImmutableCollectionsMarshal.AsImmutableArray(points);
    }
}
