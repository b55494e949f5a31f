using System.Collections.Immutable;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>Solves one interval between switchings, segment by segment, each cause alone.</summary>
internal sealed class IntervalSolver(
    NetworkLayout layout, ImmutableArray<Cause> causes, CancellationToken cancellation)
{
    private readonly double[] sizes = new double[layout.InputCount];

    /// <summary>The segments of an interval.</summary>
    /// <param name="model">The network.</param>
    /// <param name="index">Which interval it is.</param>
    /// <param name="from">Its start in seconds.</param>
    /// <param name="until">Its end.</param>
    /// <param name="stored">What every store holds at its start, cause by cause.</param>
    public ImmutableArray<Segment> Solve(
        IntervalModel model, int index, double from, double until, DoubleDouble[][] stored)
    {
        var segments = ImmutableArray.CreateBuilder<Segment>();
        var states = stored.Select(s => StateFrom(model, s)).ToArray();
        var corners = SourceCorners.Between(causes, from, until);
        for (var k = 0; k + 1 < corners.Length; k++)
        {
            cancellation.ThrowIfCancellationRequested();
            var motions =
                causes.Select((c, n) => new Motion(states[n], Forcings(c, corners[k]))).ToImmutableArray();
            var forcings = motions.SelectMany(m => m.Forcings);
            var modes = new SegmentModes(model, corners[k], corners[k + 1], forcings);
            var before = k == 0 ? null : segments[^1];
            var soFar = (double[])sizes.Clone();
            segments.Add(new Segment(
                model, index, corners[k], corners[k + 1], modes, motions,
                c => OnsetOf(c, before, motions, stored, soFar)));
            for (var c = 0; c < causes.Length && k + 2 < corners.Length; c++)
            {
                states[c] = segments[^1].StateAtEnd(c);
            }
        }

        NoteSizes(segments);
        return segments.ToImmutable();
    }

    private Onset OnsetOf(
        int cause, Segment? before, ImmutableArray<Motion> motions, DoubleDouble[][] stored, double[] soFar)
    {
        var whose = cause == Segment.Total ? motions : [motions[cause]];
        return before is null
            ? Onset.OfInterval(layout, whose, cause == Segment.Total ? stored : [stored[cause]], soFar)
            : Onset.OfCorner(layout, before, whose, cause);
    }

    private void NoteSizes(IEnumerable<Segment> segments)
    {
        foreach (var segment in segments)
        {
            var envelope = new double[segment.Basis.Width];
            segment.Basis.Envelope(0, segment.Length, envelope);
            for (var k = 0; k < layout.Stores.Length; k++)
            {
                if (segment.Coefficients(layout.Held(layout.Stores[k])) is { } c)
                {
                    var largest = c.Zip(envelope, (x, y) => Math.Abs(x) * y).DefaultIfEmpty(0).Max();
                    sizes[layout.Sources.Length + k] = Math.Max(sizes[layout.Sources.Length + k], largest);
                }
            }
        }
    }

    /// <summary>What every store holds at a segment's end, cause by cause.</summary>
    public DoubleDouble[][] StoredAtEnd(Segment segment) =>
        [.. causes.Select((_, c) =>
            layout.Stores.Select(p => segment.ValueAtEnd(layout.Held(p), c)).ToArray())];

    /// <summary>What every store holds just after a segment's start, cause by cause.</summary>
    public DoubleDouble[][] StoredAtStart(Segment segment) =>
        [.. causes.Select((_, c) =>
            layout.Stores.Select(p => segment.ValueAtStart(layout.Held(p), c)).ToArray())];

    private ImmutableArray<Forcing> Forcings(Cause cause, double start) =>
        cause.Source < 0
            ? []
            : Forcing.Of(
                cause.Pieces, layout.Input(cause.Source), CauseList.ScaleOf(layout.Circuit, cause.Source),
                start);

    private DoubleDoubleComplex[][] StateFrom(IntervalModel model, DoubleDouble[] stored)
    {
        var state = new DoubleDoubleComplex[model.Blocks.Length][];
        for (var b = 0; b < state.Length; b++)
        {
            state[b] = new DoubleDoubleComplex[model.Blocks[b].Size];
            for (var k = 0; k < stored.Length; k++)
            {
                if (!stored[k].IsZero)
                {
                    var drive = model.Drive(b, layout.Sources.Length + k);
                    for (var i = 0; i < drive.Length; i++)
                    {
                        state[b][i] += drive[i] * stored[k];
                    }
                }
            }
        }

        return state;
    }
}
