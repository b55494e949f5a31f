using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>Why no value holds.</summary>
/// <param name="Nearest">The values whose worst break is least.</param>
/// <param name="Alone">Constraints that hold nowhere in the range, whatever the others say.</param>
/// <param name="Pairs">Constraints that exclude each other, those that are farthest apart first; empty where
/// no two do.</param>
public sealed record SizeConflict(
    SizePoint Nearest, ImmutableArray<int> Alone, ImmutableArray<ExcludedPair> Pairs)
{
    // Each pair's closest miss is searched before the two are said to exclude each other.
    private const int MostPairs = 6;

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
        var others = all.RemoveRange(alone);
        var pairs =
            from first in others
            from second in others
            where first < second
            let most = Most(points, [first, second])
            where most < 0
            orderby most
            select new ExcludedPair(first, second, nearest);
        var searched = pairs.Take(MostPairs)
            .Select(pair => pair with { Nearest = improve([pair.First, pair.Second]) })
            .Where(pair => SizeSearch.Least(pair.Nearest, [pair.First, pair.Second]) < 0);
        return new SizeConflict(nearest, alone, [.. searched]);
    }

    private static double Most(ImmutableArray<SizePoint> points, ImmutableArray<int> among) =>
        points.Max(point => SizeSearch.Least(point, among));
}

/// <summary>Two constraints each of which holds somewhere, but never both.</summary>
/// <param name="First">The one.</param>
/// <param name="Second">The other.</param>
/// <param name="Nearest">The values at which they come nearest to holding together.</param>
public sealed record ExcludedPair(int First, int Second, SizePoint Nearest);
