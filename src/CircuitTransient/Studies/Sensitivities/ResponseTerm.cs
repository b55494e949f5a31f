using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Sensitivities;

/// <summary>A vector times one function of a segment.</summary>
/// <param name="Mode">Index of the mode.</param>
/// <param name="Carrier">Place of the function in it.</param>
/// <param name="IsMirrored">Whether the function's conjugate is meant.</param>
/// <param name="Vector">One number for each row of the block that responds.</param>
internal readonly record struct ResponseTerm(
    int Mode, int Carrier, bool IsMirrored, DoubleDoubleComplex[] Vector);
