using System.Collections.Immutable;
using System.Numerics;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>A stretch of the study without a switching or a source's corner: every voltage and current is a
/// sum of a fixed set of functions, cause by cause.</summary>
public sealed class Segment
{
    private readonly SegmentModes modes;
    private readonly ImmutableArray<Motion> motions;
    private readonly Motion total;
    private readonly Onset onset;
    private readonly Func<int, Onset> onsetOf;
    private readonly Dictionary<(Measurand, int), double[]> coefficients = [];

    internal Segment(
        IntervalModel model, int interval, double start, double end, SegmentModes modes,
        ImmutableArray<Motion> motions, Func<int, Onset> onsetOf)
    {
        Model = model;
        Interval = interval;
        Start = start;
        End = end;
        this.modes = modes;
        this.motions = motions;
        this.onsetOf = onsetOf;
        onset = onsetOf(Total);
        total = Motion.Sum(motions.Length == 0 ? [Still(model)] : motions);
    }

    /// <summary>The network it belongs to.</summary>
    public IntervalModel Model { get; }

    /// <summary>Index of its interval.</summary>
    public int Interval { get; }

    /// <summary>Where it begins, in seconds.</summary>
    public double Start { get; }

    /// <summary>Where it ends, in seconds.</summary>
    public double End { get; }

    /// <summary>Its length in seconds.</summary>
    public double Length => End - Start;

    /// <summary>Its functions of time.</summary>
    public SegmentBasis Basis => modes.Basis;

    /// <summary>The total's index where a cause's is asked for.</summary>
    public const int Total = -1;

    /// <summary>The coefficients of a linear quantity, of one cause or of the total; null
    /// where it is undetermined.</summary>
    public double[]? Coefficients(Measurand measurand, int cause = Total)
    {
        lock (coefficients)
        {
            if (coefficients.TryGetValue((measurand, cause), out var known))
            {
                return known;
            }
        }

        // Outside the lock: threads that want other quantities need not wait, and two that want the same find
        // the same.
        var projection = Model.Project(measurand);
        if (!projection.Output.IsDetermined)
        {
            return null;
        }

        var exact = modes.Coefficients(projection, cause == Total ? total : motions[cause]);
        var rounded = new double[Basis.Width];
        for (var m = 0; m < exact.Length; m++)
        {
            for (var k = 0; k < exact[m].Length; k++)
            {
                Basis.Put(rounded, m, k, (Complex)exact[m][k]);
            }
        }

        lock (coefficients)
        {
            return coefficients.TryAdd((measurand, cause), rounded)
                ? rounded
                : coefficients[(measurand, cause)];
        }
    }

    /// <summary>The coefficients with every pole's own motion in its own mode, however near a source is to
    /// it; null where the quantity is undetermined.</summary>
    internal DoubleDoubleComplex[][]? CoefficientsByMode(Measurand measurand, int cause) =>
        Model.Project(measurand) is { Output.IsDetermined: true } projection
            ? modes.Coefficients(projection, cause == Total ? total : motions[cause], isBeside: false)
            : null;

    /// <summary>A linear quantity at the segment's end in double-double.</summary>
    internal DoubleDouble ValueAtEnd(Measurand measurand, int cause)
    {
        var exact = modes.Coefficients(Model.Project(measurand), cause == Total ? total : motions[cause]);
        var carriers = modes.CarriersAtEnd;
        var sum = DoubleDouble.Zero;
        for (var m = 0; m < exact.Length; m++)
        {
            for (var k = 0; k < exact[m].Length; k++)
            {
                sum += (exact[m][k] * carriers[m][k]).Re;
            }
        }

        return sum;
    }

    /// <summary>A linear quantity at the segment's start in double-double.</summary>
    internal DoubleDouble ValueAtStart(Measurand measurand, int cause)
    {
        var exact = modes.Coefficients(Model.Project(measurand), cause == Total ? total : motions[cause]);
        var sum = DoubleDouble.Zero;
        for (var m = 0; m < exact.Length; m++)
        {
            for (var i = 0; i < Basis.Modes[m].Rows; i++)
            {
                sum += exact[m][Basis.Modes[m].Carrier(i, i)].Re;
            }
        }

        return sum;
    }

    /// <summary>The impulse of a voltage (V·s) or current (C) at the segment's start;
    /// zero where there is none.</summary>
    public double ImpulseAtStart(Measurand measurand, int cause = Total) =>
        (cause == Total ? onset : onsetOf(cause)).ImpulseIn(Model.Project(measurand).Output);

    /// <summary>Whether a voltage or current carries a derivative of an impulse at the segment's
    /// start: it is infinite both ways.</summary>
    public bool IsBeyondImpulseAtStart(Measurand measurand) =>
        onset.IsBeyondImpulseIn(Model.Project(measurand).Output);

    /// <summary>The motion of a cause, or the total's.</summary>
    internal Motion MotionOf(int cause) => cause == Total ? total : motions[cause];

    /// <summary>The state of every block at the segment's end, for a cause.</summary>
    internal DoubleDoubleComplex[][] StateAtEnd(int cause) => modes.StateAtEnd(motions[cause]);

    private static Motion Still(IntervalModel model) =>
        new([.. model.Blocks.Select(b => new DoubleDoubleComplex[b.Size])], []);
}
