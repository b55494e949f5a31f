using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Finds how far the tolerances can carry every figure, and solves what it found by the exact
/// engine.</summary>
internal sealed class ExtremeStudy(PointBatch batch, TransientResult nominal)
{
    private const double Idle = 1e-10; // of the figure: a value that changes it by less does not matter

    private readonly ValueRanges ranges = new(batch.Varied.Values);
    private readonly BestPoints best = new(batch.Figures.Length);
    private readonly Dictionary<string, CauseReading?> readings = new(StringComparer.Ordinal);
    private readonly ExactFigures exact = new(batch.Figures, batch.Cancellation);
    private readonly List<(BestPoints.Best Least, BestPoints.Best Greatest)> corner = [];
    private double largestCorrection;

    /// <summary>Searches.</summary>
    public (SearchAccount Account, ImmutableArray<FigureRange> Figures, ImmutableArray<LinearRange> Linear,
        JumpFindings Jumps) Run(Action<SpreadProgress> report)
    {
        var alone = Alone();
        var all = ranges.Count <= (batch.WhyExact is null
            ? SpreadOptions.MostValuesAtCorners
            : SpreadOptions.MostValuesAtExactCorners);
        var corners = new CornerSearch(batch, ranges, best);
        var count = Math.Pow(2, ranges.Count);
        var before = best.Solved;
        var (unsolvable, over) = (best.Unsolvable, OverOne());
        if (all)
        {
            corners.SolveAll(done => report(new SpreadProgress("corners", done, (long)count)));
        }
        else
        {
            corners.Search(
                alone, CornerSearch.RandomCorners,
                _ => report(new SpreadProgress("corners", best.Solved - before, 0)));
        }

        var cornerPoints = best.Solved - before;
        long[] passed = [.. OverOne().Zip(over, (now, then) => now - then)];
        var solved = cornerPoints - (best.Unsolvable - unsolvable);
        for (var f = 0; f < batch.Figures.Length; f++)
        {
            corner.Add((best[f, -1], best[f, 1]));
        }

        var inside = new InteriorSearch(batch, ranges, best)
            .Run(done => report(new SpreadProgress("between the corners", done, 0)));
        var figures = ImmutableArray.CreateBuilder<FigureRange>();
        for (var f = 0; f < batch.Reported.Length; f++)
        {
            report(new SpreadProgress("worst cases", f, batch.Reported.Length));
            figures.Add(Range(f, alone));
        }

        report(new SpreadProgress("between neighbouring corners", 0, 0));
        var jumps = new EdgeSurvey(batch, ranges).Run(
            corner.SelectMany(c => new[] { c.Greatest.Point, c.Least.Point }).Where(p => p.Length > 0)
                .Concat(corners.Visited.Reverse()),
            cornerPoints);
        var worseInside = figures.SelectMany(f => new[] { f.Least, f.Greatest })
            .Count(p => p is { IsCorner: false });
        return (
            new SearchAccount(
                count, all, cornerPoints, inside, worseInside, best.Unsolvable,
                best.UnsolvablePoint is { } point ? [.. point] : null, largestCorrection,
                batch.WhyExact),
            figures.ToImmutable(),
            [.. Enumerable.Range(0, passed.Length).Select(i => Linear(i, passed[i], solved))], jumps);
    }

    /// <summary>At how many points parts left the ranges they are linear in, part by part.</summary>
    private long[] OverOne() =>
        [.. Enumerable.Range(batch.Reported.Length, batch.Figures.Length - batch.Reported.Length)
            .Select(best.OverOne)];

    private LinearRange Linear(int index, long passed, long corners)
    {
        var f = batch.Reported.Length + index;
        var found = best[f, 1].Point;
        var isInfinite = best.Missing(f) > 0;
        return new LinearRange(
            batch.Figures[f].Index, isInfinite || found.Length == 0 ? null : Exact(found, f).Value,
            [.. found], passed, corners);
    }

    /// <summary>Every value alone at its lower and at its upper end, after all at nominal.</summary>
    private BatchFigures Alone()
    {
        var points = new List<double>();
        for (var i = 0; i < ranges.Count; i++)
        {
            points.AddRange(With(ranges.Nominal, i, ranges.Lowest(i)));
            points.AddRange(With(ranges.Nominal, i, ranges.Highest(i)));
        }

        best.Add(ranges.Nominal, batch.At(ranges.Nominal));
        double[] all = [.. points];
        var found = batch.At(all);
        best.Add(all, found);
        return found;
    }

