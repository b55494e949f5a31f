using CircuitTransient.Circuits;
using CircuitTransient.Measurements;
using static CircuitTransient.Reports.ReportWords;

namespace CircuitTransient.Reports;

/// <summary>The voltage a switch closed onto, or the current it interrupted, where the figures show that it
/// makes a value.</summary>
internal static class DrivingSwitch
{
    private const double Most = 0.5; // of the value
    private const double Likeness = 0.01; // as of the causes of a driving difference

    /// <summary>What drives a value that was broken down since a switching, in words; null where the figures
    /// do not carry it.</summary>
    public static string? Of(
        TransientResult result, WorstObservation worst, SinceEvent since, DrivingDifference? difference) =>
        result.Events.FirstOrDefault(e =>
            e.Time == since.Time && InstantWords.Name(e) == since.Event) switch
        {
            { Closes: true, VoltageBefore: { } voltage } e
                when IsDifference(difference, voltage) || IsOwnEffect(result, worst, since) =>
                $"what drives it: the {Number(voltage, "V")} across {e.Switch} just before it closes",
            { Closes: false, CurrentBefore: { } current } e when IsInterrupted(worst, since, current) =>
                $"what drives it: the {Number(current, "A")} through {e.Switch} just before it opens",
            _ => null,
        };

    private static bool IsDifference(DrivingDifference? difference, double voltage) =>
        difference is { Unit: "V" } && IsAlike(difference.Value, voltage);

    /// <summary>Whether the answer with the switching less that without it makes most of the value, and no
    /// source has changed since: else that is the source's doing as much.</summary>
    private static bool IsOwnEffect(TransientResult result, WorstObservation worst, SinceEvent since)
    {
        var both = worst.Observation.BySwitching;
        var effect = (worst.AtMax ? both?.AtMax : both?.AtMin)?.Effects
            .FirstOrDefault(e => e.Time == since.Time && e.Event == since.Event)?.Value;
        return effect / worst.Extreme.Value > Most
            && result.Circuit.Parts.All(p => p switch
            {
                VoltageSource source => IsConstant(source.Wave, since.Time),
                CurrentSource source => IsConstant(source.Wave, since.Time),
                _ => true,
            });
    }

    private static bool IsConstant(Wave wave, double from) => wave.Pieces.All(p =>
        p.Start <= from && (p.End <= from || double.IsInfinity(p.End))
        && (p.End <= from || p is { Slope: 0, DecayRate: 0, AngularFrequency: 0 }));

    /// <summary>Whether a current that was held, the one that the switch interrupts, makes most of the
    /// value.</summary>
    private static bool IsInterrupted(WorstObservation worst, SinceEvent since, double current) =>
        since.Parts.MaxBy(p => Math.Abs(p.Value ?? 0)) is { StrengthUnit: "A", Strength: { } held } largest
        && largest.Value / worst.Extreme.Value > Most && IsAlike(held, current);

    private static bool IsAlike(double one, double other) =>
        other != 0 && Math.Abs(Math.Abs(one) - Math.Abs(other)) <= Likeness * Math.Abs(other);
}
