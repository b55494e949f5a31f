using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Breakdowns;
using CircuitTransient.Measurements.Checks;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>The second breakdown: since a switching, what every part held just before it is a cause, and
/// every source from then on. The switchings that follow keep the instants of the full answer.</summary>
internal sealed class SinceEventBreakdown(TransientSolution solution, CancellationToken cancellation)
{
    private readonly Dictionary<int,
        (ImmutableArray<Cause> Causes, ImmutableArray<Segment> Segments)> solved = [];

    /// <summary>The breakdown of a quantity at an instant.</summary>
    /// <param name="quantity">The quantity; for an integral over time there is no such breakdown.</param>
    /// <param name="time">The instant, in seconds.</param>
    /// <param name="before">Whether the value just before a jump is meant.</param>
    /// <param name="since">Index of the interval that the event starts; null for the last one before the
    /// instant.</param>
    /// <returns>The parts; null where no switching comes before the instant.</returns>
    public SinceEvent? At(Measurand quantity, double time, bool before, int? since)
    {
        var at = solution.SegmentAt(time, before);
        var interval = since ?? LastStartedByEvent(solution.Segments[at].Interval);
        if (interval < 0 || interval > solution.Segments[at].Interval
            || solution.Intervals[interval].StartsWith.IsEmpty)
        {
            return null;
        }

        var (causes, segments) = Solve(interval);
        var segment = segments[at - solution.Intervals[interval].FirstSegment];
        var tau = Math.Clamp(time - segment.Start, 0, segment.Length);
        return Parts(quantity, segment, tau, causes) is { } parts
            ? new SinceEvent(Words(interval), solution.Intervals[interval].From,
                [.. parts.Select((p, n) => n < causes.Length ? WithStrength(p, causes[n], interval) : p)])
            : null;
    }

    private string Words(int interval) => SwitchingWords.Of(solution, interval);

    private int LastStartedByEvent(int interval)
    {
        while (interval >= 0 && solution.Intervals[interval].StartsWith.IsEmpty)
        {
            interval--;
        }

        return interval;
    }

    private (ImmutableArray<Cause> Causes, ImmutableArray<Segment> Segments) Solve(int first)
    {
        if (!solved.TryGetValue(first, out var known))
        {
            var causes = CausesAt(first);
            known = (causes, SwitchingWords.SegmentsFrom(solution, first, causes, cancellation));
            solved.Add(first, known);
        }

        return known;
    }

    /// <summary>Every source, and everything held just before the event.</summary>
    private ImmutableArray<Cause> CausesAt(int first)
    {
        var circuit = solution.Circuit;
        var layout = solution.Layout;
        var switching = Words(first);
        var causes = ImmutableArray.CreateBuilder<Cause>();
        causes.AddRange(CauseList.FromStart(circuit).Causes.Where(c => c.Source >= 0));
        for (var k = 0; k < layout.Stores.Length; k++)
        {
            var held = HeldBefore(first, k);
            if (held != 0)
            {
                var part = circuit.Parts[layout.Stores[k]];
                var what = part is Capacitor ? "charge" : "current";
                causes.Add(new Cause($"{part.Name} {what} when {switching}", -1, [], layout.Stores[k], held));
            }
        }

        return causes.ToImmutable();
    }

    private CauseValue WithStrength(CauseValue value, Cause cause, int interval) =>
        solution.Circuit.Parts[Math.Max(cause.Source, cause.Store)] switch
        {
            VoltageSource s => value with { Strength = Strength(s.Wave, interval) },
            CurrentSource s => value with { Strength = Strength(s.Wave, interval), StrengthUnit = "A" },
            Inductor => value with { Strength = cause.Stored, StrengthUnit = "A" },
            _ => value with { Strength = cause.Stored },
        };

    private double Strength(Wave wave, int interval) =>
        WaveValue.At(wave, solution.Intervals[interval].From, before: false);

    private double HeldBefore(int interval, int store)
    {
        var firstSegment = solution.Intervals[interval].FirstSegment;
        return firstSegment == 0
            ? solution.Initial[store]
            : (double)solution.Segments[firstSegment - 1]
                .ValueAtEnd(solution.Layout.Held(solution.Layout.Stores[store]), Segment.Total);
    }

    private ImmutableArray<CauseValue>? Parts(
        Measurand quantity, Segment segment, double tau, ImmutableArray<Cause> causes)
    {
        if (QuantityFactors.Of(solution.Circuit, quantity) is { } factors)
        {
            return ProductParts(factors, segment, tau, causes);
        }

        if (QuantityFactors.IsQuadratic(quantity) || segment.Coefficients(quantity) is null)
        {
            return null;
        }

        return [.. causes.Select((c, n) => new CauseValue(c.Name, Value(segment, quantity, n, tau)))];
    }

    private static ImmutableArray<CauseValue> ProductParts(
        QuantityFactors factors, Segment segment, double tau, ImmutableArray<Cause> causes)
    {
        var parts = causes.Select((c, n) => new CauseValue(
            c.Name,
            factors.Factor * Value(segment, factors.First, n, tau) * Value(segment, factors.Second, n, tau)))
                .ToList();
        var total = factors.Factor * Value(segment, factors.First, Segment.Total, tau)
            * Value(segment, factors.Second, Segment.Total, tau);
        parts.Add(new CauseValue("joint", total - parts.Sum(p => p.Value)));
        return [.. parts];
    }

    private static double? Value(Segment segment, Measurand quantity, int cause, double tau)
    {
        if (segment.Coefficients(quantity, cause) is not { } coefficients)
        {
            return null;
        }

        var phi = new double[segment.Basis.Width];
        segment.Basis.Evaluate(tau, phi);
        return DotProduct.Of(coefficients, phi);
    }
}
