namespace CircuitTransient.Measurements.Figures;

/// <summary>How far a response goes past the value it settles at.</summary>
internal static class Overshoot
{
    /// <summary>How it is defined, in words.</summary>
    public const string Definition =
        "how far the response passes its final value, in per cent of the change from the window's start to "
        + "that; 0 where it does not";

    /// <summary>Reads it, in per cent.</summary>
    public static FigureReading Of(WindowedCurve curve)
    {
        if (curve.FinalAfterChange is not { } final)
        {
            return FigureReading.None(curve);
        }

        var change = final - curve.Start;
        var furthest = change > 0 ? curve.Greatest : curve.Least;
        return new FigureReading(Math.Max(0, 100 * (furthest.Value - final) / change), furthest.Time);
    }
}
