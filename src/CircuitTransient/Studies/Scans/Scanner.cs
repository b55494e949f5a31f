using System.Collections.Immutable;
using System.Runtime.InteropServices;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>Runs a scan: the points first, then what lies between them.</summary>
public sealed class Scanner
{
    private const int ScatterSteps = 240;

    private const int MostMiddles = 6400;

    private const int MostSloped = 1000; // points whose slopes are all taken; of more only where they matter

    private static readonly ImmutableArray<double> Fractions =
        [.. Enumerable.Range(0, 101).Select(k => k / 100.0)];

    private readonly ScanPlan plan;
    private readonly ImmutableArray<StudyFigure> figures;
    private readonly double[] nominal;
    private readonly ScanFunction function;
    private readonly Action<int> solved;
    private readonly CancellationToken cancellation;

    private Scanner(
        ScanPlan plan, ScanMemory memory, Action<int> solved, CancellationToken cancellation)
    {
        (this.plan, this.solved, this.cancellation) = (plan, solved, cancellation);
        figures = [.. StudyFigures.Of(plan.Varied.Circuit).Where(IsWanted)];
        nominal = [.. plan.Varied.Values.Select(v => v.Nominal)];
        function = new ScanFunction(plan.Varied, figures, memory, cancellation);
    }

    /// <summary>How many points a plan solves before it searches between them.</summary>
    public static int PointCount(ScanPlan plan) =>
        plan.Axes.Aggregate(plan.Axes.IsEmpty ? 0 : 1, (count, axis) => count * axis.Values.Length)
        + (plan.Scatter is null ? 0 : ScatterSteps + 1);

