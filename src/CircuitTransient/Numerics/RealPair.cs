namespace CircuitTransient.Numerics;

/// <summary>A diagonal block of order two of a real Schur form.</summary>
internal static class RealPair
{
    /// <summary>Where the eigenvalues of the block at k are real, rotates it to triangular form; a complex
    /// pair is left as it is.</summary>
    /// <remarks>The rotation is that of LAPACK's dlanv2 (from memory).</remarks>
    public static void Split(DoubleDoubleMatrix t, DoubleDoubleMatrix qt, int k)
    {
        var a = t[k, k];
        var b = t[k, k + 1];
        var c = t[k + 1, k];
        var d = t[k + 1, k + 1];
        if (c.IsZero)
        {
            return;
        }

        var p = (a - d) * 0.5;
        var scale = Math.Max(Math.Abs(p.Hi), Math.Max(Math.Abs(b.Hi), Math.Abs(c.Hi)));
        var square = (p / scale * p) + (b / scale * c);
        if (square.Hi < 0)
        {
            return;
        }

        var root = DoubleDouble.Sqrt(DoubleDouble.Abs(square)) * DoubleDouble.Sqrt(scale);
        var z = p.Hi < 0 ? p - root : p + root;
        var size = DoubleDouble.Hypotenuse(c, z);
        (var cos, var sin) = z.IsZero ? (0, 1) : (z / size, c / size);
        Rotate(t, qt, k, cos, sin);
        t[k, k] = z.IsZero ? d : d + z;
        t[k + 1, k + 1] = z.IsZero ? a : d - (b / z * c);
        t[k, k + 1] = b - c;
        t[k + 1, k] = 0;
    }

    private static void Rotate(
        DoubleDoubleMatrix t, DoubleDoubleMatrix qt, int k, DoubleDouble cos, DoubleDouble sin)
    {
        DoubleDoubleRow.Rotate(t.Row(k, k + 2), t.Row(k + 1, k + 2), cos, sin);
        DoubleDoubleRow.Rotate(qt.Row(k), qt.Row(k + 1), cos, sin);
        for (var i = 0; i < k; i++)
        {
            var x = t[i, k];
            var y = t[i, k + 1];
            t[i, k] = (cos * x) + (sin * y);
            t[i, k + 1] = (cos * y) - (sin * x);
        }
    }
}
