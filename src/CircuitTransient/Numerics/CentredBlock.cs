namespace CircuitTransient.Numerics;

/// <summary>A triangular block less its mean pole.</summary>
/// <param name="N">T − mean · I.</param>
/// <param name="Mean">The mean pole.</param>
/// <param name="Farthest">How far the farthest pole lies from it.</param>
/// <param name="Rightmost">How far the rightmost pole lies to the right of it.</param>
internal sealed record CentredBlock(
    DoubleDoubleComplexMatrix N, DoubleDoubleComplex Mean, double Farthest, DoubleDouble Rightmost)
{
    /// <summary>The block T, centred.</summary>
    public static CentredBlock Of(DoubleDoubleComplexMatrix t)
    {
        DoubleDoubleComplex mean = 0;
        for (var i = 0; i < t.Rows; i++)
        {
            mean += t[i, i] / t.Rows;
        }

        var n = t.Copy();
        double farthest = 0;
        DoubleDouble rightmost = 0;
        for (var i = 0; i < t.Rows; i++)
        {
            n[i, i] -= mean;
            farthest = Math.Max(farthest, n[i, i].Magnitude);
            rightmost = DoubleDouble.Max(rightmost, n[i, i].Re);
        }

        return new(n, mean, farthest, rightmost);
    }
}
