using System.Collections.Immutable;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Reports.Studies;

/// <summary>The lines of a map: where a requirement begins to break through the places found on the lines
/// between the points, equal values through the exact middles of the fields. Places are numbers of the
/// points, with what lies between two of them as a fraction.</summary>
internal static class MapLines
{
    /// <summary>Pieces that join in each field the places found on its sides, and nothing else.</summary>
    public static IEnumerable<(PlotPoint A, PlotPoint B)> Breaking(
        ImmutableArray<ScanAxis> axes, ImmutableArray<ScanBreak> breaks)
    {
        var (first, second) = (axes[0].Values, axes[1].Values);
        var found = breaks.ToDictionary(b => (b.Before, b.Axis), b => At(first, second, b));
        for (var i = 0; i + 1 < first.Length; i++)
        {
            for (var j = 0; j + 1 < second.Length; j++)
            {
                var here = (i * second.Length) + j;
                (int, int)[] round = [(here, 0), (here + second.Length, 1), (here + 1, 0), (here, 1)];
                var ends = round.Where(found.ContainsKey).Select(side => found[side]).ToArray();
                for (var k = 0; k + 1 < ends.Length; k += 2)
                {
                    yield return (ends[k], ends[k + 1]);
                }
            }
        }
    }

    /// <summary>Pieces of a line of equal value, in the four triangles about the middle of each field; none
    /// in a field whose middle shows that the value does not pass smoothly through it.</summary>
    /// <param name="values">At the points.</param>
    /// <param name="middles">At the middles of the fields; null where they were not solved.</param>
    /// <param name="level">The value of the line.</param>
    /// <param name="step">From one line to the next.</param>
    public static IEnumerable<(PlotPoint A, PlotPoint B)> Equal(
        double[,] values, double[,]? middles, double level, double step)
    {
        for (var i = 0; i + 1 < values.GetLength(0); i++)
        {
            for (var j = 0; j + 1 < values.GetLength(1); j++)
            {
                PlotPoint[] corners = [new(i, j), new(i + 1, j), new(i + 1, j + 1), new(i, j + 1)];
                double[] at = [values[i, j], values[i + 1, j], values[i + 1, j + 1], values[i, j + 1]];
                var mean = at.Sum() / 4;
                var middle = middles?[i, j] ?? mean;
                if (!double.IsFinite(mean) || !(Math.Abs(middle - mean) <= step / 2))
                {
                    continue;
                }

                for (var k = 0; k < 4; k++)
                {
                    var next = (k + 1) % 4;
                    (PlotPoint At, double Value)[] triangle =
                    [
                        (corners[k], at[k]), (corners[next], at[next]),
                        (new PlotPoint(i + 0.5, j + 0.5), middle),
                    ];
                    var ends = Passed(triangle, level).ToArray();
                    if (ends.Length == 2)
                    {
                        yield return (ends[0], ends[1]);
                    }
                }
            }
        }
    }

    private static IEnumerable<PlotPoint> Passed((PlotPoint At, double Value)[] triangle, double level)
    {
        for (var k = 0; k < 3; k++)
        {
            var ((a, p), (b, q)) = (triangle[k], triangle[(k + 1) % 3]);
            if (p >= level != q >= level)
            {
                var share = (level - p) / (q - p);
                yield return new PlotPoint(a.X + (share * (b.X - a.X)), a.Y + (share * (b.Y - a.Y)));
            }
        }
    }

    private static PlotPoint At(
        ImmutableArray<double> first, ImmutableArray<double> second, ScanBreak found)
    {
        var (i, j) = (found.Before / second.Length, found.Before % second.Length);
        var (ticks, k) = found.Axis == 0 ? (first, i) : (second, j);
        var share = (found.At[found.Axis] - ticks[k]) / (ticks[k + 1] - ticks[k]);
        return found.Axis == 0 ? new PlotPoint(i + share, j) : new PlotPoint(i, j + share);
    }
}
