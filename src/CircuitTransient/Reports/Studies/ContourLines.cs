namespace CircuitTransient.Reports.Studies;

/// <summary>Lines of equal value over a grid: in each cell straight pieces between the places where its sides
/// pass the level (marching squares), by the numbers of the grid's points.</summary>
internal static class ContourLines
{
    /// <summary>The pieces of a level, in the order of the cells.</summary>
    public static IEnumerable<(PlotPoint A, PlotPoint B)> Of(double[,] values, double level)
    {
        for (var i = 0; i + 1 < values.GetLength(0); i++)
        {
            for (var j = 0; j + 1 < values.GetLength(1); j++)
            {
                var ends = Crossings(values, level, i, j).ToArray();
                for (var k = 0; k + 1 < ends.Length; k += 2)
                {
                    yield return (ends[k], ends[k + 1]);
                }
            }
        }
    }

    private static IEnumerable<PlotPoint> Crossings(double[,] values, double level, int i, int j)
    {
        (int I, int J)[] corners = [(i, j), (i + 1, j), (i + 1, j + 1), (i, j + 1)];
        if (corners.Any(c => !double.IsFinite(values[c.I, c.J])))
        {
            yield break;
        }

        for (var k = 0; k < corners.Length; k++)
        {
            var (a, b) = (corners[k], corners[(k + 1) % corners.Length]);
            var (u, v) = (values[a.I, a.J] - level, values[b.I, b.J] - level);
            if (u >= 0 != v >= 0)
            {
                var share = u / (u - v);
                yield return new PlotPoint(a.I + (share * (b.I - a.I)), a.J + (share * (b.J - a.J)));
            }
        }
    }
}
