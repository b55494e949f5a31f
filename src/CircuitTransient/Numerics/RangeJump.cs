using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

/// <summary>A place at which a function of one variable jumps.</summary>
/// <param name="Before">The last sample before it.</param>
/// <param name="After">The first sample after it.</param>
public sealed record RangeJump(SlopedSample Before, SlopedSample After)
{
    private const double Suspicious = 0.05; // of the function's span: what the slopes do not account for
    private const double Persistent = 0.5; // of the difference at first: what halving the stretch left of it
    private const double Narrow = 1e-11; // of the range
    private const int MostSuspects = 12;

    /// <summary>Finds the jumps that show between given samples: where two neighbours differ by more than
    /// their slopes account for, and by as much however near they come. A jump back within one stretch is
    /// not seen, nor one below a twentieth of the function's span.</summary>
    public static ImmutableArray<RangeJump> Find(
        ImmutableArray<SlopedSample> given, Func<double, SlopedSample> function)
    {
        var values = given.Where(s => s.HasValue).Select(s => s.Y).ToArray();
        if (values.Length < 2)
        {
            return [];
        }

        var span = values.Max() - values.Min();
        var range = given[^1].X - given[0].X;
        var suspects = given.Zip(given.Skip(1))
            .Where(pair => pair.First.HasValue && pair.Second.HasValue
                && Unexplained(pair.First, pair.Second) > Suspicious * span && span > 0)
            .OrderByDescending(pair => Unexplained(pair.First, pair.Second))
            .Take(MostSuspects);
        return
        [
            .. suspects.Select(pair => Narrowed(pair.First, pair.Second, range, function))
                .OfType<RangeJump>()
                .OrderBy(jump => jump.Before.X),
        ];
    }

    private static double Unexplained(in SlopedSample left, in SlopedSample right)
    {
        var difference = Math.Abs(right.Y - left.Y);
        return left.HasSlope && right.HasSlope
            ? difference - (2 * (right.X - left.X) * Math.Max(Math.Abs(left.Slope), Math.Abs(right.Slope)))
            : difference;
    }

    private static RangeJump? Narrowed(
        SlopedSample left, SlopedSample right, double range, Func<double, SlopedSample> function)
    {
        var least = Persistent * Math.Abs(right.Y - left.Y);
        while (right.X - left.X > Narrow * range)
        {
            var x = left.X + ((right.X - left.X) / 2);
            var middle = x > left.X && x < right.X ? function(x) : default;
            if (!middle.HasValue || x <= left.X || x >= right.X)
            {
                return null;
            }

            (left, right) = Math.Abs(middle.Y - left.Y) > Math.Abs(right.Y - middle.Y)
                ? (left, middle)
                : (middle, right);
            if (Math.Abs(right.Y - left.Y) < least)
            {
                return null;
            }
        }

        return new RangeJump(left, right);
    }
}
