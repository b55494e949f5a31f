using System.Collections.Immutable;

namespace CircuitTransient.Studies.Spreads;

/// <summary>A jump between two neighbouring corners: all values stay at the ends of their ranges, one goes
/// from its lower end to its upper one, and on that way a figure or the instant of a peak jumps.</summary>
/// <param name="Figure">Index of the figure.</param>
/// <param name="Value">Index of the value that moves.</param>
/// <param name="Point">The corner at which that value is lowest, in SI.</param>
/// <param name="Place">Where the value stands at the jump, in SI.</param>
/// <param name="Bracket">Within how much that is known, in SI.</param>
/// <param name="IsOfValue">Whether the figure itself jumps; else only its instant does, and the figure has a
/// kink: another crest takes over.</param>
/// <param name="ValueBefore">The figure just below the place; NaN where it has no value there.</param>
/// <param name="ValueAfter">The figure just above it.</param>
/// <param name="TimeBefore">Its instant just below the place, in seconds; NaN where there is none.</param>
/// <param name="TimeAfter">Its instant just above it.</param>
public sealed record EdgeJump(
    int Figure, int Value, ImmutableArray<double> Point, double Place, double Bracket, bool IsOfValue,
    double ValueBefore, double ValueAfter, double TimeBefore, double TimeAfter)
{
    /// <summary>∂figure/∂value below the place; null where it is not known.</summary>
    public double? SlopeBefore { get; init; }

    /// <summary>∂figure/∂value above it.</summary>
    public double? SlopeAfter { get; init; }

    /// <summary>The ring of whose periods the instant jumps by a whole or half number; null where there is
    /// none such.</summary>
    public RingStep? Ring { get; init; }

    /// <summary>On how many other edges the samples of the figure show a step at least half as
    /// large.</summary>
    public int Alike { get; init; }
}

/// <summary>A step in time by some periods of a ring.</summary>
/// <param name="Frequency">Its undamped frequency in hertz.</param>
/// <param name="Periods">By how many of its periods, a multiple of a half.</param>
public sealed record RingStep(double Frequency, double Periods);

/// <summary>What was found between neighbouring corners.</summary>
/// <param name="Edges">How many edges were looked at.</param>
/// <param name="AllEdges">How many there are; a double, for there may be very many.</param>
/// <param name="PointsOnEdge">How many points of each were solved, its corners among them.</param>
/// <param name="Solves">How many solves that took, those of the halving among them.</param>
/// <param name="ExactSolves">How many of them by the exact engine, to confirm what was found.</param>
/// <param name="Jumps">What was confirmed, the worst first.</param>
/// <param name="LeftOut">How many more were seen but not looked into.</param>
public sealed record JumpFindings(
    int Edges, double AllEdges, int PointsOnEdge, long Solves, long ExactSolves,
    ImmutableArray<EdgeJump> Jumps, int LeftOut);
