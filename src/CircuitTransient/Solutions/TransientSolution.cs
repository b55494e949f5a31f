using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Equations;

namespace CircuitTransient.Solutions;

/// <summary>A solved study: every cause's motion over every segment, in closed form.</summary>
/// <param name="Until">End of the study in seconds.</param>
/// <param name="UntilReason">Why it ends there, where the file does not say.</param>
/// <param name="Causes">The causes that were solved alone.</param>
/// <param name="Intervals">The intervals between switchings.</param>
/// <param name="Segments">Their segments, in order.</param>
/// <param name="Occurrences">Every switching that took place, in order.</param>
/// <param name="NeverActed">Declared events that did not take place within the study.</param>
/// <param name="Initial">What every store holds at t = 0⁻, in the layout's order: volts or amperes.</param>
public sealed record TransientSolution(
    Circuit Circuit,
    NetworkLayout Layout,
    double Until,
    string? UntilReason,
    ImmutableArray<Cause> Causes,
    ImmutableArray<SolvedInterval> Intervals,
    ImmutableArray<Segment> Segments,
    ImmutableArray<Occurrence> Occurrences,
    ImmutableArray<EventReference> NeverActed,
    ImmutableArray<double> Initial)
{
    /// <summary>Every event that had not come when the next one of its switch was due.</summary>
    public ImmutableArray<Lapse> Lapsed { get; init; } = [];

    /// <summary>Index of the segment that holds an instant; at a boundary the later one, unless the earlier
    /// is asked for.</summary>
    public int SegmentAt(double time, bool before = false)
    {
        int low = 0, high = Segments.Length - 1;
        while (low < high)
        {
            var middle = (low + high + 1) >>> 1;
            if (Segments[middle].Start < time || (!before && Segments[middle].Start == time))
            {
                low = middle;
            }
            else
            {
                high = middle - 1;
            }
        }

        return low;
    }
}

/// <summary>An interval between switchings.</summary>
/// <param name="FirstSegment">Index of its first segment.</param>
/// <param name="SegmentCount">How many segments it has.</param>
/// <param name="StartsWith">The switchings at its start.</param>
/// <param name="Momentary">The first segments of intervals that ended as they began, just before this
/// one.</param>
public sealed record SolvedInterval(
    double From, double Until, IntervalModel Model, int FirstSegment, int SegmentCount,
    ImmutableArray<Occurrence> StartsWith, ImmutableArray<Segment> Momentary);

/// <summary>A declared event that had not come when the next one of its switch was due, and then no longer
/// could.</summary>
/// <param name="Event">Which.</param>
/// <param name="Time">When the next one was due, in seconds.</param>
public sealed record Lapse(EventReference Event, double Time);

/// <summary>A switching that took place.</summary>
/// <param name="Time">In seconds.</param>
/// <param name="Event">Which declared event.</param>
/// <param name="Closes">Whether the switch closed.</param>
/// <param name="IsDecidedByAnswer">Whether the answer itself fixed the instant.</param>
public sealed record Occurrence(double Time, EventReference Event, bool Closes, bool IsDecidedByAnswer);
