using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;

namespace CircuitTransient.Studies.Sizes;

/// <summary>Judges values at the corners of the tolerances.</summary>
/// <param name="problem">The problem.</param>
/// <param name="withSpread">Whether corners are to be looked at.</param>
/// <param name="cancellation">Stops the work.</param>
internal sealed class CornerJudge(SizeProblem problem, bool withSpread, CancellationToken cancellation)
{
    private const int MostJudged = 8192; // solutions, some seconds of work
    private const int MostConfirmed = 8; // a full solution takes some tens of milliseconds

    private readonly bool looks = withSpread && !problem.Corners.Toleranced.IsEmpty;

    /// <summary>For each constraint the corner that is worst for it at the circuit's own values and at the
    /// middle of the range.</summary>
    public ImmutableArray<UInt128> Deciding()
    {
        if (!looks)
        {
            return [];
        }

        ImmutableArray<double>[] places =
        [
            [.. problem.Parts.Select(part => Math.Clamp(part.Nominal, part.Lowest, part.Highest))],
            [.. problem.Parts.Select(part => Math.Sqrt(part.Lowest * part.Highest))],
        ];
        return [.. places.SelectMany(values => WorstCorners(values).Corners).Distinct()];
    }

    private (ImmutableArray<UInt128> Corners, SizePoint Point) WorstCorners(ImmutableArray<double> values)
    {
        var corners = problem.Corners.All;
        var points = new SizePoint[corners.Length];
        var options = new ParallelOptions { CancellationToken = cancellation };
        Parallel.For(0, points.Length, options,
            i => points[i] = problem.AtCorner(values, corners[i], cancellation));
        var worst = Enumerable.Range(0, problem.Constraints.Length)
            .Select(c => corners[Enumerable.Range(0, points.Length).MinBy(i => points[i].Shares[c])]);
        return ([.. worst.Distinct()], problem.AtCorner(values, null, cancellation) with
        {
            Shares =
            [
                .. Enumerable.Range(0, problem.Constraints.Length)
                    .Select(c => points.Min(point => point.Shares[c])),
            ],
        });
    }

    /// <summary>One set of values, at every corner where corners are looked at.</summary>
    public SizePoint Of(ImmutableArray<double> values)
    {
        var nominal = problem.AtCorner(values, null, cancellation);
        if (!looks)
        {
            return nominal;
        }

        var worst = WorstCorners(values).Point;
        return worst with { Shares = [.. worst.Shares.Zip(nominal.Shares, Math.Min)] };
    }

    /// <summary>Takes the first candidate that holds at every corner.</summary>
    /// <returns>The corners that broke the best candidate or an end of a stretch; the search is not done
    /// before there are none.</returns>
    public ImmutableArray<UInt128> Confirm(
        ImmutableArray<FeasibleInterval> intervals, ImmutableArray<SizePoint> candidates,
        out SizePoint? chosen)
    {
        if (!looks)
        {
            chosen = candidates.FirstOrDefault();
            return [];
        }

        ImmutableArray<UInt128> broken =
        [
            .. intervals.SelectMany(interval => new[] { interval.From, interval.To })
                .Select(end => WorstCorners(end.Values))
                .Where(worst => !worst.Point.Holds).SelectMany(worst => worst.Corners).Distinct(),
        ];
        foreach (var candidate in candidates)
        {
            var (corners, point) = WorstCorners(candidate.Values);
            point = point with { Shares = [.. point.Shares.Zip(candidate.Shares, Math.Min)] };
            if (point.Holds)
            {
                chosen = point;
                return broken;
            }

            broken = broken.IsEmpty ? corners : broken;
        }

        chosen = null;
        return broken;
    }

    /// <summary>The points that hold at the deciding corners, judged at every corner, where that is not too
    /// much work.</summary>
    public ImmutableArray<SizePoint> AtEveryCorner(ImmutableArray<SizePoint> points)
    {
        var corners = problem.Corners.All;
        if (!looks || !problem.Corners.IsComplete
            || points.Count(point => point.Holds) * corners.Length > MostJudged)
        {
            return points;
        }

        var judged = points.ToArray();
        var options = new ParallelOptions { CancellationToken = cancellation };
        Parallel.For(0, judged.Length, options, i => judged[i] = judged[i].Holds
            ? problem.At(judged[i].Values, corners, cancellation)
            : judged[i]);
        return [.. judged];
    }

    /// <summary>The corners that are worst for the proposed values, solved in full.</summary>
    public ImmutableArray<ConfirmedCorner> InFull(SizePoint chosen)
    {
        if (!looks)
        {
            return [];
        }

        var corners = WorstCorners(chosen.Values).Corners.Take(MostConfirmed).ToArray();
        var confirmed = new ConfirmedCorner[corners.Length];
        var options = new ParallelOptions { CancellationToken = cancellation };
        var withoutPage = AnalysisOptions.Default with { IsForPage = false };
        Parallel.For(0, corners.Length, options, i =>
        {
            var solved = problem.CircuitAt(chosen.Values, corners[i])
                .Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
            var result = solved.Succeeded
                ? ResultBuilder.Measure(solved.Value, [], withoutPage, cancellation)
                : null;
            confirmed[i] = new(corners[i], result is { AllHold: true }, result is { ChecksHold: true });
        });
        return [.. confirmed];
    }
}
