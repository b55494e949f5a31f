using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Scans;

/// <summary>What a scan found.</summary>
/// <param name="Circuit">The circuit with its values as written.</param>
/// <param name="Axes">What was scanned; empty where only an event scattered.</param>
/// <param name="Figures">The figures followed.</param>
/// <param name="Points">Every point of the ranges, the last axis running fastest.</param>
/// <param name="Nominal">The circuit as written; its place may lie outside the ranges.</param>
/// <param name="Findings">For each figure what was found on and between the points.</param>
/// <param name="Family">Waveforms at some of the points; null where nothing could be drawn.</param>
/// <param name="Scatter">How the figures scatter with an event; null where that was not asked for.</param>
public sealed record ScanResult(
    Circuit Circuit,
    ImmutableArray<ScanAxis> Axes,
    ImmutableArray<StudyFigure> Figures,
    ImmutableArray<ScanPoint> Points,
    ScanPoint Nominal,
    ImmutableArray<FigureScan> Findings,
    ScanFamily? Family,
    ScatterResult? Scatter)
{
    /// <summary>Of each part with a stated linear range, where the scan keeps within it.</summary>
    public ImmutableArray<LinearScan> Linear { get; init; } = [];

    /// <summary>The middles of the fields between the points of two scanned values, the second running
    /// fastest; empty where the points lie so close that none were solved.</summary>
    public ImmutableArray<ScanPoint> Middles { get; init; } = [];

    /// <summary>The points at which the circuit has no unique solution, or is none.</summary>
    public int UnsolvedCount => Points.Count(p => p.Found is null) + (Scatter?.UnsolvedCount ?? 0);

    /// <summary>Whether some points of the ranges have no solution.</summary>
    public bool HasGaps => Points.Any(p => p.Found is null);

    /// <summary>Whether slopes were known at any point.</summary>
    public bool HasSlopes => Points.Concat(Scatter?.Points ?? [])
        .Any(p => p.Slopes.Any(double.IsFinite));

    /// <summary>Whether every requirement and rating holds at every point and between them, as far as was
    /// searched.</summary>
    public bool AllHold => Findings.All(f => f.HoldsThroughout)
        && (Scatter is null || Scatter.Figures.All(f => f.Scan.HoldsThroughout));
}

/// <summary>One point of a scan.</summary>
/// <param name="At">The scanned values in SI.</param>
/// <param name="Found">The figures there; null where there is no unique solution.</param>
/// <param name="Slopes">∂(figure)/∂(first scanned value) for each figure, NaN where it is not known; empty
/// where no slopes were asked for.</param>
/// <param name="Trouble">Why there is no solution; else null.</param>
public sealed record ScanPoint(
    ImmutableArray<double> At, StudyPoint? Found, ImmutableArray<double> Slopes, string? Trouble)
{
    /// <summary>What is used of each stated linear range, as a fraction; empty where none is stated or there
    /// is no solution.</summary>
    public ImmutableArray<double> LinearUsed { get; init; } = [];

    /// <summary>Whether some part is past the range its value is good for.</summary>
    public bool IsInDoubt => LinearUsed.Any(used => used > 1);
}

