namespace CircuitTransient.Studies.Statistics;

/// <summary>Which of the ordered values of a sample estimate a quantile, and which enclose it.</summary>
public static class QuantileRanks
{
    /// <summary>The rank, counted from 1 and not whole as a rule, between whose neighbours the quantile is
    /// interpolated: h = (n + 1/3) p + 1/3, definition 8 of Hyndman and Fan, "Sample quantiles in statistical
    /// packages", The American Statistician 50 (1996) 361 (from memory), which they recommend: its median is
    /// right whatever the distribution, very nearly.</summary>
    public static double Of(double fraction, long count) =>
        Math.Clamp(((count + (1.0 / 3)) * fraction) + (1.0 / 3), 1, count);

    /// <summary>The quantile of values in rising order.</summary>
    public static double Quantile(ReadOnlySpan<double> ordered, double fraction)
    {
        var rank = Of(fraction, ordered.Length);
        var below = (int)Math.Floor(rank);
        var (low, high) = (ordered[below - 1], ordered[Math.Min(below, ordered.Length - 1)]);
        return low + ((rank - below) * (high - low));
    }

    /// <summary>The ranks, counted from 1, of the two ordered values that enclose the quantile with at least
    /// the confidence, whatever the distribution; 0 and n + 1 where the sample is too small for an end.
    /// P(X₍ₗ₎ &gt; q) = P(B ≤ l − 1) and P(X₍ᵤ₎ &lt; q) = P(B ≥ u), B binomial of n and p; each at most
    /// half of what the confidence leaves over (Conover, Practical Nonparametric Statistics, 1999, section
    /// 3.2; from memory).</summary>
    public static (long Low, long High) Enclosing(
        double fraction, long count, double confidence = ConfidenceInterval.Confidence)
    {
        var tail = (1 - confidence) / 2;
        // The greatest l with P(B ≤ l − 1) ≤ tail, and the least u with P(B ≥ u) ≤ tail.
        var low = Greatest(l => BinomialLaw.AtMost(l - 1, count, fraction) <= tail, count);
        var high = 1 + Greatest(u => 1 - BinomialLaw.AtMost(u - 1, count, fraction) > tail, count);
        return (low, high);
    }

    /// <summary>The greatest number up to a bound for which something holds that holds from 0 to some number
    /// and not beyond.</summary>
    private static long Greatest(Func<long, bool> holds, long bound)
    {
        var (low, high) = (0L, bound + 1);
        while (high - low > 1)
        {
            var middle = (low + high) / 2;
            (low, high) = holds(middle) ? (middle, high) : (low, middle);
        }

        return low;
    }
}
