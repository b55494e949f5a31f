using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>A span in which no switch acts and no source bends.</summary>
/// <param name="Start">In seconds.</param>
/// <param name="End">In seconds.</param>
/// <param name="Equations">The equations in it.</param>
/// <param name="Propagator">What carries states through it.</param>
/// <param name="Before">The stored quantities just before it, with the source states just after its
/// start.</param>
/// <param name="States">All states just after its start.</param>
internal sealed record Segment(
    double Start, double End, DescriptorEquations Equations, Propagator Propagator, SplitMatrix Before,
    SplitMatrix States)
{
    /// <summary>All states at an instant of the span.</summary>
    public SplitMatrix StatesAt(double time) => Propagator.Advance(States, (DoubleDouble)time - Start);
}

/// <summary>Goes once through a study, segment by segment, within a budget.</summary>
internal sealed class SolvingWork(
    Circuit circuit, StorageLayout storage, InputModel inputs, double until, double budget)
{
    private readonly Dictionary<string, (DescriptorEquations Equations, Propagator Propagator)> known = [];
    private readonly double rateBound = RateBound.Of(circuit, storage);
    private double left = budget;

    /// <summary>The segments solved.</summary>
    public List<Segment> Segments { get; } = [];

    /// <summary>End of the last of them.</summary>
    public double SolvedUntil { get; private set; }

    /// <summary>Why the work stopped early; null where it did not.</summary>
    public string? Reason { get; private set; }

    /// <summary>Solves from the quantities stored at t = 0⁻.</summary>
    public void Run(SwitchingSchedule schedule, DoubleDouble[] stored)
    {
        var cursor = new InputCursor(circuit, inputs);
        for (var i = 0; i < schedule.Intervals.Length; i++)
        {
            var (start, closed) = schedule.Intervals[i];
            var end = i + 1 < schedule.Intervals.Length ? schedule.Intervals[i + 1].Start : until;
            if (end <= start && !(i == schedule.Intervals.Length - 1 && end == start))
            {
                continue;
            }

            if (EquationsFor(closed, start) is not { } found)
            {
                return;
            }

            double[] times = [start, .. InputModel.Corners(circuit, start, end), end];
            for (var k = 0; k + 1 < times.Length; k++)
            {
                if (!Spend(SegmentCost, times[k]))
                {
                    return;
                }

                stored = Cross(found.Equations, found.Propagator, times[k], times[k + 1], stored, cursor);
                if (Array.Exists(stored, q => !q.IsFinite))
                {
                    Segments.RemoveAt(Segments.Count - 1);
                    Reason = $"the solution grows past all numbers after {times[k]:R} s";
                    return;
                }

                SolvedUntil = times[k + 1];
            }
        }
    }

    private double SegmentCost => 60.0 * Math.Pow(storage.Count + inputs.StateCount, 2);

    private DoubleDouble[] Cross(
        DescriptorEquations equations, Propagator propagator, double start, double end, DoubleDouble[] stored,
        InputCursor cursor)
    {
        var before = propagator.Row(stored, cursor.StatesAfter(start));
        var states = propagator.Settle(before);
        Segments.Add(new Segment(start, end, equations, propagator, before, states));
        return propagator.Stored(propagator.Advance(states, (DoubleDouble)end - start), storage.Count);
    }

    private (DescriptorEquations Equations, Propagator Propagator)? EquationsFor(
        ImmutableArray<bool> closed, double start)
    {
        var positions = string.Create(closed.Length, closed, (text, values) =>
        {
            for (var i = 0; i < text.Length; i++)
            {
                text[i] = values[i] ? '1' : '0';
            }
        });
        if (known.TryGetValue(positions, out var found))
        {
            return found;
        }

        double parts = circuit.Parts.Length;
        if (parts * parts > left)
        {
            Reason = $"{circuit.Parts.Length} parts are too many for a dense second solve";
            return null;
        }

        var equations = DescriptorEquations.Of(circuit, storage, closed, resistorsAsBranches: false);
        if (!Spend(Propagator.CostOf(equations, inputs), start))
        {
            return null;
        }

        if (Propagator.Of(equations, inputs, rateBound, 1 / Math.Max(until, 1e-30)) is not { } propagator)
        {
            Reason = $"no unique solution from {start:R} s on";
            return null;
        }

        known.Add(positions, (equations, propagator));
        return (equations, propagator);
    }

    private bool Spend(double cost, double time)
    {
        left -= cost;
        if (left < 0)
        {
            Reason = $"the budget of the second solve ends at {time:R} s";
        }

        return left >= 0;
    }
}
