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
    private const int MostJudged = 131072; // solutions, some seconds of work
    private const int MostConfirmed = 8; // a full solution takes some tens of milliseconds

    private readonly bool looks = withSpread && !problem.Corners.Toleranced.IsEmpty;
    private readonly CornerSweep? sweep = withSpread && !problem.Corners.Toleranced.IsEmpty
        ? new CornerSweep(problem, cancellation)
        : null;

    private readonly Dictionary<(double, double), SweptCorners> swept = [];

    /// <summary>How many corners the last values were solved at.</summary>
    public int Count { get; private set; }

    /// <summary>Whether values are solved at every corner there is.</summary>
    public bool IsComplete => sweep is null or { IsComplete: true };

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
        return [.. places.SelectMany(values => Swept(values)).Distinct()];
    }

    private ImmutableArray<UInt128> Swept(ImmutableArray<double> values)
    {
        var key = (values[0], values[^1]);
        if (!swept.TryGetValue(key, out var found))
        {
            swept[key] = found = sweep!.At(values);
        }

        Count = found.Count;
        return found.Worst;
    }

    /// <summary>The point judged by the exact engine nominal and at the worst corners, and those of these
    /// that break something.</summary>
    private (ImmutableArray<UInt128> Broken, SizePoint Point) AtWorst(ImmutableArray<double> values)
    {
        var corners = Swept(values);
        var points = new SizePoint[corners.Length + 1];
        var options = new ParallelOptions { CancellationToken = cancellation };
        Parallel.For(0, points.Length, options, i => points[i] = problem.AtCorner(
            values, i == 0 ? null : corners[i - 1], cancellation));
        return ([.. corners.Where((_, i) => !points[i + 1].Holds)], points[0] with
        {
            Shares =
            [
                .. Enumerable.Range(0, problem.Constraints.Length)
                    .Select(c => points.Min(point => point.Shares[c])),
            ],
        });
    }

    /// <summary>One set of values, at the corners where these are looked at.</summary>
    public SizePoint Of(ImmutableArray<double> values) =>
        looks ? AtWorst(values).Point : problem.AtCorner(values, null, cancellation);

    /// <summary>Takes the best candidate if it holds at the corners.</summary>
    /// <param name="ends">What else is to hold: the ends of stretches.</param>
    /// <param name="candidates">The candidates, the best first.</param>
    /// <param name="isLast">Whether the next candidates are to be tried where one does not hold: the search
    /// is not to be done again.</param>
    /// <param name="chosen">What was taken.</param>
    /// <returns>The corners that broke a candidate or an end; the search is not done before there are
    /// none.</returns>
    public ImmutableArray<UInt128> Confirm(
        IEnumerable<SizePoint> ends, ImmutableArray<SizePoint> candidates, bool isLast,
        out SizePoint? chosen)
    {
        chosen = null;
        if (!looks)
        {
            chosen = candidates.FirstOrDefault();
            return [];
        }

        ImmutableArray<UInt128> broken =
        [
            .. ends.SelectMany(end => AtWorst(end.Values).Broken).Distinct(),
        ];
        foreach (var candidate in candidates)
        {
            var (corners, point) = AtWorst(candidate.Values);
            point = point with { Shares = [.. point.Shares.Zip(candidate.Shares, Math.Min)] };
            if (point.Holds)
            {
                chosen = point;
                return broken;
            }

            broken = [.. broken.Union(corners)];
            if (!isLast)
            {
                return broken;
            }
        }

        return broken;
    }

    /// <summary>The points that hold at the deciding corners, judged at every one, the best first, as many as
    /// are not too much work.</summary>
    /// <param name="points">The points.</param>
    /// <param name="ranked">Those that hold, the best first.</param>
    /// <returns>The points, and how many were judged so and hold.</returns>
    public (ImmutableArray<SizePoint> Points, int Judged) AtTheCorners(
        ImmutableArray<SizePoint> points, IEnumerable<SizePoint> ranked)
    {
        if (!looks)
        {
            return (points, 0);
        }

        var judged = points.ToArray();
        var (work, held) = (0, 0);
        foreach (var point in ranked)
        {
            if (work > MostJudged)
            {
                break;
            }

            var at = points.IndexOf(point);
            var worst = AtWorst(point.Values).Point;
            judged[at] = worst with { Shares = [.. worst.Shares.Zip(point.Shares, Math.Min)] };
            held += judged[at].Holds ? 1 : 0;
            work += Count;
        }

        return ([.. judged], held);
    }

    /// <summary>The corners that are worst for the proposed values, solved in full.</summary>
    public ImmutableArray<ConfirmedCorner> InFull(SizePoint chosen)
    {
        if (!looks)
        {
            return [];
        }

        var corners = Swept(chosen.Values).Take(MostConfirmed).ToArray();
        var confirmed = new ConfirmedCorner[corners.Length];
        var options = new ParallelOptions { CancellationToken = cancellation };
        Parallel.For(0, corners.Length, options, i =>
        {
            var solved = problem.CircuitAt(chosen.Values, corners[i])
                .Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
            var result = solved.Succeeded
                ? ResultBuilder.Measure(solved.Value, [], AnalysisOptions.WithoutPage, cancellation)
                : null;
            confirmed[i] = new(corners[i], result is { AllHold: true }, result is { ChecksHold: true });
        });
        return [.. confirmed];
    }
}
