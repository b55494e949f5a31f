using CircuitTransient.Circuits;
using CircuitTransient.Measurements.Figures;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>The derivative of a figure read off a waveform: it is made of values and of instants at which a
/// level is reached, and such an instant goes by −(∂(y − level)/∂p) / y′.</summary>
internal sealed class ReadingSlopes
{
    private readonly SlopeMarch march;
    private readonly ExtremeSlopes extremes;
    private readonly TransientSolution solution;
    private readonly Figure figure;
    private readonly Curve curve;
    private readonly MovingWindow window;
    private readonly int value;
    private readonly WindowedCurve read;

    /// <summary>Looks at a figure as a value moves it.</summary>
    /// <param name="march">The derivatives.</param>
    /// <param name="extremes">Those of extremes.</param>
    /// <param name="figure">The figure.</param>
    /// <param name="curve">The waveform's curve.</param>
    /// <param name="window">The window it is read in.</param>
    /// <param name="value">Index of the value.</param>
    public ReadingSlopes(
        SlopeMarch march, ExtremeSlopes extremes, Figure figure, Curve curve, MovingWindow window, int value)
    {
        this.march = march;
        this.extremes = extremes;
        this.figure = figure;
        this.curve = curve;
        this.window = window;
        this.value = value;
        solution = march.Reading.Solution;
        read = new WindowedCurve(curve, solution, window.From, window.To);
    }

    /// <summary>The figure's derivative.</summary>
    public PointSlope Find()
    {
        var slope = figure.Kind switch
        {
            FigureOf.RiseTime => RiseTime(),
            FigureOf.FrontTime => FrontTime(),
            FigureOf.TimeToHalfValue => TimeToHalfValue(),
            FigureOf.Overshoot => Overshoot(),
            FigureOf.SettlingTime => SettlingTime(),
            FigureOf.TimeStaysBelow => TimeStaysBelow(),
            FigureOf.TimeOfPeak => Peak.Time - window.Moves(value).From,
            FigureOf.RingFrequency => RingFrequency(),
            _ => throw new System.Diagnostics.UnreachableException($"no slope of {figure.Kind}"),
        };
        return slope is { } known && double.IsFinite(known)
            ? new PointSlope(known, null, null)
            : PointSlope.Unknown(march.Refusals[value]?.Reason
                ?? "what it is read from has no derivative: a level is met at a jump or without a slope");
    }

    private PointSlope Peak => field.Value is null
        ? field = extremes.Of(figure.Of, curve, read.Peak, window, value)
        : field;

    private double? RiseTime()
    {
        var start = read.Start;
        var (final, change) = (read.FinalAfterChange, (read.FinalAfterChange ?? read.Peak.Value) - start);
        var startSlope = At(window.From, window.Moves(value).From);
        var changeSlope = (final is null ? Peak.Value : Final()) - startSlope;
        var sign = Math.Sign(change);
        var low = read.FirstReach(sign, start + (0.1 * change), window.From);
        var high = low is { } l ? read.FirstReach(sign, start + (0.9 * change), l) : null;
        return Reached(high, startSlope + (0.9 * changeSlope))
            - Reached(low, startSlope + (0.1 * changeSlope));
    }

    private double? FrontTime()
    {
        var (times, low, high) = Front();
        return times.FrontFactor * (high - low);
    }

    private double? TimeToHalfValue()
    {
        var (times, low, high) = Front();
        var origin = low - (times.OriginFraction * times.FrontFactor * (high - low));
        var peak = read.Peak;
        var half = read.FirstReach(-Math.Sign(peak.Value), peak.Value / 2, peak.Time);
        return Reached(half, Peak.Value / 2) - origin;
    }

    private double? Overshoot()
    {
        var final = read.FinalAfterChange!.Value;
        var change = final - read.Start;
        var furthest = change > 0 ? read.Greatest : read.Least;
        if (100 * (furthest.Value - final) / change <= 0)
        {
            return 0;
        }

        var most = extremes.Of(figure.Of, curve, furthest, window, value).Value;
        var changeSlope = Final() - At(window.From, window.Moves(value).From);
        return 100 * ((most - Final()) - ((furthest.Value - final) / change * changeSlope)) / change;
    }

    private double? SettlingTime()
    {
        var final = read.Final!.Value;
        var band = figure.Argument!.Value * Math.Abs(final);
        var bandSlope = figure.Argument.Value * Math.Sign(final) * Final();
        return Last((final + band, Final() + bandSlope), (final - band, Final() - bandSlope));
    }

    private double? TimeStaysBelow() =>
        Last((figure.Argument!.Value, 0), (-figure.Argument.Value, 0));

    private double? RingFrequency()
    {
        const double same = 1e-9;
        var frequency = Measurements.Figures.RingFrequency.Of(read).Value ?? double.NaN;
        var interval = read.PeakPiece.Segment.Interval;
        var pole = PoleSlopes.Of(march.ModelOf(interval), march.Variations)
            .FirstOrDefault(p => p.Multiplicity == 1
                && Math.Abs((p.Pole.Imaginary / (2 * Math.PI)) - frequency) <= same * frequency);
        return pole?.Slopes[value].Imaginary / (2 * Math.PI);
    }

    /// <summary>The later of the last instants above one level and below another, from the window's
    /// start.</summary>
    private double? Last((double Level, double? Slope) upper, (double Level, double? Slope) lower)
    {
        var start = window.Moves(value).From;
        var above = read.LastReach(1, upper.Level);
        var below = read.LastReach(-1, lower.Level);
        return above is null && below is null ? 0
            : (above ?? window.From) >= (below ?? window.From)
                ? Reached(above, upper.Slope) - start
                : Reached(below, lower.Slope) - start;
    }

    private (ImpulseTimes Times, double? Low, double? High) Front()
    {
        var times = FigureMeasurement.ImpulseTimesOf(figure);
        var peak = read.Peak.Value;
        var sign = Math.Sign(peak);
        var low = read.FirstReach(sign, times.LowFraction * peak, window.From);
        var high = low is { } l ? read.FirstReach(sign, 0.9 * peak, l) : null;
        return (times, Reached(low, times.LowFraction * Peak.Value), Reached(high, 0.9 * Peak.Value));
    }

    /// <summary>The value's own derivative just after an instant that moves.</summary>
    private double? At(double time, double shift)
    {
        var (segment, tau) = Place(time);
        return extremes.ValueSlope(figure.Of, window, segment, tau, value)
            + (extremes.Rates(figure.Of, segment, tau)?.Slope * shift);
    }

    /// <summary>How the instant goes at which a level is reached; null at a jump.</summary>
    private double? Reached(double? time, double? level)
    {
        if (time is not { } instant)
        {
            return null;
        }

        var (segment, tau) = Place(instant);
        var length = solution.Segments[segment].Length;
        const double rounding = 1e-12;
        return tau <= rounding * length || tau >= (1 - rounding) * length ? null
            : (level - extremes.ValueSlope(figure.Of, window, segment, tau, value))
                / extremes.Rates(figure.Of, segment, tau)?.Slope;
    }

    private (int Segment, double Tau) Place(double time)
    {
        var segment = solution.SegmentAt(time);
        var at = solution.Segments[segment];
        return (segment, Math.Clamp(time - at.Start, 0, at.Length));
    }

    private double? Final()
    {
        var last = solution.SegmentAt(window.To, before: window.To > window.From);
        return march.Reading.FinalSlope(figure.Of, last, value);
    }
}
