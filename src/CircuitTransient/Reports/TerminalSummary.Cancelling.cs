using System.Collections.Immutable;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <content>Large causes that cancel, and the difference that drives an event.</content>
public static partial class TerminalSummary
{
    // Causes whose magnitudes sum to over three times the total are shown as a group with their difference.
    private static string? Cancelling(ImmutableArray<Share> shares, double total, string unit)
    {
        if (shares.Sum(share => Math.Abs(share.Value ?? 0)) <= 3 * Math.Abs(total))
        {
            return null;
        }

        var sign = total < 0 ? -1 : 1;
        var with = Group([.. shares.Where(share => share.Value * sign > 0)], unit);
        var against = Group([.. shares.Where(share => share.Value * sign < 0)], unit);
        return $"large causes cancel: {with} against {against}: {Number(total, unit)}";
    }

    private static string Group(Share[] shares, string unit)
    {
        var largest = shares.OrderByDescending(share => Math.Abs(share.Value ?? 0)).ToArray();
        var names =
            largest.Length <= 3
                ? string.Join(" and ", largest.Select(share => share.Cause))
                : $"{largest[0].Cause}, {largest[1].Cause} and {largest.Length - 2} more";
        return $"{names} {Number(Math.Abs(shares.Sum(share => share.Value ?? 0)), unit)}";
    }

    private static IEnumerable<string> Driving(
        TransientResult result, WorstObservation worst, SinceEvent since)
    {
        var difference = DrivingDifference.Of(since);
        if (difference is not null)
        {
            yield return "what the two are at that instant, and their difference: " +
                $"{Sized(difference.With)} against {Sized(difference.Against)}: " +
                Number(difference.Value, difference.Unit);
        }

        if (DrivingSwitch.Of(result, worst, since, difference) is { } driving)
        {
            yield return driving;
        }
    }

    private static string Sized(CauseValue cause) =>
        $"{cause.Cause} {Number(Math.Abs(cause.Strength ?? 0), cause.StrengthUnit)}";
}
