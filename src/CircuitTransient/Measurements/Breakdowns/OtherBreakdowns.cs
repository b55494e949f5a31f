using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>Breaks the observed waveforms of a solution down by edge and since its switchings.</summary>
internal sealed class OtherBreakdowns
{
    private const int MostEdges = 48; // more are named in results.json with `--by edge`
    private const int TermsNamed = 10; // of one waveform by edge; the rest joins, source by source
    private const int MostSwitchings = 6;
    private const int MostParts = 24; // sources and stores of a breakdown since a switching
    private const int MostTerms = 1000; // of all observations: half of what a page of samples holds

    private readonly TransientSolution solution;
    private readonly ImmutableArray<Observation> observed;
    private readonly ImmutableArray<ObservationResult> results;
    private readonly ImmutableArray<double> times;
    private readonly CancellationToken cancellation;
    private int terms;

    private OtherBreakdowns(
        TransientSolution solution, SampledWaves waves, CancellationToken cancellation)
    {
        this.solution = solution;
        this.cancellation = cancellation;
        observed = solution.Circuit.Observations.RemoveAll(o => o.Quantity is Figure);
        (times, results) = (waves.Times, waves.Observations);
    }

    /// <summary>The breakdowns there is room for.</summary>
    public static ImmutableArray<OtherBreakdown> Of(
        TransientSolution solution, SampledWaves waves, CancellationToken cancellation)
    {
        var breaking = new OtherBreakdowns(solution, waves, cancellation);
        return [.. new[] { breaking.ByEdge() }.Concat(breaking.SinceSwitchings()).OfType<OtherBreakdown>()];
    }

    private OtherBreakdown? ByEdge()
    {
        if (CauseList.ByEdge(solution.Circuit).Value is not { Causes: { Length: <= MostEdges } edges } list
            || edges.Length == solution.Causes.Length || solution.Causes.Any(c => c.IsEdge)
            || !HasRoom(Math.Min(edges.Length, 2 * TermsNamed))
            || TransientSolver.Solve(solution.Circuit, list, cancellation) is not { Succeeded: true } other
            || other.Value.Segments.Length != solution.Segments.Length)
        {
            return null;
        }

        var owners = edges.Select(e => Owner(e.Source, e.Store)).ToArray();
        return new OtherBreakdown("by edge", 0, [.. observed.Select((o, n) => IsLinear(o)
            ? Joined(edges, owners, Waves(other.Value.Segments, o, edges.Length), results[n])
            : [])]);
    }

    private int Owner(int source, int store)
    {
        var owner = 0;
        while (solution.Causes[owner].Source != source || solution.Causes[owner].Store != store)
        {
            owner++;
        }

        return owner;
    }

    /// <summary>Each edge by name where they are few; else pulses whole, the largest at the observation's
    /// greatest value by name and those left of each source in one.</summary>
    private ImmutableArray<BreakdownTerm> Joined(
        ImmutableArray<Cause> edges, int[] owners, ImmutableArray<double>[] waves, ObservationResult observed)
    {
        ImmutableArray<BreakdownTerm> all =
            [.. edges.Select((edge, e) => new BreakdownTerm(edge.Name, [(owners[e], 1)], waves[e]))];
        if (all.Length <= TermsNamed)
        {
            return all;
        }

        ImmutableArray<BreakdownTerm> pulses =
        [
            .. Enumerable.Range(0, edges.Length).GroupBy(e => (owners[e], edges[e].Pulse ?? edges[e].Name))
                .Select(g => g.Count() == 1
                    ? all[g.First()]
                    : Sum([.. g.Select(e => all[e])], $"{solution.Causes[g.Key.Item1].Name} {g.Key.Item2}")),
        ];
        var peak = Math.Max(0, times.IndexOf(observed.Greatest.Time));
        var named = pulses.OrderByDescending(t => Math.Abs(t.Samples[peak])).Take(TermsNamed).ToHashSet();
        var rest = pulses.Where(t => !named.Contains(t)).GroupBy(t => t.Weights[0].Cause)
            .Select(g => g.Count() == 1
                ? g.First()
                : Sum([.. g], $"{solution.Causes[g.Key].Name}: {g.Count()} others together"));
        return [.. pulses.Where(named.Contains), .. rest];
    }

    private BreakdownTerm Sum(BreakdownTerm[] parts, string name) => new(
        name, parts[0].Weights, [.. times.Select((_, i) => parts.Sum(p => p.Samples[i]))]);

