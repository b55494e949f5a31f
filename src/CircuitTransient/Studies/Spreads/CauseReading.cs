using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Takes figures of one solved circuit apart by its causes.</summary>
internal sealed class CauseReading
{
    private readonly TransientSolution solution;
    private readonly CurveBuilder curves;
    private readonly WindowTimes times;
    private readonly ObservedExtremes extremes;

    private CauseReading(TransientSolution solution)
    {
        this.solution = solution;
        curves = new CurveBuilder(solution);
        times = new WindowTimes(solution);
        extremes = new ObservedExtremes(new Infinities(curves));
    }

    /// <summary>Solves a circuit; null where it has no unique solution.</summary>
    public static CauseReading? Of(Circuit circuit, CancellationToken cancellation) =>
        TransientSolver.Solve(circuit, CauseList.FromStart(circuit), cancellation).Value is { } solution
            ? new CauseReading(solution)
            : null;

    /// <summary>What the quantity behind a figure reaches, and what each cause has in that; null where the
    /// figure is not one value of a quantity.</summary>
    /// <param name="figure">The figure.</param>
    /// <param name="value">Its value here.</param>
    public (double? Reached, ImmutableArray<CauseValue> Causes) Read(StudyFigure figure, double value)
    {
        if (Watched(figure) is not var (quantity, window)
            || quantity is Figure
            || times.Of(window) is not { } open
            || curves.Of(quantity, from: CurveBuilder.GatheredFrom(quantity, open.From)) is not { } total)
        {
            return (null, []);
        }

        var (max, min) = extremes.Of(quantity, total, open);
        var extreme = Meant(figure, value, max, min);
        if (extreme.Value is not { } reached)
        {
            return (null, []);
        }

        var isBefore = extreme.Side == InstantSide.Before;
        var from = CurveBuilder.GatheredFrom(quantity, open.From);
        var causes = Enumerable.Range(0, solution.Causes.Length)
            .Select(c => new CauseValue(
                solution.Causes[c].Name,
                curves.Of(quantity, Share.Own, c, from)?.ValueAt(solution, extreme.Time, isBefore)));
        return QuantityFactors.IsQuadratic(quantity)
            ? (reached, [.. causes, new CauseValue("joint", curves.Of(quantity, Share.Joint, -1, from)
                ?.ValueAt(solution, extreme.Time, isBefore))])
            : (reached, [.. causes]);
    }

    private (Measurand Quantity, Window Window)? Watched(StudyFigure figure)
    {
        var circuit = solution.Circuit;
        switch (figure.Kind)
        {
            case StudyFigureKind.Maximum or StudyFigureKind.Minimum or StudyFigureKind.Reading:
                var observation = circuit.Observations[figure.Index];
                return (observation.Quantity, observation.Window);
            case StudyFigureKind.Margin:
                var requirement = circuit.Requirements[figure.Index];
                return (requirement.Quantity, requirement.Bound is SettlesTo settles
                    ? requirement.Window with { From = settles.By }
                    : requirement.Window);
            default:
                var kind = circuit.Parts[figure.Index].Ratings[figure.Rating].Kind;
                return Rated(figure.Index, kind) is { } rated
                    ? (rated, new Window(null, null))
                    : null;
        }
    }

    private static Measurand? Rated(int part, RatingKind kind) => kind switch
    {
        RatingKind.PeakVoltage => new VoltageAcross(part),
        RatingKind.PeakCurrent => new CurrentThrough(part),
        RatingKind.VoltageRate => new RateOfChange(new VoltageAcross(part)),
        RatingKind.CurrentRate => new RateOfChange(new CurrentThrough(part)),
        RatingKind.Energy => new EnergyIn(part),
        RatingKind.JouleIntegral => new JouleIntegral(part),
        _ => null,
    };

    private Extreme Meant(StudyFigure figure, double value, Extreme max, Extreme min) => figure.Kind switch
    {
        StudyFigureKind.Maximum => max,
        StudyFigureKind.Minimum => min,
        StudyFigureKind.Margin => Distance(figure, value, max) <= Distance(figure, value, min) ? max : min,
        _ => Math.Abs(max.Value ?? double.PositiveInfinity) >= Math.Abs(min.Value ?? double.PositiveInfinity)
            ? max : min,
    };

    /// <summary>How far an extreme's own margin lies from the one found.</summary>
    private double Distance(StudyFigure figure, double margin, Extreme extreme)
    {
        if (extreme.Value is not { } value)
        {
            return double.IsInfinity(margin) ? 0 : double.PositiveInfinity;
        }

        return solution.Circuit.Requirements[figure.Index].Bound switch
        {
            Limits limits => Math.Min(
                Math.Abs((limits.Upper ?? double.PositiveInfinity) - value - margin),
                Math.Abs(value - (limits.Lower ?? double.NegativeInfinity) - margin)),
            SettlesTo s => Math.Abs((s.Within * Math.Abs(s.Target)) - Math.Abs(value - s.Target) - margin),
            _ => double.PositiveInfinity,
        };
    }
}
