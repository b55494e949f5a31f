using CircuitTransient.Circuits;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Text;

namespace CircuitTransient.Reports.Studies;

/// <summary>Requirements on fixed times whose window a moved event leaves: what then follows the event is not
/// judged, or only in part.</summary>
internal static class ScanWindows
{
    /// <summary>A sentence for each such requirement.</summary>
    public static IEnumerable<string> Left(ScanResult result)
    {
        var axes = result.Axes.Concat(result.Scatter is { } scatter ? [scatter.Axis] : [])
            .Where(a => IsMovedInTime(result.Circuit, a));
        foreach (var axis in axes)
        {
            foreach (var requirement in result.Circuit.Requirements)
            {
                if (Outside(requirement.Window, axis) is { } outside)
                {
                    yield return $"`{requirement.Statement}` counts on fixed times, which do not hold the "
                        + $"instant of {ScanWords.Subject(axis)} {outside}: what follows it outside those "
                        + "times is not judged.";
                }
            }
        }
    }

    private static bool IsMovedInTime(Circuit circuit, ScanAxis axis) => axis.Varied.Event is { } moved
        && ((Switch)circuit.Parts[moved.Part]).Events[moved.Event].Trigger
            is AtInstant { Instant.After: null };

    /// <summary>The scanned instants before and after a window that holds the one as written.</summary>
    private static string? Outside(Window window, ScanAxis axis)
    {
        var from = window.From is { After: null } begin ? begin.Delay.Nominal : double.NegativeInfinity;
        var to = window.To is { After: null } end ? end.Delay.Nominal : double.PositiveInfinity;
        var written = axis.Varied.Nominal;
        if ((window.From ?? window.To) is null || written < from || written > to)
        {
            return null;
        }

        return (axis.From < from, axis.To > to) switch
        {
            (true, true) => $"before {Say(from)} and after {Say(to)}",
            (true, false) => $"from {axis.Say(axis.From)} to {Say(Math.Min(from, axis.To))}",
            (false, true) => $"from {Say(Math.Max(to, axis.From))} to {axis.Say(axis.To)}",
            _ => null,
        };

        string Say(double instant) => EngineeringNumber.Format(instant, "s", axis.Digits);
    }
}
