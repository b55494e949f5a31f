using System.Collections.Immutable;
using CircuitTransient.Studies.Sizes;

namespace CircuitTransient.Reports.Studies;

/// <summary>Chooses the constraints that a picture of a sizing has room for.</summary>
internal static class SizeBounds
{
    /// <summary>Those that decide (the tightest, those at the ends of the stretches, those in conflict), then
    /// those with the least room; in the order of the file.</summary>
    /// <param name="result">The sizing.</param>
    /// <param name="most">How many there is room for.</param>
    /// <param name="canBeDrawn">Whether there is anything to draw of a constraint.</param>
    public static ImmutableArray<int> Shown(SizeResult result, int most, Func<int, bool> canBeDrawn)
    {
        var place = result.Chosen ?? result.Conflict?.Nearest ?? result.AsItStands;
        var ends = result.Intervals.SelectMany(interval => new[] { interval.Below, interval.Above })
            .OfType<int>().Where(index => index != FeasibleInterval.Unsolvable);
        var conflicts = result.Conflict is { } conflict
            ? conflict.Alone.Concat(conflict.Pairs.SelectMany(pair => new[] { pair.First, pair.Second }))
            : [];
        var byRoom = Enumerable.Range(0, place.Shares.Length).OrderBy(index => place.Shares[index]);
        int[] decide = [SizeWords.Tightest(place), .. ends, .. conflicts, .. byRoom];
        return [.. decide.Distinct().Where(canBeDrawn).Take(most).Order()];
    }
}
