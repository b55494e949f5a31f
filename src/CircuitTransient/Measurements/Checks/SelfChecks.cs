using System.Collections.Immutable;
using CircuitTransient.Measurements.Curves;
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
        var other = AllAtOnceSolution.Solve(solution.Circuit, ScheduleOf(solution));
        var (sum, reason) = SumCheck.Worst(solution, other);
        Add("sum of causes against all at once", sum, 1e-8);
        if (reason is not null)
        {
            open.Add(new NotJudged("sum of causes against all at once", reason));
        }

        Add("Kirchhoff's laws and each part's law", LawCheck.Worst(curves), 1e-9);
        if (EnergyCheck.Worst(curves, energy, gram) is { } balance)
        {
            Add("energy supplied, stored and lost", balance, 1e-9);
        }
        else
        {
            open.Add(new NotJudged("energy supplied, stored and lost",
                "the equations leave a part's current or voltage open"));
        }

        return (checks.ToImmutable(), open.ToImmutable());

        void Add(string name, double? worst, double allowed)
        {
            if (worst is { } figure)
            {
                checks.Add(new SelfCheck(name, figure, allowed, figure <= allowed));
            }
        }
    }

    private static SwitchingSchedule ScheduleOf(TransientSolution solution) => new(
        [.. solution.Intervals.Select(i => new SwitchedInterval(i.From, i.Model.IsClosed))], solution.Until);
}
