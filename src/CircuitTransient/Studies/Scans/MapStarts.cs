using System.Collections.Immutable;

namespace CircuitTransient.Studies.Scans;

/// <summary>From where the extremes of a figure over two values are searched.</summary>
/// <param name="points">The points, the second value running fastest.</param>
/// <param name="values">The figure at each.</param>
/// <param name="middles">The middles of the fields between them; may be none.</param>
/// <param name="between">The figure at each middle.</param>
/// <param name="width">How many values the second has.</param>
internal sealed class MapStarts(
    ImmutableArray<ScanPoint> points, double[] values, ImmutableArray<ScanPoint> middles, double[] between,
    int width)
{
    private readonly int height = values.Length / width;

    /// <summary>The highest place, and where a margin is given, those places that are higher than all about
    /// them and might break: whose margin is less than they stand out.</summary>
    /// <param name="sign">1 for the highest, −1 for the lowest.</param>
    /// <param name="margin">Of a value; null where nothing breaks.</param>
    public IEnumerable<(ImmutableArray<double> At, double Value)> Of(int sign, Func<double, double>? margin)
    {
        var all = points.Select((p, i) => (p.At, Value: values[i], About: AboutPoint(i)))
            .Concat(middles.Select((m, i) => (m.At, Value: between[i], About: AboutMiddle(i))))
            .Where(place => double.IsFinite(place.Value))
            .OrderByDescending(place => sign * place.Value);
        var isFirst = true;
        foreach (var (at, value, about) in all)
        {
            if (isFirst || (margin is not null && StandsOut(value, about)))
            {
                yield return (at, value);
            }
            else if (margin is null)
            {
                yield break;
            }

            isFirst = false;
        }

        bool StandsOut(double value, IEnumerable<double> about)
        {
            var least = about.Where(double.IsFinite).Select(v => sign * (value - v)).ToArray();
            return least.Length > 0 && least.Min() >= 0 && margin!(value) < least.Max();
        }
    }

    private IEnumerable<double> AboutPoint(int index)
    {
        var (row, column) = Math.DivRem(index, width);
        for (var r = row - 1; r <= row + 1; r++)
        {
            for (var c = column - 1; c <= column + 1; c++)
            {
                if (r >= 0 && r < height && c >= 0 && c < width && (r != row || c != column))
                {
                    yield return values[(r * width) + c];
                }
            }
        }

        for (var r = row - 1; r <= row && middles.Length > 0; r++)
        {
            for (var c = column - 1; c <= column; c++)
            {
                if (r >= 0 && r < height - 1 && c >= 0 && c < width - 1)
                {
                    yield return between[(r * (width - 1)) + c];
                }
            }
        }
    }

    private IEnumerable<double> AboutMiddle(int index)
    {
        var (row, column) = Math.DivRem(index, width - 1);
        var corner = (row * width) + column;
        return [values[corner], values[corner + 1], values[corner + width], values[corner + width + 1]];
    }
}
