using System.Collections.Immutable;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>What each switching up to an extreme has done to its value. The effect of the k-th is the answer
/// with the switchings 1…k less that with 1…k−1, at the extreme's instant, every switching at its instant of
/// the full answer; so the base and all effects add up to the value.</summary>
/// <param name="BaseWords">What the base is: <c>with no switching</c>.</param>
/// <param name="Base">The answer without the switchings that follow in <paramref name="Effects"/>.</param>
/// <param name="Effects">The effects, in the order of the switchings; later ones have none.</param>
public sealed record SwitchingBreakdown(
    string BaseWords, double Base, ImmutableArray<SwitchingEffect> Effects);

/// <summary>The effect of the switchings at one instant; those that act together have one effect.</summary>
/// <param name="Event">In words: <c>Kpre opens and Kmain opens</c>.</param>
/// <param name="Time">In seconds.</param>
/// <param name="Value">In the quantity's unit; null where it stands with a later one.</param>
/// <param name="Reason">Why there is no value of its own; else null.</param>
public sealed record SwitchingEffect(string Event, double Time, double? Value, string? Reason = null);

/// <summary>The breakdowns by switching at both extremes; null where an
/// extreme is infinite or open.</summary>
public sealed record SwitchingBreakdowns(SwitchingBreakdown? AtMax, SwitchingBreakdown? AtMin);
