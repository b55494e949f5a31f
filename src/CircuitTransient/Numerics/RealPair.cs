namespace CircuitTransient.Numerics;

/// <summary>A diagonal block of order two of a real Schur form.</summary>
internal static class RealPair
{
    /// <summary>Where the eigenvalues of the block at k are real, rotates it to triangular form; a complex
    /// pair is left as it is.</summary>
    /// <remarks>The rotation is that of LAPACK's dlanv2 (from memory).</remarks>
    public static void Split(DoubleDoubleMatrix t, DoubleDoubleMatrix qt, int k)
    {
        DoubleDouble a = t[k, k];
        DoubleDouble b = t[k, k + 1];
        DoubleDouble c = t[k + 1, k];
        DoubleDouble d = t[k + 1, k + 1];
        if (c.IsZero)
        {
            return;
        }

        DoubleDouble p = (a - d) * 0.5;
        double scale = Math.Max(Math.Abs(p.Hi), Math.Max(Math.Abs(b.Hi), Math.Abs(c.Hi)));
        DoubleDouble square = (p / scale * p) + (b / scale * c);
        if (square.Hi < 0)
        {
            return;
        }

        DoubleDouble root = DoubleDouble.Sqrt(DoubleDouble.Abs(square)) * DoubleDouble.Sqrt(scale);
        DoubleDouble z = p.Hi < 0 ? p - root : p + root;
        DoubleDouble size = DoubleDouble.Hypotenuse(c, z);
        (DoubleDouble cos, DoubleDouble sin) = z.IsZero ? (0, 1) : (z / size, c / size);
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
        for (int i = 0; i < k; i++)
        {
            DoubleDouble x = t[i, k];
            DoubleDouble y = t[i, k + 1];
            t[i, k] = (cos * x) + (sin * y);
            t[i, k + 1] = (cos * y) - (sin * x);
        }
    }
}
