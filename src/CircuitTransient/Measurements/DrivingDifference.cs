namespace CircuitTransient.Measurements;

/// <summary>Two large causes that cancel and act by the difference of what they are: a source of 932 V
/// against a charge of 905.6 V, where 26.4 V drive the event.</summary>
/// <param name="With">The cause with the total.</param>
/// <param name="Against">The cause against it.</param>
/// <param name="Value">The difference of their own sizes at the event, in <paramref name="Unit"/>.</param>
/// <param name="Unit">V or A.</param>
public sealed record DrivingDifference(CauseValue With, CauseValue Against, double Value, string Unit)
{
    /// <summary>The difference behind a breakdown since an event; null where its causes do not cancel, or do
    /// not act alike.</summary>
    public static DrivingDifference? Of(SinceEvent since)
    {
        var sized = since.Parts.Where(p => p is { Value: not (null or 0), Strength: not (null or 0) })
            .OrderByDescending(p => Math.Abs(p.Value!.Value)).ToArray();
        var total = since.Parts.Sum(p => p.Value ?? 0);
        if (sized.Length < 2 || since.Parts.Sum(p => Math.Abs(p.Value ?? 0)) <= 3 * Math.Abs(total))
        {
            return null;
        }

        var (with, against) = sized[0].Value > 0 == total > 0 ? (sized[0], sized[1]) : (sized[1], sized[0]);
        const double likeness = 0.01; // what each brings about per volt or ampere, within a hundredth
        var (one, other) = (PerUnit(with), PerUnit(against));
        return with.Value > 0 != against.Value > 0 && with.StrengthUnit == against.StrengthUnit
            && Math.Abs(one - other) <= likeness * one
            ? new DrivingDifference(
                with, against, Math.Abs(Math.Abs(with.Strength!.Value) - Math.Abs(against.Strength!.Value)),
                with.StrengthUnit)
            : null;
    }

    private static double PerUnit(CauseValue part) => Math.Abs(part.Value!.Value / part.Strength!.Value);
}
