using System.Collections.Immutable;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>How the values of a function are distributed while its argument is uniformly distributed: by the
/// measure of the places where it lies below a level, not by draws. Between two samples it follows the cubic
/// through them with their slopes, or the straight line where a slope is missing.</summary>
internal sealed class Distribution
{
    private const int PiecesAStretch = 32;
    private const int Halvings = 60;

    private readonly List<(double Low, double High, double Length)> pieces = [];
    private readonly double total;

    private Distribution(ImmutableArray<SlopedSample> samples)
    {
        for (var i = 0; i + 1 < samples.Length; i++)
        {
            Add(samples[i], samples[i + 1]);
        }

        total = pieces.Sum(p => p.Length);
    }

    /// <summary>The distribution; null where no two neighbouring samples have values.</summary>
    public static Distribution? Of(ImmutableArray<SlopedSample> samples)
    {
        var distribution = new Distribution(samples);
        return distribution.total > 0 ? distribution : null;
    }

    /// <summary>The mean.</summary>
    public double Mean => pieces.Sum(p => (p.Low + p.High) / 2 * p.Length) / total;

    /// <summary>The least level of which the function does not exceed it on such a fraction of the
    /// range.</summary>
    public double Quantile(double fraction)
    {
        var (low, high) = (pieces.Min(p => p.Low), pieces.Max(p => p.High));
        for (var k = 0; k < Halvings && high > low; k++)
        {
            var middle = low + ((high - low) / 2);
            (low, high) = Below(middle) < fraction ? (middle, high) : (low, middle);
        }

        return high;
    }

    /// <summary>On which fraction of the range the function does not exceed a level.</summary>
    public double Below(double level) =>
        pieces.Sum(p => p.Length * (p.High <= level ? 1 : p.Low > level ? 0
            : (level - p.Low) / (p.High - p.Low))) / total;

    private void Add(in SlopedSample left, in SlopedSample right)
    {
        if (!left.HasValue || !right.HasValue)
        {
            return;
        }

        var isCubic = left.HasSlope && right.HasSlope;
        var (start, before) = (left.X, left.Y);
        for (var k = 1; k <= PiecesAStretch; k++)
        {
            var x = k == PiecesAStretch ? right.X : left.X + ((right.X - left.X) * k / PiecesAStretch);
            var value = k == PiecesAStretch ? right.Y
                : isCubic ? SlopedSample.Cubic(left, right, x)
                : left.Y + ((right.Y - left.Y) * (x - left.X) / (right.X - left.X));
            pieces.Add((Math.Min(before, value), Math.Max(before, value), x - start));
            (start, before) = (x, value);
        }
    }
}
