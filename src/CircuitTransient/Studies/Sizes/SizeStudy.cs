using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Studies.Sizes;

/// <summary>Finds the values of one or two parts for which every requirement and rating holds.</summary>
public sealed class SizeStudy
{
    private const int PlaneCount = 37; // twelve a decade over the usual range
    private const int MostPlanePoints = 6000;
    private const int Neighbours = 12; // of a fine series, on either side of the best values
    private const int MostJudged = 8192; // solutions, some seconds of work
    private const int MostConfirmed = 8; // a full solution takes some tens of milliseconds
    private const int MostRounds = 12; // each adds corners of the tolerances that decide

    private readonly SizeProblem problem;
    private readonly SizeRequest request;
    private readonly Func<string, Outcome<SourceText>> readBeside;
    private readonly CancellationToken cancellation;

    private SizeStudy(
        SizeProblem problem, SizeRequest request, Func<string, Outcome<SourceText>> readBeside,
        CancellationToken cancellation)
    {
        this.problem = problem;
        this.request = request;
        this.readBeside = readBeside;
        this.cancellation = cancellation;
    }

    /// <summary>Runs a sizing.</summary>
    /// <param name="problem">What is sought.</param>
    /// <param name="request">What was asked.</param>
    /// <param name="readBeside">Reads a file that the circuit names.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>What was found, or why the circuit cannot be solved.</returns>
    public static Outcome<SizeResult> Run(
        SizeProblem problem, SizeRequest request, Func<string, Outcome<SourceText>> readBeside,
        CancellationToken cancellation = default) =>
        new SizeStudy(problem, request, readBeside, cancellation).Run();

    private Outcome<SizeResult> Run()
    {
        var corners = DecidingCorners();
        for (var round = 1; ; round++)
        {
            var search = new SizeSearch(problem, corners, cancellation);
            var found = problem.Parts.Length == 1 ? OnLine(search) : InPlane(search);
            var broken = Confirm(found, out var chosen);
            if (broken.IsEmpty || round == MostRounds)
            {
                return Conclude(Judged(found), chosen, corners);
            }

            corners = corners.Union(broken).ToImmutableArray();
        }
    }

    private Finding OnLine(SizeSearch search)
    {
        var line = new LineSearch(search);
        var scanned = line.Scan();
        var intervals = line.Intervals(scanned);
        var exact = line.Best(scanned, intervals);
        var preferred = request.Series is { } series
            ? search.At([.. Values(series, 0).Select(v => ImmutableArray.Create(v))])
            : [];
        return new Finding(
            scanned,
            [[.. scanned.Select(point => point.Values[0])]],
            intervals,
            preferred,
            exact,
            request.Series is null ? exact is null ? [] : [exact] : [.. search.Ranked(preferred)],
            exact is null && !preferred.Any(p => p.Holds)
                ? SizeConflict.Of(scanned, search.All, among => line.Nearest(scanned, among))
                : null);
    }

    private Finding InPlane(SizeSearch search)
    {
        var axes = PlaneAxes();
        var scanned = search.At([.. axes[1].SelectMany(y => axes[0].Select(x => ImmutableArray.Create(x, y)))]);
        var plane = new PlaneSearch(search);
        var reach = Math.Max(Reach(axes[0]), Reach(axes[1]));
        var start = search.Ranked(scanned).FirstOrDefault() ?? FirstHolding(plane, search, scanned, reach);
        var exact = start is null ? null : plane.Improve(start, reach);
        var preferred = request.Series is not { } series ? []
            : IsPreferredGrid ? scanned
            : exact is null ? []
            : search.At(Around(series, exact));
        return new Finding(
            scanned,
            axes,
            [],
            preferred,
            exact,
            request.Series is null ? exact is null ? [] : [exact] : [.. search.Ranked(preferred)],
            exact is null
                ? SizeConflict.Of(scanned, search.All, among =>
                    plane.Approach(scanned.MaxBy(p => SizeSearch.Least(p, among))!, among, reach))
                : null);
    }

    // What holds may lie between the scanned points.
    private static SizePoint? FirstHolding(
        PlaneSearch plane, SizeSearch search, ImmutableArray<SizePoint> scanned, double reach)
    {
        var nearest = plane.Approach(scanned.MaxBy(point => point.Worst)!, search.All, reach);
        return nearest.Holds && search.Ranked([nearest]).Any() ? nearest : null;
    }

    private static double Reach(ImmutableArray<double> axis) =>
        axis.Length < 2 ? 0.1 : 2 * Math.Log(axis[^1] / axis[0]) / (axis.Length - 1);

    private bool LooksAtCorners => request.WithSpread && !problem.Corners.Toleranced.IsEmpty;

    private bool IsPreferredGrid => request.Series is { } series
        && problem.Parts.Length == 2
        && Values(series, 0).Length * Values(series, 1).Length is > 0 and <= MostPlanePoints;

    private ImmutableArray<double> Values(PreferredSeries series, int part) =>
        [.. PreferredValues.Between(series, problem.Parts[part].Lowest, problem.Parts[part].Highest)];

