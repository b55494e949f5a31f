using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>What every search of a sizing shares: the problem, the corners looked at, and how points are
/// ranked.</summary>
/// <param name="Problem">The problem.</param>
/// <param name="Corners">The corners of the tolerances that are looked at besides the nominal
/// circuit.</param>
/// <param name="Cancellation">Stops the work.</param>
internal sealed record SizeSearch(
    SizeProblem Problem, ImmutableArray<UInt128> Corners, CancellationToken Cancellation)
{
    /// <summary>Solves for values.</summary>
    public SizePoint At(params ReadOnlySpan<double> values) => Problem.At([.. values], Corners, Cancellation);

    /// <summary>Solves for many sets of values, on every core.</summary>
    public ImmutableArray<SizePoint> At(IReadOnlyList<ImmutableArray<double>> values)
    {
        var points = new SizePoint[values.Count];
        var options = new ParallelOptions { CancellationToken = Cancellation };
        Parallel.For(
            0, points.Length, options, i => points[i] = Problem.At(values[i], Corners, Cancellation));
        return [.. points];
    }

    /// <summary>How good a point that holds is; the greater the better.</summary>
    public double Rank(SizePoint point) =>
        Problem.AimSign == 0 ? point.Worst : -Problem.AimSign * (point.Aim ?? double.NaN);

    /// <summary>The points that hold and have the figure aimed at, the best first; of equal ones that with
    /// more room.</summary>
    public IEnumerable<SizePoint> Ranked(IEnumerable<SizePoint> points) => points
        .Where(point => point.Holds && double.IsFinite(Rank(point)))
        .OrderByDescending(Rank).ThenByDescending(point => point.Worst);

    /// <summary>The least share among some constraints.</summary>
    public static double Least(SizePoint point, ImmutableArray<int> among)
    {
        var least = double.PositiveInfinity;
        foreach (var index in among)
        {
            least = Math.Min(least, point.Shares[index]);
        }

        return least;
    }

    /// <summary>Every constraint.</summary>
    public ImmutableArray<int> All => [.. Enumerable.Range(0, Problem.Constraints.Length)];

    /// <summary>Values spread evenly in ratio over a part's range, both ends included.</summary>
    public static ImmutableArray<double> Spread(SizedValue part, int count) =>
    [
        .. Enumerable.Range(0, count).Select(i => i == 0 ? part.Lowest
            : i == count - 1 ? part.Highest
            : part.Lowest * Math.Pow(part.Highest / part.Lowest, i / (count - 1.0))),
    ];
}
