using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>The regions of a grid in which everything holds, each of points that are neighbours.</summary>
internal static class HeldRegions
{
    /// <summary>The regions, the largest first.</summary>
    /// <param name="points">The grid, row by row.</param>
    /// <param name="columns">How many points a row has.</param>
    public static ImmutableArray<ImmutableArray<SizePoint>> Of(ImmutableArray<SizePoint> points, int columns)
    {
        var isTaken = new bool[points.Length];
        var regions = new List<ImmutableArray<SizePoint>>();
        for (var i = 0; i < points.Length; i++)
        {
            if (points[i].Holds && !isTaken[i])
            {
                regions.Add(From(points, columns, i, isTaken));
            }
        }

        return [.. regions.OrderByDescending(region => region.Length)];
    }

    private static ImmutableArray<SizePoint> From(
        ImmutableArray<SizePoint> points, int columns, int start, bool[] isTaken)
    {
        var region = ImmutableArray.CreateBuilder<SizePoint>();
        var waiting = new Queue<int>([start]);
        isTaken[start] = true;
        while (waiting.TryDequeue(out var i))
        {
            region.Add(points[i]);
            foreach (var other in Beside(i, columns, points.Length))
            {
                if (points[other].Holds && !isTaken[other])
                {
                    isTaken[other] = true;
                    waiting.Enqueue(other);
                }
            }
        }

        return region.ToImmutable();
    }

    private static IEnumerable<int> Beside(int i, int columns, int count)
    {
        if (i % columns > 0)
        {
            yield return i - 1;
        }

        if (i % columns < columns - 1)
        {
            yield return i + 1;
        }

        if (i >= columns)
        {
            yield return i - columns;
        }

        if (i + columns < count)
        {
            yield return i + columns;
        }
    }
}
