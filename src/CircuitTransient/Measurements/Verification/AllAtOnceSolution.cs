using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>A study solved a second time, all causes at once, straight from the unreduced equations: no pole,
/// no eigenvector, no elimination by structure, nothing in common with the solution it judges.</summary>
public sealed class AllAtOnceSolution
{
    private AllAtOnceSolution(
        Circuit circuit, StorageLayout storage, InputModel inputs, ImmutableArray<Segment> segments,
        double until, NotJudged? rest)
    {
        (Circuit, Storage, Inputs, Segments) = (circuit, storage, inputs, segments);
        (Until, Rest) = (until, rest);
        EstimatedError = Segments.Sum(segment => segment.Propagator.ErrorOver(segment.End - segment.Start));
    }

    /// <summary>Up to which instant, in seconds, there are values.</summary>
    public double Until { get; }

    /// <summary>Why the study is not solved to its end; null where it is.</summary>
    public NotJudged? Rest { get; }

    /// <summary>The relative error of states, estimated: truncation and rounding of the
    /// propagation.</summary>
    public double EstimatedError { get; }

    /// <summary>The circuit solved.</summary>
    internal Circuit Circuit { get; }

    /// <summary>Its stored quantities.</summary>
    internal StorageLayout Storage { get; }

    /// <summary>Its sources.</summary>
    internal InputModel Inputs { get; }

    /// <summary>The spans in which no switch acts and no source bends.</summary>
    internal ImmutableArray<Segment> Segments { get; }

    /// <summary>Solves a study.</summary>
    /// <param name="initial">For each part the voltage of a capacitor or the current of a coil at t = 0⁻;
    /// null for what the statements say.</param>
    /// <param name="budget">Multiply-adds of double-doubles that may be spent; some 1.5e9 take a
    /// second.</param>
    public static AllAtOnceSolution Solve(
        Circuit circuit, SwitchingSchedule schedule, ImmutableArray<double>? initial = null,
        double budget = 1.5e10)
    {
        var layout = StorageLayout.Of(circuit);
        var sources = InputModel.Of(circuit);
        var work = new SolvingWork(circuit, layout, sources, schedule.Until, budget);
        work.Run(schedule, layout.FromVoltagesAndCurrents(initial ?? StorageLayout.StatedAtStart(circuit)));
        return new AllAtOnceSolution(
            circuit, layout, sources, [.. work.Segments], work.SolvedUntil, work.Reason is { } reason
                ? new NotJudged("sum of causes against all at once", reason)
                : null);
    }

    /// <summary>A voltage, current, power or stored energy, or the rate of change of a voltage or current,
    /// at an instant; at a jump the value after it, or before it. NaN where the equations leave it open,
    /// null for quantities that are not of one instant and past <see cref="Until"/>.</summary>
    public double? ValueAt(Measurand measurand, double time, bool before = false) =>
        ValuesAt([measurand], time, before)[0];

    /// <summary>Several values at one instant, as <see cref="ValueAt"/> gives them one by one.</summary>
    public ImmutableArray<double?> ValuesAt(
        ImmutableArray<Measurand> measurands, double time, bool before = false)
    {
        if (SegmentAt(time, before) is not { } segment)
        {
            return [.. measurands.Select(_ => (double?)null)];
        }

        var states = segment.StatesAt(time);
        var value = Reading(segment, states);
        var rate = measurands.Any(measurand => measurand is RateOfChange)
            ? Reading(segment, segment.Propagator.Rate(states))
            : null;
        return
        [
            .. measurands.Select(measurand => measurand is RateOfChange { Of: VoltageBetween or VoltageAcross
                or CurrentThrough } change ? rate!.Value(change.Of) : value.Value(measurand)),
        ];
    }

    /// <summary>The impulse at an instant of a voltage (volt-seconds) or of a current (coulombs); zero where
    /// nothing jumps, NaN where the equations leave it open.</summary>
    public double ImpulseAt(Measurand measurand, double time)
    {
        if (SegmentAt(time, before: false) is not { } segment || segment.Start != time)
        {
            return 0;
        }

        var p = segment.Propagator;
        var row = p.Impulses(segment.Before, segment.States);
        var jump = p.Stored(segment.States.Plus(-DoubleDouble.One, segment.Before), Storage.Count);
        var layout = segment.Equations.Unknowns;
        return new CircuitReading(Circuit, layout, Storage, i => row[0, i], [], [.. jump], _ => 0)
            .Value(measurand) ?? double.NaN;
    }

    /// <summary>The energy of all fields at an instant, joules; null past <see cref="Until"/>.</summary>
    public double? StoredEnergyAt(double time, bool before = false) =>
        SegmentAt(time, before) is { } segment
            ? (double)Reading(segment, segment.StatesAt(time)).StoredEnergy()
            : null;

    /// <summary>All unknowns that go with settled states of a span.</summary>
    internal CircuitReading Reading(Segment segment, SplitMatrix states)
    {
        var p = segment.Propagator;
        var unknowns = p.Unknowns(states);
        var all = p.Stored(states, Storage.Count + Inputs.StateCount);
        return new CircuitReading(
            Circuit, segment.Equations.Unknowns, Storage, i => unknowns[0, i], [.. all[..Storage.Count]],
            [.. p.Stored(p.Rate(states), Storage.Count)], part => SourceValue(part, all));
    }

    private double SourceValue(int part, DoubleDouble[] states)
    {
        DoubleDouble sum = 0;
        foreach (var group in Inputs.Groups)
        {
            sum += group.Part == part ? states[Storage.Count + group.First] : 0;
        }

        return (double)sum;
    }

    private Segment? SegmentAt(double time, bool before)
    {
        if (!(time >= 0 && time <= Until))
        {
            return null;
        }

        var (low, high) = (0, Segments.Length);
        while (low < high)
        {
            var middle = (low + high) / 2;
            var start = Segments[middle].Start;
            if (start < time || (start == time && !before))
            {
                low = middle + 1;
            }
            else
            {
                high = middle;
            }
        }

        return Segments.Length == 0 ? null : Segments[Math.Max(low - 1, 0)];
    }
}
