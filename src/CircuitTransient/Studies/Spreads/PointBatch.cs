using System.Collections.Concurrent;
using System.Collections.Immutable;
using CircuitTransient.Studies.Draws;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Many points at once, on several threads; what comes out does not depend on how many.</summary>
internal sealed class PointBatch
{
    private const int PointsInPiece = 16; // enough to spread the cost of handing them out

    private readonly ConcurrentBag<FigureEvaluator> idle = [];

    /// <summary>Prepares the fast evaluation.</summary>
    /// <param name="varied">The circuit and what varies in it.</param>
    /// <param name="figures">The figures to follow; the ranges that parts are linear in are followed
    /// beside them.</param>
    /// <param name="threads">How many threads work.</param>
    /// <param name="cancellation">Stops the work.</param>
    public PointBatch(
        VariedCircuit varied, ImmutableArray<StudyFigure> figures, int threads,
        CancellationToken cancellation)
    {
        (Varied, Cancellation, Threads) = (varied, cancellation, threads);
        (Reported, Figures) = (figures, [.. figures, .. StudyFigures.LinearRanges(varied.Circuit)]);
        (Kernel, var reason) = DrawKernel.For(varied, Figures, cancellation);
        var unserved = Kernel?.Unserved.Select((why, f) => why is null ? null : $"{Figures[f].Name}: {why}");
        WhyExact = reason ?? unserved!.FirstOrDefault(words => words is not null);
    }

    /// <summary>The circuit and what varies in it.</summary>
    public VariedCircuit Varied { get; }

    /// <summary>The figures that are followed: those asked for, then the used fractions of the ranges that
    /// parts are linear in.</summary>
    public ImmutableArray<StudyFigure> Figures { get; }

    /// <summary>The first of them, which were asked for.</summary>
    public ImmutableArray<StudyFigure> Reported { get; }

    /// <summary>The fast evaluation; null where there is none.</summary>
    public DrawKernel? Kernel { get; }

    /// <summary>Stops the work.</summary>
    public CancellationToken Cancellation { get; }

    /// <summary>How many threads work.</summary>
    public int Threads { get; }

    /// <summary>Why some or all figures go to the exact engine at every point; null where none
    /// does.</summary>
    public string? WhyExact { get; }

    /// <summary>What two values of a figure must differ by to be told apart, as a fraction: the fast
    /// evaluation is good to less than that.</summary>
    public double Resolution => Kernel is null ? 1e-9 : 1e-7;

    /// <summary>How many values vary.</summary>
    public int ValueCount => Varied.Values.Length;

    /// <summary>Works out the figures of points that stand one after another.</summary>
    public BatchFigures At(double[] points)
    {
        var count = points.Length / ValueCount;
        var found = new BatchFigures(
            new double[count * Figures.Length], new double[count * Figures.Length], new bool[count],
            Figures.Length);
        var pieces = (count + PointsInPiece - 1) / PointsInPiece;
        if (pieces <= 1 || Threads == 1)
        {
            Solve(points, found, 0, count);
            return found;
        }

        var options = new ParallelOptions
        {
            MaxDegreeOfParallelism = Threads,
            CancellationToken = Cancellation,
        };
        Parallel.For(0, pieces, options, piece => Solve(
            points, found, piece * PointsInPiece, Math.Min(count, (piece + 1) * PointsInPiece)));
        return found;
    }

    private void Solve(double[] points, BatchFigures found, int from, int to)
    {
        var (k, f) = (ValueCount, Figures.Length);
        var evaluator = idle.TryTake(out var taken) ? taken : new FigureEvaluator(Varied, Figures, Kernel);
        for (var i = from; i < to; i++)
        {
            Cancellation.ThrowIfCancellationRequested();
            found.Solved[i] = evaluator.TryAt(
                points.AsSpan(i * k, k), found.Values.AsSpan(i * f, f), found.Times.AsSpan(i * f, f),
                Cancellation);
        }

        idle.Add(evaluator);
    }
}

/// <summary>The figures of several points, one point after another; NaN where there is none.</summary>
internal sealed record BatchFigures(double[] Values, double[] Times, bool[] Solved, int FigureCount)
{
    public double Value(int point, int figure) => Values[(point * FigureCount) + figure];

    public double Time(int point, int figure) => Times[(point * FigureCount) + figure];
}
