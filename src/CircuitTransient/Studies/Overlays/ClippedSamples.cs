namespace CircuitTransient.Studies.Overlays;

/// <summary>Runs of samples that stand at the record's greatest or least value, as a converter at the end of
/// its range leaves them.</summary>
internal static class ClippedSamples
{
    private const int ShortestRun = 4;
    private const double LongerThanElsewhere = 4; // times the longest run of equal values inside the range

    /// <summary>Marks what may be clipped; null where nothing is.</summary>
    public static bool[]? Candidates(double[] values)
    {
        var (low, high) = (values.Min(), values.Max());
        if (low == high)
        {
            return null;
        }

        var elsewhere = 1;
        var atEnds = new List<(int From, int Count)>();
        for (var from = 0; from < values.Length;)
        {
            var end = from + 1;
            while (end < values.Length && values[end] == values[from])
            {
                end++;
            }

            if (values[from] != low && values[from] != high)
            {
                elsewhere = Math.Max(elsewhere, end - from);
            }
            else
            {
                atEnds.Add((from, end - from));
            }

            from = end;
        }

        var least = Math.Max(ShortestRun, LongerThanElsewhere * elsewhere);
        atEnds.RemoveAll(run => run.Count < least);
        var marked = atEnds.Sum(run => run.Count);
        if (marked == 0 || 2 * marked > values.Length)
        {
            return null;
        }

        var marks = new bool[values.Length];
        foreach (var (from, count) in atEnds)
        {
            marks.AsSpan(from, count).Fill(true);
        }

        return marks;
    }

    /// <summary>Whether the model, aligned without the marked samples, goes beyond the range where they
    /// are: a waveform that really stands there is no clipping.</summary>
    public static bool AreBeyond(
        double[] times, double[] values, bool[] marks, Aligned aligned, ModelCurve model, double noise)
    {
        var (low, high) = (values.Min(), values.Max());
        var instants = times.Where((_, k) => marks[k]).Select(t => t - aligned.Offset).ToArray();
        var expected = new double[instants.Length];
        model.Evaluate(instants, expected, null);
        var (beyond, judged, n) = (0, 0, 0);
        for (var k = 0; k < values.Length; k++)
        {
            if (!marks[k])
            {
                continue;
            }

            var seen = aligned.Level + (aligned.Gain * expected[n++]);
            judged++;
            beyond += values[k] == high ? (seen > high + noise ? 1 : 0) : seen < low - noise ? 1 : 0;
        }

        return 2 * beyond > judged;
    }
}
