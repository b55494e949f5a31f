using CircuitTransient.Syntax;

namespace CircuitTransient.Circuits;

/// <summary>Couplings that are possible as they stand and impossible somewhere within the tolerances, where a
/// draw would store negative energy. A factor whose own tolerance passes 1 is a mistake; of values that pass
/// it together a spread counts how often they do. Judged at the corners of the values that vary: a factor
/// goes one way with each.</summary>
internal static class CouplingTolerances
{
    private const int MostValues = 10; // 1024 corners
    private const int MostCoils = 12;

    public static void Check(CheckState state, IReadOnlyCollection<Coupling> couplings)
    {
        foreach (var (coils, set) in CoilSets.Sets(state.Parts, couplings))
        {
            Coupling[] all = [.. set];
            if (coils.Length > MostCoils || coils.Any(c => state.Parts[c] is not Inductor))
            {
                continue;
            }

            var isTold = false;
            foreach (var coupling in all)
            {
                double[] factors = [.. Corners(state, [coupling]).Select(v => Factor(state, coupling, v))];
                if (factors.Any(f => Math.Abs(f) > 1 + CoilSets.Rounding))
                {
                    Report(state, coupling, factors);
                    isTold = true;
                }
            }

            if (coils.Length > 2 && !isTold)
            {
                CheckSet(state, coils, all);
            }
        }
    }

    private static void CheckSet(CheckState state, int[] coils, Coupling[] couplings)
    {
        var least = Corners(state, couplings)
            .Select(v => CoilSets.LeastEnergy(coils, couplings, c => Factor(state, c, v)))
            .DefaultIfEmpty(0).Min();
        if (least < -CoilSets.Rounding * coils.Length)
        {
            var names = string.Join(", ", coils.Select(c => $"`{state.Declared[c].Name}`"));
            state.Findings.Warn(couplings[0].Span,
                $"within their tolerances {names} so coupled can store "
                    + $"{Say(least)} times their energy",
                "narrow the tolerances of the couplings, or lower a factor");
        }
    }

    private static void Report(CheckState state, Coupling coupling, double[] factors)
    {
        var statement = (CouplingStatement)state.Couplings.First(c => c.Name == coupling.Name).Statement;
        var (first, second) = (state.Declared[coupling.First].Name, state.Declared[coupling.Second].Name);
        var (lowest, highest) = (factors.Min(), factors.Max());
        if (coupling.IsFactor)
        {
            state.Findings.Error(
                statement.Value.Tolerance?.Span ?? statement.Value.Value.Span,
                $"the tolerance of `{coupling.Name}` passes a coupling of all flux: "
                    + $"{Say(lowest)} to {Say(highest)}",
                "a factor is at most 1 in magnitude; narrow it" + (statement.Value.Tolerance is null ? ""
                    : $": `between {Say(Math.Max(lowest, -1))} and {Say(Math.Min(highest, 1))}`"));
            return;
        }

        state.Findings.Warn(
            statement.Value.Value.Span,
            $"within the tolerances `{coupling.Name}` couples `{first}` and `{second}` by up to "
                + $"{Say(Math.Max(highest, -lowest))} of all flux",
            "write the factor, which goes with the coils: "
                + $"`{Say(CoilSets.Factor(state.Parts, coupling))}`");
    }

    private static string Say(double factor) => Amount.Of(double.Parse(factor.ToString("G4")), "");

    private static double Factor(CheckState state, Coupling coupling, double[] values)
    {
        var value = FormulaValue.Of(coupling.Value, values);
        return coupling.IsFactor ? value : value / Math.Sqrt(
            FormulaValue.Of(((Inductor)state.Parts[coupling.First]!).Inductance, values)
            * FormulaValue.Of(((Inductor)state.Parts[coupling.Second]!).Inductance, values));
    }

    /// <summary>The values of all parameters at every corner of those that couplings read; none where there
    /// are too many.</summary>
    private static IEnumerable<double[]> Corners(CheckState state, Coupling[] couplings)
    {
        var read = new SortedSet<int>();
        foreach (var coupling in couplings)
        {
            read.UnionWith(state.Parameters.Toleranced(coupling.Value.Formula));
            if (!coupling.IsFactor)
            {
                read.UnionWith(state.Parameters.Toleranced(InductanceOf(coupling.First).Formula));
                read.UnionWith(state.Parameters.Toleranced(InductanceOf(coupling.Second).Formula));
            }
        }

        if (read.Count is 0 or > MostValues)
        {
            yield break;
        }

        int[] varied = [.. read];
        for (var corner = 0; corner < 1 << varied.Length; corner++)
        {
            double[] values = [.. Enumerable.Range(0, state.Parameters.Count)
                .Select(p => state.Parameters[p].Nominal)];
            for (var v = 0; v < varied.Length; v++)
            {
                var tolerance = state.Parameters[varied[v]].Tolerance!;
                values[varied[v]] = (corner & (1 << v)) == 0 ? tolerance.Lowest : tolerance.Highest;
            }

            yield return values;
        }

        Quantity InductanceOf(int coil) => ((Inductor)state.Parts[coil]!).Inductance;
    }
}
