
using System.Collections.Concurrent;

namespace CircuitTransient.Solutions.Curves;

/// <summary>A segment's functions tabulated where they move, once for all curves on it.</summary>
public sealed class SegmentTable
{
    private readonly double[] values;
    private readonly double[] envelopes;
    private readonly double[] middles;
    private readonly int width;
    private readonly StretchRoom room;
    private readonly ConcurrentDictionary<(double From, double Until), double[]> stretches = [];
    private readonly Lazy<(int[] Starts, double[] Weights, double[] Values)> nodes;

    /// <summary>Tabulates a segment.</summary>
    public SegmentTable(Segment segment)
        : this(segment, new StretchRoom(0))
    {
    }

    /// <summary>Tabulates a segment with room for stretches that searches ask for.</summary>
    internal SegmentTable(Segment segment, StretchRoom room)
    {
        this.room = room;
        Segment = segment;
        Instants = SamplingSteps.Of(segment.Basis, segment.Length, stepFraction: 1.5, mostSteps: 300);
        width = segment.Basis.Width;
        values = new double[Instants.Length * width];
        envelopes = new double[Math.Max(0, Instants.Length - 1) * width];
        for (var k = 0; k < Instants.Length; k++)
        {
            segment.Basis.Evaluate(Instants[k], values.AsSpan(k * width, width));
        }

        middles = new double[envelopes.Length];
        nodes = new(PlaceNodes);
        for (var k = 0; k + 1 < Instants.Length; k++)
        {
            segment.Basis.Envelope(Instants[k], Instants[k + 1], envelopes.AsSpan(k * width, width));
            var middle = Instants[k] + ((Instants[k + 1] - Instants[k]) / 2);
            segment.Basis.Evaluate(middle, middles.AsSpan(k * width, width));
        }
    }

    /// <summary>The integral of a curve from each tabulated instant to the next.</summary>
    internal double IntegralBetween(CurvePiece curve, int k)
    {
        var (starts, weights, phi) = nodes.Value;
        double sum = 0;
        for (var n = starts[k]; n < starts[k + 1]; n++)
        {
            sum += weights[n] * curve.ValueAt(0, phi.AsSpan(n * width, width));
        }

        return sum;
    }

    /// <summary>The functions half way between two instants, then their bounds over the stretch. Searches
    /// halve the same stretches for one quantity after another, and functions cost far more than a
    /// quantity's sum of them.</summary>
    internal (ReadOnlyMemory<double> Middle, ReadOnlyMemory<double> Envelope) Stretch(
        double from, double until)
    {
        if (!stretches.TryGetValue((from, until), out var both))
        {
            both = new double[2 * width];
            Segment.Basis.Evaluate(from + ((until - from) / 2), both.AsSpan(0, width));
            Segment.Basis.Envelope(from, until, both.AsSpan(width));
            if (width >= StretchRoom.Worthwhile && room.Take(both.Length))
            {
                stretches.TryAdd((from, until), both);
            }
        }

        return (both.AsMemory(0, width), both.AsMemory(width));
    }

    private (int[] Starts, double[] Weights, double[] Values) PlaceNodes()
    {
        var starts = new int[Instants.Length];
        var instants = new List<double>();
        var weights = new List<double>();
        for (var k = 0; k + 1 < Instants.Length; k++)
        {
            Quadrature.Visit(Segment.Basis, Instants[k], Instants[k + 1], (tau, weight) =>
            {
                instants.Add(tau);
                weights.Add(weight);
            });
            starts[k + 1] = instants.Count;
        }

        var phi = new double[instants.Count * width];
        for (var n = 0; n < instants.Count; n++)
        {
            Segment.Basis.Evaluate(instants[n], phi.AsSpan(n * width, width));
        }

        return (starts, [.. weights], phi);
    }

    /// <summary>The segment.</summary>
    public Segment Segment { get; }

    /// <summary>The tabulated instants from the segment's start, its ends included.</summary>
    public double[] Instants { get; }

    /// <summary>The functions at a tabulated instant.</summary>
    public ReadOnlySpan<double> Values(int k) => values.AsSpan(k * width, width);

    /// <summary>The functions half way between a tabulated instant and the next.</summary>
    public ReadOnlySpan<double> Middle(int k) => middles.AsSpan(k * width, width);

    /// <summary>Bounds of the functions between a tabulated instant and the next.</summary>
    public ReadOnlySpan<double> Envelope(int k) => envelopes.AsSpan(k * width, width);
}
