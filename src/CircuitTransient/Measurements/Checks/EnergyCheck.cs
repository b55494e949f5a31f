using System.Diagnostics;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;
using Switch = CircuitTransient.Circuits.Switch;

namespace CircuitTransient.Measurements.Checks;

/// <summary>Energy, interval by interval: what sources supply is stored or turned to heat. Heat is the
/// integral of R i² in closed form, supply that of v i, storage that of the fields at the ends: three routes
/// that meet.</summary>
internal static class EnergyCheck
{
    /// <summary>The worst imbalance over the largest of supply, heat and storage in its interval; null where
    /// some part's current or voltage is open.</summary>
    public static double? Worst(CurveBuilder curves, StoredEnergy energy, Func<int, double[,]> gram)
    {
        // An interval whose energies are rounding of an earlier one's is not judged against itself.
        const double rounding = 1e-12;
        double worst = 0, largest = 0;
        var solution = curves.Solution;
        foreach (var interval in solution.Intervals)
        {
            double supplied = 0, heat = 0, stored = 0, size = 0;
            for (var s = interval.FirstSegment; s < interval.FirstSegment + interval.SegmentCount; s++)
            {
                if (Flow(solution, s, gram(s)) is not { } flow)
                {
                    return null;
                }

                supplied += flow.Supplied;
                heat += flow.Heat;
                var (start, end) = (energy.At(s, end: false), energy.At(s, end: true));
                stored += end - start;
                var fields =
                    Math.Max(energy.LargestTermAt(s, end: false), energy.LargestTermAt(s, end: true));
                size = Math.Max(size, Math.Max(flow.Size, fields));
            }

            largest = Math.Max(largest, size);
            size = Math.Max(size, rounding * largest);
            worst = Math.Max(worst, StudySizes.Relative(Math.Abs(supplied - heat - stored), size));
        }

        return worst;
    }

    private static (double Supplied, double Heat, double Size)? Flow(TransientSolution solution, int s,
        double[,] gram)
    {
        var segment = solution.Segments[s];
        double supplied = 0, heat = 0, size = 0;

        // Where no current flows but rounding, energies are measured by a trace of what the source could
        // heat.
        const double trace = 1e-20;
        var still = trace / solution.Circuit.Parts.OfType<Resistor>()
            .Select(r => Math.Abs(r.Resistance.Nominal)).DefaultIfEmpty(double.PositiveInfinity).Max();
        for (var i = 0; i < solution.Circuit.Parts.Length; i++)
        {
            var resistance = Resistance(solution.Circuit.Parts[i], segment.Model.IsClosed[i]);
            if (resistance is 0 && solution.Circuit.Parts[i] is not (Capacitor or Inductor))
            {
                continue;
            }

            var current = segment.Coefficients(new CurrentThrough(i));
            var voltage = segment.Coefficients(new VoltageAcross(i));
            if (current is null || voltage is null)
            {
                return null;
            }

            if (resistance is 0)
            {
                continue;
            }

            if (resistance is { } r)
            {
                heat += r * GramIntegral.Form(gram, current, current);
            }
            else
            {
                supplied -= GramIntegral.Form(gram, voltage, current);
                // What goes to and fro counts too: by Schwarz, |∫ v i|² is at most ∫ v² ∫ i².
                var v2 = GramIntegral.Form(gram, voltage, voltage);
                var i2 = GramIntegral.Form(gram, current, current);
                size = Math.Max(size, Math.Sqrt(Math.Max(0, v2) * Math.Max(0, i2)));
                size = Math.Max(size, still * Math.Max(0, v2));
            }
        }

        return (supplied, heat, Math.Max(size, Math.Abs(heat)));
    }

    /// <summary>A part's resistance; zero where it neither heats nor supplies, null where it may
    /// supply.</summary>
    private static double? Resistance(Part part, bool isClosed) => part switch
    {
        Resistor r => r.Resistance.Nominal,
        Switch s when isClosed => s.ClosedResistance?.Nominal ?? 0,
        Switch s => s.OpenResistance?.Nominal ?? 0,
        Capacitor or Inductor or IdealTransformer => 0,
        VoltageSource or CurrentSource or DependentSource => null,
        _ => throw new UnreachableException($"no heat known of {part}"),
    };
}
