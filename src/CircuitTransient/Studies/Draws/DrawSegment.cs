using System.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>A stretch of one draw without a switching or a source's corner: every followed function is a sum
/// of τᵏ e^(E τ), the exponents E being the poles and those of the sources. Slots hold these functions, a
/// complex one's cosine and sine side by side.</summary>
internal sealed partial class DrawSegment
{
    private const int HighestPower = 7;
    private const double Resonant = 1e-3; // |μ − λ| L from which partial fractions lose three digits

    private readonly int exponents;
    private readonly Complex[] response; // units × (HighestPower + 1): the modes' own shares
    private readonly Complex[] forced; // exponents × units × 4: level and slope at μ, then at its conjugate
    private readonly int[] modeOf;

    /// <param name="order">The largest order of any form.</param>
    /// <param name="exponents">How many exponents the sources have.</param>
    /// <param name="functions">How many functions are followed.</param>
    public DrawSegment(int order, int exponents, int functions)
    {
        this.exponents = exponents;
        var units = order + exponents;
        Stride = (((order * (HighestPower + 1)) + (4 * exponents)) + 3) & ~3;
        response = new Complex[Math.Max(1, order) * (HighestPower + 1)];
        forced = new Complex[exponents * Math.Max(1, order) * 4];
        modeOf = new int[units];
        Re = new double[units];
        Im = new double[units];
        Degree = new int[units];
        Slot = new int[units];
        ModeError = new double[units];
        Coefficients = new double[functions * Stride];
        Slopes = new double[functions * Stride];
        Bends = new double[functions * Stride];
        Impulse = new double[functions];
    }

    /// <summary>Where it begins, in seconds.</summary>
    public double Start { get; private set; }

    /// <summary>Where it ends, in seconds.</summary>
    public double End { get; private set; }

    /// <summary>Whether an interval begins with it.</summary>
    public bool BeginsInterval { get; private set; }

    /// <summary>How many exponents are in use.</summary>
    public int Units { get; private set; }

    /// <summary>How many of them are poles; the sources' follow.</summary>
    public int Modes { get; private set; }

    /// <summary>How many slots are in use.</summary>
    public int Width { get; private set; }

    /// <summary>How far apart two functions' coefficients stand.</summary>
    public int Stride { get; }

    /// <summary>Real parts of the exponents.</summary>
    public double[] Re { get; }

    /// <summary>Imaginary parts, zero or positive.</summary>
    public double[] Im { get; }

    /// <summary>The highest power of τ beside each exponent.</summary>
    public int[] Degree { get; }

    /// <summary>Where each exponent's slots begin.</summary>
    public int[] Slot { get; }

    /// <summary>A bound of each mode's relative error over the segment.</summary>
    public double[] ModeError { get; }

    /// <summary>The functions on the slots.</summary>
    public double[] Coefficients { get; }

    /// <summary>Their first derivatives.</summary>
    public double[] Slopes { get; }

    /// <summary>Their second derivatives.</summary>
    public double[] Bends { get; }

    /// <summary>The impulse of every function at the segment's start.</summary>
    public double[] Impulse { get; }

    /// <summary>Solves the segment.</summary>
    /// <param name="form">The network.</param>
    /// <param name="start">Its start in seconds.</param>
    /// <param name="end">Its end.</param>
    /// <param name="beginsInterval">Whether an interval begins with it.</param>
    /// <param name="state">ζ at its start.</param>
    /// <param name="waves">The sources.</param>
    /// <param name="levels">α of every exponent and source at its start.</param>
    /// <param name="slopes">β.</param>
    public void Solve(
        ClosedForm form, double start, double end, bool beginsInterval, ReadOnlySpan<double> state,
        SourceWaves waves, ReadOnlySpan<Complex> levels, ReadOnlySpan<Complex> slopes)
    {
        (Start, End, BeginsInterval) = (start, end, beginsInterval);
        response.AsSpan().Clear();
        PlaceModes(form, state);
        for (var e = 0; e < exponents; e++)
        {
            Force(form, e, waves.Exponents[e], levels, slopes);
        }

        PlaceSlots(waves, slopes);
    }

    private double Length => End - Start;

    private void PlaceModes(ClosedForm form, ReadOnlySpan<double> state)
    {
        const double rounding = 1.1e-16;
        Modes = 0;
        for (var j = 0; j < form.Form.Order; j++)
        {
            var isPair = form.PoleImaginary[j] != 0;
            (Re[Modes], Im[Modes]) = (form.PoleReal[j], form.PoleImaginary[j]);
            modeOf[Modes] = j;
            Degree[Modes] = 0;
            response[Modes * (HighestPower + 1)] = new Complex(state[j], isPair ? -state[j + 1] : 0);
            var error = form.PoleErrors[j] / form.Conditions[j];
            var lasting = Math.Min(Length, 1 / Math.Max(Math.Abs(Re[Modes]), 1e-300));
            ModeError[Modes] = (error * lasting) + (16 * rounding);
            j += isPair ? 1 : 0;
            Modes++;
        }
    }

