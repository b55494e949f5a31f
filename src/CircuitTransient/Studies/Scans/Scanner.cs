using System.Collections.Immutable;
using System.Runtime.InteropServices;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>Runs a scan: the points first, then what lies between them.</summary>
public sealed class Scanner
{
    private const int ScatterSteps = 240;

    private const int MostSloped = 1000; // points whose slopes are all taken; of more only where they matter

    private static readonly ImmutableArray<double> Fractions =
        [.. Enumerable.Range(0, 101).Select(k => k / 100.0)];

    private readonly ScanPlan plan;
    private readonly ImmutableArray<StudyFigure> figures;
    private readonly double[] nominal;
    private readonly ScanFunction function;
    private readonly Action solved;
    private readonly CancellationToken cancellation;

    private Scanner(ScanPlan plan, Action solved, CancellationToken cancellation)
    {
        (this.plan, this.solved, this.cancellation) = (plan, solved, cancellation);
        figures = [.. StudyFigures.Of(plan.Varied.Circuit).Where(IsWanted)];
        nominal = [.. plan.Varied.Values.Select(v => v.Nominal)];
        function = new ScanFunction(plan.Varied, figures, cancellation);
    }

    /// <summary>How many points a plan solves before it searches between them.</summary>
    public static int PointCount(ScanPlan plan) =>
        plan.Axes.Aggregate(plan.Axes.IsEmpty ? 0 : 1, (count, axis) => count * axis.Values.Length)
        + (plan.Scatter is null ? 0 : ScatterSteps + 1);

    /// <summary>Runs a plan.</summary>
    /// <param name="plan">What to scan.</param>
    /// <param name="solved">Told after each point, from any thread.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static ScanResult Run(ScanPlan plan, Action solved, CancellationToken cancellation = default) =>
        new Scanner(plan, solved, cancellation).Run();

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
            : ScanGrid.Solve(ScanGrid.Places(plan.Axes), At, solved, cancellation);
        var findings = plan.Axes.Length switch
        {
            0 => [],
            1 => Between(plan.Axes[0], 0, points),
            _ => new MapScan(plan, figures, function, nominal, points).Run(cancellation),
        };
        var scatter = plan.Scatter is { } s ? Scatter(s) : null;
        return new ScanResult(
            plan.Varied.Circuit, plan.Axes, figures, points, written, findings,
            FamilyScan.Of(plan, points, findings, cancellation), scatter);
    }

    private ScanPoint At(ImmutableArray<double> at)
    {
        var values = (double[])nominal.Clone();
        at.CopyTo(values);
        var isSloped = plan.Axes is [var only] && only.Values.Length <= MostSloped;
        return function.Point(values, at, isSloped ? 0 : -1);
    }

    private ImmutableArray<FigureScan> Between(ScanAxis axis, int index, ImmutableArray<ScanPoint> points)
    {
        var found = new FigureScan[figures.Length];
        Parallel.For(0, figures.Length, new ParallelOptions { CancellationToken = cancellation }, f =>
        {
            var samples = Samples(axis, points, f);
            found[f] = new AxisScan(
                plan.Varied.Circuit, figures[f], function.Along(index, nominal, f), Scale(points, f))
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

    /// <summary>The greatest magnitude of a figure over the points; of an extreme that of the other extreme
    /// too.</summary>
    private double Scale(ImmutableArray<ScanPoint> points, int figure)
    {
        var own = figures[figure];
        var isExtreme = own.Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum;
        var alike = Enumerable.Range(0, figures.Length).Where(f => f == figure
            || (isExtreme && figures[f].Index == own.Index
                && figures[f].Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum)).ToArray();
        return points.SelectMany(p => alike.Select(f => Math.Abs(p.Found?.Values[f] ?? 0)))
            .Where(double.IsFinite).DefaultIfEmpty().Max();
    }

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
        var points = ScanGrid.Solve(
            ScanGrid.Places([axis]),
            at => function.Point(Put(scatter.Index, at[0]), at, scatter.Index), solved, cancellation);
        var scans = Between(axis, scatter.Index, points);
        return new ScatterResult(
            scatter, axis, points,
            [.. scans.Select((scan, f) => Distribute(scan, axis, Samples(axis, points, f)))]);
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
                [.. Fractions.Select(f => new Quantile(f, distribution.Quantile(f)))], holding);
    }
}
