using System.Collections.Immutable;
using System.Runtime.InteropServices;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>What every figure does over two scanned values: extremes between the points, and where a
/// requirement or rating begins to break on the lines through the points.</summary>
internal sealed class MapScan(
    ScanPlan plan, ImmutableArray<StudyFigure> figures, ScanFunction function, double[] nominal,
    ImmutableArray<ScanPoint> points, ImmutableArray<ScanPoint> middles)
{
    private const int MostStarts = 4;
    private const int MostRounds = 6;
    private const double Settled = 1e-10; // of the value: a round that gains less ends the search
    private const int MostCrossings = 4000; // of one figure; a finer map is not drawn finer

    private readonly ImmutableArray<double> first = plan.Axes[0].Values;
    private readonly ImmutableArray<double> second = plan.Axes[1].Values;

    /// <summary>Searches each figure.</summary>
    public ImmutableArray<FigureScan> Run(CancellationToken cancellation)
    {
        var found = new FigureScan[figures.Length];
        Parallel.For(0, figures.Length, new ParallelOptions { CancellationToken = cancellation }, f =>
            found[f] = Of(f));
        return ImmutableCollectionsMarshal.AsImmutableArray(found);
    }

    private FigureScan Of(int figure)
    {
        var kind = figures[figure].Kind;
        var isJudged = FigureScan.IsJudgedKind(kind);
        var values = Values(figure, points);
        var between = Values(figure, middles);
        if (FigureSizes.IsFlat([.. values, .. between], FigureSizes.Of(figures, points, figure), isJudged))
        {
            return Flat(figure, isJudged);
        }

        var greatest = Extreme(figure, values, between, 1);
        var least = Extreme(figure, values, between, -1);
        var breaks = isJudged ? Breaks(figure, values) : [];
        var worst = kind == StudyFigureKind.RatingUsed ? 1 - greatest?.Value : least?.Value;
        var holds = !isJudged
            || (values.Concat(between).All(v => double.IsNaN(v) || Margin(kind, v) >= 0)
                && worst is null or >= 0);
        var scan = new FigureScan(figures[figure], greatest, least, [], breaks, [], holds);
        return scan with { Room = ScanRoom.Of(plan.Varied.Circuit, scan) };
    }

    private FigureScan Flat(int figure, bool isJudged)
    {
        var (kind, first) = (figures[figure].Kind, points.First(p => p.Found?.Values[figure] is not null));
        var value = first.Found!.Values[figure]!.Value;
        var place = new ScanPlace(first.At, value, first.Found.Times[figure], RangeExtremeKind.Flat);
        var scan = new FigureScan(
            figures[figure], place, place, [], [], [], !isJudged || Margin(kind, value) >= 0);
        return scan with { Room = ScanRoom.Of(plan.Varied.Circuit, scan) };
    }

    private static double Margin(StudyFigureKind kind, double value) =>
        kind == StudyFigureKind.RatingUsed ? 1 - value : value;

    private double[] Values(int figure, ImmutableArray<ScanPoint> of) =>
        [.. of.Select(p => ScanFunction.Judged(figures[figure], p.Found, p.Found?.Values[figure]))];

    /// <summary>The extreme to which the best point or middle of a field leads. Where that does not break,
    /// others that stand out from all about them, and might, lead on too.</summary>
    private ScanPlace? Extreme(int figure, double[] values, double[] between, int sign)
    {
        var kind = figures[figure].Kind;
        var isWorst = kind == (sign > 0 ? StudyFigureKind.RatingUsed : StudyFigureKind.Margin);
        ScanPlace? best = null;
        foreach (var (start, value) in new MapStarts(points, values, middles, between, second.Length)
            .Of(sign, isWorst ? v => Margin(kind, v) : null).Take(MostStarts))
        {
            var found = Climb(figure, start, value, sign);
            best = best is null || sign * found.Value > sign * best.Value ? found : best;
            if (isWorst && Margin(kind, best.Value) < 0)
            {
                break;
            }
        }

        return best;
    }

    /// <summary>From a place on, line by line along each value in turn, until neither gains.</summary>
    private ScanPlace Climb(int figure, ImmutableArray<double> start, double value, int sign)
    {
        double[] place = [.. start];
        var how = RangeExtremeKind.End;
        for (var round = 0; round < MostRounds; round++)
        {
            var before = value;
            for (var axis = 0; axis < 2; axis++)
            {
                if (OnLine(figure, place, axis, sign) is { } found && sign * found.At.Y >= sign * value)
                {
                    (place[axis], value) = (found.At.X, found.At.Y);
                    how = found.Kind == RangeExtremeKind.End ? how : found.Kind;
                }
            }

            if (Math.Abs(value - before) <= Settled * Math.Abs(value))
            {
                break;
            }
        }

        var all = (double[])nominal.Clone();
        place.CopyTo(all, 0);
        return new ScanPlace([.. place], value, function.Time(all, figure), how);
    }

    /// <summary>The extreme along one value between the neighbours of where the search stands.</summary>
    private RangeExtreme? OnLine(int figure, double[] place, int axis, int sign)
    {
        var ticks = axis == 0 ? first : second;
        var next = ticks.BinarySearch(place[axis]);
        var (low, high) = next >= 0 ? (next - 1, next + 1) : (~next - 1, ~next);
        var others = (double[])nominal.Clone();
        place.CopyTo(others, 0);
        var along = function.Along(axis, others, figure);
        double[] at = [ticks[Math.Max(0, low)], place[axis], ticks[Math.Min(ticks.Length - 1, high)]];
        var samples = at.Distinct().Select(along).ToImmutableArray();
        return sign > 0
            ? RangeExtremeSearch.Greatest(samples, along)
            : RangeExtremeSearch.Least(samples, along);
    }

    private ImmutableArray<ScanBreak> Breaks(int figure, double[] values)
    {
        var breaks = ImmutableArray.CreateBuilder<ScanBreak>();
        for (var i = 0; i < first.Length; i++)
        {
            for (var j = 0; j < second.Length && breaks.Count < MostCrossings; j++)
            {
                var here = (i * second.Length) + j;
                if (i + 1 < first.Length)
                {
                    AddBreak(breaks, figure, values, here, here + second.Length, 0);
                }

                if (j + 1 < second.Length)
                {
                    AddBreak(breaks, figure, values, here, here + 1, 1);
                }
            }
        }

        return breaks.ToImmutable();
    }

    private void AddBreak(
        ImmutableArray<ScanBreak>.Builder breaks, int figure, double[] values, int one, int other, int axis)
    {
        var kind = figures[figure].Kind;
        var (a, b) = (Margin(kind, values[one]), Margin(kind, values[other]));
        if (!double.IsFinite(a) || !double.IsFinite(b) || a >= 0 == b >= 0)
        {
            return;
        }

        var others = (double[])nominal.Clone();
        points[one].At.CopyTo(others);
        var along = function.Along(axis, others, figure);
        var crossing = RangeCrossing.Between(
            new SlopedSample(points[one].At[axis], a, double.NaN),
            new SlopedSample(points[other].At[axis], b, double.NaN),
            x => Judged(kind, along(x)));
        if (crossing is not null)
        {
            breaks.Add(new ScanBreak(
                points[one].At.SetItem(axis, crossing.X), axis, a >= 0, crossing.IsJump, crossing.IsBySlope)
            {
                Before = one,
            });
        }
    }

    private static SlopedSample Judged(StudyFigureKind kind, SlopedSample sample) =>
        kind == StudyFigureKind.RatingUsed
            ? new SlopedSample(sample.X, 1 - sample.Y, -sample.Slope)
            : sample;
}
