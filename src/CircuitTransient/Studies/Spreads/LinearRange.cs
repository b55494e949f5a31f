using System.Collections.Immutable;

namespace CircuitTransient.Studies.Spreads;

/// <summary>Where within the tolerances a part leaves the range its value is good for.</summary>
/// <param name="Part">Index of the part.</param>
/// <param name="Used">The greatest fraction of that range that was found in use; null where an impulse passes
/// the part.</param>
/// <param name="Point">Where, one value in SI for each varied value.</param>
/// <param name="Passed">At how many of the corner points it is left.</param>
/// <param name="Corners">How many corner points were solved.</param>
public sealed record LinearRange(
    int Part, double? Used, ImmutableArray<double> Point, long Passed, long Corners);
