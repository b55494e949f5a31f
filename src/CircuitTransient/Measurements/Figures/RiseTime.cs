namespace CircuitTransient.Measurements.Figures;

/// <summary>The time from 10 % to 90 % of a change.</summary>
internal static class RiseTime
{
    /// <summary>How it is defined, in words.</summary>
    public const string Definition =
        "first crossings of 10 % and 90 % of the change from the window's start to the final value, or to "
        + "the peak where the final value is no other than the start";

    /// <summary>Reads it.</summary>
    public static FigureReading Of(WindowedCurve curve)
    {
        var start = curve.Start;
        var change = (curve.FinalAfterChange ?? curve.Peak.Value) - start;
        if (change == 0)
        {
            return FigureReading.None(curve);
        }

        var sign = Math.Sign(change);
        return curve.FirstReach(sign, start + (0.1 * change), curve.From) is { } low
            && curve.FirstReach(sign, start + (0.9 * change), low) is { } high
            ? new FigureReading(high - low, high)
            : FigureReading.None(curve);
    }
}
