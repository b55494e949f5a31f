using System.Collections.Immutable;

namespace CircuitTransient.Studies.Scans;

/// <summary>How the figures scatter while an event's instant lies anywhere within a distance of the one
/// stated.</summary>
/// <param name="Scatter">The event and how far.</param>
/// <param name="Axis">The instants that were solved for.</param>
/// <param name="Points">The figures at each.</param>
/// <param name="Figures">For each figure its distribution.</param>
public sealed record ScatterResult(
    ScanScatter Scatter, ScanAxis Axis, ImmutableArray<ScanPoint> Points,
    ImmutableArray<FigureScatter> Figures)
{
    /// <summary>Of each part with a stated linear range, where the scatter keeps within it.</summary>
    public ImmutableArray<LinearScan> Linear { get; init; } = [];

    /// <summary>The instants without a unique solution.</summary>
    public int UnsolvedCount => Points.Count(p => p.Found is null);
}

/// <summary>The distribution of one figure.</summary>
/// <param name="Scan">Its extremes and where it breaks.</param>
/// <param name="Mean">Its mean; null where it has no value anywhere.</param>
/// <param name="Quantiles">For each hundredth the value that is not exceeded in such a fraction of
/// cases.</param>
/// <param name="Holding">In which fraction of cases the requirement or rating holds; null of what is only
/// observed.</param>
public sealed record FigureScatter(
    FigureScan Scan, double? Mean, ImmutableArray<Quantile> Quantiles, double? Holding);

/// <summary>The value that is not exceeded in a fraction of cases.</summary>
public sealed record Quantile(double Fraction, double Value);
