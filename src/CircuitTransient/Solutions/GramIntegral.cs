using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>The integrals over a segment of the products of its functions, in closed form: with them the
/// energy of any part is one quadratic form.</summary>
public static class GramIntegral
{
    /// <summary>∫₀ʰ φ(τ) φ(τ)ᵀ dτ over a segment, a symmetric matrix of the basis' width.</summary>
    public static double[,] Of(Segment segment) =>
        Of(segment.Basis, (DoubleDouble)segment.End - segment.Start);

    /// <summary>∫₀ʰ φ(τ) φ(τ)ᵀ dτ over any length h in seconds.</summary>
    public static double[,] Of(SegmentBasis basis, DoubleDouble h)
    {
        var gram = new double[basis.Width, basis.Width];
        var plain = basis.Modes.Select(m => PolynomialExponential.Of(m, h)).ToArray();
        for (var a = 0; a < basis.Modes.Length; a++)
        {
            for (var b = a; b < basis.Modes.Length; b++)
            {
                if (plain[a] is { } first && plain[b] is { } second)
                {
                    AddPlainPair(gram, basis, (a, first), (b, second), h.Hi);
                }
                else
                {
                    AddPair(gram, basis, a, b, h);
                }
            }
        }

        return gram;
    }

    /// <summary>aᵀ Gram b.</summary>
    public static double Form(double[,] gram, ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        double sum = 0;
        for (var i = 0; i < a.Length; i++)
        {
            if (a[i] == 0)
            {
                continue;
            }

            double row = 0;
            for (var j = 0; j < b.Length; j++)
            {
                row += gram[i, j] * b[j];
            }

            sum += a[i] * row;
        }

        return sum;
    }

    private static void AddPlainPair(
        double[,] gram, SegmentBasis basis, (int Mode, PolynomialExponential[] Functions) a,
        (int Mode, PolynomialExponential[] Functions) b, double h)
    {
        var isReal = basis.Modes[b.Mode].IsReal;
        for (var j = 0; j < a.Functions.Length; j++)
        {
            for (var l = 0; l < b.Functions.Length; l++)
            {
                var p = a.Functions[j].Integral(b.Functions[l], conjugate: false, h);
                var q = isReal ? p : a.Functions[j].Integral(b.Functions[l], conjugate: true, h);
                Put(gram, basis, (a.Mode, j), (b.Mode, l), p, q);
            }
        }
    }

    private static void AddPair(double[,] gram, SegmentBasis basis, int a, int b, DoubleDouble h)
    {
        var (first, second) = (basis.Modes[a], basis.Modes[b]);
        var plain = Products(first, second, h, conjugate: false);
        var mirrored = second.IsReal ? plain : Products(first, second, h, conjugate: true);
        for (var i = 0; i < first.Rows; i++)
        {
            for (var j = i; j < first.Order; j++)
            {
                for (var k = 0; k < second.Rows; k++)
                {
                    for (var l = k; l < second.Order; l++)
                    {
                        var row = (i * second.Order) + k;
                        var column = (j * second.Order) + l;
                        Put(gram, basis, (a, first.Carrier(i, j)), (b, second.Carrier(k, l)),
                            (Complex)plain[row, column], (Complex)mirrored[row, column]);
                    }
                }
            }
        }
    }

    /// <summary>With P = ∫ X Y and Q = ∫ X Ȳ: ∫ Re X Re Y = Re (P + Q)/2, and so on.</summary>
    private static void Put(
        double[,] gram, SegmentBasis basis, (int Mode, int Carrier) x, (int Mode, int Carrier) y, Complex p,
        Complex q)
    {
        var isRealX = basis.Modes[x.Mode].IsReal;
        var isRealY = basis.Modes[y.Mode].IsReal;
        var i = basis.Place(x.Mode) + (isRealX ? x.Carrier : 2 * x.Carrier);
        var j = basis.Place(y.Mode) + (isRealY ? y.Carrier : 2 * y.Carrier);
        Set(i, j, (p.Real + q.Real) / 2);
        if (!isRealY)
        {
            Set(i, j + 1, (p.Imaginary - q.Imaginary) / 2);
        }

        if (!isRealX)
        {
            Set(i + 1, j, (p.Imaginary + q.Imaginary) / 2);
        }

        if (!isRealX && !isRealY)
        {
            Set(i + 1, j + 1, (q.Real - p.Real) / 2);
        }

        void Set(int row, int column, double value)
        {
            gram[row, column] = value;
            gram[column, row] = value;
        }
    }

