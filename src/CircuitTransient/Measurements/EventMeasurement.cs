using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Solutions;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Measurements;

/// <summary>Reports each switching with what its switch saw just before and after.</summary>
internal sealed class EventMeasurement(CurveBuilder curves, CancellationToken cancellation)
{
    private readonly TransientSolution solution = curves.Solution;
    private readonly Lazy<Segment> settled = new(() => SettledBefore(curves.Solution, cancellation));

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

    /// <summary>The value just before; at t = 0 that of the settled state, null where only what is stored is
    /// known.</summary>
    private double? Before(Measurand quantity, double time) =>
        time > 0 ? Value(quantity, time, before: true)
        : solution.Circuit.StartsSettled && settled.Value.Coefficients(quantity) is not null
            ? (double)settled.Value.ValueAtStart(quantity, Segment.Total)
            : null;

    /// <summary>The study as it would go on from a settled start with every switch in its first position and
    /// nothing but what has been on for ever.</summary>
    private static Segment SettledBefore(TransientSolution solution, CancellationToken cancellation)
    {
        var (circuit, layout) = (solution.Circuit, solution.Layout);
        ImmutableArray<Cause> causes =
        [
            .. CauseList.FromStart(circuit).Causes.Where(c => c.Source >= 0)
                .Select(c => c with { Pieces = [.. c.Pieces.Where(p => p.IsPerpetual)] }),
            new Cause("what is held", -1, [], -1, 0),
        ];
        DoubleDouble[][] stored =
        [
            .. causes.SkipLast(1).Select(_ => new DoubleDouble[layout.Stores.Length]),
            [.. solution.Initial.Select(x => (DoubleDouble)x)],
        ];
        var model = new IntervalModels(layout, cancellation).For(new Timeline(circuit).IsClosed)!;
        return new IntervalSolver(layout, causes, cancellation)
            .Solve(model, 0, 0, solution.Until, stored)[0];
    }

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
