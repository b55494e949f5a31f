namespace CircuitTransient.Numerics;

/// <summary>One invariant part of a real matrix A: the share V T W of A = Σ V T W, with W V = I and every
/// other block's W V = 0. Where <see cref="IsReal"/> does not hold, the block stands for itself and its
/// conjugate, so that its share is 2 Re(V T W).</summary>
/// <param name="IsReal">Whether the block is closed under conjugation: poles on the real axis, or pairs so
/// near it that they are not to be parted.</param>
/// <param name="T">m × m, upper triangular; its diagonal holds the poles.</param>
/// <param name="V">n × m, the right basis.</param>
/// <param name="W">m × n, the left basis.</param>
/// <param name="ProjectorNorm">‖V W‖ in balanced coordinates: 1 for a well separated block; how many times
/// rounding is amplified.</param>
public sealed record SpectralBlock(
    bool IsReal,
    DoubleDoubleComplexMatrix T,
    DoubleDoubleComplexMatrix V,
    DoubleDoubleComplexMatrix W,
    double ProjectorNorm)
{
    /// <summary>How many poles the block holds.</summary>
    public int Size => T.Rows;

    /// <summary>A pole, in reciprocals of the time unit of A.</summary>
    public DoubleDoubleComplex Pole(int index) => T[index, index];
}
