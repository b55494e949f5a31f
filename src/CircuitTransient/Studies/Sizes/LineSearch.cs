using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>A stretch of one part's values for which everything holds.</summary>
/// <param name="From">Its least value; it holds there.</param>
/// <param name="To">Its greatest value; it holds there.</param>
/// <param name="Below">The constraint that breaks below it; null where the range looked at ends.</param>
/// <param name="Above">The constraint that breaks above it; null where the range looked at ends.</param>
public sealed record FeasibleInterval(SizePoint From, SizePoint To, int? Below, int? Above)
{
    /// <summary>Stands for a constraint where the circuit has no unique solution beyond the
    /// boundary.</summary>
    public const int Unsolvable = -1;
}

/// <summary>Finds the values of one part for which everything holds: a scan, its turning points refined, and
/// every boundary between two scanned points bisected.</summary>
internal sealed class LineSearch(SizeSearch search)
{
    private const int ScanCount = 241; // sixty a decade over the usual range
    private const int MostHalvings = 60;
    private const int MostSections = 48;
    private const double Narrow = 1e-12; // relative width at which a boundary is settled

    private static readonly double Golden = (Math.Sqrt(5) - 1) / 2;

    /// <summary>The points looked at, ascending.</summary>
    public ImmutableArray<SizePoint> Scan()
    {
        var part = search.Problem.Parts[0];
        var values = SizeSearch.Spread(part, ScanCount).Add(part.Nominal)
            .Where(v => v >= part.Lowest && v <= part.Highest).Distinct().Order();
        var scanned = search.At([.. values.Select(v => ImmutableArray.Create(v))]);
        return [.. scanned.Concat(Turns(scanned)).OrderBy(point => point.Values[0])];
    }

    /// <summary>The stretches that hold, from scanned points.</summary>
    public ImmutableArray<FeasibleInterval> Intervals(ImmutableArray<SizePoint> scanned)
    {
        var intervals = ImmutableArray.CreateBuilder<FeasibleInterval>();
        for (var i = 0; i < scanned.Length; i++)
        {
            if (!scanned[i].Holds)
            {
                continue;
            }

            var last = i;
            while (last + 1 < scanned.Length && scanned[last + 1].Holds)
            {
                last++;
            }

            var (from, below) = i == 0 ? (scanned[i], (int?)null) : Boundary(scanned[i], scanned[i - 1]);
            var (to, above) = last == scanned.Length - 1
                ? (scanned[last], (int?)null)
                : Boundary(scanned[last], scanned[last + 1]);
            intervals.Add(new FeasibleInterval(from, to, below, above));
            i = last;
        }

        return intervals.ToImmutable();
    }

    /// <summary>The best point of the stretches.</summary>
    public SizePoint? Best(ImmutableArray<SizePoint> scanned, ImmutableArray<FeasibleInterval> intervals)
    {
        var ends = intervals.SelectMany(interval => new[] { interval.From, interval.To });
        var known = scanned.Concat(ends).OrderBy(point => point.Values[0]).ToImmutableArray();
        if (search.Ranked(known).FirstOrDefault() is not { } best)
        {
            return null;
        }

        var at = known.IndexOf(best);
        var refined = Section(
            known[Math.Max(0, at - 1)].Values[0], known[Math.Min(known.Length - 1, at + 1)].Values[0],
            point => point.Holds ? search.Rank(point) : double.NegativeInfinity);
        return search.Ranked([best, refined]).First();
    }

    /// <summary>The point with the greatest least share among some constraints.</summary>
    public SizePoint Nearest(ImmutableArray<SizePoint> scanned, ImmutableArray<int> among)
    {
        var at = Enumerable.Range(0, scanned.Length).MaxBy(i => SizeSearch.Least(scanned[i], among));
        var refined = Section(
            scanned[Math.Max(0, at - 1)].Values[0], scanned[Math.Min(scanned.Length - 1, at + 1)].Values[0],
            point => SizeSearch.Least(point, among));
        return SizeSearch.Least(refined, among) > SizeSearch.Least(scanned[at], among)
            ? refined
            : scanned[at];
    }

    // A narrow stretch, or a narrow gap in one, may lie between scanned points: where the worst share turns
    // near zero, the turning point itself is looked at.
    private IEnumerable<SizePoint> Turns(ImmutableArray<SizePoint> scanned)
    {
        for (var i = 1; i + 1 < scanned.Length; i++)
        {
            var (before, here, after) = (scanned[i - 1].Worst, scanned[i].Worst, scanned[i + 1].Worst);
            var reach = 2 * Math.Max(Math.Abs(here - before), Math.Abs(here - after));
            var isTop = here < 0 && here >= before && here >= after;
            var isBottom = here >= 0 && here <= before && here <= after;
            if ((isTop || isBottom) && Math.Abs(here) <= reach && double.IsFinite(here))
            {
                var sign = isTop ? 1 : -1;
                yield return Section(
                    scanned[i - 1].Values[0], scanned[i + 1].Values[0], point => sign * point.Worst);
            }
        }
    }

    private (SizePoint Inside, int? Constraint) Boundary(SizePoint holds, SizePoint broken)
    {
        for (var i = 0; i < MostHalvings
            && Math.Abs((broken.Values[0] / holds.Values[0]) - 1) > Narrow; i++)
        {
            var middle = search.At(Math.Sqrt(holds.Values[0] * broken.Values[0]));
            (holds, broken) = middle.Holds ? (middle, broken) : (holds, middle);
        }

        return (holds, broken.IsSolved ? broken.Shares.IndexOf(broken.Worst) : FeasibleInterval.Unsolvable);
    }

    private SizePoint Section(double low, double high, Func<SizePoint, double> value)
    {
        var (from, to) = (Math.Log(low), Math.Log(high));
        var (left, right) = (At(to - (Golden * (to - from))), At(from + (Golden * (to - from))));
        for (var i = 0; i < MostSections && to - from > Narrow; i++)
        {
            if (value(left) >= value(right))
            {
                (to, right) = (Math.Log(right.Values[0]), left);
                left = At(to - (Golden * (to - from)));
            }
            else
            {
                (from, left) = (Math.Log(left.Values[0]), right);
                right = At(from + (Golden * (to - from)));
            }
        }

        return value(left) >= value(right) ? left : right;

        SizePoint At(double logarithm) => search.At(Math.Exp(logarithm));
    }
}
