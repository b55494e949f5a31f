using System.Collections.Immutable;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Measurements.Verification;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements.Checks;

/// <summary>The checks that every solve runs on itself.</summary>
internal static class SelfChecks
{
    /// <summary>Runs all checks.</summary>
    public static (ImmutableArray<SelfCheck> Checks, ImmutableArray<NotJudged> NotJudged) Run(
        CurveBuilder curves, StoredEnergy energy, Func<int, double[,]> gram)
    {
        var checks = ImmutableArray.CreateBuilder<SelfCheck>();
        var open = ImmutableArray.CreateBuilder<NotJudged>();
        var solution = curves.Solution;
        var other = AllAtOnceSolution.Solve(solution.Circuit, ScheduleOf(solution), InitialOf(solution));
        var sizes = new StudySizes(curves);
        var (sum, reason) = SumCheck.Worst(solution, other, sizes, FirstMomentary(solution));
        Add("sum of causes against all at once", sum, 1e-8);
        if (reason is not null)
        {
            open.Add(new NotJudged("sum of causes against all at once", reason));
        }

        Add("Kirchhoff's laws and each part's law", LawCheck.Worst(curves, sizes), 1e-9);
        if (EnergyCheck.Worst(curves, energy, gram) is { } balance)
        {
            Add("energy supplied, stored and lost", balance, 1e-9);
        }
        else
        {
            open.Add(new NotJudged("energy supplied, stored and lost",
                "the equations leave a part's current or voltage open"));
        }

        var quantities = SumCheck.Quantities(solution);
        var until = FirstMomentary(solution);
        AddRoute("initial and final values by the limit theorems",
            RouteChecks.Limits(curves, other, quantities, sizes, until), null);
        var (inversion, weakness) = RouteChecks.Inversion(curves, other, quantities, sizes, until);
        AddRoute("samples by numerical inversion of X(s)", inversion, weakness);
        return (checks.ToImmutable(), open.ToImmutable());

        void AddRoute(string name, IndependentValues values, string? weakness)
        {
            if (values.Compared > 0)
            {
                checks.Add(new SelfCheck(name, values.Worst, values.Allowed, values.Worst <= values.Allowed));
            }

            if (values.TooWeak > 0 || values.Compared == 0)
            {
                open.Add(new NotJudged(name, weakness ?? (values.TooWeak > 0
                    ? $"{values.LeftOut}: the route's own error estimate is over 1e-6"
                    : "the route gives no value for this circuit")));
            }
        }

        void Add(string name, double? worst, double allowed)
        {
            if (worst is { } figure)
            {
                checks.Add(new SelfCheck(name, figure, allowed, figure <= allowed));
            }
        }
    }

    /// <summary>The first instant at which switches acted twice in no time, which the other route does not
    /// follow.</summary>
    private static double FirstMomentary(TransientSolution solution) =>
        solution.Intervals.Where(i => !i.Momentary.IsEmpty).Select(i => i.From)
            .DefaultIfEmpty(double.PositiveInfinity).First();

    private static ImmutableArray<double> InitialOf(TransientSolution solution)
    {
        var initial = new double[solution.Circuit.Parts.Length];
        for (var k = 0; k < solution.Layout.Stores.Length; k++)
        {
            initial[solution.Layout.Stores[k]] = solution.Initial[k];
        }

        return [.. initial];
    }

    private static SwitchingSchedule ScheduleOf(TransientSolution solution) => new(
        [.. solution.Intervals.Select(i => new SwitchedInterval(i.From, i.Model.IsClosed))], solution.Until);
}
