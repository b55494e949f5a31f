using System.Collections.Immutable;

namespace CircuitTransient.Solutions.Curves;

/// <summary>A measured quantity over the whole study, piece by piece.</summary>
/// <param name="Pieces">One for each segment.</param>
public sealed record Curve(ImmutableArray<CurvePiece> Pieces)
{
    /// <summary>The value at an instant; at a jump the one after it, or before it.</summary>
    public double ValueAt(TransientSolution solution, double time, bool before = false)
    {
        var piece = Pieces[solution.SegmentAt(time, before)];
        return piece.ValueAt(Math.Clamp(time - piece.Segment.Start, 0, piece.Segment.Length));
    }
}

/// <summary>Whose part of a quantity is meant.</summary>
public enum Share
{
    /// <summary>All causes together.</summary>
    Total,

    /// <summary>One cause alone.</summary>
    Own,

    /// <summary>All causes but one.</summary>
    Without,

    /// <summary>What is left of a quadratic quantity when every cause's own part is taken away.</summary>
    Joint,
}
