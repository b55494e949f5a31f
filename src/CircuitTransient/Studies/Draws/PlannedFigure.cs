namespace CircuitTransient.Studies.Draws;

/// <summary>How a draw's figure follows from tracks and integrals.</summary>
internal abstract record PlannedFigure;

/// <summary>A figure that the exact engine gives.</summary>
/// <param name="Reason">Why.</param>
internal sealed record ExactFigure(string Reason) : PlannedFigure;

/// <summary>A track's greatest or least value.</summary>
internal sealed record ExtremeFigure(int Track, bool IsGreatest) : PlannedFigure;

/// <summary>How far a track stays within limits.</summary>
internal sealed record MarginFigure(int Track, double? Lower, double? Upper) : PlannedFigure;

/// <summary>How far a track stays within a band about a target; the band is in the track's unit.</summary>
internal sealed record SettlingFigure(int Track, double Target, double Band) : PlannedFigure;

/// <summary>A track's largest magnitude over a limit.</summary>
internal sealed record PeakUsedFigure(int Track, double Limit) : PlannedFigure;

/// <summary>The most energy a store holds over a limit: its factor times the square of the track's largest
/// magnitude.</summary>
internal sealed record StoredEnergyFigure(int Track, TrackFactor Factor, double Limit) : PlannedFigure;

/// <summary>The end of a growing (or, with a negative factor, falling) integral, or its start.</summary>
internal sealed record IntegralFigure(int Integral, bool IsGreatest) : PlannedFigure;

/// <summary>How far a growing integral stays within limits.</summary>
internal sealed record IntegralMarginFigure(int Integral, double? Lower, double? Upper) : PlannedFigure;

/// <summary>An integral over a limit; its mean over the study where that is rated.</summary>
internal sealed record IntegralUsedFigure(int Integral, double Limit, bool IsMean) : PlannedFigure;
