using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>One of a mode's functions as e^(μ τ) times a polynomial in u = τ/h over a segment of length h:
/// exact for simple poles and forced functions, a series that ends below rounding for joined ones, since (p −
/// μ) h is below 1.</summary>
/// <param name="Exponent">μ h.</param>
/// <param name="Powers">The polynomial's coefficients, from u⁰ up.</param>
internal readonly record struct PolynomialExponential(Complex Exponent, Complex[] Powers)
{
    private const int SeriesLength = 18; // 1/19! is below 1e-17

    /// <summary>The functions of a mode with one row, in the order of its carriers; null for a
    /// block.</summary>
    public static PolynomialExponential[]? Of(Mode mode, DoubleDouble h)
    {
        if (mode.Order == 1)
        {
            return [new(Scaled(mode.Triangle[0, 0], h), [Complex.One])];
        }

        if (mode.Rows > 1 || mode.Kind == ModeKind.Pole)
        {
            return null;
        }

        var last = Scaled(mode.Triangle[1, 1], h);
        var x = Scaled(mode.Triangle[0, 0] - mode.Triangle[1, 1], h);
        var functions = new PolynomialExponential[mode.Order];
        functions[0] = new(Scaled(mode.Triangle[0, 0], h), [Complex.One]);
        functions[1] = new(last, Series(x, 1, h.Hi));
        if (mode.Order == 3)
        {
            functions[2] = new(last, Series(x, 2, h.Hi * h.Hi));
        }

        return functions;
    }

    /// <summary>∫₀ʰ of the product with another, or with its conjugate.</summary>
    public Complex Integral(PolynomialExponential other, bool conjugate, double h)
    {
        var exponent = Exponent + (conjugate ? Complex.Conjugate(other.Exponent) : other.Exponent);
        Span<Complex> moments = stackalloc Complex[Powers.Length + other.Powers.Length - 1];
        PowerMoments.Fill(exponent, moments);
        var sum = Complex.Zero;
        for (var k = 0; k < Powers.Length; k++)
        {
            for (var l = 0; l < other.Powers.Length; l++)
            {
                var power = conjugate ? Complex.Conjugate(other.Powers[l]) : other.Powers[l];
                sum += Powers[k] * power * moments[k + l];
            }
        }

        return sum * h;
    }

    /// <summary>scale Σ xᵏ u^(k + n)/(k + n)!.</summary>
    private static Complex[] Series(Complex x, int n, double scale)
    {
        if (x == Complex.Zero)
        {
            return n == 1 ? [0, scale] : [0, 0, scale / 2];
        }

        var powers = new Complex[SeriesLength + n];
        Complex term = n == 1 ? scale : scale / 2;
        for (var k = 0; k < SeriesLength; k++)
        {
            powers[k + n] = term;
            term *= x / (k + n + 1);
        }

        return powers;
    }

    private static Complex Scaled(DoubleDoubleComplex rate, DoubleDouble h) => (Complex)(rate * h);
}
