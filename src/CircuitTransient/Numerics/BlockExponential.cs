using System.Collections.Immutable;
using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>e^(T t) of one small upper triangular block at many instants, in doubles. Prepared once in
/// double-double; an instant costs a polynomial in t for each entry, and squarings only where t exceeds the
/// block's own scale.
/// </summary>
/// <remarks>The method of <see cref="TriangularExponential"/>; after squaring the diagonal is set anew from
/// its poles (A. H. Al-Mohy, N. J. Higham, "A new scaling and squaring algorithm for the matrix exponential",
/// SIAM J. Matrix Anal. Appl. 31 (2009), from memory).</remarks>
public sealed class BlockExponential
{
    private const int MostTerms = 200;
    private const double Negligible = 1e-20; // beside the largest coefficient

    private readonly ImmutableArray<DoubleDoubleComplex> _poles;
    private readonly ImmutableArray<Complex[]> _coefficients; // (N τ)ᵏ / k!
    private readonly DoubleDoubleComplex _mean;
    private readonly double _unit; // τ
    private readonly DoubleDouble _rightmost;
    private readonly bool _isChain;

    /// <summary>Prepares the block.</summary>
    /// <param name="t">Upper triangular.</param>
    public BlockExponential(DoubleDoubleComplexMatrix t)
    {
        ArgumentNullException.ThrowIfNull(t);
        Size = t.Rows;
        _poles = [.. Enumerable.Range(0, Size).Select(i => t[i, i])];
        CentredBlock centred = CentredBlock.Of(t);
        _mean = centred.Mean;
        _rightmost = centred.Rightmost;
        double norm = centred.N.FrobeniusNorm();
        _isChain = centred.Farthest == 0;
        _unit = !_isChain ? TriangularExponential.ScaledDistance / centred.Farthest
            : norm == 0 ? 1
            : 1 / norm;
        _coefficients = Size == 1 ? [] : Coefficients(centred.N, _unit);
    }

    /// <summary>How many poles.</summary>
    public int Size { get; }

    /// <summary>e^(T t) for t ≥ 0, row by row into <paramref name="result"/> (Size² entries).</summary>
    public void Evaluate(double t, Span<Complex> result)
    {
        Shape.MustAgree(Size * Size, result.Length);
        if (Size == 1)
        {
            result[0] = PoleExponential.Of(_poles[0], t);
            return;
        }

        double ratio = t / _unit;
        int squarings = !_isChain && ratio > 1 ? Math.ILogB(ratio) + 1 : 0;
        Polynomial(Math.ScaleB(ratio, -squarings), result);
        DoubleDoubleComplex centre = _mean;
        if (squarings > 0)
        {
            centre = _mean + _rightmost;
            Square(squarings, Math.Exp(-_rightmost.Hi * Math.ScaleB(t, -squarings)), result);
        }

        Complex factor = PoleExponential.Of(centre, t);
        for (int k = 0; k < result.Length; k++)
        {
            result[k] *= factor;
        }

        for (int i = 0; i < Size; i++)
        {
            result[(i * Size) + i] = PoleExponential.Of(_poles[i], t);
        }
    }

    private static ImmutableArray<Complex[]> Coefficients(DoubleDoubleComplexMatrix n, double unit)
    {
        ImmutableArray<Complex[]>.Builder result = ImmutableArray.CreateBuilder<Complex[]>();
        DoubleDoubleComplexMatrix term = DoubleDoubleComplexMatrix.Identity(n.Rows);
        double largest = 0;
        int quiet = 0;
        for (int k = 0; k < MostTerms && quiet < n.Rows; k++)
        {
            if (k > 0)
            {
                term = term.Times(n);
                term.Scale((DoubleDouble)unit / k);
            }

            double norm = term.FrobeniusNorm();
            largest = Math.Max(largest, norm);
            quiet = norm <= Negligible * largest ? quiet + 1 : 0;
            result.Add([.. term.ToComplex().Cast<Complex>()]);
        }

        return result.ToImmutable();
    }

    private void Polynomial(double u, Span<Complex> result)
    {
        int m = Size;
        result.Clear();
        for (int k = _coefficients.Length - 1; k >= 0; k--)
        {
            Complex[] c = _coefficients[k];
            for (int i = 0; i < m; i++)
            {
                for (int j = i; j < m; j++)
                {
                    int at = (i * m) + j;
                    result[at] = new(
                        Math.FusedMultiplyAdd(result[at].Real, u, c[at].Real),
                        Math.FusedMultiplyAdd(result[at].Imaginary, u, c[at].Imaginary));
                }
            }
        }
    }

    /// <summary>(factor E)^(2^squarings) in place: an entry is overwritten once no other needs it.</summary>
    private void Square(int squarings, double factor, Span<Complex> e)
    {
        int m = Size;
        for (int k = 0; k < e.Length; k++)
        {
            e[k] *= factor;
        }

        for (int step = 0; step < squarings; step++)
        {
            for (int i = 0; i < m; i++)
            {
                for (int j = m - 1; j >= i; j--)
                {
                    Complex sum = 0;
                    for (int k = i; k <= j; k++)
                    {
                        sum += e[(i * m) + k] * e[(k * m) + j];
                    }

                    e[(i * m) + j] = sum;
                }
            }
        }
    }
}
