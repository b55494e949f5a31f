using CircuitTransient.Studies.Designs;

namespace CircuitTransient.Studies.Spreads;

/// <summary>The corners of the tolerances: all of them where there are few, else those that a search by
/// single exchanges finds.</summary>
internal sealed class CornerSearch(PointBatch batch, ValueRanges ranges, BestPoints best)
{
    private const int CornersInBatch = 4096;

    /// <summary>How many random corners a search starts from.</summary>
    public const int RandomCorners = 512;

    private const int MostRounds = 24;
    private const ulong Stream = 0x5EED; // fixed: the extremes do not depend on the seed of the draws

    private readonly List<double[]> visited = [];

    /// <summary>The corners whose neighbours the search went through, in its order.</summary>
    public IReadOnlyList<double[]> Visited => visited;

    /// <summary>Solves every corner.</summary>
    public void SolveAll(Action<long> report)
    {
        var all = 1L << ranges.Count;
        for (long first = 0; first < all; first += CornersInBatch)
        {
            report(first);
            var points = ranges.Corners(first, (int)Math.Min(CornersInBatch, all - first));
            best.Add(points, batch.At(points));
        }
    }

    /// <summary>Starts from the corners that each value's own effect points to and from random ones, and goes
    /// on exchanging single values as long as that makes a figure greater or less.</summary>
    /// <param name="alone">The figures with each value alone at its lower, then at its upper end.</param>
    /// <param name="randomCorners">How many random corners to start from.</param>
    /// <param name="report">Is told of every round.</param>
    public void Search(BatchFigures alone, int randomCorners, Action<long> report)
    {
        var starts = RandomOnes(randomCorners);
        best.Add(starts, batch.At(starts));
        starts = PointedTo(alone);
        best.Add(starts, batch.At(starts));
        for (var round = 0; round < MostRounds; round++)
        {
            report(round);
            var before = Values();
            var neighbours = Neighbours();
            if (neighbours.Length == 0)
            {
                return;
            }

            best.Add(neighbours, batch.At(neighbours));
            if (Values().AsSpan().SequenceEqual(before))
            {
                return;
            }
        }
    }

    private double[] RandomOnes(int count)
    {
        var generator = new CounterGenerator(Stream);
        var points = new double[count * ranges.Count];
        for (var j = 0; j < points.Length; j++)
        {
            var i = j % ranges.Count;
            points[j] = generator.Below(2, 0, (ulong)j) == 0 ? ranges.Lowest(i) : ranges.Highest(i);
        }

        return points;
    }

    private double[] PointedTo(BatchFigures alone)
    {
        var points = new List<double>();
        for (var f = 0; f < batch.Figures.Length; f++)
        {
            foreach (var sign in (int[])[-1, 1])
            {
                for (var i = 0; i < ranges.Count; i++)
                {
                    var rises = alone.Value((2 * i) + 1, f) >= alone.Value(2 * i, f);
                    points.Add(rises == sign > 0 ? ranges.Highest(i) : ranges.Lowest(i));
                }
            }
        }

        return [.. points];
    }

    /// <summary>Every corner that differs in one value from a best one.</summary>
    private double[] Neighbours()
    {
        var points = new List<double>();
        var seen = new HashSet<string>(StringComparer.Ordinal);
        for (var f = 0; f < batch.Figures.Length; f++)
        {
            foreach (var sign in (int[])[-1, 1])
            {
                if (best[f, sign].Point is { Length: > 0 } point && seen.Add(string.Join(' ', point)))
                {
                    AddExchanges(points, point);
                    visited.Add(point);
                }
            }
        }

        return [.. points];
    }

    private void AddExchanges(List<double> points, double[] point)
    {
        for (var i = 0; i < ranges.Count; i++)
        {
            for (var j = 0; j < ranges.Count; j++)
            {
                points.Add(i != j ? point[j]
                    : point[j] == ranges.Highest(j) ? ranges.Lowest(j) : ranges.Highest(j));
            }
        }
    }

    private double[] Values() =>
        [.. Enumerable.Range(0, 2 * batch.Figures.Length).Select(b => best[b / 2, (2 * (b % 2)) - 1].Value)];
}
