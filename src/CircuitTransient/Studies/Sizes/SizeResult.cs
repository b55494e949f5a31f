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
/// <param name="Chosen">The values proposed, to six digits where that holds too; null where there are
/// none.</param>
/// <param name="Conflict">Why none hold; null where some do.</param>
/// <param name="Corners">The corners of the tolerances that decided; empty where they were not looked
/// at.</param>
/// <param name="Proposed">The full solution of the circuit with the proposed values, or as it stands where
/// none are proposed.</param>
/// <param name="ProposedText">The circuit's text with the proposed values; null where none are proposed, or
/// where a value has no place of its own in the text.</param>
/// <param name="Confirmed">The full solutions at the corners that are worst for the proposed values.</param>
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
    string? ProposedText,
    ImmutableArray<ConfirmedCorner> Confirmed)
{
    /// <summary>What was solved at the corners of the tolerances.</summary>
    public required CornerAccount Account { get; init; }

    /// <summary>The values of the file, judged like the proposed ones.</summary>
    public required SizePoint AsItStands { get; init; }

    /// <summary>Whether values were found, and full solutions with their self-checks confirm them.</summary>
    public bool IsFound =>
        Chosen is not null && Proposed.AllHold && ChecksHold && Confirmed.All(corner => corner.Holds);

    /// <summary>Whether every self-check of every full solution holds.</summary>
    public bool ChecksHold => Proposed.ChecksHold && Confirmed.All(corner => corner.ChecksHold);

    /// <summary>How many of the points that were looked at have no unique solution.</summary>
    public int Unsolved => Points.Count(point => !point.IsSolved);

    /// <summary>Whether a value is the first or last of its range, or of the series in it.</summary>
    public bool AtEnd(double value, SizedValue part) => Request.Series is { } series
        ? PreferredValues.Between(series, part.Lowest, part.Highest) is var all
            && (value == all.First() || value == all.Last())
        : value <= part.Lowest || value >= part.Highest;
}

/// <summary>A full solution at a corner of the tolerances.</summary>
/// <param name="Corner">The corner.</param>
/// <param name="Holds">Whether every requirement and rating holds.</param>
/// <param name="ChecksHold">Whether every self-check holds.</param>
public sealed record ConfirmedCorner(UInt128 Corner, bool Holds, bool ChecksHold);

/// <summary>What was solved at the corners of the tolerances.</summary>
/// <param name="Count">How many corners the proposed values were solved at; without such, those in the middle
/// of the range.</param>
/// <param name="IsComplete">Whether these are all there are.</param>
/// <param name="ConfirmsEnds">Whether the ends of the stretches and the best values of any size hold at all
/// of these too.</param>
/// <param name="Listed">How many of the preferred values said to hold, the best first, do so at all of these
/// too.</param>
public sealed record CornerAccount(int Count, bool IsComplete, bool ConfirmsEnds, int Listed);
