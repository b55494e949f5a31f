using System.Numerics;

namespace CircuitTransient.Studies.Draws;

internal sealed partial class DrawSegment
{
    /// <summary>Writes a row of the form, or its derivative, as coefficients on the slots.</summary>
    /// <param name="function">Which function.</param>
    /// <param name="row">Which row of the form.</param>
    /// <param name="order">How often it is differentiated.</param>
    /// <param name="withSlopes">Whether its derivatives are wanted, too.</param>
    /// <param name="form">The network.</param>
    /// <param name="waves">The sources.</param>
    /// <param name="levels">α of every exponent and source at the segment's start.</param>
    /// <param name="slopes">β.</param>
    public void Put(
        int function, int row, int order, bool withSlopes, ClosedForm form, SourceWaves waves,
        ReadOnlySpan<Complex> levels, ReadOnlySpan<Complex> slopes)
    {
        Coefficients.AsSpan(function * Stride, Stride).Clear();
        var c = Coefficients.AsSpan(function * Stride, Width);
        for (var k = 0; k < Modes; k++)
        {
            var g = Gain(form, row, k);
            for (var p = 0; p <= Degree[k]; p++)
            {
                Set(c, k, p, g * response[(k * (HighestPower + 1)) + p]);
            }
        }

        for (var e = 0; e < exponents; e++)
        {
            var (level, slope) = Forced(form, row, e, waves.Exponents[e], levels, slopes);
            Set(c, Modes + e, 0, level);
            if (Degree[Modes + e] > 0)
            {
                Set(c, Modes + e, 1, slope);
            }
        }

        for (; order > 0; order--)
        {
            Differentiate(c, c);
        }

        if (withSlopes)
        {
            Slopes.AsSpan(function * Stride, Stride).Clear();
            var d = Slopes.AsSpan(function * Stride, Width);
            Differentiate(c, d);
            Differentiate(d, Bends.AsSpan(function * Stride, Width));
        }
    }

    /// <summary>All slots at τ.</summary>
    public void Evaluate(double tau, Span<double> slots)
    {
        for (var unit = 0; unit < Units; unit++)
        {
            var growth = Re[unit] == 0 ? 1 : Math.Exp(Re[unit] * tau);
            var slot = Slot[unit];
            if (Im[unit] == 0)
            {
                slots[slot] = growth;
                for (var p = 1; p <= Degree[unit]; p++)
                {
                    slots[slot + p] = tau * slots[slot + p - 1];
                }

                continue;
            }

            var (sin, cos) = Math.SinCos(Im[unit] * tau);
            (slots[slot], slots[slot + 1]) = (growth * cos, growth * sin);
            for (var p = 1; p <= Degree[unit]; p++)
            {
                slots[slot + (2 * p)] = tau * slots[slot + (2 * p) - 2];
                slots[slot + (2 * p) + 1] = tau * slots[slot + (2 * p) - 1];
            }
        }
    }

    /// <summary>A function's value where the slots have these values.</summary>
    public double Value(int function, ReadOnlySpan<double> slots) =>
        Sum(Coefficients.AsSpan(function * Stride, Width), slots);

    /// <summary>Σ c p.</summary>
    public static double Sum(ReadOnlySpan<double> c, ReadOnlySpan<double> slots)
    {
        double sum = 0;
        for (var i = 0; i < c.Length; i++)
        {
            sum += c[i] * slots[i];
        }

        return sum;
    }

    /// <summary>A function's value and slope at τ = 0, and what each is a sum of.</summary>
    public StartOfRow AtStart(int function)
    {
        double value = 0, slope = 0, size = 0, steepness = 0;
        for (var unit = 0; unit < Units; unit++)
        {
            var at = (function * Stride) + Slot[unit]; // of τ⁰; a sine is zero there
            value += Coefficients[at];
            slope += Slopes[at];
            size += Math.Abs(Coefficients[at]) + (Im[unit] == 0 ? 0 : Math.Abs(Coefficients[at + 1]));
            steepness += Math.Abs(Slopes[at]) + (Im[unit] == 0 ? 0 : Math.Abs(Slopes[at + 1]));
        }

        return new StartOfRow(value, slope, size, steepness);
    }

