using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

/// <summary>How a function of one variable comes by its greatest or least value.</summary>
public enum RangeExtremeKind
{
    /// <summary>Its slope is zero there.</summary>
    Smooth,

    /// <summary>Its slope changes its sign at once.</summary>
    Kink,

    /// <summary>At an end of the range, or beside a place without a value.</summary>
    End,

    /// <summary>Where the function jumps.</summary>
    Jump,

    /// <summary>Found by comparing values, because no slope was known there.</summary>
    Compared,

    /// <summary>The function does not change over the range.</summary>
    Flat,
}

/// <summary>The greatest or least value found.</summary>
/// <param name="At">Where, and the value.</param>
/// <param name="Looked">Every sample, those given and those added, by place.</param>
public sealed record RangeExtreme(
    SlopedSample At, RangeExtremeKind Kind, ImmutableArray<SlopedSample> Looked);
