using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>What every part bears over the study, against its ratings.</summary>
internal sealed class PartStresses(CurveBuilder curves, Infinities infinities, Func<int, double[,]> gram)
{
    private const int MostStretches = 50_000;

    private readonly TransientSolution solution = curves.Solution;
    private readonly ImpulseWork impulses = new(curves.Solution);

    /// <summary>The stresses of every part, on as many threads as there are processors, each with curves of
    /// its own.</summary>
    public static ImmutableArray<PartResult> Of(
        CurveBuilder curves, Func<int, double[,]> gram, CancellationToken cancellation)
    {
        var results = new PartResult[curves.Solution.Circuit.Parts.Length];
        Parallel.For(
            0, results.Length, new ParallelOptions { CancellationToken = cancellation },
            () =>
            {
                var own = new CurveBuilder(curves);
                return new PartStresses(own, new Infinities(own), gram);
            },
            (part, _, stresses) =>
            {
                results[part] = stresses.Measure(part);
                return stresses;
            },
            _ => { });
        return [.. results];
    }

    /// <summary>The stresses of one part.</summary>
    public PartResult Measure(int part)
    {
        var declared = solution.Circuit.Parts[part];
        var (voltage, current, power, voltageRate, currentRate) = Peaks(part);
        var absorbed = Integral(new VoltageAcross(part), new CurrentThrough(part))
            + Enumerable.Range(0, solution.Segments.Length)
                .Sum(s => impulses.Of(part, s, Segment.Total, Segment.Total));
        var carriesImpulse = solution.Segments.Any(s => s.ImpulseAtStart(new CurrentThrough(part)) != 0);
        var joule = carriesImpulse ? null : Integral(new CurrentThrough(part), new CurrentThrough(part));
        var energy = declared switch
        {
            Capacitor c => c.Capacitance.Nominal / 2 * voltage?.Value * voltage?.Value,
            Inductor l => l.Inductance.Nominal / 2 * current?.Value * current?.Value,
            _ => absorbed,
        };
        return new PartResult(
            declared.Name, declared.Kind, voltage, current, power, voltageRate, currentRate, energy, joule,
            [.. declared.Ratings.Select(Rate)], Limit());

        RatingResult Rate(Rating rating)
        {
            var (reached, unit) = rating.Kind switch
            {
                RatingKind.PeakVoltage => (voltage?.Value, "V"),
                RatingKind.PeakCurrent => (current?.Value, "A"),
                RatingKind.MeanPower => (absorbed / solution.Until, "W"),
                RatingKind.Energy => (energy, "J"),
                RatingKind.JouleIntegral => (joule, "A²s"),
                RatingKind.VoltageRate => (voltageRate?.Value, "V/s"),
                _ => (currentRate?.Value, "A/s"),
            };
            var magnitude = Math.Abs(reached ?? double.PositiveInfinity);
            return new RatingResult(
                rating.Limit, unit, reached is null ? null : magnitude, reached is null ? null
                    : magnitude / rating.Limit,
                magnitude <= rating.Limit);
        }

        LinearUpToResult? Limit()
        {
            if (declared.LinearUpTo is not { } limit)
            {
                return null;
            }

            var reached = limit.IsVoltage ? voltage?.Value : current?.Value;
            var holds = Math.Abs(reached ?? double.PositiveInfinity) <= limit.Limit;
            return new LinearUpToResult(
                limit.Limit, limit.IsVoltage ? "V" : "A", reached is { } r ? Math.Abs(r) : null, holds,
                LinearLimits.Direction(declared, limit));
        }
    }

    /// <summary>The peaks of voltage, current, power and the rates. A resistor's current has the shape of its
    /// voltage, so two searches give all five.</summary>
    private (TimedValue? V, TimedValue? I, TimedValue? P, TimedValue? VoltageRate, TimedValue? CurrentRate)
        Peaks(int part)
    {
        var voltage = Peak(new VoltageAcross(part));
        var voltageRate = Peak(new RateOfChange(new VoltageAcross(part)));
        if (solution.Circuit.Parts[part] is Resistor { Resistance.Nominal: var r }
            && voltage?.Value is not null)
        {
            return (voltage, Times(voltage, 1 / r), Times(voltage, voltage.Value.Value / r), voltageRate,
                Times(voltageRate, 1 / r));
        }

        return (voltage, Peak(new CurrentThrough(part)), Peak(new PowerIn(part)), voltageRate,
            Peak(new RateOfChange(new CurrentThrough(part))));
    }

    private static TimedValue? Times(TimedValue? peak, double factor) =>
        peak is null ? null : peak with { Value = peak.Value * factor };

    /// <summary>The extreme of greatest magnitude, with its sign; its value is null where an impulse makes it
    /// infinite.</summary>
    private TimedValue? Peak(Measurand quantity)
    {
        if (curves.Of(quantity) is not { } curve)
        {
            return null;
        }

        var (up, down) = infinities.Of(quantity, 0, solution.Until);
        if ((up ?? down) is { } time)
        {
            return new TimedValue(null, time);
        }

        var peak = ExtremeSearch.GreatestMagnitude(curve, 0, solution.Until, MostStretches);
        return new TimedValue(peak.Value, peak.Time);
    }

    /// <summary>The integral of a product over the study, in closed form.</summary>
    private double? Integral(Measurand first, Measurand second)
    {
        double sum = 0;
        for (var s = 0; s < solution.Segments.Length; s++)
        {
            if (solution.Segments[s].Coefficients(first) is not { } a
                || solution.Segments[s].Coefficients(second) is not { } b)
            {
                return null;
            }

            sum += GramIntegral.Form(gram(s), a, b);
        }

        return sum;
    }
}
