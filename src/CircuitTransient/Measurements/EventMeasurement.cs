using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;
using CircuitTransient.Solutions;

namespace CircuitTransient.Measurements;

/// <summary>Reports each switching with what its switch saw just before and after.</summary>
internal sealed class EventMeasurement(CurveBuilder curves)
{
    private readonly TransientSolution solution = curves.Solution;

    /// <summary>One switching.</summary>
    public EventResult Measure(Occurrence occurrence)
    {
        var part = occurrence.Event.Part;
        return new EventResult(
            occurrence.Time,
            solution.Circuit.Parts[part].Name,
            occurrence.Closes,
            Before(new VoltageAcross(part), occurrence.Time),
            After(new VoltageAcross(part), occurrence.Time),
            Before(new CurrentThrough(part), occurrence.Time),
            After(new CurrentThrough(part), occurrence.Time),
            occurrence.IsDecidedByAnswer ? "instant decided by the answer" : null);
    }

    /// <summary>The value just before; null at t = 0, before which only what is stored is known.</summary>
    private double? Before(Measurand quantity, double time) =>
        time > 0 ? Value(quantity, time, before: true) : null;

    private double? After(Measurand quantity, double time) => Value(quantity, time, before: false);

    /// <summary>A segment's own coefficients serve, since a quantity may be open in some other
    /// interval.</summary>
    private double? Value(Measurand quantity, double time, bool before)
    {
        var index = solution.SegmentAt(time, before);
        var segment = solution.Segments[index];
        return segment.Coefficients(quantity) is { } coefficients
            ? new LinearPiece(curves.Tables[index], coefficients)
                .ValueAt(Math.Clamp(time - segment.Start, 0, segment.Length))
            : null;
    }
}
