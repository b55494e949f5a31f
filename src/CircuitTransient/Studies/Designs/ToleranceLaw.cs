using CircuitTransient.Circuits;
using MathNet.Numerics.Distributions;

namespace CircuitTransient.Studies.Designs;

/// <summary>How a value is spread over its tolerance: evenly, or as a normal distribution about the middle of
/// the range, whose limits are three standard deviations away and where it is cut.</summary>
public static class ToleranceLaw
{
    private const double Cut = 3; // standard deviations, as the language says

    private static double Below => Normal.CDF(0, 1, -Cut);

    /// <summary>The value, in SI, below which a fraction of all lies.</summary>
    /// <param name="fraction">Between 0 and 1.</param>
    public static double At(Tolerance tolerance, double fraction)
    {
        var (low, high) = (tolerance.Lowest, tolerance.Highest);
        if (!tolerance.IsNormal)
        {
            return low + (fraction * (high - low));
        }

        var z = Normal.InvCDF(0, 1, Below + (fraction * (1 - (2 * Below))));
        return Math.Clamp(((low + high) / 2) + (z * (high - low) / (2 * Cut)), low, high);
    }

    /// <summary>The variance of the value, the square of its SI unit.</summary>
    // Of a standard normal cut at ±a: 1 − 2 a φ(a)/(Φ(a) − Φ(−a)) (Johnson, Kotz and Balakrishnan, Continuous
    // Univariate Distributions 1, 1994, 10.1; from memory).
    public static double Variance(Tolerance tolerance)
    {
        var width = tolerance.Highest - tolerance.Lowest;
        if (!tolerance.IsNormal)
        {
            return width * width / 12;
        }

        var deviation = width / (2 * Cut);
        var kept = 1 - (2 * Cut * Normal.PDF(0, 1, Cut) / (1 - (2 * Below)));
        return deviation * deviation * kept;
    }
}
