using MathNet.Numerics.Distributions;

namespace CircuitTransient.Studies.Statistics;

/// <summary>Mean and central moments of values added one by one, without keeping them.</summary>
/// <param name="Count">How many.</param>
/// <param name="Mean">Their mean, in their unit.</param>
/// <param name="Second">Σ (x − mean)².</param>
/// <param name="Third">Σ (x − mean)³.</param>
/// <param name="Fourth">Σ (x − mean)⁴.</param>
public readonly record struct Moments(long Count, double Mean, double Second, double Third, double Fourth)
{
    /// <summary>With one more value (Pébay, Sandia report SAND2008-6212, 2008, the update by one value; from
    /// memory).</summary>
    public Moments With(double value)
    {
        double n = Count + 1;
        var delta = value - Mean;
        var step = delta / n;
        var term = delta * step * Count;
        return new Moments(
            Count + 1,
            Mean + step,
            Second + term,
            Third + (term * step * (n - 2)) - (3 * step * Second),
            Fourth + (term * step * step * ((n * n) - (3 * n) + 3)) + (6 * step * step * Second)
                - (4 * step * Third));
    }

    /// <summary>The sample's standard deviation, n − 1 in the denominator; zero for one value.</summary>
    public double StandardDeviation => Count < 2 ? 0 : Math.Sqrt(Second / (Count - 1));

    /// <summary>The interval of the mean by Student's t.</summary>
    public ConfidenceInterval MeanInterval
    {
        get
        {
            if (Count < 2)
            {
                return new ConfidenceInterval(double.NegativeInfinity, double.PositiveInfinity);
            }

            var t = StudentT.InvCDF(0, 1, Count - 1, 1 - Tail);
            var half = t * StandardDeviation / Math.Sqrt(Count);
            return new ConfidenceInterval(Mean - half, Mean + half);
        }
    }

    /// <summary>The large-sample interval of the standard deviation, whatever the distribution: the variance
    /// of s² is (m₄ − s⁴ (n − 3)/(n − 1))/n with the fourth moment m₄ (Cramér, Mathematical Methods of
    /// Statistics, 1946, 27.4; from memory).</summary>
    public ConfidenceInterval DeviationInterval
    {
        get
        {
            if (Count < 4)
            {
                return new ConfidenceInterval(0, double.PositiveInfinity);
            }

            var variance = Second / (Count - 1);
            var spread = ((Fourth / Count) - (variance * variance * (Count - 3) / (Count - 1))) / Count;
            var half = Normal.InvCDF(0, 1, 1 - Tail) * Math.Sqrt(Math.Max(0, spread));
            return new ConfidenceInterval(
                Math.Sqrt(Math.Max(0, variance - half)), Math.Sqrt(variance + half));
        }
    }

    private static double Tail => (1 - ConfidenceInterval.Confidence) / 2;
}
