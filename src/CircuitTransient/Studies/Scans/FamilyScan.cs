using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Scans;

/// <summary>The waveforms that stand for a scan: some spread over the range, the circuit as written, the
/// worst.</summary>
internal static class FamilyScan
{
    private const int MostSpread = 9;
    private const int SampleCount = 700;
    private const int CloseUpCount = 400;
    private const double CloseUpLength = 6; // times as long as from the switching to the peak

    /// <summary>The family; null where there is no waveform to draw.</summary>
    public static ScanFamily? Of(
        ScanPlan plan, ImmutableArray<ScanPoint> points, ImmutableArray<FigureScan> findings,
        CancellationToken cancellation)
    {
        if (plan.Axes.IsEmpty || Subject(plan.Varied.Circuit, findings) is not { } subject)
        {
            return null;
        }

        var members = Places(plan, points, subject.Worst)
            .AsParallel().AsOrdered().WithCancellation(cancellation)
            .Select(place => Member(plan, subject, place.At, place.Role, cancellation))
            .OfType<FamilyMember>().ToImmutableArray();
        return members.IsEmpty ? null
            : new ScanFamily(
                subject.Name, subject.Unit, subject.Requirement, Moved(plan)?.Name, members);
    }

    /// <summary>The quantity of the requirement that comes nearest to breaking; where none is, of what was
    /// first observed.</summary>
    private static Subject? Subject(Circuit circuit, ImmutableArray<FigureScan> findings)
    {
        var tightest = findings
            .Where(f => f.Figure.Kind == StudyFigureKind.Margin
                && circuit.Requirements[f.Figure.Index].Quantity is not Figure)
            .MinBy(f => f.Room);
        if (tightest is not null)
        {
            var required = circuit.Requirements[tightest.Figure.Index];
            return new Subject(
                required.Name, required.Unit, required.Quantity, tightest.Figure.Index, -1,
                tightest.Worst?.At);
        }

        var index = Enumerable.Range(0, circuit.Observations.Length)
            .FirstOrDefault(i => circuit.Observations[i].Quantity is not Figure, -1);
        if (index < 0)
        {
            return null;
        }

        var observed = circuit.Observations[index];
        var peak = findings.Where(f => f.Figure.Index == index && f.Figure.Kind is StudyFigureKind.Maximum
                or StudyFigureKind.Minimum)
            .Select(f => f.Figure.Kind == StudyFigureKind.Maximum ? f.Greatest : f.Least)
            .OfType<ScanPlace>().MaxBy(p => Math.Abs(p.Value));
        return new Subject(observed.Name, observed.Unit, observed.Quantity, -1, index, peak?.At);
    }

    private static IEnumerable<(ImmutableArray<double> At, FamilyRole Role)> Places(
        ScanPlan plan, ImmutableArray<ScanPoint> points, ImmutableArray<double>? worst)
    {
        var solved = points.Where(p => p.Found is not null).ToArray();
        var count = Math.Min(MostSpread, solved.Length);
        var spread = Enumerable.Range(0, count)
            .Select(k => solved[count == 1 ? 0 : k * (solved.Length - 1) / (count - 1)].At);
        ImmutableArray<double> written = [.. plan.Axes.Select((_, i) => plan.Varied.Values[i].Nominal)];
        foreach (var at in plan.Axes.Length == 1 ? spread : Corners(plan))
        {
            if (!at.SequenceEqual(written) && !(worst is { } w && at.SequenceEqual(w)))
            {
                yield return (at, FamilyRole.Spread);
            }
        }

        yield return (written, FamilyRole.AsWritten);
        if (worst is { } place)
        {
            yield return (place, FamilyRole.Worst);
        }
    }

    private static IEnumerable<ImmutableArray<double>> Corners(ScanPlan plan)
    {
        var (first, second) = (plan.Axes[0], plan.Axes[1]);
        return [[first.From, second.From], [first.From, second.To], [first.To, second.From],
            [first.To, second.To]];
    }

    private static FamilyMember? Member(
        ScanPlan plan, Subject subject, ImmutableArray<double> at, FamilyRole role,
        CancellationToken cancellation)
    {
        var values = plan.Varied.Values.Select(v => v.Nominal).ToArray();
        at.CopyTo(values);
        var solved = plan.Varied.At(values)
            .Then(c => TransientSolver.Solve(c, CauseList.FromStart(c), cancellation));
        if (solved.Value is not { } solution)
        {
            return null;
        }

        if (new WindowTimes(solution).Of(subject.WindowIn(solution.Circuit)) is not { } open
            || new CurveBuilder(solution).Of(subject.Quantity) is not { } curve)
        {
            return null;
        }

        var max = ExtremeSearch.Greatest(curve, open.From, open.To);
        var min = ExtremeSearch.Least(curve, open.From, open.To);
        var peak = Math.Abs(min.Value) > Math.Abs(max.Value) ? min.Time : max.Time;
        var start = Math.Max(solution.Occurrences.LastOrDefault(o => o.Time <= peak)?.Time ?? 0, open.From);
        var origin = solution.Occurrences.FirstOrDefault(o => o.Event == Moved(plan)?.Event)?.Time ?? 0;
        var times = SampleTimes.Of(
            solution, SampleCount,
            [max.Time, min.Time, .. CloseUp(start, peak, solution.Until), .. After(origin, solution.Until)],
            ModeRelevance.Of(solution, [curve]));
        return new FamilyMember(
            at, role, times, Waveform.Of([curve], solution, times)[0],
            origin, start, peak, open.To);
    }

    /// <summary>Instants ever closer towards an event, so that any enlargement about it is smooth.</summary>
    private static IEnumerable<double> After(double origin, double until) => Enumerable.Range(0, CloseUpCount)
        .Select(k => origin + ((until - origin) * Math.Pow(1e-5, (k + 1.0) / CloseUpCount)));

    /// <summary>The event that is scanned; null where none is.</summary>
    private static VariedValue? Moved(ScanPlan plan) =>
        plan.Axes.FirstOrDefault(a => a.Varied.Kind == VariedKind.EventTime)?.Varied;

    /// <summary>Instants close together about a peak that is short in the whole study.</summary>
    private static IEnumerable<double> CloseUp(double start, double peak, double until)
    {
        var length = Math.Min(CloseUpLength * (peak - start), until - start);
        return Enumerable.Range(0, CloseUpCount).Select(k => start + (length * k / CloseUpCount));
    }
}

/// <summary>The quantity a family shows.</summary>
/// <param name="Requirement">Index of the requirement it is taken from; −1 for an observation.</param>
/// <param name="Observation">Index of the observation; −1 for a requirement.</param>
/// <param name="Worst">The scanned values at which it is worst; null where none is known.</param>
internal sealed record Subject(
    string Name, string Unit, Measurand Quantity, int Requirement, int Observation,
    ImmutableArray<double>? Worst)
{
    /// <summary>When it counts, in a circuit with other values.</summary>
    public Window WindowIn(Circuit circuit) => Requirement >= 0
        ? circuit.Requirements[Requirement].Window
        : circuit.Observations[Observation].Window;
}