    private ImmutableArray<ImmutableArray<double>> PlaneAxes() => request.Series is { } series && IsPreferredGrid
        ? [Values(series, 0), Values(series, 1)]
        : [SizeSearch.Spread(problem.Parts[0], PlaneCount), SizeSearch.Spread(problem.Parts[1], PlaneCount)];

    private List<ImmutableArray<double>> Around(PreferredSeries series, SizePoint centre)
    {
        var (first, second) = (Near(0), Near(1));
        return [.. second.SelectMany(y => first.Select(x => ImmutableArray.Create(x, y)))];

        ImmutableArray<double> Near(int part)
        {
            var all = Values(series, part);
            var place = all.Count(value => value < centre.Values[part]);
            return [.. all.Skip(place - Neighbours).Take(2 * Neighbours)];
        }
    }

    /// <summary>For each constraint the corner that is worst for it at the circuit's own values and at the
    /// middle of the range.</summary>
    private ImmutableArray<UInt128> DecidingCorners()
    {
        if (!LooksAtCorners)
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

    /// <summary>Takes the first candidate that holds at every corner.</summary>
    /// <returns>The corners that broke the best candidate or an end of a stretch; the search is not done
    /// before there are none.</returns>
    private ImmutableArray<UInt128> Confirm(Finding found, out SizePoint? chosen)
    {
        if (!LooksAtCorners)
        {
            chosen = found.Candidates.FirstOrDefault();
            return [];
        }

        ImmutableArray<UInt128> broken =
        [
            .. found.Intervals.SelectMany(interval => new[] { interval.From, interval.To })
                .Select(end => WorstCorners(end.Values))
                .Where(worst => !worst.Point.Holds).SelectMany(worst => worst.Corners).Distinct(),
        ];
        foreach (var candidate in found.Candidates)
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
    private Finding Judged(Finding found)
    {
        var corners = problem.Corners.All;
        var isGrid = found.Preferred == found.Points;
        if (!LooksAtCorners || !problem.Corners.IsComplete)
        {
            return found;
        }

        var points = Judge(found.Points);
        return found with { Points = points, Preferred = isGrid ? points : Judge(found.Preferred) };

        ImmutableArray<SizePoint> Judge(ImmutableArray<SizePoint> looked)
        {
            if (looked.Count(point => point.Holds) * corners.Length > MostJudged)
            {
                return looked;
            }

            var judged = looked.ToArray();
            var options = new ParallelOptions { CancellationToken = cancellation };
            Parallel.For(0, judged.Length, options, i =>
                judged[i] = judged[i].Holds ? problem.At(judged[i].Values, corners, cancellation) : judged[i]);
            return [.. judged];
        }
    }

    private Outcome<SizeResult> Conclude(Finding found, SizePoint? chosen, ImmutableArray<UInt128> corners)
    {
        var text = chosen is null ? null : problem.TextWith(chosen.Values).Value;
        var circuit = text is not null ? Read(new SourceText($"{problem.File.Source.Name} with these values", text))
            : chosen is not null ? problem.CircuitAt(chosen.Values, null)
            : new(problem.File, []);
        var solved = circuit.Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
        return solved.Succeeded
            ? new(new SizeResult(
                problem, request, found.Points, found.Axes, found.Intervals, found.Preferred, found.Exact,
                chosen, found.Conflict, corners,
                ResultBuilder.Measure(
                    solved.Value, solved.Diagnostics, AnalysisOptions.Default, cancellation),
                text,
                chosen is null ? [] : ConfirmedCorners(chosen)), [])
            : new(null, solved.Diagnostics);
    }

    /// <summary>The corners that are worst for the proposed values, solved in full.</summary>
    private ImmutableArray<ConfirmedCorner> ConfirmedCorners(SizePoint chosen)
    {
        if (!LooksAtCorners)
        {
            return [];
        }

        var corners = WorstCorners(chosen.Values).Corners.Take(MostConfirmed).ToArray();
        var confirmed = new ConfirmedCorner[corners.Length];
        var options = new ParallelOptions { CancellationToken = cancellation };
        Parallel.For(0, corners.Length, options, i =>
        {
            var solved = problem.CircuitAt(chosen.Values, corners[i])
                .Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
            var result = solved.Succeeded
                ? ResultBuilder.Measure(solved.Value, [], AnalysisOptions.Default, cancellation)
                : null;
            confirmed[i] = new(corners[i], result is { AllHold: true }, result is { ChecksHold: true });
        });
        return [.. confirmed];
    }

    private Outcome<Circuit> Read(SourceText source)
    {
        var (syntax, mistakes) = CircuitParser.ParseWhatCanBe(source);
        return CircuitChecker.Check(syntax, mistakes, readBeside);
    }

    private sealed record Finding(
        ImmutableArray<SizePoint> Points,
        ImmutableArray<ImmutableArray<double>> Axes,
        ImmutableArray<FeasibleInterval> Intervals,
        ImmutableArray<SizePoint> Preferred,
        SizePoint? Exact,
        ImmutableArray<SizePoint> Candidates,
        SizeConflict? Conflict);
}
