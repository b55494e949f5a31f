using System.Collections.Immutable;
using CircuitTransient.Measurements;

namespace CircuitTransient.Studies.Sizes;

/// <summary>What a sizing found.</summary>
/// <param name="Problem">The problem.</param>
/// <param name="Request">What was asked.</param>
/// <param name="Points">Every point of the scan, ascending; of two parts row by row of the second.</param>
/// <param name="Axes">The values scanned of each part.</param>
/// <param name="Intervals">Of one part: the stretches that hold.</param>
/// <param name="Preferred">The preferred values looked at; empty where none are asked for.</param>
/// <param name="Exact">The best values of any size; null where none hold.</param>
/// <param name="Chosen">The values proposed; null where there are none.</param>
/// <param name="Conflict">Why none hold; null where some do.</param>
/// <param name="Corners">The corners of the tolerances that decided; empty where they were not looked
/// at.</param>
/// <param name="Proposed">The full solution of the circuit with the proposed values, or as it stands where
/// none are proposed.</param>
/// <param name="ProposedText">The circuit's text with the proposed values; null where none are proposed, or
/// where a value has no place of its own in the text.</param>
public sealed record SizeResult(
    SizeProblem Problem,
    SizeRequest Request,
    ImmutableArray<SizePoint> Points,
    ImmutableArray<ImmutableArray<double>> Axes,
    ImmutableArray<FeasibleInterval> Intervals,
    ImmutableArray<SizePoint> Preferred,
    SizePoint? Exact,
    SizePoint? Chosen,
    SizeConflict? Conflict,
    ImmutableArray<UInt128> Corners,
    TransientResult Proposed,
    string? ProposedText)
{
    /// <summary>Whether values were found, and the full solution with its self-checks confirms them.</summary>
    public bool IsFound => Chosen is not null && Proposed.AllHold && Proposed.ChecksHold;

    /// <summary>How many of the points that were looked at have no unique solution.</summary>
    public int Unsolved => Points.Count(point => !point.IsSolved);
}