    private FigureRange Range(int f, BatchFigures alone)
    {
        var figure = batch.Figures[f];
        var circuit = batch.Varied.At(ranges.Nominal).Value!;
        var own = exact.At(circuit, f);
        var value = own.Value;
        var (least, greatest) = (Extreme(f, -1), Extreme(f, 1));
        var (reached, causes) = Reading(ranges.Nominal)?.Read(figure, value ?? double.NaN) ?? (null, []);
        return new FigureRange(
            figure, value, own.Time, least, greatest,
            [.. Enumerable.Range(0, ranges.Count)
                .Select(i => new ValueEffect(alone.Value(2 * i, f), alone.Value((2 * i) + 1, f)))],
            Holds(f, least, greatest), best.Missing(f))
        {
            NominalCauses = causes,
            NominalReached = reached,
        };
    }

    private bool? Holds(int f, ExtremePoint? least, ExtremePoint? greatest)
    {
        var figure = batch.Figures[f];
        if (!Judgement.IsJudged(figure))
        {
            return null;
        }

        // A rating that is open everywhere (the current of one of two ideal contacts) is not exceeded.
        var isOpen = figure.Kind == StudyFigureKind.RatingUsed
            && nominal.Parts[figure.Index].Ratings[figure.Rating] is { Used: null, Holds: true };
        return (isOpen || best.Missing(f) == 0)
            && (least is null || Judgement.Holds(figure, least.Value))
            && (greatest is null || Judgement.Holds(figure, greatest.Value));
    }

    private ExtremePoint? Extreme(int f, int sign)
    {
        var found = best[f, sign];
        if (found.Point.Length == 0)
        {
            return null;
        }

        var figure = batch.Figures[f];
        var (point, matters, solved) = WithoutIdle(f, found);
        var value = solved.Value ?? found.Value;
        var scale = Math.Max(Math.Abs(value), Math.Abs(found.Value));
        if (scale > 0 && double.IsFinite(scale))
        {
            largestCorrection = Math.Max(largestCorrection, Math.Abs(value - found.Value) / scale);
        }

        var (reached, causes) = Reading(point)?.Read(figure, value) ?? (null, []);
        var moves = BestPoints.IsBeyond(value, best[f, -sign].Value, sign, batch.Resolution);
        return new ExtremePoint(
            [.. point], matters, value, solved.Time, ranges.IsCorner(point), Returns(f, point))
        {
            AtWorstCorner = ranges.IsCorner(point) ? null
                : Exact(sign > 0 ? corner[f].Greatest.Point : corner[f].Least.Point, f).Value,
            Reached = Judgement.IsJudged(figure) ? reached : value,
            Causes = causes,
            Jumps = moves ? [.. new JumpSearch(batch, ranges.Nominal).Find(f, point)] : [],
        };
    }

    /// <summary>The point with every value that changes nothing back at nominal.</summary>
    private (double[] Point, ImmutableArray<bool> Matters, (double? Value, double? Time) Solved) WithoutIdle(
        int f, BestPoints.Best found)
    {
        var returns = Returns(f, found.Point);
        bool[] matters = [.. returns.Select((value, i) =>
            found.Point[i] != ranges.Nominal[i] && IsOther(value, found.Value))];
        double[] point = [.. found.Point.Select((value, i) => matters[i] ? value : ranges.Nominal[i])];
        var whole = Exact(found.Point, f);
        var bare = Exact(point, f);
        return bare.Value is { } value && whole.Value is { } all && !IsOther(value, all)
            ? (point, [.. matters], bare)
            : (found.Point, [.. found.Point.Select((place, i) => place != ranges.Nominal[i])], whole);
    }

    private (double? Value, double? Time) Exact(double[] point, int f) =>
        batch.Varied.At(point).Value is { } circuit ? exact.At(circuit, f) : (null, null);

    private static bool IsOther(double value, double than) =>
        !(value == than
            || Math.Abs(value - than) <= Idle * Math.Max(Math.Abs(value), Math.Abs(than)));

    private ImmutableArray<double> Returns(int f, double[] point)
    {
        var found = batch.At([.. Enumerable.Range(0, ranges.Count)
            .SelectMany(i => With(point, i, ranges.Nominal[i]))]);
        return [.. Enumerable.Range(0, ranges.Count).Select(i => found.Value(i, f))];
    }

    private static double[] With(double[] point, int value, double other)
    {
        var changed = (double[])point.Clone();
        changed[value] = other;
        return changed;
    }

    private CauseReading? Reading(double[] point)
    {
        var key = string.Join(' ', point);
        if (!readings.TryGetValue(key, out var reading))
        {
            var circuit = batch.Varied.At(point).Value;
            reading = circuit is null ? null : CauseReading.Of(circuit, batch.Cancellation);
            readings.Add(key, reading);
        }

        return reading;
    }
}
