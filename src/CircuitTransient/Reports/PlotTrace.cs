using System.Collections.Immutable;

namespace CircuitTransient.Reports;

/// <summary>Turns waveforms into lines: cut to a window, thinned to what a column of pixels can
/// show.</summary>
internal static class PlotTrace
{
    /// <summary>The samples within a window, with straight-line values at its ends; a gap where a value is
    /// NaN.</summary>
    public static ImmutableArray<PlotPoint> Within(
        ImmutableArray<double> times,
        ImmutableArray<double> values,
        double from,
        double to)
    {
        var points = ImmutableArray.CreateBuilder<PlotPoint>();
        for (var i = 0; i < times.Length; i++)
        {
            if (times[i] >= from && times[i] <= to)
            {
                points.Add(new(times[i], values[i]));
            }

            if (i + 1 < times.Length)
            {
                AddCrossing(points, times, values, i, from);
                AddCrossing(points, times, values, i, to);
            }
        }

        return points.ToImmutable();
    }

    /// <summary>The lines of a waveform, each without a gap: first, least, greatest and last of each
    /// column.</summary>
    public static IEnumerable<ImmutableArray<PlotPoint>> Lines(
        ImmutableArray<PlotPoint> samples,
        PlotScale time,
        PlotScale level)
    {
        const double columnsPerPoint = 2; // a screen of twice the usual density still sees every column
        var (top, bottom) = (Math.Min(level.Start, level.End), Math.Max(level.Start, level.End));
        return Unbroken(samples)
            .Select(run => run.Select(s => new PlotPoint(time.Place(s.X), level.Place(s.Y))))
            .SelectMany(run => Clipped(Thinned([.. run], columnsPerPoint), top, bottom))
            .Where(line => line.Length > 1);
    }

    /// <summary>First, least, greatest and last point of each column, in their order.</summary>
    public static ImmutableArray<PlotPoint> Thinned(
        ImmutableArray<PlotPoint> points,
        double columnsPerPoint)
    {
        var thinned = ImmutableArray.CreateBuilder<PlotPoint>();
        for (var first = 0; first < points.Length;)
        {
            var column = Math.Floor(points[first].X * columnsPerPoint);
            var (end, least, greatest) = (first + 1, first, first);
            while (end < points.Length && Math.Floor(points[end].X * columnsPerPoint) == column)
            {
                least = points[end].Y < points[least].Y ? end : least;
                greatest = points[end].Y > points[greatest].Y ? end : greatest;
                end++;
            }

            foreach (var kept in ((int[])[first, least, greatest, end - 1]).Distinct().Order())
            {
                thinned.Add(points[kept]);
            }

            first = end;
        }

        return thinned.ToImmutable();
    }

    private static void AddCrossing(
        ImmutableArray<PlotPoint>.Builder points,
        ImmutableArray<double> times,
        ImmutableArray<double> values,
        int i,
        double edge)
    {
        if (times[i] < edge && times[i + 1] > edge)
        {
            var share = (edge - times[i]) / (times[i + 1] - times[i]);
            points.Add(new(edge, values[i] + (share * (values[i + 1] - values[i]))));
        }
    }

    private static IEnumerable<List<PlotPoint>> Unbroken(ImmutableArray<PlotPoint> samples)
    {
        var run = new List<PlotPoint>();
        foreach (var sample in samples)
        {
            if (double.IsFinite(sample.Y))
            {
                run.Add(sample);
            }
            else if (run.Count > 0)
            {
                yield return run;
                run = [];
            }
        }

        if (run.Count > 0)
        {
            yield return run;
        }
    }

    // The stretches between two heights; what lies past them is cut where the line crosses.
    private static IEnumerable<ImmutableArray<PlotPoint>> Clipped(
        ImmutableArray<PlotPoint> points,
        double top,
        double bottom)
    {
        var line = ImmutableArray.CreateBuilder<PlotPoint>();
        for (var i = 0; i < points.Length; i++)
        {
            var isInside = points[i].Y >= top && points[i].Y <= bottom;
            if (i > 0 && Crossings(points[i - 1], points[i], top, bottom) is { Length: > 0 } crossings)
            {
                line.AddRange(crossings);
            }

            if (isInside)
            {
                line.Add(points[i]);
            }
            else if (line.Count > 0)
            {
                yield return line.ToImmutable();
                line.Clear();
            }
        }

        yield return line.ToImmutable();
    }

    private static PlotPoint[] Crossings(PlotPoint a, PlotPoint b, double top, double bottom)
    {
        var edges = ((double[])[top, bottom]).Where(edge =>
            (a.Y < edge && b.Y > edge) || (a.Y > edge && b.Y < edge));
        return
        [
            .. edges
                .Select(edge => new PlotPoint(a.X + ((edge - a.Y) / (b.Y - a.Y) * (b.X - a.X)), edge))
                .OrderBy(point => Math.Abs(point.Y - a.Y)),
        ];
    }
}
