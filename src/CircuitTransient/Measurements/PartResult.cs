using System.Collections.Immutable;

namespace CircuitTransient.Measurements;

/// <summary>Stresses of a part; null where undetermined or infinite.</summary>
/// <param name="Energy">In joules: the greatest that a capacitor or coil stores, what any other part absorbs
/// over the study.</param>
/// <param name="JouleIntegral">∫ i² dt over the study, A²s.</param>
public sealed record PartResult(
    string Name, string Kind, TimedValue? PeakVoltage, TimedValue? PeakCurrent, TimedValue? PeakPower,
    TimedValue? PeakVoltageRate, TimedValue? PeakCurrentRate, double? Energy, double? JouleIntegral,
    ImmutableArray<RatingResult> Ratings, LinearUpToResult? LinearUpTo);

/// <summary>A rating against what was reached; <paramref name="Used"/> is a fraction.</summary>
public sealed record RatingResult(double Rated, string Unit, double? Reached, double? Used, bool Holds);

/// <summary>A <c>linear up to</c> limit against what was reached.</summary>
/// <param name="Direction">Which way the result errs past the limit, in words; null where the kind does not
/// tell.</param>
public sealed record LinearUpToResult(
    double Declared, string Unit, double? Reached, bool Holds, string? Direction);
