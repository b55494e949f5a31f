using CircuitTransient.Studies.Designs;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Looks between the corners: points spread over the inside of the ranges, a step inwards from every
/// worst corner, and a climb from wherever that was worse.</summary>
internal sealed class InteriorSearch(PointBatch batch, ValueRanges ranges, BestPoints best)
{
    /// <summary>Points spread over the inside.</summary>
    public const int PointCount = 500;

    private const ulong Seed = 0x1D5; // fixed: the extremes do not depend on the seed of the draws
    private const double FirstStep = 0.25; // of a range
    private const double LastStep = 1e-4; // an extreme between the corners is flat: the value is good to 1e-8
    private const int MostSteps = 200;

    /// <summary>Searches.</summary>
    /// <returns>How many points were solved.</returns>
    public long Run(Action<long> report)
    {
        var before = best.Solved;
        var targets =
            from f in Enumerable.Range(0, batch.Figures.Length)
            from sign in (int[])[-1, 1]
            select (Figure: f, Sign: sign, Corner: best[f, sign]);
        var corners = targets.ToArray();
        var inside = ranges.Stretched(
            new LatinHypercube(Seed, ranges.Count, PointCount).Points(0));
        best.Add(inside, batch.At(inside), batch.Resolution);
        var inwards = Inwards(corners.Select(c => c.Corner.Point));
        best.Add(inwards, batch.At(inwards), batch.Resolution);
        foreach (var (figure, sign, corner) in corners)
        {
            if (BestPoints.IsBeyond(best[figure, sign].Value, corner.Value, sign, batch.Resolution))
            {
                report(best.Solved - before);
                Climb(figure, sign);
            }
        }

        return best.Solved - before;
    }

    /// <summary>From every corner two steps along each value's range: a short one, which sees where the slope
    /// points, and a long one.</summary>
    private double[] Inwards(IEnumerable<double[]> corners)
    {
        var points = new List<double>();
        var distinct = corners.Where(c => c.Length > 0)
            .DistinctBy(c => string.Join(' ', c), StringComparer.Ordinal);
        foreach (var corner in distinct)
        {
            for (var i = 0; i < ranges.Count; i++)
            {
                foreach (var step in (double[])[0.01, 0.3])
                {
                    AddMoved(points, corner, i, corner[i] == ranges.Lowest(i) ? step : -step);
                }
            }
        }

        return [.. points];
    }

    /// <summary>A climb by steps along one value at a time, each half as long as the last when none
    /// helps.</summary>
    private void Climb(int figure, int sign)
    {
        var step = FirstStep;
        for (var s = 0; s < MostSteps && step > LastStep; s++)
        {
            var from = best[figure, sign];
            var points = new List<double>();
            for (var i = 0; i < ranges.Count; i++)
            {
                AddMoved(points, from.Point, i, step);
                AddMoved(points, from.Point, i, -step);
            }

            double[] around = [.. points];
            best.Add(around, batch.At(around));
            if (!BestPoints.IsBeyond(best[figure, sign].Value, from.Value, sign))
            {
                step /= 2;
            }
        }
    }

    private void AddMoved(List<double> points, double[] point, int value, double step)
    {
        for (var j = 0; j < ranges.Count; j++)
        {
            points.Add(j != value ? point[j] : Math.Clamp(
                point[j] + (step * ranges.Width(j)), ranges.Lowest(j), ranges.Highest(j)));
        }
    }
}
