namespace CircuitTransient.Studies.Spreads;

/// <summary>The figures along edges, and where they step.</summary>
/// <param name="edges">The edges.</param>
/// <param name="found">The figures at evenly spaced points of each, edge after edge.</param>
/// <param name="stretches">Into how many stretches these points part an edge.</param>
internal sealed class EdgeSamples(List<Edge> edges, BatchFigures found, int stretches)
{
    private const double Share = 5e-3; // of the range of a figure over all edges: less is not worth a word
    private const double OwnShare = 0.2; // of a stretch's change: less is no step
    private const double Rounding = 1e-7;

    /// <summary>Of every edge that shows a step of a figure: the stretch in which it is, the largest first. A
    /// step is a change that stands out of those of the other stretches, or a value that ceases to
    /// be.</summary>
    /// <param name="figure">Index of the figure.</param>
    /// <param name="isTime">Whether of its instant.</param>
    public List<EdgeStep> Steps(int figure, bool isTime)
    {
        var least = isTime ? 0 : Share * Range(figure);
        var (changes, sorted) = (new double[stretches], new double[stretches]);
        var steps = new List<EdgeStep>();
        for (var e = 0; e < edges.Count; e++)
        {
            var median = PutChanges(e, figure, isTime, changes, sorted);
            EdgeStep? best = null;
            for (var i = 0; i < stretches; i++)
            {
                var step = Step(e, i, figure, isTime, changes, median);
                best = step is not null && step.Size > Math.Max(least, best?.Size ?? 0) ? step : best;
            }

            if (best is not null)
            {
                steps.Add(best);
            }
        }

        return [.. steps.OrderByDescending(step => step.Size)];
    }

    private double At(int edge, int sample, int figure, bool isTime)
    {
        var point = (edge * (stretches + 1)) + sample;
        return isTime ? found.Time(point, figure) : found.Value(point, figure);
    }

    private bool IsSolved(int edge, int sample) => found.Solved[(edge * (stretches + 1)) + sample];

    /// <summary>Between what a figure lies on all edges.</summary>
    public double Range(int figure)
    {
        var (low, high) = (double.PositiveInfinity, double.NegativeInfinity);
        for (var p = 0; p < found.Solved.Length; p++)
        {
            var value = found.Value(p, figure);
            low = double.IsFinite(value) ? Math.Min(low, value) : low;
            high = double.IsFinite(value) ? Math.Max(high, value) : high;
        }

        return high > low ? high - low : 0;
    }

    /// <summary>The changes in all stretches of an edge, and their median.</summary>
    private double PutChanges(int e, int figure, bool isTime, double[] changes, double[] sorted)
    {
        var finite = 0;
        for (var i = 0; i < stretches; i++)
        {
            changes[i] = At(e, i + 1, figure, isTime) - At(e, i, figure, isTime);
            sorted[finite] = changes[i];
            finite += double.IsFinite(changes[i]) ? 1 : 0;
        }

        Array.Sort(sorted, 0, finite);
        return finite == 0 ? 0 : (sorted[(finite - 1) / 2] + sorted[finite / 2]) / 2;
    }

    private EdgeStep? Step(int e, int i, int figure, bool isTime, double[] changes, double median)
    {
        if (changes[i] == 0 || !IsSolved(e, i) || !IsSolved(e, i + 1) || (isTime && IsNothing(e, i, figure)))
        {
            return null;
        }

        var (from, to) = (At(e, i, figure, isTime), At(e, i + 1, figure, isTime));
        if (!double.IsFinite(from) || !double.IsFinite(to))
        {
            var isSame = isTime || double.IsFinite(from) == double.IsFinite(to);
            return isSame ? null : new EdgeStep(edges[e], i, figure, isTime, double.PositiveInfinity, 0);
        }

        var smooth = Nearest(i, changes, median);
        var size = Math.Abs(changes[i] - smooth);
        var isStep = size > OwnShare * Math.Abs(changes[i])
            && size > Rounding * Math.Max(Math.Abs(from), Math.Abs(to));
        return isStep ? new EdgeStep(edges[e], i, figure, isTime, size, smooth) : null;
    }

    /// <summary>Whether a figure is zero at both ends: then its instant means nothing.</summary>
    private bool IsNothing(int e, int i, int figure) =>
        At(e, i, figure, isTime: false) == 0 && At(e, i + 1, figure, isTime: false) == 0;

    /// <summary>What a smooth function changes by in a stretch: the median of all changes or what the changes
    /// beside it lead to, whichever explains more. A jump beside the stretch spoils only the
    /// second.</summary>
    private double Nearest(int i, double[] changes, double median)
    {
        var led = i == 0 ? (2 * changes[1]) - changes[2]
            : i == stretches - 1 ? (2 * changes[i - 1]) - changes[i - 2]
            : (changes[i - 1] + changes[i + 1]) / 2;
        return double.IsFinite(led) && Math.Abs(changes[i] - led) < Math.Abs(changes[i] - median)
            ? led : median;
    }
}

/// <summary>A stretch of an edge in which a figure may jump.</summary>
/// <param name="Edge">The edge.</param>
/// <param name="Stretch">Which of its stretches.</param>
/// <param name="Figure">Index of the figure.</param>
/// <param name="IsTime">Whether of its instant.</param>
/// <param name="Size">How far the change stands out; infinite where a value ceases to be.</param>
/// <param name="Smooth">What of the change the other stretches explain.</param>
internal sealed record EdgeStep(
    Edge Edge, int Stretch, int Figure, bool IsTime, double Size, double Smooth);
