using System.Collections.Immutable;
using CircuitTransient.Studies.Designs;
using CircuitTransient.Studies.Spreads;

namespace CircuitTransient.Studies.Sizes;

/// <summary>Finds the corners of the tolerances that are worst for a set of values: among all of them where
/// they are few, else among those that the search of a spread would go through.</summary>
internal sealed class CornerSweep
{
    private const int MostComplete = 12; // tolerances: 4096 corners
    private const int MostCompleteExactly = 10; // the same without the fast evaluation
    private const int MostRounds = 24;
    private const ulong Stream = 0x5EED; // fixed: the same values have the same corners

    private readonly SizeProblem problem;
    private readonly ToleranceCorners corners;
    private readonly PointBatch batch;

    /// <summary>Prepares the fast evaluation.</summary>
    public CornerSweep(SizeProblem problem, CancellationToken cancellation)
    {
        this.problem = problem;
        corners = problem.Corners;
        batch = problem.Batch(cancellation);
        IsComplete = corners.Toleranced.Length
            <= (batch.WhyExact is null ? MostComplete : MostCompleteExactly);
    }

    /// <summary>Whether every corner is looked at.</summary>
    public bool IsComplete { get; }

    /// <summary>The worst corner for each constraint, each once.</summary>
    /// <param name="sized">The sought values.</param>
    public SweptCorners At(ImmutableArray<double> sized)
    {
        var worst = new WorstCorners(problem.Constraints.Length);
        if (IsComplete)
        {
            var all = 1 << corners.Toleranced.Length;
            Look(sized, [.. Enumerable.Range(0, all).Select(i => (UInt128)i)], worst);
        }
        else
        {
            Look(sized, [.. Random(), .. PointedTo(sized), .. OneAway()], worst);
            for (var round = 0; round < MostRounds && worst.Unvisited() is { Length: > 0 } centres; round++)
            {
                Look(sized, [.. centres.SelectMany(Neighbours)], worst);
            }
        }

        return new SweptCorners([.. worst.Corners.Distinct()], worst.Count);
    }

    private void Look(ImmutableArray<double> sized, IEnumerable<UInt128> places, WorstCorners worst)
    {
        UInt128[] fresh = [.. places.Distinct().Where(worst.IsNew)];
        var found = batch.At([.. fresh.SelectMany(corner => corners.Values(sized.AsSpan(), corner))]);
        for (var i = 0; i < fresh.Length; i++)
        {
            worst.Add(fresh[i], Shares(found, i));
        }
    }

    private double[] Shares(BatchFigures found, int point) =>
    [
        .. problem.Constraints.Select((constraint, c) => constraint.Share(
            found.Solved[point] && !double.IsNaN(found.Value(point, c)) ? found.Value(point, c) : null)),
    ];

    // Where each value alone, from nominal, takes a constraint down.
    private IEnumerable<UInt128> PointedTo(ImmutableArray<double> sized)
    {
        var count = corners.Toleranced.Length;
        var found = batch.At([.. Enumerable.Range(0, 2 * count).SelectMany(j =>
            corners.Alone(sized.AsSpan(), j / 2, isHighest: j % 2 == 1))]);
        var shares = Enumerable.Range(0, 2 * count).Select(j => Shares(found, j)).ToArray();
        return Enumerable.Range(0, problem.Constraints.Length).Select(c => Enumerable.Range(0, count)
            .Where(i => shares[(2 * i) + 1][c] < shares[2 * i][c])
            .Aggregate(UInt128.Zero, (corner, i) => corner | Bit(i)));
    }

    private IEnumerable<UInt128> OneAway()
    {
        var all = corners.Toleranced.Select((_, i) => Bit(i)).Aggregate((a, b) => a | b);
        return corners.Toleranced.SelectMany((_, i) => new[] { Bit(i), all ^ Bit(i) });
    }

    // Without the fast evaluation random corners would take longer than they are worth.
    private IEnumerable<UInt128> Random()
    {
        var generator = new CounterGenerator(Stream);
        var count = corners.Toleranced.Length;
        return Enumerable.Range(0, batch.WhyExact is null ? CornerSearch.RandomCorners : 0)
            .Select(j => Enumerable.Range(0, count)
                .Where(i => generator.Below(2, 0, (ulong)((j * count) + i)) == 1)
                .Aggregate(UInt128.Zero, (corner, i) => corner | Bit(i)));
    }

    private IEnumerable<UInt128> Neighbours(UInt128 corner) =>
        corners.Toleranced.Select((_, i) => corner ^ Bit(i));

    private static UInt128 Bit(int place) => UInt128.One << place;

    private sealed class WorstCorners(int count)
    {
        private readonly double[] shares = [.. Enumerable.Repeat(double.PositiveInfinity, count)];
        private readonly HashSet<UInt128> seen = [];
        private readonly HashSet<UInt128> visited = [];

        public UInt128[] Corners { get; } = new UInt128[count];

        public int Count => seen.Count;

        public bool IsNew(UInt128 corner) => !seen.Contains(corner);

        public UInt128[] Unvisited() => [.. Corners.Distinct().Where(visited.Add)];

        public void Add(UInt128 corner, double[] found)
        {
            seen.Add(corner);
            for (var c = 0; c < count; c++)
            {
                if (found[c] < shares[c])
                {
                    (shares[c], Corners[c]) = (found[c], corner);
                }
            }
        }
    }
}

/// <summary>What a sweep of the corners found.</summary>
/// <param name="Worst">The corners that are worst for a constraint.</param>
/// <param name="Count">How many were looked at.</param>
internal readonly record struct SweptCorners(ImmutableArray<UInt128> Worst, int Count);
