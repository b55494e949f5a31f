namespace CircuitTransient.Studies.Overlays;

/// <summary>Runs of samples that stand at the record's greatest or least value, as a converter at the end of
/// its range leaves them.</summary>
internal static class ClippedSamples
{
    private const int ShortestRun = 3;
    private const double LongerThanElsewhere = 4; // times the longest run of equal values inside the range
    private const double SteepCodes = 1.5;

    /// <summary>Marks what may be clipped; null where nothing is.</summary>
    public static bool[]? Candidates(double[] values)
    {
        var (low, high) = (values.Min(), values.Max());
        if (low == high)
        {
            return null;
        }

        var step = RecordNoise.StepOf(values);
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
            else if (end - from >= ShortestRun)
            {
                atEnds.Add((from, end - from));
            }

            from = end;
        }

        atEnds.RemoveAll(run => run.Count < LongerThanElsewhere * elsewhere
            && !(IsSteep(run.From - 1, run.From) && IsSteep(run.From + run.Count, run.From)));
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

        // A waveform that turns within the range comes and goes by single codes.
        bool IsSteep(int outside, int inside) =>
            outside < 0 || outside == values.Length
            || Math.Abs(values[outside] - values[inside]) > SteepCodes * step;
    }

    /// <summary>Those of the marked runs in which the model, aligned without them, goes beyond the range: a
    /// waveform that really stands there is no clipping. Null where none is left.</summary>
    public static bool[]? Beyond(
        double[] times, double[] values, bool[] marks, Aligned aligned, ModelCurve model, double noise)
    {
        var (low, high) = (values.Min(), values.Max());
        var expected = new double[values.Length];
        model.Evaluate(Array.ConvertAll(times, t => t - aligned.Offset), expected, null);
        var kept = new bool[values.Length];
        for (var from = 0; from < values.Length;)
        {
            var end = from + 1;
            while (end < values.Length && marks[end] && marks[from] && values[end] == values[from])
            {
                end++;
            }

            var beyond = 0;
            for (var k = from; k < end && marks[from]; k++)
            {
                var seen = aligned.Level + (aligned.Gain * expected[k]);
                beyond += values[k] == high ? (seen > high + noise ? 1 : 0) : seen < low - noise ? 1 : 0;
            }

            kept.AsSpan(from, end - from).Fill(2 * beyond > end - from);
            from = end;
        }

        return kept.Contains(true) ? kept : null;
    }
}