    /// <summary>The forced response at one exponent, and what of it is at resonance with a pole.</summary>
    private void Force(
        ClosedForm form, int e, Complex exponent, ReadOnlySpan<Complex> levels, ReadOnlySpan<Complex> slopes)
    {
        var sources = form.Form.Sources;
        for (var k = 0; k < Modes; k++)
        {
            var j = modeOf[k];
            Complex a = 0, b = 0, aConjugate = 0, bConjugate = 0;
            for (var s = 0; s < sources; s++)
            {
                var w = new Complex(
                    form.Inputs[(j * sources) + s], Im[k] == 0 ? 0 : -form.Inputs[((j + 1) * sources) + s]);
                var (level, slope) = (levels[(e * sources) + s], slopes[(e * sources) + s]);
                a += w * level;
                b += w * slope;
                aConjugate += w * Complex.Conjugate(level);
                bConjugate += w * Complex.Conjugate(slope);
            }

            var own = forced.AsSpan(((e * Modes) + k) * 4, 4);
            own.Clear();
            var isSplit = Im[k] != 0 && exponent.Imaginary != 0; // a real sine drives a pair by both halves
            var half = isSplit ? 0.5 : 1;
            (own[0], own[1]) = Drive(k, half * a, half * b, exponent);
            if (isSplit)
            {
                (own[2], own[3]) = Drive(
                    k, half * aConjugate, half * bConjugate, Complex.Conjugate(exponent));
            }
        }
    }

    private (Complex Level, Complex Slope) Drive(int k, Complex a, Complex b, Complex exponent)
    {
        if (a == Complex.Zero && b == Complex.Zero)
        {
            return (0, 0);
        }

        var own = response.AsSpan(k * (HighestPower + 1), HighestPower + 1);
        var difference = exponent - new Complex(Re[k], Im[k]);
        if (difference.Magnitude * Length > Resonant)
        {
            var level = (a - (b / difference)) / difference;
            own[0] -= Im[k] == 0 ? level.Real : level;
            return (level, b / difference);
        }

        // ∫₀^τ (a + b s) e^(d s) ds by powers of τ
        var power = Complex.One;
        for (var p = 0; p + 2 <= HighestPower; p++)
        {
            Raise(k, own, p + 1, a * power / (p + 1));
            Raise(k, own, p + 2, b * power / (p + 2));
            power *= difference / (p + 1);
            if (power.Magnitude * Math.Pow(Length, p + 1) < 1e-17)
            {
                break;
            }
        }

        return (0, 0);
    }

    private void Raise(int k, Span<Complex> own, int power, Complex value)
    {
        if (value != Complex.Zero)
        {
            own[power] += Im[k] == 0 ? value.Real : value;
            Degree[k] = Math.Max(Degree[k], power);
        }
    }

    private void PlaceSlots(SourceWaves waves, ReadOnlySpan<Complex> slopes)
    {
        Units = Modes + exponents;
        Width = 0;
        for (var unit = 0; unit < Units; unit++)
        {
            if (unit >= Modes)
            {
                var e = unit - Modes;
                (Re[unit], Im[unit]) = (waves.Exponents[e].Real, waves.Exponents[e].Imaginary);
                Degree[unit] = 0;
                ModeError[unit] = 0;
                foreach (var slope in slopes.Slice(e * waves.SourceCount, waves.SourceCount))
                {
                    Degree[unit] = slope == Complex.Zero ? Degree[unit] : 1;
                }
            }

            Slot[unit] = Width;
            Width += (Degree[unit] + 1) * (Im[unit] == 0 ? 1 : 2);
        }
    }

    /// <summary>ζ at the segment's end.</summary>
    public void PutStateAtEnd(SourceWaves waves, Span<double> state)
    {
        for (var k = 0; k < Modes; k++)
        {
            var sum = Complex.Zero;
            for (var p = Degree[k]; p >= 0; p--)
            {
                sum = (sum * Length) + response[(k * (HighestPower + 1)) + p];
            }

            sum *= Complex.Exp(new Complex(Re[k], Im[k]) * Length);
            for (var e = 0; e < exponents; e++)
            {
                var own = forced.AsSpan(((e * Modes) + k) * 4, 4);
                var growth = Complex.Exp(waves.Exponents[e] * Length);
                sum += (own[0] + (own[1] * Length)) * growth;
                sum += (own[2] + (own[3] * Length)) * Complex.Conjugate(growth);
            }

            state[modeOf[k]] = sum.Real;
            if (Im[k] != 0)
            {
                state[modeOf[k] + 1] = -sum.Imaginary;
            }
        }
    }
}
