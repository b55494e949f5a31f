using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>Improves a point of two parts' values: the shares and the aim are taken as straight in the
/// logarithms of the values near it, the small program that makes is solved, and the step is kept where the
/// exact solution confirms it.</summary>
internal sealed class PlaneSearch(SizeSearch search)
{
    private const int MostSteps = 50;
    private const int MostRows = 14; // the constraints nearest to their bounds: others matter in no step
    private const int MostCorrections = 6;
    private const double Difference = 1e-5; // of a logarithm: rounding of 1e-11 leaves a slope good to 1e-6
    private const double Smallest = 1e-10;

    /// <summary>The best point reached from one that holds.</summary>
    /// <param name="start">A point that holds.</param>
    /// <param name="reach">The first step's size, in logarithms.</param>
    public SizePoint Improve(SizePoint start, double reach) => search.Problem.AimSign == 0
        ? Approach(start, search.All, reach)
        : Walk(start, reach, search.Rank, point => point.Holds, AimStep);

    /// <summary>The point with the greatest least share among some constraints, reached from a
    /// start.</summary>
    public SizePoint Approach(SizePoint start, ImmutableArray<int> among, double reach) => Walk(
        start, reach, point => SizeSearch.Least(point, among), _ => true,
        (point, slopes, size) => RoomStep(point, slopes, among, size));

    private SizePoint Walk(
        SizePoint start, double reach, Func<SizePoint, double> rank, Func<SizePoint, bool> isAllowed,
        Func<SizePoint, Slopes, double, double[]?> step)
    {
        var (point, size) = (start, reach);
        Slopes? slopes = null;
        for (var i = 0; i < MostSteps && size > Smallest; i++)
        {
            slopes ??= SlopesAt(point);
            if (slopes is null || step(point, slopes, size) is not { } move)
            {
                return point;
            }

            var trial = Moved(point, move);
            for (var k = 0; k < MostCorrections && !isAllowed(trial) && trial.IsSolved; k++)
            {
                trial = Corrected(trial, slopes);
            }

            var gain = rank(trial) - rank(point);
            if (isAllowed(trial) && gain > 1e-13 * Math.Abs(rank(point)))
            {
                // A gain that no longer shows in ten digits is the end coming near.
                size = gain > 1e-10 * Math.Abs(rank(point)) ? Math.Min(reach, 2 * size) : size / 4;
                (point, slopes) = (trial, null);
            }
            else
            {
                size /= 4;
            }
        }

        return point;
    }

    private double[]? AimStep(SizePoint point, Slopes slopes, double size)
    {
        var rows = Box(point, size, 2);
        foreach (var i in Tightest(point, search.All))
        {
            rows.Add(([-slopes.Shares[i][0], -slopes.Shares[i][1]], point.Shares[i]));
        }

        var sign = -search.Problem.AimSign;
        return LinearCorners.Maximise([sign * slopes.Aim[0], sign * slopes.Aim[1]], rows);
    }

    // The third unknown is the least share itself.
    private double[]? RoomStep(SizePoint point, Slopes slopes, ImmutableArray<int> among, double size)
    {
        var rows = Box(point, size, 3);
        foreach (var i in Tightest(point, among))
        {
            rows.Add(([-slopes.Shares[i][0], -slopes.Shares[i][1], 1], point.Shares[i]));
        }

        return LinearCorners.Maximise([0, 0, 1], rows);
    }

    private List<(double[] A, double B)> Box(SizePoint point, double size, int count)
    {
        var rows = new List<(double[], double)>();
        for (var k = 0; k < 2; k++)
        {
            var part = search.Problem.Parts[k];
            var (up, down) = (new double[count], new double[count]);
            (up[k], down[k]) = (1, -1);
            rows.Add((up, Math.Min(size, Math.Max(0, Math.Log(part.Highest / point.Values[k])))));
            rows.Add((down, Math.Min(size, Math.Max(0, Math.Log(point.Values[k] / part.Lowest)))));
        }

        return rows;
    }

    private static IEnumerable<int> Tightest(SizePoint point, ImmutableArray<int> among) =>
        among.Where(i => double.IsFinite(point.Shares[i])).OrderBy(i => point.Shares[i]).Take(MostRows);

    private SizePoint Moved(SizePoint point, params ReadOnlySpan<double> move) =>
        search.At(ValuesAt(point, move[0], move[1]).AsSpan());

    private ImmutableArray<double> ValuesAt(SizePoint point, double first, double second)
    {
        var (across, up) = (search.Problem.Parts[0], search.Problem.Parts[1]);
        return
        [
            Math.Clamp(point.Values[0] * Math.Exp(first), across.Lowest, across.Highest),
            Math.Clamp(point.Values[1] * Math.Exp(second), up.Lowest, up.Highest),
        ];
    }

    // Straight towards the bound that is broken most, a little past it: boundaries are curved.
    private SizePoint Corrected(SizePoint trial, Slopes slopes)
    {
        var worst = trial.Shares.IndexOf(trial.Worst);
        var slope = slopes.Shares[worst];
        var square = (slope[0] * slope[0]) + (slope[1] * slope[1]);
        var factor = -(trial.Worst * (1 + 1e-6)) / square;
        return double.IsFinite(factor)
            ? Moved(trial, factor * slope[0], factor * slope[1])
            : trial;
    }

    private Slopes? SlopesAt(SizePoint point)
    {
        var shares = point.Shares.Select(_ => new double[2]).ToArray();
        var aim = new double[2];
        var around = search.At(
        [
            ValuesAt(point, Difference, 0), ValuesAt(point, -Difference, 0),
            ValuesAt(point, 0, Difference), ValuesAt(point, 0, -Difference),
        ]);
        for (var k = 0; k < 2; k++)
        {
            var (up, down) = (around[2 * k], around[(2 * k) + 1]);
            var width = Math.Log(up.Values[k] / down.Values[k]);
            if (!up.IsSolved || !down.IsSolved || width == 0)
            {
                return null;
            }

            aim[k] = ((up.Aim ?? 0) - (down.Aim ?? 0)) / width;
            for (var i = 0; i < shares.Length; i++)
            {
                var slope = (up.Shares[i] - down.Shares[i]) / width;
                shares[i][k] = double.IsFinite(slope) ? slope : 0;
            }
        }

        return new Slopes(shares, aim);
    }

    private sealed record Slopes(double[][] Shares, double[] Aim);
}
