namespace CircuitTransient.Studies.Spreads;

/// <summary>The greatest and the least value of every figure among the points solved so far, and where each
/// stands. Of equal ones the first stays, so that the outcome does not depend on threads.</summary>
internal sealed class BestPoints(int figureCount)
{
    private readonly Best[] best =
        [.. Enumerable.Repeat(new Best([], double.NaN), 2 * figureCount)];

    private readonly long[] missing = new long[figureCount];
    private readonly long[] overOne = new long[figureCount];

    /// <summary>How many points were solved.</summary>
    public long Solved { get; private set; }

    /// <summary>Points at which the circuit has no unique solution.</summary>
    public long Unsolvable { get; private set; }

    /// <summary>One of the points without a unique solution; null where there is none.</summary>
    public double[]? UnsolvablePoint { get; private set; }

    /// <summary>At how many of the points that have a solution a figure has no value.</summary>
    public long Missing(int figure) => missing[figure];

    /// <summary>At how many of the points that have a solution a figure is over 1, or infinite.</summary>
    public long OverOne(int figure) => overOne[figure];

    /// <summary>The best value of a figure: the greatest for a sign of 1, the least for −1.</summary>
    public Best this[int figure, int sign] => best[(2 * figure) + (sign > 0 ? 1 : 0)];

    /// <summary>Whether a value lies further out than another, by more than a fraction of their
    /// size.</summary>
    public static bool IsBeyond(double value, double other, int sign, double fraction = 0)
    {
        if (double.IsNaN(value) || value == other)
        {
            return false;
        }

        if (double.IsNaN(other) || !double.IsFinite(other) || !double.IsFinite(value))
        {
            return double.IsNaN(other) || sign * value > sign * other;
        }

        return sign * (value - other) > fraction * Math.Max(Math.Abs(value), Math.Abs(other));
    }

    /// <summary>Compares points, one after another, with the best so far.</summary>
    /// <param name="points">The points.</param>
    /// <param name="found">Their figures.</param>
    /// <param name="fraction">By which fraction of its size a value must lie further out than the best so
    /// far.</param>
    public void Add(double[] points, BatchFigures found, double fraction = 0)
    {
        var k = points.Length / found.Solved.Length;
        for (var i = 0; i < found.Solved.Length; i++)
        {
            var point = points.AsSpan(i * k, k);
            Solved++;
            if (!found.Solved[i])
            {
                Unsolvable++;
                UnsolvablePoint ??= point.ToArray();
                continue;
            }

            for (var f = 0; f < missing.Length; f++)
            {
                missing[f] += double.IsNaN(found.Value(i, f)) ? 1 : 0;
                overOne[f] += found.Value(i, f) <= 1 ? 0 : 1;
            }

            for (var b = 0; b < best.Length; b++)
            {
                var value = found.Value(i, b / 2);
                if (IsBeyond(value, best[b].Value, (2 * (b % 2)) - 1, fraction))
                {
                    best[b] = new Best(point.ToArray(), value);
                }
            }
        }
    }

    /// <summary>A point and a figure's value there; an empty point and NaN where the figure has none
    /// anywhere.</summary>
    public sealed record Best(double[] Point, double Value);
}
