using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Verification;
using CircuitTransient.Solutions;
using CircuitTransient.Text;
using Segment = CircuitTransient.Solutions.Segment;

namespace CircuitTransient.Measurements.Checks;

/// <summary>The sum of the causes, each solved alone, against one solution of everything at once by another
/// route.</summary>
internal static class SumCheck
{
    private const int MostInstants = 24;

    /// <summary>The worst difference over each quantity's largest value at the compared instants; null with a
    /// reason where the other route does not reach.</summary>
    /// <param name="solution">The solution to be judged.</param>
    /// <param name="other">The other route's.</param>
    /// <param name="sizes">What errors are measured by.</param>
    /// <param name="until">Up to which instant the two may be compared.</param>
    public static (double? Worst, string? Reason) Worst(
        TransientSolution solution, AllAtOnceSolution other, StudySizes sizes, double until)
    {
        var quantities = Quantities(solution);
        var worst = new double[quantities.Length];
        var step = Math.Max(1, solution.Segments.Length * 2 / MostInstants);
        var compared = 0;
        for (var k = 0; k < solution.Segments.Length * 2; k += step)
        {
            var segment = solution.Segments[k / 2];
            var tau = k % 2 == 0 ? segment.Length / 7 : segment.Length;
            if (segment.Start + tau > Math.Min(other.Until, until))
            {
                break;
            }

            Compare(solution, segment, tau, quantities, other, worst);
            compared++;
        }

        var rest = other.Rest?.Reason ?? (double.IsPositiveInfinity(until)
            ? null
            : $"not compared beyond {EngineeringNumber.Format(until, "s")}: a switch acts there at once upon "
                + "another or upon the start");
        return compared == 0
            ? (null, rest ?? "the other route gave no value")
            : (worst.Select((w, q) => StudySizes.Relative(w, sizes.Of(quantities[q])))
                .DefaultIfEmpty(0).Max(), rest);
    }

    private static void Compare(
        TransientSolution solution, Segment segment, double tau, ImmutableArray<Measurand> quantities,
        AllAtOnceSolution other, double[] worst)
    {
        var phi = new double[segment.Basis.Width];
        segment.Basis.Evaluate(tau, phi);
        var expected = other.ValuesAt(quantities, segment.Start + tau, before: tau == segment.Length);
        for (var q = 0; q < quantities.Length; q++)
        {
            if (segment.Coefficients(quantities[q]) is null || expected[q] is not { } value
                || double.IsNaN(value))
            {
                continue;
            }

            double sum = 0;
            for (var c = 0; c < solution.Causes.Length; c++)
            {
                sum += Numerics.DotProduct.Of(segment.Coefficients(quantities[q], c)!, phi);
            }

            worst[q] = Math.Max(worst[q], Math.Abs(sum - value));
        }
    }

    /// <summary>What is observed and required, as far as it is linear, and everything that is
    /// stored.</summary>
    public static ImmutableArray<Measurand> Quantities(TransientSolution solution)
    {
        var circuit = solution.Circuit;
        var asked =
            circuit.Observations.Select(o => o.Quantity).Concat(circuit.Requirements.Select(r => r.Quantity))
            .Where(q => q is VoltageBetween or VoltageAcross or CurrentThrough);
        var stored = solution.Layout.Stores.Select(
            Measurand (i) => circuit.Parts[i] is Capacitor ? new VoltageAcross(i) : new CurrentThrough(i));
        return [.. asked.Concat(stored).Distinct()];
    }
}
