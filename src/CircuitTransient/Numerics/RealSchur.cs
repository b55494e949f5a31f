namespace CircuitTransient.Numerics;

/// <summary>The real Schur form A = Q T Qᵀ: Q orthogonal, T upper triangular but for blocks of order two that
/// hold the complex pairs.</summary>
/// <param name="T">The triangle.</param>
/// <param name="TransposedQ">Qᵀ: its rows are the Schur vectors.</param>
public sealed record RealSchur(DoubleDoubleMatrix T, DoubleDoubleMatrix TransposedQ)
{
    /// <summary>The Schur form of a square matrix of finite entries.</summary>
    public static RealSchur Of(DoubleDoubleMatrix a)
    {
        ArgumentNullException.ThrowIfNull(a);
        var t = a.Copy();
        var qt = DoubleDoubleMatrix.Identity(a.Rows);
        Hessenberg.Reduce(t, qt);
        FrancisIteration.Run(t, qt);
        return new(t, qt);
    }
}
