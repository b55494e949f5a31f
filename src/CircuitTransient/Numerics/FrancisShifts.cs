namespace CircuitTransient.Numerics;

/// <summary>The two shifts of a Francis step: a complex pair, or twice the real one nearer the
/// corner.</summary>
/// <param name="Re1">Real part of the first.</param>
/// <param name="Im1">Imaginary part of the first; that of the second is its opposite.</param>
/// <param name="Re2">Real part of the second.</param>
internal readonly record struct FrancisShifts(DoubleDouble Re1, DoubleDouble Im1, DoubleDouble Re2)
{
    // dlahqr: at 10 from the top of the window, at 20 from its corner
    private const int ExceptionalEvery = 10;

    /// <summary>The eigenvalues of the trailing block of order two, or, every tenth step, exceptional
    /// ones.</summary>
    public static FrancisShifts Choose(DoubleDoubleMatrix h, int first, int last, int step)
    {
        if (step % (2 * ExceptionalEvery) == ExceptionalEvery)
        {
            var s = DoubleDouble.Abs(h[first + 1, first])
                + DoubleDouble.Abs(h[first + 2, first + 1]);
            return Exceptional(s, h[first, first]);
        }

        if (step % (2 * ExceptionalEvery) == 0)
        {
            var s = DoubleDouble.Abs(h[last, last - 1]) + DoubleDouble.Abs(h[last - 1, last - 2]);
            return Exceptional(s, h[last, last]);
        }

        return Of(h[last - 1, last - 1], h[last - 1, last], h[last, last - 1], h[last, last]);
    }

    /// <summary>The first column of (H − s₁)(H − s₂) at row m, up to a factor.</summary>
    public (DoubleDouble X, DoubleDouble Y, DoubleDouble Z) FirstColumn(DoubleDoubleMatrix h, int m)
    {
        var corner = h[m, m];
        var scale = DoubleDouble.Abs(corner - Re2) + DoubleDouble.Abs(Im1)
            + DoubleDouble.Abs(h[m + 1, m]);
        var below = h[m + 1, m] / scale;
        var x = (below * h[m, m + 1]) + ((corner - Re1) * ((corner - Re2) / scale))
            + (Im1 * (Im1 / scale));
        var y = below * (corner + h[m + 1, m + 1] - Re1 - Re2);
        var z = below * h[m + 2, m + 1];
        var size = Math.Abs(x.Hi) + Math.Abs(y.Hi) + Math.Abs(z.Hi);
        return size == 0 ? (x, y, z) : (x / size, y / size, z / size);
    }

    private static FrancisShifts Exceptional(DoubleDouble s, DoubleDouble corner)
    {
        var h = (0.75 * s) + corner;
        return Of(h, -0.4375 * s, s, h);
    }

    private static FrancisShifts Of(DoubleDouble a, DoubleDouble b, DoubleDouble c, DoubleDouble d)
    {
        var size = Math.Abs(a.Hi) + Math.Abs(b.Hi) + Math.Abs(c.Hi) + Math.Abs(d.Hi);
        if (size == 0)
        {
            return new(0, 0, 0);
        }

        var mean = (a + d) * 0.5;
        var determinant = ((a - mean) / size * ((d - mean) / size)) - (b / size * (c / size));
        var root = DoubleDouble.Sqrt(DoubleDouble.Abs(determinant)) * size;
        if (determinant.Hi >= 0)
        {
            return new(mean, root, mean);
        }

        var upper = mean + root;
        var lower = mean - root;
        var nearer = DoubleDouble.Abs(upper - d) <= DoubleDouble.Abs(lower - d) ? upper : lower;
        return new(nearer, 0, nearer);
    }
}
