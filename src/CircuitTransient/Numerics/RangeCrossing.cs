namespace CircuitTransient.Numerics;

/// <summary>Where a function of one variable passes zero.</summary>
/// <param name="Below">The sample with the negative value nearest to it.</param>
/// <param name="NotBelow">The sample with a value that is not negative nearest to it.</param>
/// <param name="IsJump">Whether the function jumps over zero there.</param>
/// <param name="IsBySlope">Whether slopes led there; else values were compared.</param>
public sealed record RangeCrossing(SlopedSample Below, SlopedSample NotBelow, bool IsJump, bool IsBySlope)
{
    private const int MostLooks = 120;
    private const double Narrow = 4e-16; // relative: no double lies between, or hardly one

    /// <summary>The place: that of the side nearer to zero.</summary>
    public double X => Math.Abs(Below.Y) < Math.Abs(NotBelow.Y) && !IsJump ? Below.X : NotBelow.X;

    /// <summary>Finds it between two samples on different sides: Newton steps from the nearer side, kept in
    /// the bracket; a secant where there is no slope; a halving where neither shrinks it. Null where a place
    /// without a value is met.</summary>
    public static RangeCrossing? Between(
        SlopedSample one, SlopedSample other, Func<double, SlopedSample> function)
    {
        var (below, above) = one.Y < 0 ? (one, other) : (other, one);
        var size = Math.Max(Math.Abs(one.Y), Math.Abs(other.Y));
        var isBySlope = true;
        var isSlow = false;
        for (var k = 0; k < MostLooks; k++)
        {
            var width = Math.Abs(above.X - below.X);
            var middle = below.X + ((above.X - below.X) / 2);
            if (above.Y == 0 || width <= Narrow * Math.Max(Math.Abs(above.X), Math.Abs(below.X))
                || middle == below.X || middle == above.X)
            {
                break;
            }

            var next = isSlow ? middle : Step(below, above, out isBySlope);
            if (!Lies(next, below.X, above.X))
            {
                next = middle;
            }

            var sample = function(next);
            if (!sample.HasValue)
            {
                return null;
            }

            (below, above) = sample.Y < 0 ? (sample, above) : (below, sample);
            isSlow = !isSlow && Math.Abs(above.X - below.X) > width / 2;
            if (Math.Abs(sample.Y) <= 1e-13 * size)
            {
                return new RangeCrossing(below, above, IsJump: false, isBySlope);
            }
        }

        var isJump = above.Y - below.Y > 1e-6 * size && above.Y != 0;
        return new RangeCrossing(below, above, isJump, isBySlope);
    }

    private static double Step(in SlopedSample below, in SlopedSample above, out bool isBySlope)
    {
        var near = Math.Abs(below.Y) < Math.Abs(above.Y) ? below : above;
        isBySlope = near.HasSlope && near.Slope != 0;
        return isBySlope
            ? near.X - (near.Y / near.Slope)
            : below.X - (below.Y * (above.X - below.X) / (above.Y - below.Y));
    }

    private static bool Lies(double x, double a, double b) => x > Math.Min(a, b) && x < Math.Max(a, b);
}
