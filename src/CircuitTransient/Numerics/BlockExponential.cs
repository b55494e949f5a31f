using System.Collections.Immutable;
using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>e^(T t) of one small upper triangular block at many instants, in doubles. Prepared once in
/// double-double; an instant costs a polynomial in t for each entry, and squarings only where t exceeds the
/// block's own scale.</summary>
/// <remarks>The method of <see cref="TriangularExponential"/>; after squaring the diagonal is set anew from
/// its poles (A. H. Al-Mohy, N. J. Higham, "A new scaling and squaring algorithm for the matrix exponential",
/// SIAM J. Matrix Anal. Appl. 31 (2009), from memory).</remarks>
public sealed class BlockExponential
{
    private const int MostTerms = 200;
    private const double Negligible = 1e-20; // beside the largest coefficient

    private readonly ImmutableArray<DoubleDoubleComplex> poles;
    private readonly ImmutableArray<Complex[]> coefficients; // (N τ)ᵏ / k!
    private readonly DoubleDoubleComplex mean;
    private readonly double unit; // τ
    private readonly DoubleDouble rightmost;
    private readonly bool isChain;

    /// <summary>Prepares the block.</summary>
    /// <param name="t">Upper triangular.</param>
    public BlockExponential(DoubleDoubleComplexMatrix t)
    {
        ArgumentNullException.ThrowIfNull(t);
        Size = t.Rows;
        poles = [.. Enumerable.Range(0, Size).Select(i => t[i, i])];
        var centred = CentredBlock.Of(t);
        mean = centred.Mean;
        rightmost = centred.Rightmost;
        var norm = centred.N.FrobeniusNorm();
        isChain = centred.Farthest == 0;
        unit = !isChain ? TriangularExponential.ScaledDistance / centred.Farthest
            : norm == 0 ? 1
            : 1 / norm;
        coefficients = Size == 1 ? [] : Coefficients(centred.N, unit);
    }

    /// <summary>How many poles.</summary>
    public int Size { get; }

    /// <summary>e^(T t) for t ≥ 0, row by row into <paramref name="result"/> (Size² entries).</summary>
    public void Evaluate(double t, Span<Complex> result)
    {
        Shape.MustAgree(Size * Size, result.Length);
        if (Size == 1)
        {
            result[0] = PoleExponential.Of(poles[0], t);
            return;
        }

        var ratio = t / unit;
        var squarings = !isChain && ratio > 1 ? Math.ILogB(ratio) + 1 : 0;
        Polynomial(Math.ScaleB(ratio, -squarings), result);
        var centre = mean;
        if (squarings > 0)
        {
            centre = mean + rightmost;
            Square(squarings, Math.Exp(-rightmost.Hi * Math.ScaleB(t, -squarings)), result);
        }

        var factor = PoleExponential.Of(centre, t);
        for (var k = 0; k < result.Length; k++)
        {
            result[k] *= factor;
        }

        for (var i = 0; i < Size; i++)
        {
            result[(i * Size) + i] = PoleExponential.Of(poles[i], t);
        }
    }

    private static ImmutableArray<Complex[]> Coefficients(DoubleDoubleComplexMatrix n, double unit)
    {
        var result = ImmutableArray.CreateBuilder<Complex[]>();
        var term = DoubleDoubleComplexMatrix.Identity(n.Rows);
        double largest = 0;
        var quiet = 0;
        for (var k = 0; k < MostTerms && quiet < n.Rows; k++)
        {
            if (k > 0)
            {
                term = term.Times(n);
                term.Scale((DoubleDouble)unit / k);
            }

            var norm = term.FrobeniusNorm();
            largest = Math.Max(largest, norm);
            quiet = norm <= Negligible * largest ? quiet + 1 : 0;
            result.Add([.. term.ToComplex().Cast<Complex>()]);
        }

        return result.ToImmutable();
    }

    private void Polynomial(double u, Span<Complex> result)
    {
        var m = Size;
        result.Clear();
        for (var k = coefficients.Length - 1; k >= 0; k--)
        {
            var c = coefficients[k];
            for (var i = 0; i < m; i++)
            {
                for (var j = i; j < m; j++)
                {
                    var at = (i * m) + j;
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
        var m = Size;
        for (var k = 0; k < e.Length; k++)
        {
            e[k] *= factor;
        }

        for (var step = 0; step < squarings; step++)
        {
            for (var i = 0; i < m; i++)
            {
                for (var j = m - 1; j >= i; j--)
                {
                    Complex sum = 0;
                    for (var k = i; k <= j; k++)
                    {
                        sum += e[(i * m) + k] * e[(k * m) + j];
                    }

                    e[(i * m) + j] = sum;
                }
            }
        }
    }
}
