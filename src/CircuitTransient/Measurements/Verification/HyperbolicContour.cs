using System.Numerics;

namespace CircuitTransient.Measurements.Verification;

/// <summary>The points and weights of a numerical inversion of the Laplace transform for one instant:
/// f(t) ≈ Im Σ w F(z) over a hyperbola round every pole near the negative real axis.</summary>
/// <remarks>z = μ(1 + sin(iu − α)) with α = 1.1721, h = 1.0818/N, μ = 4.4921 N/t, error some 10.2⁻ᴺ:
/// J. A. C. Weideman, L. N. Trefethen, "Parabolic and hyperbolic contours for computing the Bromwich
/// integral", Math. Comp. 76 (2007) (from memory; the accuracy is measured in the tests).</remarks>
internal static class HyperbolicContour
{
    private const double Alpha = 1.1721;

    /// <summary>The upper half of the points, <paramref name="count"/> of them, with their weights.</summary>
    public static (Complex Point, Complex Weight)[] For(double time, int count)
    {
        var (sin, cos) = Math.SinCos(Alpha);
        var h = 1.0818 / count;
        var mu = 4.4921 * count / time;
        var points = new (Complex, Complex)[count];
        for (var k = 0; k < count; k++)
        {
            var u = (k + 0.5) * h;
            var z = mu * new Complex(1 - (Math.Cosh(u) * sin), Math.Sinh(u) * cos);
            var derivative = mu * new Complex(-Math.Sinh(u) * sin, Math.Cosh(u) * cos);
            points[k] = (z, h / Math.PI * Complex.Exp(z * time) * derivative);
        }

        return points;
    }

    /// <summary>Greatest |Im p|·t of a pole on the imaginary axis that lies well within the contour, which
    /// crosses the axis at 0.73 N/t. Measured for 20 points: an error of 3e-10 at 4.</summary>
    public static double WidestEnclosed(int count) => 0.2 * count;
}
