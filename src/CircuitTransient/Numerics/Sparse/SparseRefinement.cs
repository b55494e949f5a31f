namespace CircuitTransient.Numerics.Sparse;

/// <summary>A x = b in double-double by factors in double: what is left of b, formed in double-double, is
/// solved for again and again.</summary>
/// <remarks>C. B. Moler, "Iterative refinement in floating point", J. ACM 14 (1967), from memory: each turn
/// gains the digits that the condition leaves to the factors.</remarks>
public static class SparseRefinement
{
    private const int MostTurns = 30;
    private const double Exact = 1e-31; // of the solution's size, each unknown in the scale of its column
    private const double Enough = 1e-28;

    /// <summary>The solution; null where the matrix is so near to singular that no digit is gained.</summary>
    /// <param name="lu">Factors of the values rounded to double.</param>
    /// <param name="pattern">Where the values stand.</param>
    /// <param name="values">The matrix.</param>
    /// <param name="b">The right-hand side.</param>
    public static DoubleDouble[]? Solve(
        SparseLu<double> lu, SparsePattern pattern, ReadOnlySpan<DoubleDouble> values,
        ReadOnlySpan<DoubleDouble> b)
    {
        var x = new DoubleDouble[pattern.Size];
        var correction = new double[pattern.Size];
        var (last, size) = (double.PositiveInfinity, 0.0);
        for (var turn = 0; turn < MostTurns; turn++)
        {
            Residual(pattern, values, x, b, correction);
            lu.Solve(correction);
            var change = lu.ScaledSize(correction);
            if (!double.IsFinite(change))
            {
                return null;
            }

            if (change > last / 2)
            {
                return last <= Enough * size ? x : null;
            }

            for (var i = 0; i < x.Length; i++)
            {
                x[i] += correction[i];
                correction[i] = x[i].Hi;
            }

            (last, size) = (change, lu.ScaledSize(correction));
            if (change <= Exact * size)
            {
                return x;
            }
        }

        return last <= Enough * size ? x : null;
    }

    private static void Residual(
        SparsePattern pattern, ReadOnlySpan<DoubleDouble> values, DoubleDouble[] x,
        ReadOnlySpan<DoubleDouble> b, double[] residual)
    {
        var left = b.ToArray();
        for (var j = 0; j < x.Length; j++)
        {
            for (var p = pattern.Starts[j]; !x[j].IsZero && p < pattern.Starts[j + 1]; p++)
            {
                left[pattern.Rows[p]] -= values[p] * x[j];
            }
        }

        for (var i = 0; i < left.Length; i++)
        {
            residual[i] = (double)left[i];
        }
    }
}
