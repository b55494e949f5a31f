using MathNet.Numerics;

namespace CircuitTransient.Studies.Statistics;

/// <summary>What a count of successes in independent trials says of their probability.</summary>
public static class BinomialLaw
{
    /// <summary>Probability of at most <paramref name="successes"/> in <paramref name="trials"/>.</summary>
    /// <param name="successes">Zero or more.</param>
    /// <param name="trials">One or more.</param>
    /// <param name="probability">Of each success, from 0 to 1.</param>
    // P(B ≤ k) = I₁₋ₚ(n − k, k + 1), the regularised incomplete beta function (Abramowitz and Stegun 1964,
    // 26.5.24; from memory).
    public static double AtMost(long successes, long trials, double probability) =>
        successes < 0 ? 0
        : successes >= trials ? 1
        : SpecialFunctions.BetaRegularized(trials - successes, successes + 1, 1 - probability);

    /// <summary>The exact interval of the probability of success (Clopper and Pearson, Biometrika 26, 1934,
    /// p. 404; from memory): each end leaves at most half of what the confidence leaves over.</summary>
    /// <param name="successes">From 0 to <paramref name="trials"/>.</param>
    /// <param name="trials">One or more.</param>
    public static ConfidenceInterval Interval(
        long successes, long trials, double confidence = ConfidenceInterval.Confidence)
    {
        var tail = (1 - confidence) / 2;
        var low = successes == 0 ? 0
            : Solve(p => 1 - AtMost(successes - 1, trials, p) - tail);
        var high = successes == trials ? 1
            : Solve(p => tail - AtMost(successes, trials, p));
        return new ConfidenceInterval(low, high);
    }

    /// <summary>Where a function that grows from below zero at 0 to above zero at 1 passes zero.</summary>
    private static double Solve(Func<double, double> growing)
    {
        const int halvings = 200; // ends at neighbouring doubles long before
        var (low, high) = (0.0, 1.0);
        for (var i = 0; i < halvings; i++)
        {
            var middle = (low + high) / 2;
            if (middle == low || middle == high)
            {
                break;
            }

            (low, high) = growing(middle) < 0 ? (middle, high) : (low, middle);
        }

        return (low + high) / 2;
    }
}
