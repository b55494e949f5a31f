using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Breakdowns;
using CircuitTransient.Measurements.Cautions;
using CircuitTransient.Measurements.Checks;
using CircuitTransient.Measurements.Figures;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;
using CircuitTransient.Text;

namespace CircuitTransient.Measurements;

/// <summary>Measures a solved study: from closed forms to every figure a user is told.</summary>
public sealed class ResultBuilder
{
    private readonly TransientSolution solution;
    private readonly Circuit circuit;
    private readonly AnalysisOptions options;
    private readonly CancellationToken cancellation;
    private readonly CurveBuilder curves;
    private readonly WindowTimes times;
    private readonly Infinities infinities;
    private readonly StoredEnergy energy;
    private readonly FigureMeasurement reading;
    private readonly double[][,] grams;
    private readonly ObservationMeasurement observing;

    private ResultBuilder(TransientSolution solution, AnalysisOptions options, CancellationToken cancellation)
    {
        (this.solution, this.options, this.cancellation) = (solution, options, cancellation);
        circuit = solution.Circuit;
        curves = new CurveBuilder(solution);
        times = new WindowTimes(solution);
        infinities = new Infinities(curves);
        energy = new StoredEnergy(curves);
        reading = new FigureMeasurement(curves, times, infinities);
        observing = new ObservationMeasurement(
            curves, times, infinities, new SinceEventBreakdown(solution, cancellation), options,
            cancellation);
        grams = [.. solution.Segments.Select(GramIntegral.Of)];
    }

    /// <summary>Takes all measurements.</summary>
    /// <param name="solution">The solved study.</param>
    /// <param name="warnings">The warnings of the stages before.</param>
    /// <param name="options">What was asked for beyond the file.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static TransientResult Measure(
        TransientSolution solution,
        ImmutableArray<Diagnostic> warnings,
        AnalysisOptions options,
        CancellationToken cancellation = default) =>
        new ResultBuilder(solution, options, cancellation).Measure(warnings);

    private TransientResult Measure(ImmutableArray<Diagnostic> warnings)
    {
        var checking = Check();
        var observed = Observe();
        var parts = PartStresses.Of(curves, s => grams[s], cancellation);
        var requirements = Judge(LinearLimits.Doubt(parts), [.. observed.Select(o => o.Result)]);
        var waves = Sample(observed, requirements);
        var intervals = solution.Intervals.Select(new IntervalMeasurement(solution, energy).Measure)
            .ToImmutableArray();
        var seen = new EventMeasurement(curves, cancellation);
        var events = solution.Occurrences.Select(seen.Measure).ToImmutableArray();
        var followed = options.IsForPage ? FollowedWaves.Of(curves, times, waves.Times) : [];
        var otherwise = options.IsForPage ? OtherBreakdowns.Of(solution, waves, cancellation) : [];
        var (checks, notJudged) = checking.GetAwaiter().GetResult();
        return new TransientResult(
            circuit,
            solution.Until,
            solution.UntilReason,
            [.. solution.Causes.Select(NameOf)],
            intervals,
            events,
            waves.Times,
            waves.Observations,
            Read(),
            requirements,
            parts,
            checks,
            notJudged,
            Notices.Of(solution, warnings, waves.Observations),
            new CautionFinder(curves, parts, intervals, events).Find())
        {
            IsAfterAsked = options.After is not null,
            After = options.After,
            By = options.By,
            Followed = followed,
            OtherBreakdowns = otherwise,
        };
    }

    /// <summary>The self-checks run beside the measurements, on curves of their own.</summary>
    private Task<(ImmutableArray<SelfCheck> Checks, ImmutableArray<NotJudged> NotJudged)> Check()
    {
        var own = new CurveBuilder(curves);
        return Task.Run(() => SelfChecks.Run(own, new StoredEnergy(own), s => grams[s]), cancellation);
    }

    private (ObservationResult Result, ImmutableArray<Curve> Curves)[] Observe() =>
        [.. Each(Waveforms, observing.Measure)];

    private ImmutableArray<FigureResult> Read() =>
        [.. Each(circuit.Observations.Where(o => o.Quantity is Figure), reading.Measure)];

    private ImmutableArray<RequirementResult> Judge(
        string? doubt, ImmutableArray<ObservationResult> observed)
    {
        var judging = new RequirementMeasurement(curves, times, infinities, reading);
        return
        [
            .. Each(circuit.Requirements, requirement =>
            {
                var verdict = judging.Judge(requirement);
                return verdict with { Doubt = doubt, Within = Within(requirement, verdict, observed) };
            }),
        ];
    }

    /// <summary>What makes a worst value that no observation has among its extremes.</summary>
    private ObservationResult? Within(
        Requirement requirement, RequirementResult verdict, ImmutableArray<ObservationResult> observed)
    {
        if (requirement is not { Bound: Limits, Quantity: not Figure } || verdict.Worst.Value is null
            || Waveforms.Zip(observed).Any(pair => IsExtreme(pair.First, pair.Second)))
        {
            return null;
        }

        var measured = observing.Measure(new Observation(
            requirement.Name, requirement.Unit, requirement.Quantity, requirement.Window, requirement.Span));
        return JudgedExtreme.IsMax(measured.Result, verdict.Worst, 1, solution.Until) is null
            ? null
            : measured.Result;

        bool IsExtreme(Observation observation, ObservationResult result) =>
            SameQuantity.Sign(circuit, observation.Quantity, requirement.Quantity) is not 0 and var sign
            && JudgedExtreme.IsMax(result, verdict.Worst, sign, solution.Until) is not null;
    }

    /// <summary>The observations that are waveforms, and no figures read off them.</summary>
    private IEnumerable<Observation> Waveforms => circuit.Observations.Where(o => o.Quantity is not Figure);

    private SampledWaves Sample(
        (ObservationResult Result, ImmutableArray<Curve> Curves)[] observed,
        ImmutableArray<RequirementResult> requirements) =>
        SampledWaves.Of(
            solution, observed, options.SampleCount,
            [
                .. observed.SelectMany(o => (double[])[o.Result.Max.Time, o.Result.Min.Time]),
                .. requirements.Select(r => r.Worst.Time).Where(t => t >= 0 && t <= solution.Until),
            ]);

    private IEnumerable<TResult> Each<T, TResult>(IEnumerable<T> all, Func<T, TResult> measure)
    {
        foreach (var one in all)
        {
            yield return measure(one);
            cancellation.ThrowIfCancellationRequested();
        }
    }

    private CauseName NameOf(Cause cause) => cause switch
    {
        { IsEdge: true } => new(cause.Name, CauseKind.Edge, circuit.Parts[cause.Source].Name)
        {
            Pulse = cause.Pulse is { } pulse ? $"{circuit.Parts[cause.Source].Name} {pulse}" : null,
            From = cause.Pieces[0].Start,
        },
        { Source: >= 0 } => new(cause.Name, CauseKind.Source),
        _ => new(cause.Name, CauseKind.Stored),
    };
}
