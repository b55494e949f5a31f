using System.Numerics;

namespace CircuitTransient.Numerics;

public static class TriangularExponential
{
    public static Complex[,] Of(DoubleDoubleComplex[,] t, double tau)
    {
        var x = Exact(t, tau);
        var n = t.GetLength(0);
        var r = new Complex[n, n];
        for (var i = 0; i < n; i++)
            for (var j = i; j < n; j++)
                r[i, j] = (Complex)x[i, j];
        return r;
    }

    public static DoubleDoubleComplex[,] Exact(DoubleDoubleComplex[,] t, DoubleDouble tau)
    {
        var n = t.GetLength(0);
        var mean = DoubleDoubleComplex.Zero;
        for (var i = 0; i < n; i++) mean += t[i, i];
        mean = mean / (DoubleDouble)n;
        var a = new DoubleDoubleComplex[n, n];
        double norm = 0;
        for (var i = 0; i < n; i++)
            for (var j = i; j < n; j++)
            {
                a[i, j] = (t[i, j] - (i == j ? mean : DoubleDoubleComplex.Zero)) * tau;
                norm += a[i, j].Magnitude;
            }
        var k = norm > 0.5 ? (int)Math.Ceiling(Math.Log2(norm)) + 1 : 0;
        var s = DoubleDouble.ScaleByPowerOfTwo(1, -k);
        var term = new DoubleDoubleComplex[n, n];
        var sum = new DoubleDoubleComplex[n, n];
        for (var i = 0; i < n; i++) { term[i, i] = 1; sum[i, i] = 1; for (var j = i; j < n; j++) a[i, j] *= s; }
        for (var m = 1; m <= 26; m++)
        {
            term = Mul(term, a);
            for (var i = 0; i < n; i++) for (var j = i; j < n; j++) { term[i, j] = term[i, j] / (DoubleDouble)m; sum[i, j] += term[i, j]; }
        }
        for (var q = 0; q < k; q++) sum = Mul(sum, sum);
        var f = DoubleDoubleComplex.Exp(mean * tau);
        for (var i = 0; i < n; i++) for (var j = i; j < n; j++) sum[i, j] *= f;
        return sum;
    }

    private static DoubleDoubleComplex[,] Mul(DoubleDoubleComplex[,] a, DoubleDoubleComplex[,] b)
    {
        var n = a.GetLength(0);
        var c = new DoubleDoubleComplex[n, n];
        for (var i = 0; i < n; i++) for (var j = i; j < n; j++) for (var k = i; k <= j; k++) c[i, j] += a[i, k] * b[k, j];
        return c;
    }
}
