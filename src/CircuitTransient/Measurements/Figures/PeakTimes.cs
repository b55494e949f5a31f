namespace CircuitTransient.Measurements.Figures;

/// <summary>When a waveform is greatest, and since when it stays small.</summary>
internal static class PeakTimes
{
    /// <summary>How the time of the peak is defined, in words.</summary>
    public const string PeakDefinition = "of the greatest magnitude, from the window's start";

    /// <summary>How the time after which it stays below a level is defined, in words.</summary>
    public const string StaysBelowDefinition =
        "last instant at which the magnitude is still at the level or above, from the window's start";

    /// <summary>Reads the time of the peak.</summary>
    public static FigureReading Peak(WindowedCurve curve) =>
        new(curve.Peak.Time - curve.From, curve.Peak.Time);

    /// <summary>Reads the time after which the magnitude stays below a level; null where it does not at the
    /// window's end.</summary>
    public static FigureReading StaysBelow(WindowedCurve curve, double level)
    {
        if (Math.Abs(curve.End) >= level)
        {
            return FigureReading.None(curve);
        }

        var above = curve.LastReach(1, level) ?? curve.From;
        var below = curve.LastReach(-1, -level) ?? curve.From;
        var last = Math.Max(above, below);
        return new FigureReading(last - curve.From, last);
    }
}
