using System.Collections.Immutable;
using CircuitTransient.Measurements;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Reports.Studies;

/// <summary>Where a scan's results are in doubt because a part is driven past the range its value is good
/// for, in words.</summary>
internal static class ScanDoubt
{
    /// <summary>Where the scan is in doubt: <c>in doubt from 52 mΩ to 1 Ω: Cin leaves the range its value is
    /// good for</c>; null where it nowhere is.</summary>
    public static string? Of(ScanResult result)
    {
        if (Left(result.Linear) is not { } left)
        {
            return null;
        }

        var solved = result.Points.Where(p => p.Found is not null).ToArray();
        var doubtful = solved.Count(p => p.IsInDoubt);
        return $"in doubt {(result.Axes, doubtful == solved.Length) switch
        {
            ([var axis], _) => Where(axis, result.Linear),
            (_, true) => "throughout",
            _ => $"at {doubtful:N0} of {result.Points.Length:N0} points",
        }}: {left}";
    }

    /// <summary>Where the scatter is in doubt; null where it nowhere is.</summary>
    public static string? Of(ScatterResult scatter) => Left(scatter.Linear) is { } left
        ? $"in doubt {Where(scatter.Axis, scatter.Linear)}: {left}"
        : null;

    /// <summary>Of each part that leaves its range by how much, and which way the results err.</summary>
    public static IEnumerable<string> Reasons(ScanResult result)
    {
        foreach (var linear in result.Linear.Concat(result.Scatter?.Linear ?? []))
        {
            if (linear.Scan is not { HoldsThroughout: false, Greatest: { } most })
            {
                continue;
            }

            var axes = result.Linear.Contains(linear) ? result.Axes : [result.Scatter!.Axis];
            var part = result.Circuit.Parts.Single(p => p.Name == linear.Part);
            var direction = LinearLimits.Direction(part, part.LinearUpTo!) is { } words ? $": {words}" : "";
            yield return $"{linear.Part} is linear up to {ReportWords.Number(linear.Limit, linear.Unit)} but "
                + $"reaches {ReportWords.Number(most.Value * linear.Limit, linear.Unit)} at "
                + $"{ScanWords.Place(axes, most.At)}{direction}";
        }
    }

    private static string? Left(ImmutableArray<LinearScan> linear)
    {
        var left = linear.Where(l => !l.Scan.HoldsThroughout).Select(l => l.Part).ToArray();
        return left.Length switch
        {
            0 => null,
            1 => $"{left[0]} leaves the range its value is good for",
            2 => $"{left[0]} and {left[1]} leave the ranges their values are good for",
            _ => $"{left[0]} and {left.Length - 1} more leave the ranges their values are good for",
        };
    }

    private static string Where(ScanAxis axis, ImmutableArray<LinearScan> linear)
    {
        var kept = ScanStretches.Common(linear.Select(l => l.Scan.Holding));
        return (kept.Length, kept.IsEmpty || kept[0].From > axis.From, kept.IsEmpty || kept[^1].To < axis.To)
            switch
        {
            (0, _, _) => "throughout",
            (1, false, true) => $"above {axis.Say(kept[0].To)}",
            (1, true, false) => $"below {axis.Say(kept[0].From)}",
            _ => $"except {ScanWords.Stretches(axis, kept)}",
        };
    }
}
