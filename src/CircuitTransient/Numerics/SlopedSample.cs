namespace CircuitTransient.Numerics;

/// <summary>A function of one variable at one place.</summary>
/// <param name="Y">Its value; NaN where it has none.</param>
/// <param name="Slope">Its derivative; NaN where that is not known.</param>
public readonly record struct SlopedSample(double X, double Y, double Slope)
{
    /// <summary>Whether the function has a value there.</summary>
    public bool HasValue => double.IsFinite(Y);

    /// <summary>Whether its derivative is known there.</summary>
    public bool HasSlope => double.IsFinite(Slope);

    /// <summary>The sample of the function with its sign turned.</summary>
    public SlopedSample Negate() => new(X, -Y, -Slope);

    /// <summary>The cubic through two samples with their slopes (Hermite), at a place between.</summary>
    public static double Cubic(in SlopedSample left, in SlopedSample right, double x)
    {
        var h = right.X - left.X;
        var u = (x - left.X) / h;
        var (bend, twist) = Coefficients(left, right);
        return left.Y + (h * u * (left.Slope + (u * (bend + (u * twist)))));
    }

    /// <summary>Where that cubic has its maximum strictly between the samples; NaN where it has
    /// none.</summary>
    public static double CubicMaximum(in SlopedSample left, in SlopedSample right)
    {
        // slope + 2 bend u + 3 twist u² = 0, the root at which it falls, in the form that does not cancel
        var (bend, twist) = Coefficients(left, right);
        var discriminant = (bend * bend) - (3 * twist * left.Slope);
        if (discriminant < 0)
        {
            return double.NaN;
        }

        var root = Math.Sqrt(discriminant);
        var u = bend <= 0
            ? left.Slope / (root - bend)
            : -(bend + root) / (3 * twist);
        return u is > 0 and < 1 ? left.X + (u * (right.X - left.X)) : double.NaN;
    }

    // y(u)/h = y0/h + slope u + bend u² + twist u³ on 0 ≤ u ≤ 1
    private static (double Bend, double Twist) Coefficients(in SlopedSample left, in SlopedSample right)
    {
        var mean = (right.Y - left.Y) / (right.X - left.X);
        return ((3 * mean) - (2 * left.Slope) - right.Slope, left.Slope + right.Slope - (2 * mean));
    }
}
