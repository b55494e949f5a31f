using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>What one figure does along one scanned value: jumps, extremes and breaks, on the points and
/// between them.</summary>
/// <param name="circuit">The circuit.</param>
/// <param name="figure">The figure.</param>
/// <param name="function">The figure anywhere in the range.</param>
/// <param name="scale">How large the figure, or what it is the extreme of, is over the points.</param>
internal sealed class AxisScan(
    Circuit circuit, StudyFigure figure, Func<double, SlopedSample> function, double scale)
{
    private const int MostCrests = 4;

    private readonly bool isJudged = FigureScan.IsJudgedKind(figure.Kind);
    private readonly List<SlopedSample> looks = [];

    /// <summary>Searches.</summary>
    /// <param name="given">The figure at the points, by place: infinite where it breaks without limit, NaN
    /// where the circuit has no solution.</param>
    /// <param name="timeAt">When the figure stands at a place.</param>
    public FigureScan Run(ImmutableArray<SlopedSample> given, Func<double, double?> timeAt)
    {
        if (FigureSizes.IsFlat([.. given.Select(s => s.Y)], scale, isJudged))
        {
            return Flat(given, timeAt);
        }

        given = Sloped(given);
        var jumps = RangeJump.Find(given, Look);
        var looked = Merge(given, jumps.SelectMany(j => new[] { j.Before, j.After }));
        (looked, var leftOver) = WithDips(looked);
        var greatest = RangeExtremeSearch.Greatest(looked, Look);
        var least = RangeExtremeSearch.Least(looked, Look);
        looked = Merge(looked, [.. greatest?.Looked ?? [], .. least?.Looked ?? []]);
        var breaks = isJudged ? Breaks(looked) : [];
        var holding = isJudged ? Holding(looked, breaks) : [];
        var findings = new FigureScan(
            figure,
            Place(greatest, jumps, timeAt),
            Place(least, jumps, timeAt),
            [.. jumps.Select(j => new ScanJump(j.After.X, j.Before.Y, j.After.Y))],
            breaks,
            holding,
            !isJudged || looked.All(s => double.IsNaN(s.Y) || Judged(s).Y >= 0));
        var places = given.Select(s => s.X).ToHashSet();
        return findings with
        {
            Room = ScanRoom.Of(circuit, findings),
            LeftOver = leftOver,
            Looks = Merge([], looks.Where(s => !places.Contains(s.X))),
        };
    }

    /// <summary>What is looked at further because a break, or an end of one, may lie between samples: of what
    /// is only observed, because an extreme may be other than the samples foretell.</summary>
    private (ImmutableArray<SlopedSample> Looked, int LeftOver) WithDips(ImmutableArray<SlopedSample> looked)
    {
        var (before, leftOver) = (looks.Count, 0);
        if (isJudged)
        {
            leftOver = RangeDips.Search([.. looked.Select(Judged)], x => Judged(Look(x))).LeftOver;
        }
        else
        {
            RangeDips.Resolve(looked, Look);
            RangeDips.Resolve([.. looked.Select(s => s.Negate())], x => Look(x).Negate());
        }

        return (Merge(looked, looks[before..]), leftOver);
    }

    private SlopedSample Look(double x)
    {
        looks.Add(function(x));
        return looks[^1];
    }

    /// <summary>The slopes about the highest and lowest points, where they were not all taken.</summary>
    private ImmutableArray<SlopedSample> Sloped(ImmutableArray<SlopedSample> given)
    {
        if (given.Any(s => s.HasSlope))
        {
            return given;
        }

        var wanted = Crests(given, 1).Concat(Crests(given, -1))
            .SelectMany(i => new[] { i - 1, i, i + 1 })
            .Where(i => i >= 0 && i < given.Length).Distinct().ToHashSet();
        return [.. given.Select((sample, i) => wanted.Contains(i) ? Look(sample.X) : sample)];
    }

    private static IEnumerable<int> Crests(ImmutableArray<SlopedSample> given, int sign)
    {
        return Enumerable.Range(0, given.Length)
            .Where(i => given[i].HasValue && !(Height(i - 1) > Height(i)) && !(Height(i + 1) > Height(i)))
            .OrderByDescending(Height)
            .Take(MostCrests);

        double Height(int i) => i >= 0 && i < given.Length ? sign * given[i].Y : double.NaN;
    }

    private FigureScan Flat(ImmutableArray<SlopedSample> given, Func<double, double?> timeAt)
    {
        var solved = given.Where(s => s.HasValue).ToArray();
        var (first, last) = (solved[0], solved[^1]);
        var value = Math.Abs(first.Y) <= FigureSizes.Rounding * scale ? 0 : first.Y;
        var place = new ScanPlace([first.X], value, timeAt(first.X), RangeExtremeKind.Flat);
        var holds = !isJudged || Judged(first).Y >= 0;
        var findings = new FigureScan(
            figure, place, place, [], [], isJudged && holds ? [new ScanStretch(first.X, last.X)] : [], holds);
        return findings with { Room = ScanRoom.Of(circuit, findings) };
    }

    private static ScanPlace? Place(
        RangeExtreme? extreme, ImmutableArray<RangeJump> jumps, Func<double, double?> timeAt)
    {
        if (extreme is null)
        {
            return null;
        }

        var at = extreme.At;
        var isAtJump = jumps.Any(j => j.Before.X == at.X || j.After.X == at.X);
        return new ScanPlace(
            [at.X], at.Y, timeAt(at.X), isAtJump ? RangeExtremeKind.Jump : extreme.Kind);
    }

    /// <summary>Positive or zero where it holds, negative where it breaks.</summary>
    private SlopedSample Judged(SlopedSample sample) => figure.Kind == StudyFigureKind.RatingUsed
        ? new SlopedSample(sample.X, 1 - sample.Y, -sample.Slope)
        : sample;

    private ImmutableArray<ScanBreak> Breaks(ImmutableArray<SlopedSample> looked)
    {
        var breaks = ImmutableArray.CreateBuilder<ScanBreak>();
        for (var i = 0; i + 1 < looked.Length; i++)
        {
            var (left, right) = (Judged(looked[i]), Judged(looked[i + 1]));
            if (left.HasValue && right.HasValue && left.Y >= 0 != right.Y >= 0
                && RangeCrossing.Between(left, right, x => Judged(Look(x))) is { } crossing)
            {
                breaks.Add(new ScanBreak(
                    [crossing.X], 0, left.Y >= 0, crossing.IsJump, crossing.IsBySlope));
            }
        }

        return breaks.ToImmutable();
    }

    /// <summary>From each place where it begins to hold to the next where it ceases; where the circuit has no
    /// solution nothing is known to hold.</summary>
    private ImmutableArray<ScanStretch> Holding(
        ImmutableArray<SlopedSample> looked, ImmutableArray<ScanBreak> breaks)
    {
        var stretches = ImmutableArray.CreateBuilder<ScanStretch>();
        double? start = null;
        for (var i = 0; i < looked.Length; i++)
        {
            var before = i > 0 ? looked[i - 1].X : double.PositiveInfinity;
            var passed = breaks.FirstOrDefault(b => b.At[0] >= before && b.At[0] <= looked[i].X);
            if (Judged(looked[i]).Y >= 0)
            {
                start ??= passed?.At[0] ?? looked[i].X;
            }
            else if (start is { } from)
            {
                stretches.Add(new ScanStretch(from, passed?.At[0] ?? looked[i - 1].X));
                start = null;
            }
        }

        if (start is { } open)
        {
            stretches.Add(new ScanStretch(open, looked[^1].X));
        }

        return stretches.ToImmutable();
    }

    private static ImmutableArray<SlopedSample> Merge(
        ImmutableArray<SlopedSample> samples, IEnumerable<SlopedSample> more) =>
        [.. samples.Concat(more).DistinctBy(s => s.X).OrderBy(s => s.X)];
}