    /// <summary>∫₀ʰ exp(T₁ s) ⊗ exp(T₂ s) ds, the integral of the exponential of K = T₁ ⊕ T₂.</summary>
    private static DoubleDoubleComplex[,] Products(Mode first, Mode second, DoubleDouble h, bool conjugate)
    {
        var k = KroneckerSum(first.Triangle, second.Triangle, conjugate);
        var n = k.GetLength(0);
        if (n == 1)
        {
            return new DoubleDoubleComplex[,] { { ExponentialIntegral(k[0, 0], h) } };
        }

        var isFar = true;
        for (var i = 0; i < n; i++)
        {
            isFar &= k[i, i].Magnitude * h.Hi >= 0.5;
        }

        return isFar ? BySolving(k, h) : ByAugmenting(k, h);
    }

    /// <summary>(e^(x h) − 1)/x, by its series where x h is small.</summary>
    private static DoubleDoubleComplex ExponentialIntegral(DoubleDoubleComplex x, DoubleDouble h)
    {
        var z = x * h;
        if (z.Magnitude >= 0.25)
        {
            return (DoubleDoubleComplex.Exp(z) - DoubleDoubleComplex.One) / x;
        }

        var sum = DoubleDoubleComplex.One;
        for (var k = 24; k >= 1; k--)
        {
            sum = DoubleDoubleComplex.One + (z * sum / (DoubleDouble)(k + 1));
        }

        return sum * h;
    }

    private static DoubleDoubleComplex[,] BySolving(DoubleDoubleComplex[,] k, DoubleDouble h)
    {
        var n = k.GetLength(0);
        var x = TriangularExponential.Exact(k, h);
        for (var i = n - 1; i >= 0; i--)
        {
            x[i, i] -= DoubleDoubleComplex.One;
            for (var j = i; j < n; j++)
            {
                var sum = x[i, j];
                for (var l = i + 1; l < n; l++)
                {
                    sum -= k[i, l] * x[l, j];
                }

                x[i, j] = sum / k[i, i];
            }
        }

        return x;
    }

    private static DoubleDoubleComplex[,] ByAugmenting(DoubleDoubleComplex[,] k, DoubleDouble h)
    {
        var n = k.GetLength(0);
        var augmented = new DoubleDoubleComplex[2 * n, 2 * n];
        for (var i = 0; i < n; i++)
        {
            for (var j = i; j < n; j++)
            {
                augmented[i, j] = k[i, j];
            }

            augmented[i, n + i] = DoubleDoubleComplex.One;
        }

        var x = TriangularExponential.Exact(augmented, h);
        var integral = new DoubleDoubleComplex[n, n];
        for (var i = 0; i < n; i++)
        {
            for (var j = i; j < n; j++)
            {
                integral[i, j] = x[i, n + j];
            }
        }

        return integral;
    }

    private static DoubleDoubleComplex[,] KroneckerSum(
        DoubleDoubleComplex[,] a, DoubleDoubleComplex[,] b, bool conjugate)
    {
        var (m, n) = (a.GetLength(0), b.GetLength(0));
        var sum = new DoubleDoubleComplex[m * n, m * n];
        for (var i = 0; i < m; i++)
        {
            for (var k = 0; k < n; k++)
            {
                for (var j = i; j < m; j++)
                {
                    sum[(i * n) + k, (j * n) + k] += a[i, j];
                }

                for (var l = k; l < n; l++)
                {
                    sum[(i * n) + k, (i * n) + l] += conjugate ? b[k, l].Conjugate : b[k, l];
                }
            }
        }

        return sum;
    }
}
