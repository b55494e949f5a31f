using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions.Curves;

namespace CircuitTransient.Solutions;

/// <summary>Finds the switchings whose instants the answer itself decides.</summary>
internal sealed class DecidedEvents(Timeline timeline, WatchedQuantities quantities, double resolution)
{
    private const double Rounding = 1e-14; // of the waveform's own size
    private const double Nothing = 1e-20; // of the largest current: of 32 digits solved in, still rounding

    /// <summary>The first instant in an interval at which a waiting event's condition holds, and the events
    /// that act then; null where none does.</summary>
    /// <param name="segments">The interval, solved as if nothing happened in it.</param>
    public (double Time, ImmutableArray<EventReference> Events)? FirstIn(ImmutableArray<Segment> segments)
    {
        var waiting = timeline.Waiting().Where(w => !Timeline.IsFixed(w.Event)).ToArray();
        if (waiting.Length == 0)
        {
            return null;
        }

        var tables = segments.Select(s => new SegmentTable(s)).ToArray();
        var found = new List<(double Time, EventReference Event)>();
        foreach (var (reference, declared) in waiting)
        {
            var watched = Watched(reference, declared);
            if (Holds(watched, tables, timeline.Due(reference, declared)) is { } time)
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

    /// <summary>What an event waits for: a condition of its own, or the fall of its switch's
    /// current.</summary>
    public static WhenCrosses Watched(EventReference reference, SwitchEvent declared) =>
        declared.Trigger is WhenCrosses condition
            ? condition
            : new WhenCrosses(
                new CurrentThrough(reference.Part), Rises: false, declared.CutAtMost!.Value,
                InMagnitude: true, null);

    private double? Holds(WhenCrosses watched, SegmentTable[] tables, double watchedFrom)
    {
        if (quantities.Over(tables, watched.Quantity) is not { } pieces)
        {
            return null;
        }

        foreach (var piece in pieces)
        {
            var from = Math.Max(0, watchedFrom - piece.Segment.Start);
            if (from <= piece.Segment.Length && Crossing(piece, watched, from) is { } tau)
            {
                return piece.Segment.Start + tau;
            }
        }

        return null;
    }

    private static double? Crossing(CurvePiece piece, WhenCrosses watched, double from)
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

        var size = Size(piece);
        return watched.Quantity is CurrentThrough && size <= Nothing * LargestCurrent(piece.Segment)
            ? from
            : new FallSearch(piece, watched.Level, Rounding * size).First(from);
    }

    private static double Size(CurvePiece piece)
    {
        var envelope = new double[piece.Segment.Basis.Width];
        piece.Segment.Basis.Envelope(0, piece.Segment.Length, envelope);
        return piece switch
        {
            LinearPiece linear => linear.Scale,
            QuadraticPiece quadratic => quadratic.MagnitudeWithin(envelope),
            _ => Math.Abs(piece.Tabulated[^1]),
        };
    }

    private static double LargestCurrent(Segment segment)
    {
        var envelope = new double[segment.Basis.Width];
        segment.Basis.Envelope(0, segment.Length, envelope);
        double largest = 0;
        for (var i = 0; i < segment.Model.Form.Layout.Circuit.Parts.Length; i++)
        {
            foreach (var (c, e) in (segment.Coefficients(new CurrentThrough(i)) ?? []).Zip(envelope))
            {
                largest = Math.Max(largest, Math.Abs(c) * e);
            }
        }

        return largest;
    }
}
