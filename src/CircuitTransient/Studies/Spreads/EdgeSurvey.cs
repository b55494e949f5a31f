using System.Collections.Immutable;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Looks along the edges between neighbouring corners for figures that jump: samples every edge,
/// halves the stretches in which a figure steps, and has the exact engine confirm what is left.</summary>
internal sealed class EdgeSurvey(PointBatch batch, ValueRanges ranges)
{
    private const int MostStretches = 16;
    private const int LeastStretches = 4;
    private const int Halvings = 14;
    private const double Remains = 0.3; // of a step: what is left after halving is no smooth change
    private const int MostInGroup = 4; // steps of one figure that are halved
    private const int MostConfirmed = 12;
    private const double SamePeak = 1e-3; // of a step of the instant

    private readonly Edges edges = new(ranges);
    private int stretches;
    private long solves;

    /// <summary>Looks.</summary>
    /// <param name="corners">The most important corners, the first ones first.</param>
    /// <param name="cornerPoints">How many points the search for corners took.</param>
    public JumpFindings Run(IEnumerable<double[]> corners, long cornerPoints)
    {
        var (most, chosen) = Chosen(corners, cornerPoints);
        stretches = (int)Math.Clamp(most / Math.Max(1, chosen.Count), LeastStretches, MostStretches);
        double[] points = [.. chosen.SelectMany(edge => Enumerable.Range(0, stretches + 1)
            .SelectMany(s => edges.At(edge.Corner, edge.Value, (double)s / stretches)))];
        var samples = new EdgeSamples(chosen, At(points), stretches);
        var groups =
            from f in Enumerable.Range(0, batch.Reported.Length)
            from isTime in (bool[])[false, true]
            select samples.Steps(f, isTime);
        var seen = groups.Where(steps => steps.Count > 0).ToArray();
        var halved = batch.WhyExact is null ? MostInGroup : 1;
        var jumps = Largest(Halved([.. seen.SelectMany(steps => steps.Take(halved))]));
        var ranked = Ranked(jumps, samples);
        var confirmation = new JumpConfirmation(batch, edges);
        var confirmed = ranked.Take(MostConfirmed).AsParallel().AsOrdered()
            .WithDegreeOfParallelism(batch.Threads).WithCancellation(batch.Cancellation)
            .Select(jump => confirmation.Of(jump) is { } found
                ? found with { Alike = Alike(seen, jump, found) } : null)
            .ToArray();
        return new JumpFindings(
            chosen.Count, edges.Count, stretches + 1, solves + confirmation.Solves, confirmation.Solves,
            Told(confirmed), Math.Max(0, ranked.Count - MostConfirmed));
    }

    /// <summary>The edges, and into how many stretches all of them together may be parted: about as many as
    /// the corners took.</summary>
    private (long Most, List<Edge> Edges) Chosen(IEnumerable<double[]> corners, long cornerPoints)
    {
        var most = batch.WhyExact is null
            ? Math.Clamp(cornerPoints, 4096, 20_480)
            : Math.Clamp(cornerPoints / 2, 512, 2048);
        return (most, edges.Chosen(corners, (int)most / LeastStretches));
    }

    private BatchFigures At(double[] points)
    {
        solves += points.Length / batch.ValueCount;
        return batch.At(points);
    }

    /// <summary>Halves all steps together; those that vanish are dropped.</summary>
    private List<Halving> Halved(List<EdgeStep> steps)
    {
        var ends = At([.. steps.SelectMany(step => (double[])[
            .. Point(step, Low(step)), .. Point(step, Low(step) + (1.0 / stretches))])]);
        List<Halving> halvings = [.. steps.Select((step, i) => new Halving(
            step, Placed(ends, 2 * i, step, Low(step)),
            Placed(ends, (2 * i) + 1, step, Low(step) + (1.0 / stretches)), stretches * step.Smooth))];
        for (var n = 0; n < Halvings; n++)
        {
            var middles = At([.. halvings.SelectMany(h => Point(h.Step, h.Middle))]);
            halvings = [.. halvings
                .Select((h, i) => h.Half(Placed(middles, i, h.Step, h.Middle)))
                .Where(h => h.Change > Remains * Math.Min(h.Step.Size, double.MaxValue))];
        }

        return halvings;
    }

    private double Low(EdgeStep step) => (double)step.Stretch / stretches;

    private double[] Point(EdgeStep step, double place) => edges.At(step.Edge.Corner, step.Edge.Value, place);

    private static PlacedFigure Placed(BatchFigures found, int point, EdgeStep step, double place) =>
        new(place, found.Value(point, step.Figure), found.Time(point, step.Figure));

    /// <summary>Of every figure the largest jump of its value and of its instant; where both are one, only
    /// the first.</summary>
    private static List<Halving> Largest(List<Halving> halvings)
    {
        Halving[] largest =
        [
            .. halvings.GroupBy(h => (h.Step.Figure, h.Step.IsTime))
                .Select(group => group.MaxBy(h => h.Change)!),
        ];
        return [.. largest.Where(h => !h.Step.IsTime || !largest.Any(other => !other.Step.IsTime
            && other.Step.Figure == h.Step.Figure && other.Step.Edge == h.Step.Edge
            && other.Low.Place <= h.High.Place && h.Low.Place <= other.High.Place))];
    }

    /// <summary>Jumps of values by their share of the figure's range, then those of instants, judged figures
    /// first.</summary>
    private List<Halving> Ranked(List<Halving> jumps, EdgeSamples samples) =>
    [
        .. jumps.OrderBy(h => h.Step.IsTime)
            .ThenByDescending(h => h.Step.IsTime ? 0 : h.Change / samples.Range(h.Step.Figure))
            .ThenByDescending(h => Judgement.IsJudged(batch.Figures[h.Step.Figure]))
            .ThenByDescending(h => h.Change),
    ];

    private static int Alike(List<EdgeStep>[] seen, Halving jump, EdgeJump found)
    {
        var (before, after) = jump.Step.IsTime
            ? (found.TimeBefore, found.TimeAfter)
            : (found.ValueBefore, found.ValueAfter);
        var least = double.IsFinite(after - before) ? Math.Abs(after - before) / 2 : double.MaxValue;
        return seen.First(s => s[0].Figure == jump.Step.Figure && s[0].IsTime == jump.Step.IsTime)
            .Count(step => step.Size >= least) - 1;
    }

    /// <summary>What was confirmed, values before instants; of several figures that follow one peak, the
    /// first.</summary>
    private static ImmutableArray<EdgeJump> Told(EdgeJump?[] confirmed)
    {
        var told = new List<EdgeJump>();
        foreach (var jump in confirmed.OfType<EdgeJump>().OrderBy(jump => !jump.IsOfValue))
        {
            if (jump.IsOfValue || !told.Exists(other => IsSamePeak(jump, other)))
            {
                told.Add(jump);
            }
        }

        return [.. told];
    }

    private static bool IsSamePeak(EdgeJump jump, EdgeJump other)
    {
        var nothing = SamePeak * Math.Abs(jump.TimeAfter - jump.TimeBefore);
        return !other.IsOfValue && other.Value == jump.Value && other.Point.SequenceEqual(jump.Point)
            && Math.Abs(other.Place - jump.Place) <= 2 * (other.Bracket + jump.Bracket)
            && Math.Abs(other.TimeBefore - jump.TimeBefore) <= nothing
            && Math.Abs(other.TimeAfter - jump.TimeAfter) <= nothing;
    }
}
