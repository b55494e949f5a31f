using System.Collections.Immutable;

namespace CircuitTransient.Studies.Statistics;

/// <summary>A figure's values as they come, in bounded memory: all of them where there are few, else how many
/// fall in each of 65 536 classes of one width. Values are added in the order of the draws, so that the
/// result does not depend on who worked them out.</summary>
public sealed class FigureTally
{
    private const int ClassCount = 1 << 16;
    private const int MostBars = 60;

    private readonly double from;
    private readonly double to;
    private readonly Func<double, bool>? holds;
    private readonly double[]? kept;
    private readonly long[]? classes;
    private Moments moments;
    private double least = double.PositiveInfinity;
    private double greatest = double.NegativeInfinity;
    private long none;
    private long infinite;
    private long holding;

    /// <summary>An empty tally.</summary>
    /// <param name="capacity">How many values to keep; 0 to count classes instead.</param>
    /// <param name="from">Where the classes begin; what lies below is counted in the first.</param>
    /// <param name="to">Where they end; what lies above is counted in the last.</param>
    /// <param name="holds">Whether a requirement or rating holds at a value; null for other figures.</param>
    public FigureTally(int capacity, double from, double to, Func<double, bool>? holds)
    {
        (this.from, this.to, this.holds) = (from, to > from ? to : from + 1, holds);
        kept = capacity > 0 ? new double[capacity] : null;
        classes = capacity > 0 ? null : new long[ClassCount];
    }

    /// <summary>The fractions at which quantiles are given.</summary>
    public static ImmutableArray<double> Fractions { get; } = [0.01, 0.05, 0.25, 0.5, 0.75, 0.95, 0.99];

    /// <summary>Adds a value; NaN where a draw has no such figure.</summary>
    public void Add(double value)
    {
        holding += holds?.Invoke(value) == true ? 1 : 0;
        if (!double.IsFinite(value))
        {
            none += double.IsNaN(value) ? 1 : 0;
            infinite += double.IsNaN(value) ? 0 : 1;
            return;
        }

        if (kept is not null)
        {
            kept[moments.Count] = value;
        }
        else
        {
            classes![ClassOf(value)]++;
        }

        moments = moments.With(value);
        (least, greatest) = (Math.Min(least, value), Math.Max(greatest, value));
    }

    /// <summary>What the values tell.</summary>
    /// <param name="draws">All draws, also those without a solution.</param>
    public FigureStatistics Statistics(long draws)
    {
        var count = moments.Count;
        var ordered = kept is null ? [] : kept[..(int)count];
        Array.Sort(ordered);
        var held = holds is null ? null
            : new HoldingEstimate(holding, draws, BinomialLaw.Interval(holding, draws));
        var isEmpty = count == 0;
        return new FigureStatistics(
            count, none, infinite, isEmpty ? double.NaN : least, isEmpty ? double.NaN : greatest,
            isEmpty ? double.NaN : moments.Mean, moments.MeanInterval, moments.StandardDeviation,
            moments.DeviationInterval,
            isEmpty ? [] : [.. Fractions.Select(fraction => Quantile(ordered, fraction))],
            kept is null ? Width : 0, Bars(ordered), held);
    }

    /// <summary>Writes what was gathered so far.</summary>
    public void Save(BinaryWriter to)
    {
        to.Write(none);
        to.Write(infinite);
        to.Write(holding);
        to.Write(least);
        to.Write(greatest);
        to.Write(moments.Count);
        foreach (var moment in (double[])[moments.Mean, moments.Second, moments.Third, moments.Fourth])
        {
            to.Write(moment);
        }

        foreach (var value in kept is null ? [] : kept.AsSpan(0, (int)moments.Count))
        {
            to.Write(value);
        }

        foreach (var number in classes ?? [])
        {
            to.Write7BitEncodedInt64(number); // most classes are empty or nearly so
        }
    }

    /// <summary>Reads what <see cref="Save"/> wrote of a tally of the same make.</summary>
    public void Load(BinaryReader from)
    {
        (none, infinite, holding) = (from.ReadInt64(), from.ReadInt64(), from.ReadInt64());
        (least, greatest) = (from.ReadDouble(), from.ReadDouble());
        moments = new Moments(
            from.ReadInt64(), from.ReadDouble(), from.ReadDouble(), from.ReadDouble(), from.ReadDouble());
        for (var i = 0; kept is not null && i < moments.Count; i++)
        {
            kept[i] = from.ReadDouble();
        }

        for (var i = 0; classes is not null && i < ClassCount; i++)
        {
            classes[i] = from.Read7BitEncodedInt64();
        }
    }

    private double Width => (to - from) / ClassCount;

    private int ClassOf(double value) =>
        (int)Math.Clamp((value - from) / (to - from) * ClassCount, 0, ClassCount - 1);

    private QuantileEstimate Quantile(double[] ordered, double fraction)
    {
        var count = moments.Count;
        var (low, high) = QuantileRanks.Enclosing(fraction, count);
        var value = kept is not null
            ? QuantileRanks.Quantile(ordered, fraction)
            : Between(QuantileRanks.Of(fraction, count));
        return new QuantileEstimate(fraction, value, new ConfidenceInterval(
            low == 0 ? double.NegativeInfinity : kept is not null ? ordered[low - 1] : Edge(low, 0),
            high > count ? double.PositiveInfinity : kept is not null ? ordered[high - 1] : Edge(high, 1)));
    }

    private double Between(double rank)
    {
        var below = (long)Math.Floor(rank);
        var low = Edge(below, 0.5);
        return low + ((rank - below) * (Edge(Math.Min(below + 1, moments.Count), 0.5) - low));
    }

    /// <summary>A place in the class of the value of that rank: 0 its lower end, 1 its upper one; never
    /// beyond the least and the greatest value.</summary>
    private double Edge(long rank, double place)
    {
        long below = 0;
        var c = 0;
        while (below + classes![c] < rank)
        {
            below += classes[c++];
        }

        return Math.Clamp(from + ((c + place) * Width), least, greatest);
    }

    // 2 n^⅓ bars (Rice's rule; from memory), between the least and the greatest value.
    private Histogram Bars(double[] ordered)
    {
        if (moments.Count == 0)
        {
            return new Histogram(0, 0, []);
        }

        var bars = new long[(int)Math.Clamp(Math.Ceiling(2 * Math.Cbrt(moments.Count)), 1, MostBars)];
        if (greatest <= least)
        {
            return new Histogram(least, greatest, [moments.Count]);
        }

        foreach (var value in ordered)
        {
            bars[BarOf(value, bars.Length)]++;
        }

        for (var c = 0; c < (classes?.Length ?? 0); c++)
        {
            bars[BarOf(Math.Clamp(from + ((c + 0.5) * Width), least, greatest), bars.Length)] += classes![c];
        }

        return new Histogram(least, greatest, [.. bars]);
    }

    private int BarOf(double value, int bars) =>
        (int)Math.Clamp((value - least) / (greatest - least) * bars, 0, bars - 1);
}
