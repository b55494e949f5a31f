using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Figures;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>Finds a study's figures and their derivatives.</summary>
internal sealed class FigureSlopeFinder
{
    private const int MostStretches = 1_000_000;

    private readonly TransientSolution solution;
    private readonly ImmutableArray<Variation> variations;
    private readonly SlopeMarch march;
    private readonly CurveBuilder curves;
    private readonly WindowTimes times;
    private readonly Infinities infinities;
    private readonly ExtremeSlopes extremes;
    private readonly FigureMeasurement readings;

    public FigureSlopeFinder(
        TransientSolution solution, ImmutableArray<Variation> variations, SlopeMarch march)
    {
        this.solution = solution;
        this.variations = variations;
        this.march = march;
        curves = new CurveBuilder(solution);
        times = new WindowTimes(solution);
        infinities = new Infinities(curves);
        extremes = new ExtremeSlopes(march);
        readings = new FigureMeasurement(curves, times, infinities);
    }

    /// <summary>A figure with its derivatives; null where it has no value.</summary>
    public FigureSlopes? Of(StudyFigure figure)
    {
        var circuit = solution.Circuit;
        switch (figure.Kind)
        {
            case StudyFigureKind.Maximum or StudyFigureKind.Minimum:
                var observed = circuit.Observations[figure.Index];
                return WindowOf(observed.Window) is { } window
                    ? Extreme(observed.Quantity, window, figure.Kind == StudyFigureKind.Maximum ? 1 : -1)
                    : null;
            case StudyFigureKind.Reading:
                var shown = circuit.Observations[figure.Index];
                return Reading((Figure)shown.Quantity, shown.Window);
            case StudyFigureKind.Margin:
                return Margin(circuit.Requirements[figure.Index]);
            case StudyFigureKind.RatingUsed:
                return new RatingSlopes(solution, variations, curves, infinities, extremes, march)
                    .Of(figure.Index, circuit.Parts[figure.Index].Ratings[figure.Rating], Whole);
            default:
                throw new System.Diagnostics.UnreachableException($"no slopes of {figure.Kind}");
        }
    }

    private MovingWindow Whole => WindowOf(new Window(null, null))!;

    private FigureSlopes? Extreme(Measurand quantity, MovingWindow window, int sign)
    {
        var from = CurveBuilder.GatheredFrom(quantity, window.From);
        if (curves.Of(quantity, from: from) is not { } curve)
        {
            return null;
        }

        var (up, down) = infinities.Of(quantity, window.From, window.To);
        if ((sign > 0 ? up : down) is not null)
        {
            return null;
        }

        var found = sign > 0
            ? ExtremeSearch.Greatest(curve, window.From, window.To, MostStretches)
            : ExtremeSearch.Least(curve, window.From, window.To, MostStretches);
        return Gathered(found.Value, found.Time, v => extremes.Of(quantity, curve, found, window, v));
    }

    private FigureSlopes? Reading(Figure figure, Window window)
    {
        if (readings.Read(figure, window) is not { Value: { } value, Time: var time }
            || WindowOf(window) is not { } open)
        {
            return null;
        }

        var curve = curves.Of(figure.Of, from: CurveBuilder.GatheredFrom(figure.Of, open.From))!;
        return Gathered(
            value, time, v => new ReadingSlopes(march, extremes, figure, curve, open, v).Find());
    }

    private FigureSlopes? Margin(Requirement requirement)
    {
        if (requirement.Bound is SettlesTo settles)
        {
            return WindowOf(new Window(settles.By, requirement.Window.To)) is { } after
                ? Settling(requirement.Quantity, settles, after) : null;
        }

        var limits = (Limits)requirement.Bound;
        if (requirement.Quantity is Figure figure)
        {
            return Reading(figure, requirement.Window) is not { } shown ? null
                : shown.Value - limits.Lower < (limits.Upper ?? double.PositiveInfinity) - shown.Value
                    || limits.Upper is not { } most
                    ? shown.Times(1, -limits.Lower!.Value)
                    : shown.Times(-1, most);
        }

        if (WindowOf(requirement.Window) is not { } window)
        {
            return null;
        }

        if (infinities.BreaksAt(requirement.Quantity, limits, window.From, window.To) is not null)
        {
            return null;
        }

        var high = limits.Upper is { } upper
            ? Extreme(requirement.Quantity, window, 1)?.Times(-1, upper) : null;
        var low = limits.Lower is { } lower
            ? Extreme(requirement.Quantity, window, -1)?.Times(1, -lower) : null;
        return high is null || low?.Value < high.Value ? low : high;
    }

    /// <summary>The margin of the band about a target: whichever side is farther from it.</summary>
    private FigureSlopes? Settling(Measurand quantity, SettlesTo settles, MovingWindow window)
    {
        if (Extreme(quantity, window, 1) is not { } high || Extreme(quantity, window, -1) is not { } low)
        {
            return null;
        }

        var worst = high.Value - settles.Target > settles.Target - low.Value ? high : low;
        var band = settles.Within * Math.Abs(settles.Target);
        var side = Math.Sign(worst.Value - settles.Target);
        return worst.Times(-side, band + (side * settles.Target));
    }

    private FigureSlopes Gathered(double value, double? time, Func<int, PointSlope> slope) =>
        FigureSlopes.Gathered(value, time, [.. Enumerable.Range(0, variations.Length).Select(slope)]);

    /// <summary>A window cut to the study, and how it moves; null where it holds nothing.</summary>
    private MovingWindow? WindowOf(Window window)
    {
        if (times.Of(window) is not { } open)
        {
            return null;
        }

        return new MovingWindow(open.From, open.To, v => (
            open.From <= 0 || window.From is null ? 0 : march.Shifts[v].Of(window.From) ?? 0,
            window.To is { } to && open.To < solution.Until ? march.Shifts[v].Of(to)
                : march.EndShift(v)));
    }
}