    /// <summary>C of Re(C τᵖ e^(E τ)).</summary>
    public Complex Coefficient(int function, int unit, int power)
    {
        var at = (function * Stride) + Slot[unit];
        return Im[unit] == 0
            ? Coefficients[at + power]
            : new Complex(Coefficients[at + (2 * power)], -Coefficients[at + (2 * power) + 1]);
    }

    /// <summary>A complex coefficient's magnitude for every unit, all powers of τ at their largest.</summary>
    /// <param name="function">Which function.</param>
    /// <param name="unit">Which exponent.</param>
    /// <param name="latest">The largest τ.</param>
    public double Magnitude(int function, int unit, double latest)
    {
        var at = (function * Stride) + Slot[unit];
        double sum = 0;
        var power = 1.0;
        for (var p = 0; p <= Degree[unit]; p++)
        {
            sum += power * (Im[unit] == 0
                ? Math.Abs(Coefficients[at + p])
                : Math.Sqrt((Coefficients[at + (2 * p)] * Coefficients[at + (2 * p)])
                    + (Coefficients[at + (2 * p) + 1] * Coefficients[at + (2 * p) + 1])));
            power *= latest;
        }

        return sum;
    }

    private Complex Gain(ClosedForm form, int row, int k)
    {
        var at = (row * form.Form.Order) + modeOf[k];
        return new Complex(form.Rows[at], Im[k] == 0 ? 0 : form.Rows[at + 1]);
    }

    /// <summary>The coefficients of e^(μ τ) and τ e^(μ τ) in a row.</summary>
    private (Complex Level, Complex Slope) Forced(
        ClosedForm form, int row, int e, Complex exponent, ReadOnlySpan<Complex> levels,
        ReadOnlySpan<Complex> slopes)
    {
        Complex level = 0, slope = 0;
        for (var k = 0; k < Modes; k++)
        {
            var g = Gain(form, row, k);
            var own = forced.AsSpan(((e * Modes) + k) * 4, 4);
            level += (g * own[0]) + Complex.Conjugate(g * own[2]);
            slope += (g * own[1]) + Complex.Conjugate(g * own[3]);
        }

        var sources = form.Form.Sources;
        for (var s = 0; s < sources; s++)
        {
            var (direct, rate) = (form.Direct[(row * sources) + s], form.Rates[(row * sources) + s]);
            var (a, b) = (levels[(e * sources) + s], slopes[(e * sources) + s]);
            level += (direct * a) + (rate * ((exponent * a) + b));
            slope += (direct * b) + (rate * exponent * b);
        }

        return (level, slope);
    }

    private void Set(Span<double> c, int unit, int power, Complex value)
    {
        if (Im[unit] == 0)
        {
            c[Slot[unit] + power] = value.Real;
        }
        else
        {
            c[Slot[unit] + (2 * power)] = value.Real;
            c[Slot[unit] + (2 * power) + 1] = -value.Imaginary;
        }
    }

    /// <summary>c′ₚ = E cₚ + (p + 1) cₚ₊₁ for every exponent.</summary>
    private void Differentiate(ReadOnlySpan<double> c, Span<double> d)
    {
        for (var unit = 0; unit < Units; unit++)
        {
            var (slot, re, im) = (Slot[unit], Re[unit], Im[unit]);
            for (var p = 0; p <= Degree[unit]; p++)
            {
                var isLast = p == Degree[unit];
                if (im == 0)
                {
                    d[slot + p] = (re * c[slot + p]) + (isLast ? 0 : (p + 1) * c[slot + p + 1]);
                    continue;
                }

                var at = slot + (2 * p);
                var (x, y) = (c[at], c[at + 1]);
                d[at] = (re * x) + (im * y) + (isLast ? 0 : (p + 1) * c[at + 2]);
                d[at + 1] = (re * y) - (im * x) + (isLast ? 0 : (p + 1) * c[at + 3]);
            }
        }
    }
}
