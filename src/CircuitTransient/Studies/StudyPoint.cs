using System.Collections.Immutable;

namespace CircuitTransient.Studies;

/// <summary>What a study's figures come to at one set of values.</summary>
/// <param name="Values">In the order of the figures, in their SI units; null where a figure is infinite, was
/// not judged, or does not exist. A margin that is infinitely negative is negative infinity.</param>
/// <param name="Times">When each stood, in seconds; null where there is no instant.</param>
public sealed record StudyPoint(ImmutableArray<double?> Values, ImmutableArray<double?> Times);
