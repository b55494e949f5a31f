namespace CircuitTransient.Studies.Records;

/// <summary>What is done about instants that stand more than once.</summary>
internal static class RecordInstants
{
    /// <summary>Joins the two rows of each instant.</summary>
    public static (double[] Times, double[] Values, double[] HalfWidths) Pair(
        double[] times, double[] values)
    {
        var count = times.Length / 2;
        var (t, v, h) = (new double[count], new double[count], new double[count]);
        for (var k = 0; k < count; k++)
        {
            t[k] = times[2 * k];
            v[k] = 0.5 * (values[2 * k] + values[(2 * k) + 1]);
            h[k] = 0.5 * Math.Abs(values[2 * k] - values[(2 * k) + 1]);
        }

        return (t, v, h);
    }

    /// <summary>Where repeats come from rounding an even grid, puts the instants back on it; says which of
    /// the two was done.</summary>
    public static string Spread(double[] times, RecordTable rows)
    {
        var (first, last) = (times[0], times[^1]);
        var step = (last - first) / (times.Length - 1);
        var resolution = double.PositiveInfinity;
        var worst = 0.0;
        for (var k = 0; k < times.Length; k++)
        {
            worst = Math.Max(worst, Math.Abs(times[k] - (first + (k * step))));
            if (k > 0 && times[k] > times[k - 1])
            {
                resolution = Math.Min(resolution, times[k] - times[k - 1]);
            }
        }

        var count = $"{rows.RepeatCount} row{(rows.RepeatCount == 1 ? " repeats" : "s repeat")} the instant "
            + $"before, the first in line {rows.FirstRepeat}";
        if (!(worst <= resolution) || rows.LeftOut is not null || step <= 0)
        {
            return count + ": all are kept";
        }

        for (var k = 0; k < times.Length; k++)
        {
            times[k] = first + (k * step);
        }

        return count + ": rounded instants of an even grid, put back on it";
    }
}
