using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <summary>Which edges or pulses landed in phase with the swing that an extreme
/// stands on, in one line.</summary>
public static class PhaseWords
{
    private const double WorthNaming = 0.05; // of the extreme: what swings by less does not make it
    private const int MostNamed = 3;

    /// <summary>The line; null where the sources are not broken down by edge, or fewer than two of
    /// their edges or pulses swing.</summary>
    public static string? Of(TransientResult result, ObservationResult observed, bool atMax)
    {
        var extreme = (atMax ? observed.Max : observed.Min).Value;
        var breakdown = atMax ? observed.ByMode?.AtMax : observed.ByMode?.AtMin;
        if (result.By != Breakdown.Edge || extreme is not { } total || breakdown is null
            || PeakShare.IsProduct(result, observed))
        {
            return null;
        }

        var swinging = Enumerable.Range(0, breakdown.Modes.Length)
            .Where(m => !breakdown.Modes[m].IsForced && breakdown.Modes[m].Rate.Imaginary != 0).ToArray();
        var swings = breakdown.Causes.Zip(result.Causes)
            .Where(pair => pair.Second.Kind == CauseKind.Edge)
            .GroupBy(pair => pair.Second.Pulse ?? pair.Second.Name)
            .Select(g => (Name: g.Key, Value: g.Sum(pair => swinging.Sum(m => pair.First.Values[m]))))
            .Where(s => Math.Abs(s.Value) >= WorthNaming * Math.Abs(total))
            .OrderByDescending(s => Math.Abs(s.Value)).ToArray();
        var with = Listed([.. swings.Where(s => s.Value * total > 0)], observed.Unit);
        var against = Listed([.. swings.Where(s => s.Value * total < 0)], observed.Unit);
        return swings.Length < 2 ? null : (with, against) switch
        {
            (null, { } only) => $"Every swing is against it: {only}.",
            ({ } only, null) => $"In phase with it swing {only}; none against it.",
            _ => $"In phase with it swing {with}; against it {against}.",
        };
    }

    private static string? Listed((string Name, double Value)[] side, string unit)
    {
        var named = side.Take(MostNamed).Select(s => $"{s.Name} ({Signed(s.Value, unit)})").ToList();
        if (side.Length > MostNamed)
        {
            var rest = side[MostNamed..].Sum(s => s.Value);
            named.Add($"{side.Length - MostNamed} more ({Signed(rest, unit)})");
        }

        return named.Count switch
        {
            0 => null,
            1 => named[0],
            _ => $"{string.Join(", ", named[..^1])} and {named[^1]}",
        };
    }
}
