using System.Collections.Immutable;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Many points at once, on several threads; what comes out does not depend on how many.</summary>
internal sealed class PointBatch(
    VariedCircuit varied, ImmutableArray<StudyFigure> figures, int threads, CancellationToken cancellation)
{
    private const int PointsInPiece = 16; // enough to spread the cost of handing them out

    public VariedCircuit Varied => varied;

    public ImmutableArray<StudyFigure> Figures => figures;

    public int ValueCount => varied.Values.Length;

    public CancellationToken Cancellation => cancellation;

    /// <summary>Works out the figures of points that stand one after another.</summary>
    public BatchFigures At(double[] points)
    {
        var (k, f) = (ValueCount, figures.Length);
        var count = points.Length / k;
        var found = new BatchFigures(new double[count * f], new double[count * f], new bool[count], f);
        var options = new ParallelOptions
        {
            MaxDegreeOfParallelism = threads,
            CancellationToken = cancellation,
        };
        var pieces = (count + PointsInPiece - 1) / PointsInPiece;
        Parallel.For(
            0, pieces, options,
            () => new FigureEvaluator(varied, figures),
            (piece, _, evaluator) =>
            {
                for (var i = piece * PointsInPiece; i < Math.Min(count, (piece + 1) * PointsInPiece); i++)
                {
                    found.Solved[i] = evaluator.TryAt(
                        points.AsSpan(i * k, k), found.Values.AsSpan(i * f, f),
                        found.Times.AsSpan(i * f, f), cancellation);
                }

                return evaluator;
            },
            _ => { });
        return found;
    }
}

/// <summary>The figures of several points, one point after another; NaN where there is none.</summary>
internal sealed record BatchFigures(double[] Values, double[] Times, bool[] Solved, int FigureCount)
{
    public double Value(int point, int figure) => Values[(point * FigureCount) + figure];

    public double Time(int point, int figure) => Times[(point * FigureCount) + figure];
}
