using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

/// <summary>Searches the greatest value of a function between its samples. Between two samples with slopes
/// the cubic through them, or where their tangents meet, says how high it may rise; the most promising
/// stretch is looked at next, until none promises more. A root of the slope converges as Newton's method
/// does, a kink by its tangents. What rises and falls again between two neighbouring samples without
/// showing in their slopes is not seen.</summary>
public sealed class RangeExtremeSearch
{
    private const double Resolution = 1e-11; // of the function's size: what a further look could gain
    private const int MostLooks = 60;
    private const int MostComparedCrests = 3;
    private const double FlatSlope = 1e-6; // of the function's size over the range: a slope that is zero
    private const double Golden = 0.3819660112501051; // (3 − √5)/2

    private readonly Func<double, SlopedSample> function;
    private readonly SortedList<double, SlopedSample> samples = [];
    private readonly PriorityQueue<Stretch, double> waiting = new();
    private readonly double range;
    private readonly double size;
    private SlopedSample best;
    private bool isCompared;

    private RangeExtremeSearch(ImmutableArray<SlopedSample> given, Func<double, SlopedSample> function)
    {
        this.function = function;
        foreach (var sample in given)
        {
            samples.Add(sample.X, sample);
        }

        range = given[^1].X - given[0].X;
        size = given.Where(s => s.HasValue).Max(s => Math.Abs(s.Y));
        best = given.Where(s => s.HasValue).MaxBy(s => s.Y);
    }

    /// <summary>The greatest value; null where no sample has one.</summary>
    /// <param name="given">Samples by place, the ends of the range first and last.</param>
    /// <param name="function">The function anywhere in the range.</param>
    public static RangeExtreme? Greatest(
        ImmutableArray<SlopedSample> given, Func<double, SlopedSample> function) =>
        given.Any(s => s.HasValue) ? new RangeExtremeSearch(given, function).Run() : null;

    /// <summary>The least value; null where no sample has one.</summary>
    public static RangeExtreme? Least(
        ImmutableArray<SlopedSample> given, Func<double, SlopedSample> function)
    {
        var found = Greatest([.. given.Select(s => s.Negate())], x => function(x).Negate());
        return found is null ? null : found with
        {
            At = found.At.Negate(),
            Looked = [.. found.Looked.Select(s => s.Negate())],
        };
    }

    private RangeExtreme Run()
    {
        var given = samples.Values.ToArray();
        for (var i = 0; i + 1 < given.Length; i++)
        {
            Enqueue(given[i], given[i + 1], 0);
        }

        var looks = MostLooks;
        while (looks-- > 0 && waiting.TryDequeue(out var stretch, out var promise)
            && -promise > best.Y + (Resolution * size))
        {
            var middle = Look(stretch.At);
            Enqueue(stretch.Left, middle, stretch.Looks + 1);
            Enqueue(middle, stretch.Right, stretch.Looks + 1);
        }

        foreach (var i in ComparedCrests(given))
        {
            Compare(given[i - 1].X, given[i], given[i + 1].X);
        }

        return new RangeExtreme(best, KindOfBest(), [.. samples.Values]);
    }

    private SlopedSample Look(double x)
    {
        var sample = function(x);
        samples[x] = sample;
        if (sample.HasValue && sample.Y > best.Y)
        {
            best = sample;
            isCompared = false;
        }

        return sample;
    }

    private void Enqueue(in SlopedSample left, in SlopedSample right, int looks)
    {
        var h = right.X - left.X;
        if (!left.HasValue || !right.HasValue || !left.HasSlope || !right.HasSlope
            || h <= 1e-15 * Math.Max(Math.Abs(left.X), Math.Abs(right.X)))
        {
            return;
        }

        var crest = SlopedSample.CubicMaximum(left, right);
        var promise = double.IsNaN(crest) ? double.NegativeInfinity : SlopedSample.Cubic(left, right, crest);
        var place = crest;
        if (left.Slope > 0 && right.Slope < 0)
        {
            var meet = left.X + ((right.Y - left.Y - (right.Slope * h)) / (left.Slope - right.Slope));
            var isBetween = meet > left.X && meet < right.X;
            promise = Math.Max(promise, isBetween ? left.Y + (left.Slope * (meet - left.X)) : promise);
            place = (looks % 3, isBetween) switch
            {
                (1, true) => meet,
                (2, _) => left.X + (h / 2),
                _ => double.IsNaN(crest) ? left.X + (h / 2) : crest,
            };
        }

        if (double.IsFinite(promise) && place > left.X && place < right.X)
        {
            waiting.Enqueue(new Stretch(left, right, place, looks), -promise);
        }
    }

    /// <summary>The highest crests among the given samples beside which a slope is missing.</summary>
    private static IEnumerable<int> ComparedCrests(SlopedSample[] given) =>
        Enumerable.Range(1, Math.Max(0, given.Length - 2))
            .Where(i => given[i - 1].HasValue && given[i].HasValue && given[i + 1].HasValue
                && !(given[i - 1].HasSlope && given[i].HasSlope && given[i + 1].HasSlope)
                && given[i].Y >= given[i - 1].Y && given[i].Y >= given[i + 1].Y)
            .OrderByDescending(i => given[i].Y)
            .Take(MostComparedCrests);

    /// <summary>Narrows the neighbourhood of a crest by golden sections.</summary>
    private void Compare(double low, SlopedSample middle, double high)
    {
        for (var k = 0; k < MostLooks && high - low > 1e-9 * range; k++)
        {
            var isRight = high - middle.X > middle.X - low;
            var x = middle.X + (Golden * (isRight ? high - middle.X : low - middle.X));
            var wasBest = best;
            var sample = Look(x);
            isCompared |= best != wasBest;
            if (sample.HasValue && sample.Y >= middle.Y)
            {
                (low, high) = isRight ? (middle.X, high) : (low, middle.X);
                middle = sample;
            }
            else
            {
                (low, high) = isRight ? (low, x) : (x, high);
            }
        }
    }

    private RangeExtremeKind KindOfBest()
    {
        var place = samples.IndexOfKey(best.X);
        if (place == 0 || place == samples.Count - 1
            || !samples.Values[place - 1].HasValue || !samples.Values[place + 1].HasValue)
        {
            return RangeExtremeKind.End;
        }

        return isCompared || !best.HasSlope ? RangeExtremeKind.Compared
            : Math.Abs(best.Slope) * range <= FlatSlope * size ? RangeExtremeKind.Smooth
            : RangeExtremeKind.Kink;
    }

    private readonly record struct Stretch(SlopedSample Left, SlopedSample Right, double At, int Looks);
}
