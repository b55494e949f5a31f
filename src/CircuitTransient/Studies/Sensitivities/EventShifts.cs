using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Solutions;
using Switch = CircuitTransient.Circuits.Switch;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>How the instants of switchings go with one value.</summary>
/// <param name="solution">The solution.</param>
/// <param name="variation">The value.</param>
internal sealed class EventShifts(TransientSolution solution, Variation variation)
{
    private const double Same = 1e-9; // relative, of shifts that are computed on different ways

    private readonly Dictionary<EventReference, (double Time, double Shift)> acted = [];
    private readonly double rounding = 1e-12 * solution.Until; // instants that differ by less are one

    /// <summary>How a declared instant goes with the value; null where its event has not taken
    /// place.</summary>
    public double? Of(Instant instant) => Of(instant, variation.SlopeOf(instant.Delay));

    /// <summary>Takes the switchings at the start of an interval.</summary>
    /// <param name="interval">The interval.</param>
    /// <param name="crossing">For a quantity that was watched, minus its derivative over its rate just
    /// before; null where it has none.</param>
    /// <param name="previousStart">Where the interval before began, in seconds.</param>
    /// <returns>The common shift; or why there is none.</returns>
    public (double Shift, string? Reason) Act(
        SolvedInterval interval, Func<Measurand, double?> crossing, double previousStart)
    {
        double? common = null;
        foreach (var occurrence in interval.StartsWith)
        {
            var declared = ((Switch)solution.Circuit.Parts[occurrence.Event.Part])
                .Events[occurrence.Event.Event];
            var shift = Of(occurrence, declared, crossing, common, previousStart);
            if (shift is not { } known)
            {
                return (0, $"{Name(occurrence)} waits for a quantity that reaches its level without a slope, "
                    + "or whose derivative is not known");
            }

            if (common is { } other
                && Math.Abs(known - other) > Same * Math.Max(Math.Abs(known), Math.Abs(other)))
            {
                return (0, $"{Name(occurrence)} at the instant of another switching that moves otherwise: "
                    + "their order decides");
            }

            common = known;
            acted[occurrence.Event] = (occurrence.Time, known);
        }

        return common is null or 0 || !IsAtCorner(interval.From) ? (common ?? 0, null)
            : (0, "a switching that moves coincides with a corner of a source: their order decides");
    }

    private double? Of(
        Occurrence occurrence, SwitchEvent declared, Func<Measurand, double?> crossing, double? common,
        double previousStart)
    {
        var (due, shift) = Due(occurrence.Event, declared);
        if (!occurrence.IsDecidedByAnswer)
        {
            return shift;
        }

        // The condition held from the first: when the event was due, or when this instant's others acted.
        if (Math.Abs(occurrence.Time - due) <= rounding)
        {
            return shift;
        }

        return common is { } others ? others
            : IsAtCorner(occurrence.Time) || occurrence.Time - previousStart <= rounding ? 0
            : crossing(DecidedEvents.Watched(occurrence.Event, declared).Quantity);
    }

    private (double Time, double Shift) Due(EventReference reference, SwitchEvent declared)
    {
        var previous = reference.Event == 0 ? (0, 0)
            : acted.GetValueOrDefault(reference with { Event = reference.Event - 1 });
        var instant = declared.Trigger switch
        {
            AtInstant at => at.Instant,
            WhenCrosses { After: { } after } => after,
            _ => null,
        };
        if (instant is null)
        {
            return previous;
        }

        var time = instant.Delay.Nominal
            + (instant.After is { } reached ? acted.GetValueOrDefault(reached).Time : 0);
        return time < previous.Item1 ? previous
            : (time, Of(instant, variation.DelaySlope(reference, instant)) ?? 0);
    }

    private double? Of(Instant instant, double delay) =>
        instant.After is null ? delay
        : acted.TryGetValue(instant.After, out var after) ? after.Shift + delay
        : null;

    private bool IsAtCorner(double time) => solution.Causes.Any(c => c.Pieces.Any(p =>
        Math.Abs(p.Start - time) <= rounding || Math.Abs(p.End - time) <= rounding));

    private string Name(Occurrence occurrence) =>
        $"{solution.Circuit.Parts[occurrence.Event.Part].Name} {(occurrence.Closes ? "closes" : "opens")}";
}
