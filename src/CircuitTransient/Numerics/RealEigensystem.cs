namespace CircuitTransient.Numerics;

/// <summary>Eigenvalues and eigenvectors of small real matrices in double precision, in memory that is made
/// once: A X = X Λ. A conjugate pair a ± i b stands in two neighbouring columns, the real and the imaginary
/// part of the vector of a + i b with b &gt; 0.</summary>
/// <remarks>Reduction to Hessenberg form, implicit double shifts and substitution backwards, as in G. H.
/// Golub, C. F. Van Loan, "Matrix Computations", chapter 7 (from memory); deflation after M. Ahues and F.
/// Tisseur (LAPACK Working Note 122, 1997, from memory), so that a matrix graded from large to small keeps
/// its small eigenvalues.</remarks>
/// <param name="largest">The largest order it will be asked for.</param>
public sealed partial class RealEigensystem(int largest)
{
    private readonly double[] t = new double[largest * largest];
    private readonly double[] q = new double[largest * largest];
    private readonly double[] x = new double[largest * largest];
    private readonly double[] re = new double[largest];
    private readonly double[] im = new double[largest];
    private readonly double[] work = new double[2 * largest];
    private int n;

    /// <summary>Real parts of the eigenvalues.</summary>
    public ReadOnlySpan<double> Real => re.AsSpan(0, n);

    /// <summary>Imaginary parts; a positive one is followed by its opposite.</summary>
    public ReadOnlySpan<double> Imaginary => im.AsSpan(0, n);

    /// <summary>X, row by row, its columns of unit length.</summary>
    public ReadOnlySpan<double> Vectors => x.AsSpan(0, n * n);

    /// <summary>The orthogonal basis of the Schur form, row by row.</summary>
    public ReadOnlySpan<double> Basis => q.AsSpan(0, n * n);

    /// <summary>Takes a matrix apart.</summary>
    /// <param name="a">The entries, row by row.</param>
    /// <param name="order">How many rows.</param>
    /// <returns>Whether the iteration converged.</returns>
    public bool Solve(ReadOnlySpan<double> a, int order)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThan(order, largest);
        n = order;
        a[..(n * n)].CopyTo(t);
        q.AsSpan(0, n * n).Clear();
        for (var i = 0; i < n; i++)
        {
            q[(i * n) + i] = 1;
        }

        Reduce();
        if (!Iterate())
        {
            return false;
        }

        FindVectors();
        return true;
    }

    /// <summary>T = Qᵀ A Q with zeros below the first subdiagonal.</summary>
    private void Reduce()
    {
        for (var k = 0; k + 2 < n; k++)
        {
            double tail = 0;
            for (var i = k + 2; i < n; i++)
            {
                tail = Math.Max(tail, Math.Abs(t[(i * n) + k]));
            }

            if (tail == 0)
            {
                continue;
            }

            Reflect(k, Math.Max(tail, Math.Abs(t[((k + 1) * n) + k])));
        }
    }

    /// <summary>Clears column k below the subdiagonal by I − β v vᵀ.</summary>
    private void Reflect(int k, double scale)
    {
        var v = work;
        double square = 0;
        for (var i = k + 1; i < n; i++)
        {
            v[i] = t[(i * n) + k] / scale;
            square += v[i] * v[i];
        }

        var norm = Math.Sqrt(square);
        var alpha = v[k + 1] > 0 ? -norm : norm;
        var beta = 1 / (norm * (norm + Math.Abs(v[k + 1])));
        v[k + 1] -= alpha;
        for (var j = k + 1; j < n; j++)
        {
            double sum = 0;
            for (var i = k + 1; i < n; i++)
            {
                sum += v[i] * t[(i * n) + j];
            }

            sum *= beta;
            for (var i = k + 1; i < n; i++)
            {
                t[(i * n) + j] -= sum * v[i];
            }
        }

        FromRight(t, k + 1, beta);
        FromRight(q, k + 1, beta);
        t[((k + 1) * n) + k] = alpha * scale;
        for (var i = k + 2; i < n; i++)
        {
            t[(i * n) + k] = 0;
        }
    }

    private void FromRight(double[] a, int first, double beta)
    {
        for (var i = 0; i < n; i++)
        {
            double sum = 0;
            for (var j = first; j < n; j++)
            {
                sum += a[(i * n) + j] * work[j];
            }

            sum *= beta;
            for (var j = first; j < n; j++)
            {
                a[(i * n) + j] -= sum * work[j];
            }
        }
    }
}
