namespace CircuitTransient.Numerics;

/// <summary>The blocks of one connected matrix: balanced, brought to Schur form, clustered, and each cluster
/// given a right basis; the left bases are rows of the inverse of all right ones, so that they are dual to
/// rounding however near to each other some poles are.</summary>
internal sealed class SpectralSplit
{
    // of ‖A‖ and per row; couplings below it do not tell a pair from two real poles
    private const double Noise = 1e-30;

    private readonly DoubleDoubleMatrix _a;
    private readonly double _zero;
    private readonly DoubleDoubleMatrix _rows;
    private int _filled;

    private SpectralSplit(DoubleDoubleMatrix balanced, double zero)
    {
        _a = balanced;
        _zero = zero;
        _rows = new(balanced.Rows, balanced.Rows);
    }

    /// <summary>The blocks.</summary>
    public static IEnumerable<SpectralBlock> Of(DoubleDoubleMatrix a)
    {
        Balancing balancing = Balancing.Of(a);
        double norm = balancing.Matrix.FrobeniusNorm();
        ComplexSchur schur = ComplexSchur.Of(RealSchur.Of(balancing.Matrix), Noise * a.Rows * norm);
        SpectralSplit split = new(balancing.Matrix, BlockSubstitution.ZeroPole * norm);
        split.ClearZeroPoles(schur.T);

        List<Share> shares = [];
        foreach ((InvariantBasis basis, bool isReal) in PoleClusters.Of(schur, norm))
        {
            DoubleDoubleComplexMatrix right = basis.Right.Times(schur.Vectors);
            shares.Add(!isReal ? split.AddComplex(basis.T, right)
                : right.Rows == 1 ? split.AddReal(basis.T, right)
                : split.AddRealCluster(right));
        }

        DoubleDoubleMatrix inverse = LuFactorization.Of(split._rows.Transposed())
            .Solve(DoubleDoubleMatrix.Identity(a.Rows));
        return shares.Select(share => share.Finished(inverse, balancing.Exponents));
    }

    private void ClearZeroPoles(DoubleDoubleComplexMatrix t)
    {
        for (int i = 0; i < t.Rows; i++)
        {
            t[i, i] = t[i, i].Magnitude <= _zero ? 0 : t[i, i];
        }
    }

    private Share AddComplex(DoubleDoubleComplexMatrix t, DoubleDoubleComplexMatrix right)
    {
        int first = _filled;
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
        int first = _filled;
        TurnPhase(right);
        DoubleDoubleComplexMatrix real = DoubleDoubleComplexMatrix.From(right.Re);
        real.Re.Row(0).Scale(1 / DoubleDouble.Sqrt(real.Re.Row(0).SumOfSquares()));
        Append(real.Re);
        return new(true, first, t, real, DoubleDoubleComplexMatrix.Identity(1));
    }

    /// <summary>A cluster closed under conjugation gets a real orthonormal basis B, and its triangle anew
    /// from B A Bᵀ.</summary>
    private Share AddRealCluster(DoubleDoubleComplexMatrix right)
    {
        int first = _filled;
        DoubleDoubleMatrix b = RealSpan.Of(right);
        Append(b);
        ComplexSchur schur = ComplexSchur.Of(RealSchur.Of(b.Times(_a).Times(b.Transposed())));
        ClearZeroPoles(schur.T);
        (DoubleDoubleComplexMatrix t, DoubleDoubleComplexMatrix q) = NilpotentForm.Of(schur.T, _zero);
        DoubleDoubleComplexMatrix turn = q.Transposed().Times(schur.Vectors);
        return new(true, first, t, turn.Times(b), turn);
    }

    private void Append(DoubleDoubleMatrix rows)
    {
        for (int i = 0; i < rows.Rows; i++)
        {
            _rows.Row(_filled++).CopyFrom(rows.Row(i));
        }
    }

    /// <summary>Turns the phase of a single vector so that its largest entry is positive.</summary>
    private static void TurnPhase(DoubleDoubleComplexMatrix v)
    {
        int largest = Enumerable.Range(0, v.Columns).MaxBy(j => v[0, j].Magnitude);
        DoubleDoubleComplex phase = v[0, largest].Conjugate / DoubleDoubleComplex.Abs(v[0, largest]);
        for (int j = 0; j < v.Columns; j++)
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
            int m = T.Rows;
            int n = inverse.Rows;
            DoubleDoubleComplexMatrix left;
            if (IsReal)
            {
                DoubleDoubleMatrix dual = inverse.Part(First, 0, m, n);
                left = new(Turn.Re.Times(dual), Turn.Im.Negative().Times(dual));
            }
            else
            {
                // (V, V̄) = (Re V, Im V) (1 1; i −i), so W = (W_re − i W_im) / 2.
                left = new(inverse.Part(First, 0, m, n), inverse.Part(First + m, 0, m, n).Negative());
                left.Scale(0.5);
            }

            double projector = left.FrobeniusNorm();
            DoubleDoubleComplexMatrix right = Right.Copy();
            for (int j = 0; j < n; j++)
            {
                for (int i = 0; i < m; i++)
                {
                    right[i, j] = right[i, j].ScaleByPowerOfTwo(exponents[j]);
                    left[i, j] = left[i, j].ScaleByPowerOfTwo(-exponents[j]);
                }
            }

            return new(IsReal, T, right.Transposed(), left, projector);
        }
    }
}
