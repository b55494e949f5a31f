namespace CircuitTransient.Numerics;

/// <summary>The blocks of one connected matrix: balanced, brought to Schur form, clustered, and each cluster
/// given a right basis; the left bases are rows of the inverse of all right ones, so that they are dual to
/// rounding however near to each other some poles are.</summary>
internal sealed class SpectralSplit
{
    // of ‖A‖ and per row; couplings below it do not tell a pair from two real poles
    private const double Noise = 1e-30;

    // of ‖A‖; a good basis reaches n · 1e-31, and zero poles are cleared at 1e-26
    private const double Invariance = 1e-25;

    private readonly DoubleDoubleMatrix a;
    private readonly DoubleDoubleMatrix transposed;
    private readonly double norm;
    private readonly DoubleDoubleMatrix bases;
    private readonly List<Share> shares = [];
    private int filled;

    private SpectralSplit(DoubleDoubleMatrix balanced, double norm)
    {
        a = balanced;
        transposed = balanced.Transposed();
        this.norm = norm;
        bases = new(balanced.Rows, balanced.Rows);
    }

    /// <summary>The blocks.</summary>
    public static IEnumerable<SpectralBlock> Of(DoubleDoubleMatrix a)
    {
        var balancing = Balancing.Of(a);
        var balanced = balancing.Matrix;
        var size = balanced.FrobeniusNorm();
        var schur = ComplexSchur.Of(RealSchur.Of(balanced), Noise * a.Rows * size);
        ClearZeroPoles(schur.T, BlockSubstitution.ZeroPole * size);

        SpectralSplit split = new(balanced, size);
        if (!split.Fill(PoleClusters.Of(schur.Copy(), size, PoleClusters.LargeBlock))
            && !split.Fill(PoleClusters.Of(schur.Copy(), size, a.Rows)))
        {
            split.FillWhole(schur.Vectors);
        }

        var inverse = LuFactorization.Of(split.bases.Transposed())
            .Solve(DoubleDoubleMatrix.Identity(a.Rows));
        return split.shares.Select(share => share.Finished(inverse, balancing.Exponents));
    }

    /// <summary>Takes these clusters; false where some basis is not invariant to rounding, because poles
    /// closer than rounding were parted all the same.</summary>
    private bool Fill(PoleClusters clusters)
    {
        Clear();
        foreach ((var basis, var isReal) in clusters.Found)
        {
            var right = basis.Right.Times(clusters.Schur.Vectors);
            shares.Add(!isReal ? AddComplex(basis.T, right)
                : right.Rows == 1 ? AddReal(basis.T, right)
                : AddRealCluster(right));
        }

        return shares.TrueForAll(IsInvariant);
    }

    private void FillWhole(DoubleDoubleComplexMatrix vectors)
    {
        Clear();
        shares.Add(AddRealCluster(vectors));
    }

    private void Clear()
    {
        filled = 0;
        shares.Clear();
    }

    private bool IsInvariant(Share share)
    {
        var image = share.Right.Times(transposed);
        var expected = share.T.Transposed().Times(share.Right);
        return double.Hypot(
            image.Re.Plus(-1, expected.Re).FrobeniusNorm(),
            image.Im.Plus(-1, expected.Im).FrobeniusNorm()) <= Invariance * norm;
    }

    private static void ClearZeroPoles(DoubleDoubleComplexMatrix t, double limit)
    {
        for (var i = 0; i < t.Rows; i++)
        {
            t[i, i] = t[i, i].Magnitude <= limit ? 0 : t[i, i];
        }
    }

    private Share AddComplex(DoubleDoubleComplexMatrix t, DoubleDoubleComplexMatrix right)
    {
        var first = filled;
        if (right.Rows == 1)
        {
            TurnPhase(right);
        }

        Append(right.Re);
        Append(right.Im);
        return new(false, first, t, right, DoubleDoubleComplexMatrix.Identity(t.Rows));
    }

    private Share AddReal(DoubleDoubleComplexMatrix t, DoubleDoubleComplexMatrix right)
    {
        var first = filled;
        TurnPhase(right);
        var real = DoubleDoubleComplexMatrix.From(right.Re);
        real.Re.Row(0).Scale(1 / DoubleDouble.Sqrt(real.Re.Row(0).SumOfSquares()));
        Append(real.Re);
        return new(true, first, t, real, DoubleDoubleComplexMatrix.Identity(1));
    }

    /// <summary>A cluster closed under conjugation gets a real orthonormal basis B, and its triangle anew
    /// from B A Bᵀ.</summary>
    private Share AddRealCluster(DoubleDoubleComplexMatrix right)
    {
        var first = filled;
        var b = RealSpan.Of(right);
        Append(b);
        var schur = ComplexSchur.Of(RealSchur.Of(b.Times(a).Times(b.Transposed())));
        ClearZeroPoles(schur.T, BlockSubstitution.ZeroPole * norm);
        (var t, var q) =
            NilpotentForm.Of(schur.T, BlockSubstitution.ZeroPole * norm);
        var turn = q.Transposed().Times(schur.Vectors);
        return new(true, first, t, turn.Times(b), turn);
    }

    private void Append(DoubleDoubleMatrix rows)
    {
        for (var i = 0; i < rows.Rows; i++)
        {
            bases.Row(filled++).CopyFrom(rows.Row(i));
        }
    }

    /// <summary>Turns the phase of a single vector so that its largest entry is positive.</summary>
    private static void TurnPhase(DoubleDoubleComplexMatrix v)
    {
        var largest = Enumerable.Range(0, v.Columns).MaxBy(j => v[0, j].Magnitude);
        var phase = v[0, largest].Conjugate / DoubleDoubleComplex.Abs(v[0, largest]);
        for (var j = 0; j < v.Columns; j++)
        {
            v[0, j] *= phase;
        }
    }

    /// <summary>A block still lacking its left basis: its rows among the real rows of all, its right vectors
    /// (a row a vector), and for a real one how they come from those rows.</summary>
    private sealed record Share(
        bool IsReal,
        int First,
        DoubleDoubleComplexMatrix T,
        DoubleDoubleComplexMatrix Right,
        DoubleDoubleComplexMatrix Turn)
    {
        public SpectralBlock Finished(DoubleDoubleMatrix inverse, IReadOnlyList<int> exponents)
        {
            var m = T.Rows;
            var n = inverse.Rows;
            DoubleDoubleComplexMatrix left;
            if (IsReal)
            {
                var dual = inverse.Part(First, 0, m, n);
                left = new(Turn.Re.Times(dual), Turn.Im.Negative().Times(dual));
            }
            else
            {
                // (V, V̄) = (Re V, Im V) (1 1; i −i), so W = (W_re − i W_im) / 2.
                left = new(inverse.Part(First, 0, m, n), inverse.Part(First + m, 0, m, n).Negative());
                left.Scale(0.5);
            }

            var projector = left.FrobeniusNorm();
            var right = Right.Copy();
            for (var j = 0; j < n; j++)
            {
                for (var i = 0; i < m; i++)
                {
                    right[i, j] = right[i, j].ScaleByPowerOfTwo(exponents[j]);
                    left[i, j] = left[i, j].ScaleByPowerOfTwo(-exponents[j]);
                }
            }

            return new(IsReal, T, right.Transposed(), left, projector);
        }
    }
}