/// <summary>What was found of one figure.</summary>
/// <param name="Figure">The figure.</param>
/// <param name="Greatest">Its greatest value, on or between the points; null where it has none.</param>
/// <param name="Least">Its least value.</param>
/// <param name="Jumps">Where it jumps, of one scanned value.</param>
/// <param name="Breaks">Where a requirement or rating begins or ceases to break: of one scanned value every
/// such place, of two those on the lines through the points.</param>
/// <param name="Holding">Of one scanned value, the stretches over which the requirement or rating
/// holds.</param>
/// <param name="HoldsThroughout">Whether it holds wherever it was searched; true for what is only
/// observed.</param>
public sealed record FigureScan(
    StudyFigure Figure,
    ScanPlace? Greatest,
    ScanPlace? Least,
    ImmutableArray<ScanJump> Jumps,
    ImmutableArray<ScanBreak> Breaks,
    ImmutableArray<ScanStretch> Holding,
    bool HoldsThroughout)
{
    /// <summary>Whether it is a requirement's margin or a rating's use.</summary>
    public bool IsJudged => IsJudgedKind(Figure.Kind);

    /// <summary>The worst place of what is judged; null of what is only observed.</summary>
    public ScanPlace? Worst => Figure.Kind switch
    {
        StudyFigureKind.Margin => Least,
        StudyFigureKind.RatingUsed => Greatest,
        _ => null,
    };

    /// <summary>How far the worst place is from breaking, as a fraction of what is allowed; negative where it
    /// breaks, negative infinity where without limit, null of what is only observed.</summary>
    public double? Room { get; init; }

    /// <summary>What was looked at between the points of one scanned value, by place.</summary>
    public ImmutableArray<SlopedSample> Looks { get; init; } = [];

    /// <summary>How many stretches between points might hide a break and were not searched to the
    /// end.</summary>
    public int LeftOver { get; init; }

    /// <summary>Whether figures of a kind are judged.</summary>
    internal static bool IsJudgedKind(StudyFigureKind kind) =>
        kind is StudyFigureKind.Margin or StudyFigureKind.RatingUsed;
}

/// <summary>A value of a figure and where it stands.</summary>
/// <param name="At">The scanned values in SI.</param>
/// <param name="Time">When it stood, in seconds; null where there is no instant.</param>
/// <param name="How">How it was found.</param>
public sealed record ScanPlace(
    ImmutableArray<double> At, double Value, double? Time, RangeExtremeKind How)
{
    /// <summary>Whether some part is past the range its value is good for.</summary>
    public bool IsInDoubt { get; init; }
}

/// <summary>Where a figure jumps as the scanned value passes.</summary>
public sealed record ScanJump(double At, double Before, double After);

/// <summary>Where a requirement or rating begins or ceases to break.</summary>
/// <param name="At">The scanned values in SI.</param>
/// <param name="Axis">Along which scanned value.</param>
/// <param name="HoldsBelow">Whether it holds below that value, and breaks above.</param>
/// <param name="IsJump">Whether the figure jumps there.</param>
/// <param name="IsBySlope">Whether exact slopes led there; else values were compared.</param>
public sealed record ScanBreak(
    ImmutableArray<double> At, int Axis, bool HoldsBelow, bool IsJump, bool IsBySlope)
{
    /// <summary>Of two scanned values, the number of the point before it on its line.</summary>
    public int Before { get; init; }
}

/// <summary>A stretch of a scanned value.</summary>
public sealed record ScanStretch(double From, double To);

/// <summary>Waveforms of one quantity at some of a scan's points.</summary>
/// <param name="Name">The quantity.</param>
/// <param name="Unit">Its unit.</param>
/// <param name="Requirement">Index of the requirement on it that comes nearest to breaking; −1 where none
/// is.</param>
/// <param name="Event">The scanned event; null where none is.</param>
public sealed record ScanFamily(
    string Name, string Unit, int Requirement, string? Event, ImmutableArray<FamilyMember> Members);

/// <summary>One waveform of a family.</summary>
/// <param name="At">The scanned values in SI.</param>
/// <param name="Role">Why it was taken.</param>
/// <param name="Times">In seconds.</param>
/// <param name="Values">In the family's unit.</param>
/// <param name="Origin">When the scanned event takes place, in seconds; 0 where none is scanned.</param>
/// <param name="Start">The last switching before its peak, or when it begins to count, in seconds.</param>
/// <param name="Peak">When its magnitude is greatest while it counts, in seconds.</param>
/// <param name="End">Until when it counts, in seconds.</param>
public sealed record FamilyMember(
    ImmutableArray<double> At, FamilyRole Role, ImmutableArray<double> Times, ImmutableArray<double> Values,
    double Origin, double Start, double Peak, double End);

/// <summary>Why a waveform stands for its family.</summary>
public enum FamilyRole
{
    /// <summary>One of several spread over the range.</summary>
    Spread,

    /// <summary>The circuit as written.</summary>
    AsWritten,

    /// <summary>The worst found.</summary>
    Worst,
}
