using System.Collections.Immutable;

namespace CircuitTransient.Circuits;

/// <summary>What a study says in place of the circuit's text.</summary>
/// <param name="NamedValues">Named values in SI, by name.</param>
/// <param name="EventTimes">Delays of events in seconds, by switch and whether it closes.</param>
public sealed record CircuitOverrides(
    ImmutableDictionary<string, double> NamedValues,
    ImmutableDictionary<(string Switch, bool Closes), double> EventTimes)
{
    /// <summary>The text as it stands.</summary>
    public static CircuitOverrides None { get; } = new(
        ImmutableDictionary<string, double>.Empty,
        ImmutableDictionary<(string Switch, bool Closes), double>.Empty);
}
