using System.Collections.Immutable;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>How the values of a function are distributed while its argument is uniformly distributed: by the
/// measure of the places where it lies below a level, not by draws. Between two samples it follows the cubic
/// through them with their slopes, or the straight line where a slope is missing.</summary>
internal sealed class Distribution
{
    private const int PiecesAStretch = 32;

    private readonly double[] levels; // ascending
    private readonly double[] below; // the fraction at or below each level; a step stands twice

    private Distribution(double[] levels, double[] below, double mean) =>
        (this.levels, this.below, Mean) = (levels, below, mean);

    /// <summary>The mean.</summary>
    public double Mean { get; }

    /// <summary>The distribution; null where no two neighbouring samples have values.</summary>
    public static Distribution? Of(ImmutableArray<SlopedSample> samples)
    {
        var pieces = samples.Zip(samples.Skip(1))
            .Where(pair => pair.First.HasValue && pair.Second.HasValue)
            .SelectMany(pair => Pieces(pair.First, pair.Second)).ToArray();
        var total = pieces.Sum(p => p.Length);
        return total > 0 ? Swept(pieces, total) : null;
    }

    /// <summary>The least level that the function does not exceed on such a fraction of the range.</summary>
    public double Quantile(double fraction)
    {
        var at = Array.FindIndex(below, b => b >= fraction);
        return at < 0 ? levels[^1]
            : at == 0 || below[at] == below[at - 1] ? levels[at]
            : levels[at - 1] + ((levels[at] - levels[at - 1]) * (fraction - below[at - 1])
                / (below[at] - below[at - 1]));
    }

    /// <summary>On which fraction of the range the function does not exceed a level.</summary>
    public double Below(double level)
    {
        var after = Array.FindIndex(levels, l => l > level);
        return after < 0 ? 1
            : after == 0 ? 0
            : below[after - 1] + ((below[after] - below[after - 1]) * (level - levels[after - 1])
                / (levels[after] - levels[after - 1]));
    }

    // From the lowest level upwards: a rising piece is passed at the rate of its length over its height, a
    // level one at once.
    private static Distribution Swept((double Low, double High, double Length)[] pieces, double total)
    {
        var turns = pieces.SelectMany(p => p.High > p.Low
            ? new[]
            {
                (Level: p.Low, Rate: p.Length / (p.High - p.Low), Step: 0.0),
                (Level: p.High, Rate: -p.Length / (p.High - p.Low), Step: 0.0),
            }
            : [(Level: p.Low, Rate: 0.0, Step: p.Length)]).OrderBy(t => t.Level).ToArray();
        var steps = new List<double>();
        var shares = new List<double>();
        var (passed, rate, last) = (0.0, 0.0, turns[0].Level);
        foreach (var turn in turns)
        {
            passed += rate * (turn.Level - last);
            Add(turn.Level);
            passed += turn.Step;
            if (turn.Step > 0)
            {
                Add(turn.Level);
            }

            (rate, last) = (rate + turn.Rate, turn.Level);
        }

        shares[^1] = 1; // what rounding left
        return new Distribution(
            [.. steps], [.. shares], pieces.Sum(p => (p.Low + p.High) / 2 * p.Length) / total);

        void Add(double level)
        {
            steps.Add(level);
            shares.Add(Math.Min(1, passed / total));
        }
    }

    private static IEnumerable<(double Low, double High, double Length)> Pieces(
        SlopedSample left, SlopedSample right)
    {
        var isCubic = left.HasSlope && right.HasSlope;
        var (start, before) = (left.X, left.Y);
        for (var k = 1; k <= PiecesAStretch; k++)
        {
            var x = k == PiecesAStretch ? right.X : left.X + ((right.X - left.X) * k / PiecesAStretch);
            var value = k == PiecesAStretch ? right.Y
                : isCubic ? SlopedSample.Cubic(left, right, x)
                : left.Y + ((right.Y - left.Y) * (x - left.X) / (right.X - left.X));
            yield return (Math.Min(before, value), Math.Max(before, value), x - start);
            (start, before) = (x, value);
        }
    }
}
