namespace CircuitTransient.Studies.Sensitivities;

/// <summary>Why a derivative does not exist, or is not known.</summary>
/// <param name="From">From which instant on, in seconds.</param>
/// <param name="Reason">In words, without a full stop.</param>
public sealed record Refusal(double From, string Reason);
