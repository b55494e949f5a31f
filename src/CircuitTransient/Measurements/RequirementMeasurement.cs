using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Figures;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>Judges requirements.</summary>
internal sealed class RequirementMeasurement(
    CurveBuilder curves, WindowTimes times, Infinities infinities, FigureMeasurement figures)
{
    private const int MostStretches = 1_000_000;

    /// <summary>The verdict; one that could not be judged does not hold, and its worst value is
    /// null.</summary>
    public RequirementResult Judge(Requirement requirement)
    {
        var line = curves.Solution.Circuit.Source.LineOf(requirement.Span.Start);
        var verdict = requirement.Bound switch
        {
            Limits limits when requirement.Quantity is Figure figure =>
                JudgeFigure(requirement, figure, limits),
            Limits limits => JudgeLimits(requirement, limits),
            SettlesTo settles => JudgeSettling(requirement, settles),
            _ => throw new System.Diagnostics.UnreachableException($"no verdict on {requirement.Bound}"),
        };
        return new RequirementResult(
            requirement.Statement, requirement.Reason, requirement.Unit, line, verdict.Holds, verdict.Worst,
            verdict.Margin)
        {
            Quantity = requirement.Judged,
            IsJudged = verdict.IsJudged,
        };
    }

    private Verdict JudgeLimits(Requirement requirement, Limits limits)
    {
        if (times.Of(requirement.Window) is not { } window)
        {
            return NotJudged(requirement);
        }

        if (CurveOf(requirement.Quantity, window) is not { } curve)
        {
            return NotJudged(requirement);
        }

        if (infinities.BreaksAt(requirement.Quantity, limits, window.From, window.To) is { } time)
        {
            return new Verdict(false, new TimedValue(null, time), null);
        }

        (TimedValue Worst, double Margin)? nearest = null;
        if (limits.Upper is { } upper)
        {
            var found = ExtremeSearch.Greatest(curve, window.From, window.To, MostStretches);
            nearest = (new TimedValue(found.Value, found.Time), upper - found.Value);
        }

        if (limits.Lower is { } lower)
        {
            var found = ExtremeSearch.Least(curve, window.From, window.To, MostStretches);
            if (nearest is not { } other || found.Value - lower < other.Margin)
            {
                nearest = (new TimedValue(found.Value, found.Time), found.Value - lower);
            }
        }

        var (worst, margin) = nearest!.Value;
        return new Verdict(margin >= 0, worst, margin);
    }

    /// <summary>A figure is one number; where the waveform has none, the requirement does not hold.</summary>
    private Verdict JudgeFigure(
        Requirement requirement, Figure figure, Limits limits)
    {
        if (figures.Read(figure, requirement.Window) is not { Value: { } value, Time: var time })
        {
            return NotJudged(requirement);
        }

        var margin = Math.Min(
            (limits.Upper ?? double.PositiveInfinity) - value,
            value - (limits.Lower ?? double.NegativeInfinity));
        return new Verdict(margin >= 0, new TimedValue(value, time), margin);
    }

    /// <summary>From the stated instant on the quantity stays within the band about its target.</summary>
    private Verdict JudgeSettling(Requirement requirement, SettlesTo settles)
    {
        if (times.Of(new Window(settles.By, requirement.Window.To)) is not { } window
            || CurveOf(requirement.Quantity, window) is not { } curve)
        {
            return NotJudged(requirement);
        }

        var band = settles.Within * Math.Abs(settles.Target);
        var high = ExtremeSearch.Greatest(curve, window.From, window.To, MostStretches);
        var low = ExtremeSearch.Least(curve, window.From, window.To, MostStretches);
        var worst = high.Value - settles.Target > settles.Target - low.Value ? high : low;
        var margin = band - Math.Abs(worst.Value - settles.Target);
        return new Verdict(margin >= 0, new TimedValue(worst.Value, worst.Time), margin);
    }

    /// <summary>A quantity's curve, good within a window at least: outside it the equations may leave open
    /// what is judged. An energy gathers from the start, so it must be known throughout.</summary>
    private Curve? CurveOf(Measurand quantity, (double From, double To) window)
    {
        var from = CurveBuilder.GatheredFrom(quantity, window.From);
        return curves.Of(quantity, from: from)
            ?? (quantity is EnergyIn && curves.IsAccumulated(quantity)
                ? null
                : curves.Within(window).Of(quantity, from: from));
    }

    private Verdict NotJudged(Requirement requirement) =>
        new(false, new TimedValue(null, times.Of(requirement.Window)?.From ?? curves.Solution.Until), null,
            IsJudged: false);

    private sealed record Verdict(bool Holds, TimedValue Worst, double? Margin, bool IsJudged = true);
}
