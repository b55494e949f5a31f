namespace CircuitTransient.Studies.Spreads;

/// <summary>An edge of the box of all ranges.</summary>
/// <param name="Corner">The corner at which the value that moves is lowest.</param>
/// <param name="Value">Index of that value.</param>
internal sealed record Edge(double[] Corner, int Value);

/// <summary>The edges that are looked at: all where there are few, else those at the extremes and at the
/// corners that the search went through.</summary>
internal sealed class Edges(ValueRanges ranges)
{
    /// <summary>How many edges the box has.</summary>
    public double Count => ranges.Count * Math.Pow(2, ranges.Count - 1);

    /// <summary>How long the edges of a value are.</summary>
    public double Width(int value) => ranges.Width(value);

    /// <summary>The edges that are looked at.</summary>
    /// <param name="corners">The most important corners, the first ones first.</param>
    /// <param name="most">How many edges at most.</param>
    public List<Edge> Chosen(IEnumerable<double[]> corners, int most)
    {
        if (Count <= most)
        {
            return All();
        }

        var chosen = new List<Edge>();
        var seen = new HashSet<string>(StringComparer.Ordinal);
        foreach (var corner in corners)
        {
            for (var i = 0; i < ranges.Count && chosen.Count < most; i++)
            {
                var lowest = At(corner, i, 0);
                if (seen.Add($"{i} {string.Join(' ', lowest)}"))
                {
                    chosen.Add(new Edge(lowest, i));
                }
            }
        }

        return chosen;
    }

    /// <summary>A point of an edge.</summary>
    /// <param name="corner">One of the edge's points.</param>
    /// <param name="value">Index of the value that moves.</param>
    /// <param name="place">How far along the edge, from 0 to 1.</param>
    public double[] At(double[] corner, int value, double place)
    {
        var point = (double[])corner.Clone();
        point[value] = place == 1 ? ranges.Highest(value)
            : ranges.Lowest(value) + (place * ranges.Width(value));
        return point;
    }

    private List<Edge> All()
    {
        var all = new List<Edge>();
        var corners = ranges.Corners(0, 1 << ranges.Count);
        for (var c = 0; c < 1 << ranges.Count; c++)
        {
            for (var i = 0; i < ranges.Count; i++)
            {
                if (((c >> i) & 1) == 0)
                {
                    all.Add(new Edge(corners[(c * ranges.Count)..((c + 1) * ranges.Count)], i));
                }
            }
        }

        return all;
    }
}
