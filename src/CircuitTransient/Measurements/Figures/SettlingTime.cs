namespace CircuitTransient.Measurements.Figures;

/// <summary>The time after which a response stays near its final value.</summary>
internal static class SettlingTime
{
    /// <summary>How it is defined, in words.</summary>
    public const string Definition =
        "from the window's start to the last instant outside that band about the final value";

    /// <summary>Reads it; null where there is no final value other than zero, or the band is not kept at the
    /// window's end.</summary>
    public static FigureReading Of(WindowedCurve curve, double within)
    {
        if (curve.Final is not { } final || final == 0)
        {
            return FigureReading.None(curve);
        }

        var band = within * Math.Abs(final);
        if (Math.Abs(curve.End - final) >= band)
        {
            return FigureReading.None(curve);
        }

        var above = curve.LastReach(1, final + band) ?? curve.From;
        var below = curve.LastReach(-1, final - band) ?? curve.From;
        var last = Math.Max(above, below);
        return new FigureReading(last - curve.From, last);
    }
}
