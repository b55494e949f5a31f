using System.Collections.Immutable;

namespace CircuitTransient.Measurements.Breakdowns;

/// <summary>Waveforms broken down otherwise than the result itself, for a reader who chooses: by edge, and
/// since a switching.</summary>
/// <param name="Words">How they are broken down: <c>by edge</c>, <c>since Kmain closes</c>.</param>
/// <param name="From">Since when, in seconds; NaN stands in the waveforms before.</param>
/// <param name="Observations">The terms of each observation; none for one that is not linear.</param>
public sealed record OtherBreakdown(
    string Words, double From, ImmutableArray<ImmutableArray<BreakdownTerm>> Observations);

/// <summary>One cause of another breakdown.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Weights">How it grows with the scales of the result's own causes: its waveform is
/// <paramref name="Samples"/> times the sum of the weights, each times its cause's scale.</param>
/// <param name="Samples">At the result's sample times.</param>
public sealed record BreakdownTerm(
    string Name, ImmutableArray<(int Cause, double Weight)> Weights, ImmutableArray<double> Samples);