    /// <summary>Runs a plan.</summary>
    /// <param name="plan">What to scan.</param>
    /// <param name="memory">What the same plan has solved before, and gets what is solved now.</param>
    /// <param name="solved">Told how many points were solved before, then of each one, from any
    /// thread.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static ScanResult Run(
        ScanPlan plan, ScanMemory memory, Action<int> solved, CancellationToken cancellation = default) =>
        new Scanner(plan, memory, solved, cancellation).Run();

    /// <summary>Node voltages that are only observed because nothing else was would crowd out what is
    /// required.</summary>
    private bool IsWanted(StudyFigure figure) => FigureScan.IsJudgedKind(figure.Kind)
        || plan.Varied.Circuit.Requirements.IsEmpty
        || !plan.Varied.Circuit.Observations[figure.Index].IsByDefault;

    private ScanResult Run()
    {
        var written = function.Point(nominal, [.. plan.Axes.Select((_, i) => nominal[i])]);
        var points = plan.Axes.IsEmpty
            ? []
            : FigureSizes.Cleaned(
                figures, ScanGrid.Solve(
                    ScanGrid.Places(plan.Axes), Sloped, Put, function, solved, cancellation));
        var middles = Middles();
        var findings = plan.Axes.Length switch
        {
            0 => [],
            1 => Between(plan.Axes[0], 0, points),
            _ => new MapScan(plan, figures, function, nominal, points, middles).Run(cancellation),
        };
        var scatter = plan.Scatter is { } s ? Scatter(s) : null;
        findings = Completed(findings, points, 0);
        return new ScanResult(
            plan.Varied.Circuit, plan.Axes, figures, points, written, findings,
            FamilyScan.Of(plan, points, findings, cancellation), scatter)
        {
            Linear = plan.Axes switch
            {
                [] => [],
                [var only] => Linear(only, 0, points),
                _ => [.. Enumerable.Range(0, function.Linear.Count)
                    .Select(k => function.Linear.Over(k, points))],
            },
            Middles = middles,
        };
    }

    /// <summary>The middles of the fields between the points of two values, which tell whether a figure
    /// passes from one to the next without a jump or a kink.</summary>
    private ImmutableArray<ScanPoint> Middles()
    {
        if (plan.Axes is not [var first, var second]
            || first.Values.Length * second.Values.Length > MostMiddles)
        {
            return [];
        }

        var places = Between(first).SelectMany(_ => Between(second), (a, b) => ImmutableArray.Create(a, b));
        return ScanGrid.Solve([.. places], -1, Put, function, _ => { }, cancellation);

        static IEnumerable<double> Between(ScanAxis axis) =>
            axis.Values.Zip(axis.Values.Skip(1), (a, b) => (a + b) / 2);
    }

    private ImmutableArray<LinearScan> Linear(ScanAxis axis, int index, ImmutableArray<ScanPoint> points) =>
    [
        .. Enumerable.Range(0, function.Linear.Count).Select(k => function.Linear.Along(
            k,
            [.. points.Select((p, i) => new SlopedSample(
                axis.Values[i], p.Found is null ? double.NaN : p.LinearUsed[k], double.NaN))],
            function.LinearAlong(index, nominal, k))),
    ];

    /// <summary>The findings with the doubt at their places, and rounding left of zero as zero.</summary>
    private ImmutableArray<FigureScan> Completed(
        ImmutableArray<FigureScan> scans, ImmutableArray<ScanPoint> points, int index)
    {
        return [.. scans.Select((scan, f) => scan with
        {
            Greatest = Complete(scan.Greatest, f),
            Least = Complete(scan.Least, f),
        })];

        ScanPlace? Complete(ScanPlace? place, int figure)
        {
            if (place is null)
            {
                return null;
            }

            var values = (double[])nominal.Clone();
            place.At.CopyTo(values, index);
            return place with
            {
                IsInDoubt = function.IsInDoubt(values),
                Value = FigureSizes.Clean(place.Value, FigureSizes.Of(figures, points, figure)),
            };
        }
    }

    /// <summary>The axis whose slopes are taken at every point; −1 where they are not.</summary>
    private int Sloped => plan.Axes is [var only] && only.Values.Length <= MostSloped ? 0 : -1;

    private double[] Put(ImmutableArray<double> at)
    {
        var values = (double[])nominal.Clone();
        at.CopyTo(values);
        return values;
    }

    private ImmutableArray<FigureScan> Between(ScanAxis axis, int index, ImmutableArray<ScanPoint> points)
    {
        var found = new FigureScan[figures.Length];
        Parallel.For(0, figures.Length, new ParallelOptions { CancellationToken = cancellation }, f =>
        {
            var samples = Samples(axis, points, f);
            found[f] = new AxisScan(
                plan.Varied.Circuit, figures[f], function.Along(index, nominal, f),
                FigureSizes.Of(figures, points, f))
                .Run(samples, x => function.Time(Put(index, x), f));
        });
        return ImmutableCollectionsMarshal.AsImmutableArray(found);
    }

    private ImmutableArray<SlopedSample> Samples(
        ScanAxis axis, ImmutableArray<ScanPoint> points, int figure) =>
    [
        .. points.Select((p, i) => new SlopedSample(
            axis.Values[i],
            ScanFunction.Judged(figures[figure], p.Found, p.Found?.Values[figure]),
            p.Slopes.IsDefaultOrEmpty ? double.NaN : p.Slopes[figure])),
    ];

    private double[] Put(int index, double value)
    {
        var values = (double[])nominal.Clone();
        values[index] = value;
        return values;
    }

    private ScatterResult Scatter(ScanScatter scatter)
    {
        var axis = new ScanAxis(
            scatter.Varied, "", ScanSpacing.Even,
            [
                .. Enumerable.Range(0, ScatterSteps + 1)
                    .Select(i => scatter.From + ((scatter.To - scatter.From) * i / ScatterSteps)),
            ]);
        var points = FigureSizes.Cleaned(figures, ScanGrid.Solve(
            ScanGrid.Places([axis]), scatter.Index, at => Put(scatter.Index, at[0]), function, solved,
            cancellation));
        var scans = Completed(Between(axis, scatter.Index, points), points, scatter.Index);
        return new ScatterResult(
            scatter, axis, points,
            [.. scans.Select((scan, f) => Distribute(scan, axis, Samples(axis, points, f)))])
        {
            Linear = Linear(axis, scatter.Index, points),
        };
    }

    private static FigureScatter Distribute(
        FigureScan scan, ScanAxis axis, ImmutableArray<SlopedSample> samples)
    {
        var distribution = Distribution.Of(samples);
        double? holding = scan.IsJudged
            ? scan.Holding.Sum(s => s.To - s.From) / (axis.To - axis.From)
            : null;
        return distribution is null
            ? new FigureScatter(scan, null, [], holding)
            : new FigureScatter(
                scan, distribution.Mean,
                [.. Fractions.Select(f => new Quantile(f, Within(distribution.Quantile(f))))], holding);

        // Between the instants the distribution is interpolated, the extremes are found.
        double Within(double value) =>
            scan is { Least.Value: var low, Greatest.Value: var high } && low <= high
                ? Math.Clamp(value, low, high)
                : value;
    }
}
