using System.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>Jₖ(w) = ∫₀¹ uᵏ e^(w u) du for k = 0 … n: what integrals of polynomials times exponentials are
/// made of.</summary>
internal static class PowerMoments
{
    /// <summary>Fills in the moments. Where |w| exceeds the highest order the recursion Jₖ = (e^w − k Jₖ₋₁)/w
    /// runs upwards, since each step shrinks the error; else it runs downwards from the highest, which Jₙ =
    /// e^w Σ (−w)ʲ n!/(n + j + 1)! gives (for Re w &gt; 0 Σ wʲ/(j! (n + j + 1))): integration by parts, all
    /// terms of falling size.</summary>
    public static void Fill(Complex w, Span<Complex> moments)
    {
        var exponential = Complex.Exp(w);
        var n = moments.Length - 1;
        if (w.Magnitude > Math.Max(n, 1))
        {
            moments[0] = (exponential - 1) / w;
            for (var k = 1; k <= n; k++)
            {
                moments[k] = (exponential - (k * moments[k - 1])) / w;
            }

            return;
        }

        moments[n] = Highest(w, n, exponential);
        for (var k = n; k >= 1; k--)
        {
            moments[k - 1] = (exponential - (w * moments[k])) / k;
        }
    }

    private static Complex Highest(Complex w, int n, Complex exponential)
    {
        const int mostTerms = 200; // |w| ≤ n: the ratio of terms is below n/(n + j), so far fewer do
        var term = new Complex(1.0 / (n + 1), 0);
        var sum = term;
        for (var j = 1; j < mostTerms && term.Magnitude > 1e-18 * sum.Magnitude; j++)
        {
            term *= -w / (n + 1 + j);
            sum += term;
        }

        return exponential * sum;
    }
}
