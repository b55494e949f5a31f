using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Solutions;

/// <summary>Finds the switchings whose instants the answer itself decides.</summary>
internal sealed class DecidedEvents(Timeline timeline, double resolution)
{
    /// <summary>The first instant in an interval at which a waiting event's condition holds, and the events
    /// that act then; null where none does.</summary>
    /// <param name="segments">The interval, solved as if nothing happened in it.</param>
    public (double Time, ImmutableArray<EventReference> Events)? FirstIn(ImmutableArray<Segment> segments)
    {
        var tables = segments.Select(s => new SegmentTable(s)).ToArray();
        var found = new List<(double Time, EventReference Event)>();
        foreach (var (reference, declared) in timeline.Waiting())
        {
            if (Timeline.IsFixed(declared))
            {
                continue;
            }

            var watchedFrom = timeline.Due(reference, declared);
            if (Holds(reference, declared, tables, watchedFrom) is { } time)
            {
                found.Add((time, reference));
            }
        }

        if (found.Count == 0)
        {
            return null;
        }

        var first = found.Min(f => f.Time);
        return (first, [.. found.Where(f => f.Time <= first + resolution).Select(f => f.Event)]);
    }

    private static double? Holds(
        EventReference reference, SwitchEvent declared, SegmentTable[] tables, double watchedFrom)
    {
        var watched = declared.Trigger is WhenCrosses w
            ? w
            : new WhenCrosses(new CurrentThrough(reference.Part), Rises: false, declared.CutAtMost!.Value,
                true, null);
        foreach (var table in tables)
        {
            var from = Math.Max(0, watchedFrom - table.Segment.Start);
            if (from > table.Segment.Length
                || table.Segment.Coefficients(watched.Quantity) is not { } coefficients)
            {
                continue;
            }

            if (Crossing(new LinearPiece(table, coefficients), watched, from) is { } tau)
            {
                return table.Segment.Start + tau;
            }
        }

        return null;
    }

    private static double? Crossing(LinearPiece piece, WhenCrosses watched, double from)
    {
        var until = piece.Segment.Length;
        var rises = watched.Rises ? 1 : -1;
        if (!watched.InMagnitude)
        {
            return LevelSearch.First(piece, rises, rises * watched.Level, from, until);
        }

        if (watched.Rises)
        {
            var up = LevelSearch.First(piece, 1, watched.Level, from, until);
            var down = LevelSearch.First(piece, -1, watched.Level, from, until);
            return up is null || down < up ? down : up;
        }

        // The magnitude falls to a level (zero too): the value, while it keeps its sign, falls to it. A zero
        // that is only touched counts within rounding of the waveform's size.
        var sign = piece.ValueAt(from) < 0 ? -1 : 1;
        var touch = watched.Level + (1e-14 * piece.Scale);
        if (LevelSearch.First(piece, -sign, -touch, from, until) is not { } near)
        {
            return null;
        }

        var exact = LevelSearch.First(piece, -sign, -watched.Level, near, until);
        return exact is { } e && e - near <= 1e-6 * until ? e : near;
    }
}
