using System.Collections.Immutable;

namespace CircuitTransient.Studies.Sizes;

/// <summary>What a set of values comes to.</summary>
/// <param name="Values">The values of the sized parts, in SI.</param>
/// <param name="Shares">Each constraint's margin as a fraction of its scale, the least over the corners
/// looked at; negative infinity where it cannot be judged or there is no unique solution.</param>
/// <param name="Aim">What is to be made least or greatest, with all else nominal; null where there is no such
/// figure.</param>
public sealed record SizePoint(ImmutableArray<double> Values, ImmutableArray<double> Shares, double? Aim)
{
    /// <summary>The least share.</summary>
    public double Worst => Shares.Min();

    /// <summary>Whether every requirement and rating holds.</summary>
    public bool Holds => Worst >= 0;

    /// <summary>Whether the circuit has a unique solution there.</summary>
    public bool IsSolved { get; init; } = true;
}
