namespace CircuitTransient.Measurements.Figures;

/// <summary>What was read off a waveform.</summary>
/// <param name="Value">The figure in its own unit (an overshoot's in per cent); null where the waveform has
/// none.</param>
/// <param name="Time">The instant it is settled by, in seconds.</param>
internal sealed record FigureReading(double? Value, double Time)
{
    /// <summary>No such figure in this window.</summary>
    public static FigureReading None(WindowedCurve curve) => new(null, curve.Until);
}
