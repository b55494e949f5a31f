namespace CircuitTransient.Numerics;

/// <summary>Reduction to upper Hessenberg form by reflections, A = Q H Qᵀ (A. S. Householder; G. H. Golub,
/// C. F. Van Loan, "Matrix Computations", section 7.4.3, from memory).</summary>
public static class Hessenberg
{
    /// <summary>Overwrites A with H, and the rows of <paramref name="qt"/> (orthogonal on entry) with Qᵀ
    /// times them.</summary>
    public static void Reduce(DoubleDoubleMatrix a, DoubleDoubleMatrix qt)
    {
        ArgumentNullException.ThrowIfNull(a);
        ArgumentNullException.ThrowIfNull(qt);
        var n = a.Rows;
        Shape.MustAgree(n, a.Columns);
        DoubleDoubleMatrix work = new(2, n);
        for (var k = 0; k + 2 < n; k++)
        {
            var v = work.Row(0, k + 1);
            if (!MakeReflection(a, k, v, out var beta, out var alpha))
            {
                continue;
            }

            FromLeft(a, k + 1, k + 1, v, beta, work.Row(1, k + 1));
            FromRight(a, k + 1, v, beta);
            FromLeft(qt, k + 1, 0, v, beta, work.Row(1));
            a[k + 1, k] = alpha;
            for (var i = k + 2; i < n; i++)
            {
                a[i, k] = 0;
            }
        }
    }

    /// <summary>v and β so that (I − β v vᵀ) maps the column below the diagonal on α e₁.</summary>
    private static bool MakeReflection(
        DoubleDoubleMatrix a, int k, DoubleDoubleRow v, out DoubleDouble beta, out DoubleDouble alpha)
    {
        double largest = 0;
        for (var i = 0; i < v.Length; i++)
        {
            v[i] = a[k + 1 + i, k];
            largest = i > 0 ? Math.Max(largest, Math.Abs(v.Hi[i])) : largest;
        }

        beta = 0;
        alpha = v[0];
        if (largest == 0)
        {
            return false;
        }

        var scale = Math.ILogB(Math.Max(largest, Math.Abs(alpha.Hi)));
        for (var i = 0; i < v.Length; i++)
        {
            v[i] = DoubleDouble.ScaleByPowerOfTwo(v[i], -scale);
        }

        var norm = DoubleDouble.Sqrt(v.SumOfSquares());
        var signed = v.Hi[0] > 0 ? -norm : norm;
        beta = 1.0 / (norm * (norm + DoubleDouble.Abs(v[0])));
        v[0] -= signed;
        alpha = DoubleDouble.ScaleByPowerOfTwo(signed, scale);
        return true;
    }

    /// <summary>Rows from <paramref name="first"/> on, columns from <paramref name="start"/> on:
    /// A = (I − β v vᵀ) A, with w for vᵀ A.</summary>
    private static void FromLeft(
        DoubleDoubleMatrix a, int first, int start, DoubleDoubleRow v, DoubleDouble beta, DoubleDoubleRow w)
    {
        w.Clear();
        for (var i = 0; i < v.Length; i++)
        {
            w.AddScaled(v[i], a.Row(first + i, start));
        }

        for (var i = 0; i < v.Length; i++)
        {
            a.Row(first + i, start).AddScaled(-(beta * v[i]), w);
        }
    }

    /// <summary>Columns from <paramref name="start"/> on: A = A (I − β v vᵀ).</summary>
    private static void FromRight(DoubleDoubleMatrix a, int start, DoubleDoubleRow v, DoubleDouble beta)
    {
        for (var i = 0; i < a.Rows; i++)
        {
            var row = a.Row(i, start);
            row.AddScaled(-(beta * row.Dot(v)), v);
        }
    }
}
