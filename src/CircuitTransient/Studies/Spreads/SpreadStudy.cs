using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Studies.Sensitivities;

namespace CircuitTransient.Studies.Spreads;

/// <summary>The study of a circuit's tolerances: the hard extremes first, then random draws, never mixed. The
/// draws can be broken off, saved and taken up again.</summary>
public sealed class SpreadStudy
{
    private readonly PointBatch batch;
    private readonly TransientResult nominal;
    private readonly SpreadOptions options;
    private readonly CancellationToken cancellation;
    private readonly SearchAccount account;
    private readonly ImmutableArray<FigureRange> figures;
    private readonly ImmutableArray<LinearRange> linear;
    private readonly JumpFindings jumps;
    private readonly SensitivityFindings sensitivities;
    private readonly DrawStudy? draws;

    /// <summary>Finds the extremes; the draws are still to be made.</summary>
    /// <param name="varied">The circuit and its values that have a tolerance, at least one.</param>
    /// <param name="nominal">Its nominal result.</param>
    /// <param name="options">What is asked for.</param>
    /// <param name="report">Is told how far the work has come.</param>
    /// <param name="cancellation">Stops the work.</param>
    public SpreadStudy(
        VariedCircuit varied, TransientResult nominal, SpreadOptions options, Action<SpreadProgress> report,
        CancellationToken cancellation)
    {
        (this.nominal, this.options, this.cancellation) = (nominal, options, cancellation);
        batch = new PointBatch(varied, StudyFigures.Of(varied.Circuit), options.Threads, cancellation);
        (account, figures, linear, jumps) = new ExtremeStudy(batch, nominal).Run(report);
        report(new SpreadProgress("sensitivities", 0, 0));
        sensitivities = SensitivityFindings.Of(varied, batch.Reported, cancellation);
        draws = options.Draws == 0 ? null : new DrawStudy(
            batch, options,
            [.. figures.Select(Between), .. linear.Select(_ => (0.0, 1.0))]);
    }

    /// <summary>How many draws are made.</summary>
    public long DrawsDone => draws?.Done ?? 0;

    /// <summary>Makes the draws that are left, and puts everything together.</summary>
    /// <param name="report">Is told how far the work has come.</param>
    /// <param name="details">Stretches in which the waveforms' bands are sampled closely.</param>
    public SpreadResult Finish(
        Action<SpreadProgress> report, ImmutableArray<WaveformDetail> details = default)
    {
        draws?.Run(report);
        report(new SpreadProgress("waveforms", 0, 0));
        var bands = draws is null ? [] : Envelopes.Of(
            batch, nominal, details.IsDefault ? [] : details,
            draws.FirstPoints(Envelopes.DrawCount(nominal, options.Draws)), options.Threads);
        return new SpreadResult(
            batch.Varied, options, nominal, account, figures, linear, jumps, Worst(), draws?.Finish(bands),
            sensitivities);
    }

    /// <summary>Writes the draws made so far.</summary>
    public void SaveDraws(BinaryWriter to) => draws?.Save(to);

    /// <summary>Takes up draws that were saved by the same study.</summary>
    public void LoadDraws(BinaryReader from) => draws?.Load(from);

    /// <summary>The range over which a figure's values are counted; an interior extreme may still lie a
    /// little outside what the search saw.</summary>
    private static (double From, double To) Between(FigureRange figure)
    {
        var (low, high) = (figure.Least?.Value ?? 0, figure.Greatest?.Value ?? 0);
        (low, high) = (double.IsFinite(low) ? low : high, double.IsFinite(high) ? high : low);
        var margin = 0.01 * (high - low);
        return double.IsFinite(low) ? (low - margin, high + margin) : (0, 1);
    }

    /// <summary>The requirement or rating that uses most of what is allowed; where nothing is judged, the
    /// observed extreme that grows most.</summary>
    private WorstCase? Worst()
    {
        var circuit = batch.Varied.Circuit;
        var ranked = Enumerable.Range(0, figures.Length)
            .Where(f => figures[f].Worst is not null)
            .Select(f =>
                (Index: f, Used: Judgement.Used(circuit, figures[f].Figure, figures[f].Worst!.Value)))
            .ToArray();
        var isJudged = ranked.Any(r => !double.IsNaN(r.Used));
        var chosen = ranked
            .Where(r => !isJudged || !double.IsNaN(r.Used))
            .OrderByDescending(r => isJudged ? r.Used : Growth(figures[r.Index]))
            .Select(r => ((int Index, double Used)?)r)
            .FirstOrDefault();
        if (chosen is not var (index, used))
        {
            return null;
        }

        var point = figures[index].Worst!;
        var worst = batch.Varied.At([.. point.Point]).Value!;
        var solved = TransientSolver.Solve(worst, CauseList.FromStart(worst), cancellation);
        return solved.Value is { } solution
            ? new WorstCase(
                index, point, used,
                ResultBuilder.Measure(solution, [], AnalysisOptions.WithoutPage, cancellation),
                IsSteepest(figures[index].Figure, point))
            : null;
    }

    /// <summary>Whether every derivative at a worst point points out of the ranges.</summary>
    private bool? IsSteepest(StudyFigure figure, ExtremePoint point)
    {
        var derived = SensitivityAnalysis.Of(batch.Varied, point.Point.AsSpan(), cancellation).Value;
        if (derived?.Of(figure) is not { } slopes)
        {
            return null;
        }

        var sign = figure.Kind is StudyFigureKind.Margin or StudyFigureKind.Minimum ? -1 : 1;
        bool? isSteepest = true;
        for (var i = 0; i < point.Point.Length; i++)
        {
            if (point.Matters[i] && slopes.Slopes[i] is null)
            {
                isSteepest = null;
            }
            else if (point.Matters[i])
            {
                var tolerance = batch.Varied.Values[i].Tolerance!;
                var outwards = point.Point[i] == tolerance.Highest ? 1
                    : point.Point[i] == tolerance.Lowest ? -1 : 0;
                if (sign * outwards * slopes.Slopes[i] <= 0)
                {
                    return false;
                }
            }
        }

        return isSteepest;
    }

    private static double Growth(FigureRange figure) =>
        figure.Figure.Kind is StudyFigureKind.Maximum or StudyFigureKind.Minimum
            && figure.Nominal is { } nominal && nominal != 0
            ? Math.Abs((figure.Worst!.Value - nominal) / nominal)
            : 0;
}
