using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements.Figures;

/// <summary>Reads figures off the closed form of a waveform.</summary>
internal sealed class FigureMeasurement(CurveBuilder curves, WindowTimes times, Infinities infinities)
{
    /// <summary>An observed figure with its definition in words.</summary>
    public FigureResult Measure(Observation observation)
    {
        var figure = (Figure)observation.Quantity;
        var within = observation.Window is { From: null, To: null } ? "" : "; within the window asked for";
        return new FigureResult(
            observation.Name, observation.Unit, Read(figure, observation.Window)?.Value,
            Definition(figure) + within);
    }

    /// <summary>Reads a figure; null where the window or the waveform is undetermined. A waveform with an
    /// impulse in the window has no figures.</summary>
    public FigureReading? Read(Figure figure, Window window)
    {
        if (times.Of(window) is not { } open
            || curves.Of(figure.Of, from: CurveBuilder.GatheredFrom(figure.Of, open.From)) is not { } total)
        {
            return null;
        }

        var curve = new WindowedCurve(total, curves.Solution, open.From, open.To);
        return infinities.Of(figure.Of, open.From, open.To) is (null, null)
            ? Read(figure, curve)
            : FigureReading.None(curve);
    }

    private static FigureReading Read(Figure figure, WindowedCurve curve) => figure.Kind switch
    {
        FigureOf.RiseTime => RiseTime.Of(curve),
        FigureOf.FrontTime => ImpulseTimesOf(figure).Front(curve),
        FigureOf.TimeToHalfValue => ImpulseTimesOf(figure).HalfValue(curve),
        FigureOf.Overshoot => Overshoot.Of(curve),
        FigureOf.SettlingTime => SettlingTime.Of(curve, figure.Argument!.Value),
        FigureOf.RingFrequency => RingFrequency.Of(curve),
        FigureOf.TimeOfPeak => PeakTimes.Peak(curve),
        FigureOf.TimeStaysBelow => PeakTimes.StaysBelow(curve, figure.Argument!.Value),
        _ => throw new System.Diagnostics.UnreachableException($"no reading for {figure.Kind}"),
    };

    private static string Definition(Figure figure) => figure.Kind switch
    {
        FigureOf.RiseTime => RiseTime.Definition,
        FigureOf.FrontTime => ImpulseTimesOf(figure).FrontDefinition,
        FigureOf.TimeToHalfValue => ImpulseTimesOf(figure).HalfValueDefinition,
        FigureOf.Overshoot => Overshoot.Definition,
        FigureOf.SettlingTime => SettlingTime.Definition,
        FigureOf.RingFrequency => RingFrequency.Definition,
        FigureOf.TimeOfPeak => PeakTimes.PeakDefinition,
        FigureOf.TimeStaysBelow => PeakTimes.StaysBelowDefinition,
        _ => throw new System.Diagnostics.UnreachableException($"no definition for {figure.Kind}"),
    };

    /// <summary>The rules for an impulse of a quantity's kind.</summary>
    public static ImpulseTimes ImpulseTimesOf(Figure figure) =>
        figure.Of is VoltageBetween or VoltageAcross ? ImpulseTimes.OfVoltage : ImpulseTimes.OfCurrent;
}
