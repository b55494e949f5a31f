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
public static class ResultBuilder
{
    /// <summary>Takes all measurements.</summary>
    /// <param name="solution">The solved study.</param>
    /// <param name="warnings">The warnings of the stages before.</param>
    /// <param name="options">What was asked for beyond the file.</param>
    /// <param name="cancellation">Stops the work.</param>
    public static TransientResult Measure(
        TransientSolution solution,
        ImmutableArray<Diagnostic> warnings,
        AnalysisOptions options,
        CancellationToken cancellation = default)
    {
        var circuit = solution.Circuit;
        var curves = new CurveBuilder(solution);
        var times = new WindowTimes(solution);
        var infinities = new Infinities(curves);
        var energy = new StoredEnergy(curves);
        var intervals = new IntervalMeasurement(solution, energy);
        var events = new EventMeasurement(curves);
        var observing = new ObservationMeasurement(
            curves, times, infinities, new SinceEventBreakdown(solution, cancellation), options,
            cancellation);
        var reading = new FigureMeasurement(curves, times, infinities);
        var judging = new RequirementMeasurement(curves, times, infinities, reading);
        var grams = solution.Segments.Select(GramIntegral.Of).ToArray();

        var own = new CurveBuilder(curves);
        var checking =
            Task.Run(() => SelfChecks.Run(own, new StoredEnergy(own), s => grams[s]), cancellation);

        var observed = circuit.Observations.Where(o => o.Quantity is not Figure)
            .Select(o => Unless(observing.Measure(o), cancellation)).ToArray();
        var parts = PartStresses.Of(curves, s => grams[s], cancellation);
        var requirements =
            circuit.Requirements.Select(r => Unless(judging.Judge(r), cancellation) with
            {
                Doubt = LinearLimits.Doubt(parts),
            }).ToImmutableArray();
        var waves = SampledWaves.Of(
            solution, observed, options.SampleCount,
            [
                .. observed.SelectMany(o => Peaks(o.Result)),
                .. requirements.Select(r => r.Worst.Time).Where(t => t >= 0 && t <= solution.Until),
            ]);
        var intervalResults = solution.Intervals.Select(intervals.Measure).ToImmutableArray();
        var eventResults = solution.Occurrences.Select(events.Measure).ToImmutableArray();
        var (checks, notJudged) = checking.GetAwaiter().GetResult();
        return new TransientResult(
            circuit,
            solution.Until,
            solution.UntilReason,
            [.. solution.Causes.Select(c => NameOf(circuit, c))],
            intervalResults,
            eventResults,
            waves.Times,
            waves.Observations,
            [.. circuit.Observations.Where(o => o.Quantity is Figure)
                .Select(o => Unless(reading.Measure(o), cancellation))],
            requirements,
            parts,
            checks,
            notJudged,
            Notices.Of(solution, warnings, waves.Observations),
            new CautionFinder(curves, parts, intervalResults, eventResults).Find())
        {
            IsAfterAsked = options.After is not null,
            By = options.By,
            FollowedWaves = new(() => FollowedWaves.Of(curves, times, waves.Times)),
            OtherWaves = new(() => OtherBreakdowns.Of(solution, waves, cancellation)),
        };
    }

    private static CauseName NameOf(Circuit circuit, Cause cause) => cause switch
    {
        { IsEdge: true } => new(cause.Name, CauseKind.Edge, circuit.Parts[cause.Source].Name)
        {
            Pulse = cause.Pulse is { } pulse ? $"{circuit.Parts[cause.Source].Name} {pulse}" : null,
            From = cause.Pieces[0].Start,
        },
        { Source: >= 0 } => new(cause.Name, CauseKind.Source),
        _ => new(cause.Name, CauseKind.Stored),
    };

    private static IEnumerable<double> Peaks(ObservationResult result) => [result.Max.Time, result.Min.Time];

    private static T Unless<T>(T value, CancellationToken cancellation)
    {
        cancellation.ThrowIfCancellationRequested();
        return value;
    }
}
