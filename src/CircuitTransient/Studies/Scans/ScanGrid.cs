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
    /// <param name="solve">Solves one point.</param>
    /// <param name="solved">Told after each point, from any thread.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static ImmutableArray<ScanPoint> Solve(
        ImmutableArray<ImmutableArray<double>> places, Func<ImmutableArray<double>, ScanPoint> solve,
        Action solved, CancellationToken cancellation)
    {
        var points = new ScanPoint[places.Length];
        Parallel.For(0, places.Length, new ParallelOptions { CancellationToken = cancellation }, i =>
        {
            points[i] = solve(places[i]);
            solved();
        });
        return ImmutableCollectionsMarshal.AsImmutableArray(points);
    }
}
