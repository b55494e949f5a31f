using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>Why no value holds.</summary>
/// <param name="Nearest">The values whose worst break is least.</param>
/// <param name="Alone">Constraints that hold nowhere in the range, whatever the others say.</param>
/// <param name="First">A constraint that excludes <paramref name="Second"/>: each holds somewhere, never
/// both; null where no two exclude each other.</param>
/// <param name="PairNearest">The values at which those two come nearest to holding together; null where there
/// are none.</param>
public sealed record SizeConflict(
    SizePoint Nearest, ImmutableArray<int> Alone, int? First, int? Second, SizePoint? PairNearest)
{
    // A grid's closest miss is improved before two constraints are said to exclude each other.
    private const int MostPairs = 3;

    /// <summary>Finds it from points none of which holds.</summary>
    /// <param name="points">The points looked at.</param>
    /// <param name="all">Every constraint.</param>
    /// <param name="improve">Raises the least share among some constraints from where the points have
    /// it.</param>
    internal static SizeConflict Of(
        ImmutableArray<SizePoint> points, ImmutableArray<int> all,
        Func<ImmutableArray<int>, SizePoint> improve)
    {
        var nearest = improve(all);
        var alone = all
            .Where(i => Most(points, [i]) < 0 && SizeSearch.Least(improve([i]), [i]) < 0).ToImmutableArray();
        if (!alone.IsEmpty)
        {
            return new SizeConflict(nearest, alone, null, null, null);
        }

        var pairs =
            from first in all
            from second in all
            where first < second
            let most = Most(points, [first, second])
            where most < 0
            orderby most
            select (First: first, Second: second);
        foreach (var (first, second) in pairs.Take(MostPairs))
        {
            var best = improve([first, second]);
            if (SizeSearch.Least(best, [first, second]) < 0)
            {
                return new SizeConflict(nearest, [], first, second, best);
            }
        }

        return new SizeConflict(nearest, [], null, null, null);
    }

    private static double Most(ImmutableArray<SizePoint> points, ImmutableArray<int> among) =>
        points.Max(point => SizeSearch.Least(point, among));
}
