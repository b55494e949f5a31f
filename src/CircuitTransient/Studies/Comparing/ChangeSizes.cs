namespace CircuitTransient.Studies.Comparing;

/// <summary>Says which differences count.</summary>
/// <param name="Within">The fraction of a quantity's size that is overlooked.</param>
/// <param name="Seconds">The difference of two instants that is overlooked.</param>
internal sealed record ChangeSizes(double Within, double Seconds)
{
    /// <summary>A number before and after.</summary>
    /// <param name="before">Null where infinite or open.</param>
    /// <param name="after">Likewise.</param>
    /// <param name="size">The size of the quantity; if not given, the greater magnitude of the two.</param>
    /// <param name="floor">A difference below this is rounding of greater numbers.</param>
    public NumberChange Of(double? before, double? after, double? size = null, double floor = 0)
    {
        if (before is not { } from || after is not { } to)
        {
            return new NumberChange(before, after, before.HasValue != after.HasValue);
        }

        var scale = size ?? Math.Max(Math.Abs(from), Math.Abs(to));
        return new NumberChange(from, to, Math.Abs(to - from) > Math.Max(Within * scale, floor));
    }

    /// <summary>An instant before and after, in seconds.</summary>
    public NumberChange OfTimes(double before, double after) =>
        new(before, after, Math.Abs(after - before) > Seconds);
}
