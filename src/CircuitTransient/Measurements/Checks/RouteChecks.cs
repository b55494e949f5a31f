using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Checks;

/// <summary>The checks that know how well they can judge: the limit theorems, and numerical inversion of
/// X(s).</summary>
internal static class RouteChecks
{
    private const int MostStarts = 12;

    /// <summary>Initial values of intervals and final values, from s X(s) for s → ∞ and s → 0.</summary>
    public static IndependentValues Limits(
        CurveBuilder curves, AllAtOnceSolution other, ImmutableArray<Measurand> quantities, StudySizes sizes,
        double until)
    {
        var result = IndependentValues.None;
        foreach (var interval in curves.Solution.Intervals.Where(i => i.From < until).Take(MostStarts))
        {
            if (LimitTheorems.InitialAt(other, interval.From) is { } initial)
            {
                result = result.With(curves, quantities, interval.FirstSegment, 0, sizes, initial.ValueOf);
            }
        }

        if (!double.IsPositiveInfinity(until) || LimitTheorems.Final(other) is not { } final)
        {
            return result;
        }

        foreach (var quantity in quantities)
        {
            if (curves.Of(quantity) is { } curve && FinalValue.Of(curve) is { } own
                && final.ValueOf(quantity) is { } value && double.IsFinite(value.Value)
                    && sizes.Of(quantity) > 0)
            {
                // What it tends to after the study may be far greater than anything within it.
                var size = Math.Max(sizes.Of(quantity), Math.Abs(own));
                result = result.With(own - value.Value, value.EstimatedError, size);
            }
        }

        return result;
    }

    /// <summary>A few samples by contour inversion, no pole used.</summary>
    public static (IndependentValues Values, string? Reason) Inversion(
        CurveBuilder curves, AllAtOnceSolution other, ImmutableArray<Measurand> quantities, StudySizes sizes,
        double until)
    {
        var (samples, notJudged) = ContourInversion.Samples(other);
        var result = IndependentValues.None;
        foreach (var sample in samples.Where(s => s.Time <= until))
        {
            var index = curves.Solution.SegmentAt(sample.Time);
            var tau = sample.Time - curves.Solution.Segments[index].Start;
            result = result.With(curves, quantities, index, tau, sizes, sample.ValueOf);
        }

        return (result, notJudged.IsEmpty ? null : notJudged[0].Reason);
    }
}
