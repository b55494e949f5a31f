using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Checks;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.ClosedForms;

/// <summary>Writes quantities of a solved study out in closed form.</summary>
public sealed class ClosedFormBuilder
{
    private const double Nothing = 1e-15; // of the quantity's greatest term: rounding of the solution

    private readonly TransientSolution solution;
    private readonly WindowTimes times;

    private ClosedFormBuilder(TransientSolution solution)
    {
        this.solution = solution;
        times = new WindowTimes(solution);
    }

    /// <summary>The closed forms of observations; quadratic ones are given by their factors.</summary>
    public static ClosedFormStudy Study(
        TransientSolution solution, IReadOnlyList<Observation> asked,
        CancellationToken cancellation = default)
    {
        var builder = new ClosedFormBuilder(solution);
        var circuit = solution.Circuit;
        var linear = new List<Observation>();
        var products = ImmutableArray.CreateBuilder<ClosedProduct>();
        foreach (var observation in asked)
        {
            if (QuantityFactors.OfAny(circuit, observation.Quantity) is not { } factors)
            {
                linear.Add(observation);
                continue;
            }

            var first = builder.Factor(factors.First, observation.Window);
            var second = builder.Factor(factors.Second, observation.Window);
            linear.AddRange(first == second ? [first] : [first, second]);
            var factorUnit =
                observation.Unit != "J" || factors.IsIntegrated ? "" : first.Unit == "V" ? "F" : "H";
            products.Add(new ClosedProduct(
                observation.Name, observation.Unit, factors.Factor, factorUnit, first.Name, second.Name,
                factors.IsIntegrated));
        }

        var forms = linear.DistinctBy(o => (o.Name, o.Window)).Select(o =>
        {
            cancellation.ThrowIfCancellationRequested();
            return builder.Form(o);
        }).ToImmutableArray();
        var curves = new CurveBuilder(solution);
        var (checks, notJudged) =
            SelfChecks.Run(curves, new StoredEnergy(curves), s => GramIntegral.Of(solution.Segments[s]));
        return new ClosedFormStudy(
            circuit, solution.Until,
            [.. solution.Causes
                .Select(c => new CauseName(c.Name, c.Source >= 0 ? CauseKind.Source : CauseKind.Stored))],
            [.. solution.Intervals.Select(builder.Interval)], forms, products.ToImmutable(), checks,
            notJudged);
    }

    private Observation Factor(Measurand quantity, Window window) => quantity switch
    {
        VoltageAcross v => new($"voltage across {NameOf(v.Part)}", "V", v, window, default),
        CurrentThrough c => new($"current through {NameOf(c.Part)}", "A", c, window, default),
        _ => throw new System.Diagnostics.UnreachableException($"no factor is {quantity}"),
    };

    private string NameOf(int part) => solution.Circuit.Parts[part].Name;

    private ClosedInterval Interval(SolvedInterval interval) => new(
        interval.From, interval.Until,
        [.. interval.StartsWith.Select(o =>
            $"{NameOf(o.Event.Part)} {(o.Closes ? "closes" : "opens")}")],
        [.. PoleGroups.Of(interval.Model.Blocks)
            .Select(p => new Pole(p.Value.Real, p.Value.Imaginary, p.Multiplicity))]);

    private ClosedForm Form(Observation observation)
    {
        var stretches = times.Of(observation.Window) is var (from, to)
            ? solution.Segments.Where(s => s.End > from && s.Start < to)
                .Select(s => Stretch(s, observation.Quantity)).ToImmutableArray()
            : [];
        var greatest = stretches.SelectMany(s => s.ByCause).SelectMany(c => c.Terms)
            .Select(t => t.Bound).DefaultIfEmpty(0).Max();
        return new ClosedForm(observation.Name, observation.Unit,
            [.. stretches.Select(s => s with
            {
                Total = s.Total is null ? null : Cleaned(s.Total),
                ByCause = [.. s.ByCause.Select(Cleaned)],
            })]);

        ClosedSum Cleaned(ClosedSum sum) =>
            sum with { Terms = sum.Terms.RemoveAll(t => t.Bound <= Nothing * greatest) };
    }

    private ClosedStretch Stretch(Segment segment, Measurand quantity)
    {
        var interval = solution.Intervals[segment.Interval];
        var startsInterval = solution.Segments[interval.FirstSegment] == segment;
        Segment[] starting = startsInterval ? [.. interval.Momentary, segment] : [segment];
        return new ClosedStretch(
            segment.Start, segment.End, segment.Interval, startsInterval, Sum(Segment.Total, null),
            segment.Coefficients(quantity) is null
                ? []
                : [.. solution.Causes.Select((cause, c) => Sum(c, cause.Name)!)]);

        ClosedSum? Sum(int cause, string? name) => segment.Coefficients(quantity, cause) is { } coefficients
            ? new ClosedSum(
                name,
                ClosedTerms.Of(segment, coefficients),
                quantity is RateOfChange ? 0 : starting.Sum(s => s.ImpulseAtStart(quantity, cause)),
                cause == Segment.Total && starting.Any(s => IsBeyondImpulse(s, quantity)),
                Scale(segment, coefficients))
            : null;
    }

    private static bool IsBeyondImpulse(Segment segment, Measurand quantity) => quantity is RateOfChange rate
        ? segment.ImpulseAtStart(rate.Of) != 0 || segment.IsBeyondImpulseAtStart(rate.Of)
        : segment.IsBeyondImpulseAtStart(quantity);

    /// <summary>The largest magnitude at instants spread evenly and towards the start.</summary>
    private static double Scale(Segment segment, double[] coefficients)
    {
        const int even = 32;
        const int halvings = 24; // down to a ten-millionth of the length
        var functions = new double[segment.Basis.Width];
        double largest = 0;
        for (var k = 0; k <= even + halvings; k++)
        {
            var tau = k <= even ? segment.Length * k / even : Math.ScaleB(segment.Length, even - 5 - k);
            segment.Basis.Evaluate(tau, functions);
            double value = 0;
            for (var i = 0; i < functions.Length; i++)
            {
                value += functions[i] * coefficients[i];
            }

            largest = Math.Max(largest, Math.Abs(value));
        }

        return largest;
    }
}
