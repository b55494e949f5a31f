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
    private const int MostRegions = 2; // each is improved from its own best point
    private const int Neighbours = 12; // of a fine series, on either side of the best values
    private const int MostRounds = 12; // each adds corners of the tolerances that decide

    private readonly SizeProblem problem;
    private readonly SizeRequest request;
    private readonly Func<string, Outcome<SourceText>> readBeside;
    private readonly CornerJudge judge;
    private readonly CancellationToken cancellation;

    private SizeStudy(
        SizeProblem problem, SizeRequest request, Func<string, Outcome<SourceText>> readBeside,
        CancellationToken cancellation)
    {
        this.problem = problem;
        this.request = request;
        this.readBeside = readBeside;
        this.cancellation = cancellation;
        judge = new CornerJudge(problem, request.WithSpread, cancellation);
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
        var corners = judge.Deciding();
        for (var (round, isLast) = (1, false); ; round++)
        {
            isLast |= round == MostRounds;
            var search = new SizeSearch(problem, corners, cancellation);
            var found = problem.Parts.Length == 1 ? OnLine(search) : InPlane(search);
            var ends = found.Intervals.SelectMany(interval => new[] { interval.From, interval.To })
                .Concat(found.Exact is { } exact ? [exact] : []);
            var broken = judge.Confirm(ends, found.Candidates, isLast, out var chosen);
            if (broken.IsEmpty || isLast)
            {
                var (judged, listed) = Judged(found, search);
                return Conclude(judged, chosen, corners, broken.IsEmpty, listed);
            }

            // A corner that is known and yet breaks is a matter of rounding: another search ends there too.
            isLast = broken.All(corners.Contains);
            corners = [.. corners.Union(broken)];
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
        var scanned = search.At(
            [.. axes[1].SelectMany(y => axes[0].Select(x => ImmutableArray.Create(x, y)))]);
        var plane = new PlaneSearch(search);
        var reach = Math.Max(Reach(axes[0]), Reach(axes[1]));
        var starts = HeldRegions.Of(scanned, axes[0].Length)
            .Select(region => search.Ranked(region).FirstOrDefault()).OfType<SizePoint>()
            .Take(MostRegions).ToArray();
        if (starts.Length == 0 && FirstHolding(plane, search, scanned, reach) is { } between)
        {
            starts = [between];
        }

        var exact = search.Ranked(starts.Select(start => plane.Improve(start, reach))).FirstOrDefault();
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

    private bool IsPreferredGrid => request.Series is { } series
        && problem.Parts.Length == 2
        && Values(series, 0).Length * Values(series, 1).Length is > 0 and <= MostPlanePoints;

    private ImmutableArray<double> Values(PreferredSeries series, int part) =>
        [.. PreferredValues.Between(series, problem.Parts[part].Lowest, problem.Parts[part].Highest)];

    private ImmutableArray<ImmutableArray<double>> PlaneAxes() =>
        request.Series is { } series && IsPreferredGrid
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

    private (Finding Found, int Listed) Judged(Finding found, SizeSearch search)
    {
        var (preferred, listed) = judge.AtTheCorners(found.Preferred, search.Ranked(found.Preferred));
        return (found with
        {
            Points = found.Preferred == found.Points ? preferred : found.Points,
            Preferred = preferred,
        }, listed);
    }

    private Outcome<SizeResult> Conclude(
        Finding found, SizePoint? chosen, ImmutableArray<UInt128> corners, bool confirmsEnds, int listed)
    {
        if (chosen is not null && request.Series is null)
        {
            chosen = ShortValues.Of(chosen, problem.Parts, judge.Of);
        }

        var text = chosen is null ? null : problem.TextWith(chosen.Values).Value;
        var name = $"{problem.File.Source.Name} with these values";
        var circuit = text is not null ? Read(new SourceText(name, text))
            : chosen is not null ? problem.CircuitAt(chosen.Values, null)
            : new(problem.File, []);
        var solved = circuit.Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
        var confirmed = chosen is null ? [] : judge.InFull(chosen);
        var account = new CornerAccount(judge.Count, judge.IsComplete, confirmsEnds, listed);
        return solved.Succeeded
            ? new(new SizeResult(
                problem, request, found.Points, found.Axes, found.Intervals, found.Preferred, found.Exact,
                chosen, found.Conflict, corners,
                ResultBuilder.Measure(
                    solved.Value, solved.Diagnostics, AnalysisOptions.Default, cancellation),
                text,
                confirmed)
            {
                AsItStands = judge.Of([.. problem.Parts.Select(part => part.Nominal)]),
                Account = account,
            }, [])
            : new(null, solved.Diagnostics);
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
