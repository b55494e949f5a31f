namespace CircuitTransient.Numerics;

/// <summary>Decouples the diagonal blocks of a triangular matrix: T X = X D and Y T = D Y with D the diagonal
/// blocks and unit diagonal blocks in X and Y. Each block is found by substitution of its own, so that an ill
/// conditioned one spoils no other.</summary>
/// <remarks>The block form of eigenvector substitution, a triangular Sylvester equation solved entry by entry
/// (R. H. Bartels, G. W. Stewart 1972, from memory).</remarks>
internal sealed class BlockSubstitution
{
    /// <summary>Poles this much of ‖A‖ or less are zero: the circuit's own zeros, blurred by
    /// rounding.</summary>
    public const double ZeroPole = 1e-26;

    // what a step of the reduction leaves of ‖T‖; seen in trials, times n below
    private const double Noise = 4e-32;
    // poles that differ by less than this many noises are one to working accuracy
    private const double EqualPoles = 16;
    // beyond this a vector only says "not separable"; fourth powers stay finite
    private const double Largest = 1e60;

    private readonly DoubleDoubleComplexMatrix t;
    private readonly double norm;
    private readonly double noise;

    /// <summary>Substitutes in T with ‖T‖ as stated; block b covers places starts[b] to starts[b + 1] −
    /// 1.</summary>
    public BlockSubstitution(DoubleDoubleComplexMatrix t, double norm, IReadOnlyList<int> starts)
    {
        this.t = t;
        this.norm = norm;
        noise = Noise * t.Rows * norm;
        X = DoubleDoubleComplexMatrix.Identity(t.Rows);
        Y = DoubleDoubleComplexMatrix.Identity(t.Rows);
        var startOf = new int[t.Rows];
        for (var b = 0; b + 1 < starts.Count; b++)
        {
            for (var i = starts[b]; i < starts[b + 1]; i++)
            {
                startOf[i] = starts[b];
            }
        }

        for (var b = starts.Count - 2; b >= 0; b--)
        {
            for (var i = starts[b + 1] - 1; i >= starts[b]; i--)
            {
                SubstituteRight(i, starts[b + 1], startOf);
                SubstituteLeft(i, starts[b + 1]);
            }
        }
    }

    /// <summary>The right bases, block by block in columns.</summary>
    public DoubleDoubleComplexMatrix X { get; }

    /// <summary>The left bases, block by block in rows.</summary>
    public DoubleDoubleComplexMatrix Y { get; }

    /// <summary>X_ij (t_ii − t_jj) = −Σ_{k>i} t_ik X_kj + Σ_{l&lt;j, l in the block of j} X_il
    /// t_lj.</summary>
    private void SubstituteRight(int i, int end, int[] startOf)
    {
        var n = t.Rows;
        if (end == n)
        {
            return;
        }

        for (var k = i + 1; k < n; k++)
        {
            X.AddScaledRow(i, -t[i, k], X, k, end);
        }

        for (var j = end; j < n; j++)
        {
            var sum = X[i, j];
            for (var l = startOf[j]; l < j; l++)
            {
                sum += X[i, l] * t[l, j];
            }

            X[i, j] = Divide(sum, i, j);
        }
    }

    /// <summary>Y_ij (t_jj − t_ii) = −Σ_{l&lt;j} Y_il t_lj + Σ_{k>i, k in the block of i} t_ik
    /// Y_kj.</summary>
    private void SubstituteLeft(int i, int end)
    {
        var n = t.Rows;
        if (end == n)
        {
            return;
        }

        Y.AddScaledRow(i, -1, t, i, end);
        for (var k = i + 1; k < end; k++)
        {
            Y.AddScaledRow(i, t[i, k], Y, k, end);
        }

        for (var j = end; j < n; j++)
        {
            var y = Divide(Y[i, j], j, i);
            Y[i, j] = y;
            if (j + 1 < n)
            {
                Y.AddScaledRow(i, -y, t, j, j + 1);
            }
        }
    }

    private DoubleDoubleComplex Divide(DoubleDoubleComplex sum, int i, int j)
    {
        var gap = t[i, i] - t[j, j];
        var size = sum.Magnitude;
        if (size == 0)
        {
            return 0;
        }

        if (gap.Magnitude <= EqualPoles * noise)
        {
            var isZeroPair = t[i, i].IsZero && t[j, j].IsZero;
            if (size <= (isZeroPair ? ZeroPole * norm : noise))
            {
                return 0;
            }

            gap = gap.Magnitude < noise ? noise : gap;
        }

        var quotient = sum / gap;
        var magnitude = quotient.Magnitude;
        return magnitude <= Largest ? quotient : quotient * (Largest / magnitude);
    }
}
