using CircuitTransient.Circuits;
using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>What the change of a value puts on the right side of a part's law: a multiple of a voltage or
/// current of the circuit as it is. A rate of change is meant from just before the start, so that a jump
/// there is an impulse in it.</summary>
/// <param name="Part">Whose law.</param>
/// <param name="Quantity">The voltage, current or rate.</param>
/// <param name="Weight">Its multiple for a unit change of the value.</param>
internal sealed record LawTerm(int Part, Measurand Quantity, DoubleDouble Weight);
