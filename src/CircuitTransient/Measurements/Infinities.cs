using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Where a quantity is infinite for an instant: an impulse of a voltage or current, or the rate of
/// change of something that jumps.</summary>
internal sealed class Infinities(CurveBuilder curves)
{
    private readonly TransientSolution solution = curves.Solution;

    /// <summary>The first instants in a window at which the quantity is infinitely great and infinitely
    /// small.</summary>
    public (double? Up, double? Down) Of(Measurand quantity, double from, double until)
    {
        double? up = null, down = null;
        for (var s = 0; s < solution.Segments.Length; s++)
        {
            var time = solution.Segments[s].Start;
            if (time < from || time > until || (time == until && until > from))
            {
                continue;
            }

            var sign = Sign(quantity, s);
            var isBothWays = IsBothWays(quantity, s);
            up ??= sign > 0 || isBothWays ? time : null;
            down ??= sign < 0 || isBothWays ? time : null;
        }

        return (up, down);
    }

    /// <summary>When an infinity first breaks a bound: an impulse breaks bounds on either side, an integral
    /// that it makes infinite only the upper one.</summary>
    public double? BreaksAt(Measurand quantity, Limits limits, double from, double until)
    {
        var (up, down) = Of(quantity, from, until);
        return quantity is JouleIntegral ? (limits.Upper is null ? null : up)
            : up is null || down < up ? down : up;
    }

    private bool IsBothWays(Measurand quantity, int s) => quantity switch
    {
        RateOfChange rate => solution.Segments[s].ImpulseAtStart(rate.Of) != 0 || IsBothWays(rate.Of, s),
        VoltageBetween or VoltageAcross or CurrentThrough =>
            solution.Segments[s].IsBeyondImpulseAtStart(quantity),
        _ => false,
    };

    /// <summary>The sign of the infinity at a segment's start; zero where there is none.</summary>
    private int Sign(Measurand quantity, int s)
    {
        switch (quantity)
        {
            case RateOfChange rate:
                var impulse = Math.Sign(solution.Segments[s].ImpulseAtStart(rate.Of));
                return impulse != 0 ? impulse : Math.Sign(JumpAt(rate.Of, s));
            case PowerIn power:
                var voltage = new VoltageAcross(power.Part);
                var current = new CurrentThrough(power.Part, power.Delivered);
                var v = solution.Segments[s].ImpulseAtStart(voltage);
                var i = solution.Segments[s].ImpulseAtStart(current);
                return v != 0 ? Math.Sign(v * Level(current, s))
                    : i != 0 ? Math.Sign(i * Level(voltage, s))
                    : 0;
            case JouleIntegral joule:
                return solution.Segments[s].ImpulseAtStart(new CurrentThrough(joule.Part)) == 0 ? 0 : 1;
            case EnergyIn or CouplingEnergy or Figure:
                return 0;
            default:
                return Math.Sign(solution.Segments[s].ImpulseAtStart(quantity));
        }
    }

    /// <summary>By how much a voltage or current jumps at a segment's start; zero at the study's start,
    /// before which nothing is known of it.</summary>
    private double JumpAt(Measurand quantity, int s)
    {
        if (s == 0 || curves.Of(quantity) is not { } curve)
        {
            return 0;
        }

        var after = curve.Pieces[s].ValueAt(0);
        var before = curve.Pieces[s - 1].ValueAt(curve.Pieces[s - 1].Segment.Length);
        const double rounding = 1e-9; // the accuracy every value is held to
        var size = Math.Max(((LinearPiece)curve.Pieces[s]).Scale, ((LinearPiece)curve.Pieces[s - 1]).Scale);
        return Math.Abs(after - before) <= rounding * size ? 0 : after - before;
    }

    /// <summary>The value just after a segment's start or, where that is zero, just before it.</summary>
    private double Level(Measurand quantity, int s)
    {
        var curve = curves.Of(quantity);
        var after = curve?.Pieces[s].ValueAt(0) ?? 0;
        return after != 0 || curve is null || s == 0
            ? after
            : curve.Pieces[s - 1].ValueAt(curve.Pieces[s - 1].Segment.Length);
    }
}
