using System.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>What the stores hold where constants and sines have been on for ever: the forced response at t =
/// 0.</summary>
internal static class SettledValues
{
    private const double NearPole = 1e-9; // relative; nearer, the exact engine says what is open or resonant

    /// <summary>Finds them.</summary>
    /// <param name="form">The network before any event.</param>
    /// <param name="waves">The sources.</param>
    /// <param name="levels">α of what has been on for ever, at t = 0.</param>
    /// <param name="stated">What every store is stated to hold; not a number where nothing is.</param>
    /// <param name="stored">Takes what every store holds.</param>
    /// <returns>False where there is no settled state, or it is not sure that there is.</returns>
    public static bool Put(
        ClosedForm form, SourceWaves waves, ReadOnlySpan<Complex> levels, ReadOnlySpan<double> stated,
        Span<double> stored)
    {
        stored.Clear();
        for (var e = 0; e < waves.Exponents.Length; e++)
        {
            var own = levels.Slice(e * waves.SourceCount, waves.SourceCount);
            if (own.IndexOfAnyExcept(Complex.Zero) >= 0 && !Add(form, waves.Exponents[e], own, stored))
            {
                return false;
            }
        }

        if (!FixHeld(form, stated, stored))
        {
            return false;
        }

        for (var k = 0; k < stored.Length; k++)
        {
            stored[k] = double.IsNaN(stated[k]) ? stored[k] : stated[k];
        }

        return true;
    }

    /// <summary>A charge or current that an exact zero pole holds follows from a stated one; two such poles
    /// at once are left to the exact engine.</summary>
    private static bool FixHeld(ClosedForm form, ReadOnlySpan<double> stated, Span<double> stored)
    {
        var held = -1;
        for (var j = 0; j < form.Form.Order; j++)
        {
            var isZero = form.PoleReal[j] == 0 && form.PoleImaginary[j] == 0;
            if (isZero && held < 0)
            {
                held = j;
            }
            else if (isZero || form.PoleReal[j] >= -NearPole * Math.Abs(form.PoleImaginary[j]))
            {
                return false;
            }
        }

        if (held < 0)
        {
            return true;
        }

        var (anchor, largest) = (-1, 0.0);
        for (var k = 0; k < stored.Length; k++)
        {
            var share = Math.Abs(form.Rows[(k * form.Form.Order) + held]);
            if (!double.IsNaN(stated[k]) && share > largest)
            {
                (anchor, largest) = (k, share);
            }
        }

        if (anchor < 0)
        {
            return false;
        }

        var amount = (stated[anchor] - stored[anchor]) / form.Rows[(anchor * form.Form.Order) + held];
        for (var k = 0; k < stored.Length; k++)
        {
            stored[k] += amount * form.Rows[(k * form.Form.Order) + held];
        }

        return true;
    }

    private static bool Add(
        ClosedForm form, Complex exponent, ReadOnlySpan<Complex> levels, Span<double> stored)
    {
        var (n, sources) = (form.Form.Order, form.Form.Sources);
        for (var j = 0; j < n; j++)
        {
            var isPair = form.PoleImaginary[j] != 0;
            var pole = new Complex(form.PoleReal[j], form.PoleImaginary[j]);
            if (pole == Complex.Zero && !form.IsDriven(j))
            {
                continue;
            }

            if ((exponent - pole).Magnitude <= NearPole * Math.Max(pole.Magnitude, exponent.Magnitude))
            {
                return false;
            }

            Complex q = 0;
            for (var s = 0; s < sources; s++)
            {
                var w = new Complex(
                    form.Inputs[(j * sources) + s], isPair ? -form.Inputs[((j + 1) * sources) + s] : 0);
                q += isPair
                    ? 0.5 * w * ((levels[s] / (exponent - pole))
                        + (Complex.Conjugate(levels[s]) / (Complex.Conjugate(exponent) - pole)))
                    : (w * levels[s] / (exponent - pole)).Real;
            }

            for (var k = 0; k < stored.Length; k++)
            {
                var g = new Complex(form.Rows[(k * n) + j], isPair ? form.Rows[(k * n) + j + 1] : 0);
                stored[k] += (g * q).Real;
            }

            j += isPair ? 1 : 0;
        }

        for (var k = 0; k < stored.Length; k++)
        {
            for (var s = 0; s < sources; s++)
            {
                stored[k] += form.Direct[(k * sources) + s] * levels[s].Real;
                stored[k] += form.Rates[(k * sources) + s] * (exponent * levels[s]).Real;
            }
        }

        return true;
    }
}
