namespace CircuitTransient.Studies.Overlays;

/// <summary>Runs of samples that stand at the record's greatest or least value, as a converter at the end of
/// its range leaves them.</summary>
internal static class ClippedSamples
{
    private const int ShortestRun = 2; // one sample at an end is what every record has
    private const int FewestLeft = 16; // to align by, without those that are marked

    /// <summary>Marks what may be clipped, be it ever so little: whether it is, the model decides. Null where
    /// nothing is.</summary>
    public static bool[]? Candidates(double[] values)
    {
        var (low, high) = (values.Min(), values.Max());
        if (low == high)
        {
            return null;
        }

        var marks = new bool[values.Length];
        var left = values.Length;
        for (var from = 0; from < values.Length;)
        {
            var end = from + 1;
            while (end < values.Length && values[end] == values[from])
            {
                end++;
            }

            if ((values[from] == low || values[from] == high) && end - from >= ShortestRun)
            {
                marks.AsSpan(from, end - from).Fill(true);
                left -= end - from;
            }

            from = end;
        }

        return left < values.Length && left >= FewestLeft ? marks : null;
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
