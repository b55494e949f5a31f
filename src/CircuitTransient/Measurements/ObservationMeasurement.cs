using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Breakdowns;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Measures an observed quantity: its extremes and what each cause has in them.</summary>
internal sealed class ObservationMeasurement(
    CurveBuilder curves, WindowTimes times, Infinities infinities, SinceEventBreakdown since,
    AnalysisOptions options, CancellationToken cancellation)
{
    private const int MostStretchesOfACause = 200_000;
    private const double WorthNaming = 0.05; // of the extreme: a pulse that has less does not make it

    private readonly TransientSolution solution = curves.Solution;
    private readonly ObservedExtremes extremes = new(infinities);
    private readonly ModeSplit modes = new(curves.Solution, options.By == Breakdown.Mode);
    private readonly SwitchingEffects switchings = new(curves, cancellation);

    /// <summary>Measures one observation; its waveforms are still to be filled in from the curves, the
    /// total's first.</summary>
    public (ObservationResult Result, ImmutableArray<Curve> Curves) Measure(Observation observation)
    {
        var window = times.Of(observation.Window);
        if (curves.Of(observation.Quantity) is not { } total || window is not { } open)
        {
            return (Undetermined(observation), []);
        }

        var gathered = CurveBuilder.GatheredFrom(observation.Quantity, open.From);
        total = gathered > 0 ? curves.Of(observation.Quantity, from: gathered)! : total;

        var (max, min) = extremes.Of(observation.Quantity, total, open);
        var shares = Shares(observation.Quantity, open);
        ImmutableArray<Contribution> contributions =
            [.. shares.Select(s => Contribution(observation.Quantity, s, max, min, open))];
        var final = FinalValue.Of(total);
        var result = new ObservationResult(
            observation.Name,
            observation.Unit,
            total.ValueAt(solution, open.From),
            total.ValueAt(solution, open.To, before: open.To > open.From),
            final,
            max,
            min,
            !curves.IsAccumulated(observation.Quantity) && EndsRising(total, final, max, min),
            contributions,
            new ContributionsAfter(Since(observation.Quantity, max), Since(observation.Quantity, min)),
            [.. options.At.Select(t => Sample(t, total, shares))],
            [],
            [])
        {
            Pulses = QuantityFactors.IsQuadratic(observation.Quantity)
                ? []
                : [.. Pulses(observation.Quantity, contributions, max, min, open)],
            BySwitching = options.By == Breakdown.Switching
                ? switchings.Of(observation.Quantity, gathered, max, min)
                : null,
            ByMode = modes.Of(observation.Quantity, max, min),
            Window = open == (0, solution.Until) ? null : open,
        };
        return (result, [total, .. shares.Select(s => s.Curve)]);
    }

    private List<(string Name, Share Share, int Cause, Curve Curve)> Shares(
        Measurand quantity, (double From, double To) window)
    {
        var shares = new List<(string, Share, int, Curve)>();
        var from = CurveBuilder.GatheredFrom(quantity, window.From);
        for (var c = 0; c < solution.Causes.Length; c++)
        {
            shares.Add((solution.Causes[c].Name, Share.Own, c, curves.Of(quantity, Share.Own, c, from)!));
        }

        if (QuantityFactors.IsQuadratic(quantity))
        {
            shares.Add(("joint", Share.Joint, -1, curves.Of(quantity, Share.Joint, -1, from)!));
        }

        return shares;
    }

    private Contribution Contribution(
        Measurand quantity, (string Name, Share Share, int Cause, Curve Curve) share, Extreme max,
        Extreme min, (double From, double To) window)
    {
        var atMax = At(share.Curve, max);
        var atMin = At(share.Curve, min);
        var ownMax = Search(share.Curve, window, greatest: true);
        var ownMin = Search(share.Curve, window, greatest: false);
        if (share.Share == Share.Joint)
        {
            return new Contribution(share.Name, atMax, atMin, ownMax, ownMin, null, null);
        }

        var from = CurveBuilder.GatheredFrom(quantity, window.From);
        // Nothing else asks for it: kept, it would hold the memory of every cause on every segment.
        var without = new CurveBuilder(curves).Of(quantity, Share.Without, share.Cause, from)!;
        return new Contribution(
            share.Name, atMax, atMin, ownMax, ownMin,
            Search(without, window, greatest: true), Search(without, window, greatest: false));
    }

    private IEnumerable<PulseShare> Pulses(
        Measurand quantity, ImmutableArray<Contribution> contributions, Extreme max, Extreme min,
        (double From, double To) window)
    {
        var pulses = Enumerable.Range(0, solution.Causes.Length)
            .Where(c => solution.Causes[c].Pulse is not null)
            .GroupBy(c => (solution.Causes[c].Source, solution.Causes[c].Pulse));
        foreach (var pulse in pulses)
        {
            var atMax = pulse.Sum(c => contributions[c].AtMax);
            var atMin = pulse.Sum(c => contributions[c].AtMin);
            if (IsWorth(atMax, max) || IsWorth(atMin, min))
            {
                var without = new CurveBuilder(curves).WithoutAll(quantity, [.. pulse])!;
                yield return new PulseShare(
                    $"{solution.Circuit.Parts[pulse.Key.Source].Name} {pulse.Key.Pulse}",
                    max.Value is null ? null : atMax, min.Value is null ? null : atMin,
                    Search(without, window, greatest: true), Search(without, window, greatest: false));
            }
        }

        static bool IsWorth(double? share, Extreme extreme) => extreme.Value is { } value
            && Math.Abs(share ?? 0) >= WorthNaming * Math.Abs(value) && share is not 0;
    }

    /// <summary>The value where an extreme stands; null where that is infinite and so is its share.</summary>
    private double? At(Curve curve, Extreme extreme) => extreme.Value is null
        ? null
        : curve.ValueAt(solution, extreme.Time, extreme.Side == InstantSide.Before);

    private SinceEvent? Since(Measurand quantity, Extreme extreme) =>
        extreme.Value is null || curves.IsAccumulated(quantity)
            ? null
            : since.At(quantity, extreme.Time, extreme.Side != InstantSide.After,
                times.IntervalOf(options.After));

    private static TimedValue Search(Curve curve, (double From, double To) window, bool greatest)
    {
        var found = greatest
            ? ExtremeSearch.Greatest(curve, window.From, window.To, MostStretchesOfACause)
            : ExtremeSearch.Least(curve, window.From, window.To, MostStretchesOfACause);
        return new TimedValue(found.Value, found.Time);
    }

    private SampleAt Sample(double time, Curve total,
        List<(string Name, Share Share, int Cause, Curve Curve)> shares) =>
        new(time, total.ValueAt(solution, time),
            [.. shares.Select(s => (double?)s.Curve.ValueAt(solution, time))]);

    /// <summary>Whether a later end would show more. A limit that is all but reached is no news, nor is one
    /// where the end was chosen by how far the modes have fallen.</summary>
    private bool EndsRising(Curve total, double? final, Extreme max, Extreme min)
    {
        const double nearly = 1e-3; // of the limit, as far as modes fall where the end is chosen
        var greatest = Math.Abs(min.Value ?? 0) > Math.Abs(max.Value ?? 0) ? min : max;
        if (greatest.Time != solution.Until || greatest.Value is not { } value
            || (final is { } limit && (solution.UntilReason is not null
                || Math.Abs(limit - value) <= nearly * Math.Abs(limit))))
        {
            return false;
        }

        var last = total.Pieces[^1];
        Span<double> phi = new double[last.Segment.Basis.Width];
        last.Segment.Basis.Evaluate(last.Segment.Length, phi);
        var slope = last.At(last.Segment.Length, phi).Slope * Math.Sign(value);
        // still growing by a thousandth a study's length
        return slope * solution.Until > 1e-3 * Math.Abs(value);
    }

    private ObservationResult Undetermined(Observation observation)
    {
        var nothing = new Extreme(null, 0, InstantSide.At, null);
        var contributions =
            solution.Causes.Select(c => new Contribution(c.Name, null, null, null, null, null, null));
        return new ObservationResult(
            observation.Name, observation.Unit, null, null, null, nothing, nothing, false, [.. contributions],
            null,
            [.. options.At
                .Select(t => new SampleAt(t, null, [.. solution.Causes.Select(_ => (double?)null)]))],
            [], []);
    }
}
