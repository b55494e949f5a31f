using System.Collections.Immutable;

namespace CircuitTransient.Circuits;

/// <summary>What an engineer calls an edge of a wave: a step, a pulse's rise or fall, the change
/// of level over a ramp or over one of several straight lines, a sine, a decay, an impulse. The
/// edges of a wave add up to it.</summary>
/// <param name="Label">What it is, in the user's words: <c>rise of pulse 3 at 2 ms</c>.</param>
/// <param name="Start">When it begins, in seconds.</param>
/// <param name="Pieces">The pieces that make it up.</param>
public sealed record WaveEdge(string Label, double Start, ImmutableArray<WavePiece> Pieces)
{
    /// <summary>The edges of a wave in the order of its pieces; what begins at one instant
    /// under one label is one edge.</summary>
    public static ImmutableArray<WaveEdge> Of(Wave wave)
    {
        var edges = new List<WaveEdge>();
        var places = new Dictionary<(string, double), int>();
        var timesUsed = new Dictionary<string, int>();
        foreach (var edge in Runs(wave).SelectMany(OfRun))
        {
            if (places.TryGetValue((edge.Label, edge.Start), out var place))
            {
                edges[place] = edges[place] with { Pieces = [.. edges[place].Pieces, .. edge.Pieces] };
                continue;
            }

            places.Add((edge.Label, edge.Start), edges.Count);
            var used = timesUsed[edge.Label] = timesUsed.GetValueOrDefault(edge.Label) + 1;
            // Two instants may read alike when rounded.
            edges.Add(used == 1 ? edge : edge with { Label = $"{edge.Label} ({used})" });
        }

        return [.. edges];
    }

    /// <summary>The pieces, those that go on from one another together.</summary>
    private static IEnumerable<ImmutableArray<WavePiece>> Runs(Wave wave)
    {
        var first = 0;
        for (var next = 1; next <= wave.Pieces.Length; next++)
        {
            if (next == wave.Pieces.Length || !wave.Pieces[next].Continues)
            {
                yield return wave.Pieces[first..next];
                first = next;
            }
        }
    }

    private static IEnumerable<WaveEdge> OfRun(ImmutableArray<WavePiece> run)
    {
        if (run.All(p => p is { DecayRate: 0, AngularFrequency: 0 })
            && (run.Length > 1 || !double.IsPositiveInfinity(run[0].End)))
        {
            return Changes(run);
        }

        var label = run.Length == 1 ? run[0].Label : run[0].Label.Split(',')[0]; // `impulse from 1 ms, tail`
        return [new WaveEdge(label, run[0].Start, run)];
    }

    /// <summary>Every change of level along straight lines, as an edge that leaves the new level behind:
    /// corners as edges would be ramps without end, which only cancel.</summary>
    private static IEnumerable<WaveEdge> Changes(ImmutableArray<WavePiece> lines)
    {
        const double rounding = 1e-12; // of levels that a slope was made from
        var negligible = rounding * lines.Max(p => Math.Max(Math.Abs(p.Amplitude), Math.Abs(LevelAfter(p))));
        double level = 0, until = lines[0].Start;
        foreach (var line in lines)
        {
            if (line.Start > until)
            {
                if (Math.Abs(level) > negligible)
                {
                    yield return Step(until, -level);
                }

                level = 0;
            }

            if (Math.Abs(line.Amplitude - level) > negligible)
            {
                yield return Step(line.Start, line.Amplitude - level);
            }

            if (line.Slope != 0)
            {
                yield return Slope(line);
            }

            (level, until) = (LevelAfter(line), line.End);
        }

        if (!double.IsPositiveInfinity(until) && Math.Abs(level) > negligible)
        {
            yield return Step(until, -level);
        }
    }

    private static double LevelAfter(WavePiece line) =>
        line.Slope == 0 || double.IsPositiveInfinity(line.End)
            ? line.Amplitude
            : line.Amplitude + (line.Slope * (line.End - line.Start));

    private static WaveEdge Slope(WavePiece line)
    {
        var rise = line with { Amplitude = 0, Continues = false };
        if (double.IsPositiveInfinity(line.End))
        {
            return new WaveEdge(line.Label, line.Start, [rise]);
        }

        var held = Held(line.End, line.Slope * (line.End - line.Start), line.Label) with { Continues = true };
        return new WaveEdge(line.Label, line.Start, [rise, held]);
    }

    private static WaveEdge Step(double at, double change)
    {
        var label = $"step at {Amount.Of(at, "s")}";
        return new WaveEdge(label, at, [Held(at, change, label)]);
    }

    private static WavePiece Held(double from, double level, string label) =>
        new(from, double.PositiveInfinity, level, 0, 0, 0, 0, label);
}