    private IEnumerable<OtherBreakdown?> SinceSwitchings()
    {
        var sources = CauseList.FromStart(solution.Circuit).Causes.Where(c => c.Source >= 0).ToArray();
        var stores = solution.Layout.Stores;
        if (sources.Length + stores.Length > MostParts || solution.Causes.Any(c => c.IsEdge))
        {
            yield break;
        }

        // At the start itself only a settled one holds what sources have made.
        var starts = Enumerable.Range(0, solution.Intervals.Length).Where(i =>
            !solution.Intervals[i].StartsWith.IsEmpty
            && (solution.Intervals[i].From > 0 || solution.Circuit.StartsSettled));
        foreach (var interval in starts.Take(MostSwitchings))
        {
            yield return HasRoom(sources.Length + stores.Length) ? Since(interval, sources) : null;
        }
    }

    /// <summary>Every store is solved for a unit of what it holds, so that it follows the causes that made
    /// it, also where they cancel.</summary>
    private OtherBreakdown? Since(int interval, Cause[] sources)
    {
        var switching = SwitchingWords.Of(solution, interval);
        var held = Held(interval);
        var causes = sources.Select(s => (
            Cause: s, Weights: ImmutableArray.Create((Owner(s.Source, -1), 1.0)))).ToList();
        foreach (var (k, store) in solution.Layout.Stores.Index())
        {
            var weights = Enumerable.Range(0, solution.Causes.Length)
                .Select(c => (Cause: c, Weight: (double)held[c][k]))
                .Where(w => w.Weight != 0).ToImmutableArray();
            if (!weights.IsEmpty)
            {
                var what = solution.Circuit.Parts[store] is Capacitor ? "charge" : "current";
                var name = $"{solution.Circuit.Parts[store].Name} {what} when {switching}";
                causes.Add((new Cause(name, -1, [], store, 1), weights));
            }
        }

        if (causes.Count == 1)
        {
            return null; // one source and nothing stored: the same as from the start
        }

        ImmutableArray<Cause> own = [.. causes.Select(c => c.Cause)];
        var segments = SwitchingWords.SegmentsFrom(solution, interval, own, cancellation);
        return new OtherBreakdown($"since {switching}", solution.Intervals[interval].From,
            [.. observed.Select(o => IsLinear(o)
                ? Waves(segments, o, own.Length)
                    .Select((wave, n) => new BreakdownTerm(own[n].Name, causes[n].Weights, wave))
                    .ToImmutableArray()
                : [])]);
    }

    /// <summary>What every cause holds in every store just before an interval.</summary>
    private DoubleDouble[][] Held(int interval)
    {
        var layout = solution.Layout;
        if (solution.Intervals[interval].FirstSegment is > 0 and var first)
        {
            return [.. solution.Causes.Select((_, c) => layout.Stores
                .Select(s => solution.Segments[first - 1].ValueAtEnd(layout.Held(s), c)).ToArray())];
        }

        var model = new IntervalModels(layout, cancellation).For(new Timeline(solution.Circuit).IsClosed);
        return SettledStart.Find(model!, layout, solution.Causes).Stored;
    }

    private bool HasRoom(int more)
    {
        var linear = observed.Count(IsLinear);
        terms += more * linear;
        return linear > 0 && terms <= MostTerms;
    }

    private bool IsLinear(Observation observation) =>
        !QuantityFactors.IsQuadratic(observation.Quantity)
        && solution.Segments.All(s => s.Coefficients(observation.Quantity) is not null);

    /// <summary>The waveform of every cause at the sample times; NaN before the first segment.</summary>
    private ImmutableArray<double>[] Waves(
        ImmutableArray<Segment> segments, Observation observation, int causes)
    {
        var waves = Enumerable.Range(0, causes).Select(_ => new double[times.Length]).ToArray();
        var coefficients = segments.Select(s => Enumerable.Range(0, causes)
            .Select(c => s.Coefficients(observation.Quantity, c)!).ToArray()).ToArray();
        var functions = new double[segments.Max(s => s.Basis.Width)];
        var at = 0;
        for (var k = 0; k < times.Length; k++)
        {
            var isBefore = k + 1 < times.Length && times[k + 1] == times[k];
            while (at + 1 < segments.Length
                && (segments[at].End < times[k] || (!isBefore && segments[at].End == times[k])))
            {
                at++;
            }

            var segment = segments[at];
            var isOpen = times[k] < segment.Start || (isBefore && times[k] == segment.Start && at == 0);
            var now = functions.AsSpan(0, segment.Basis.Width);
            segment.Basis.Evaluate(Math.Clamp(times[k] - segment.Start, 0, segment.Length), now);
            for (var c = 0; c < causes; c++)
            {
                waves[c][k] = isOpen ? double.NaN : DotProduct.Of(coefficients[at][c], now);
            }
        }

        return [.. waves.Select(w => w.ToImmutableArray())];
    }
}
