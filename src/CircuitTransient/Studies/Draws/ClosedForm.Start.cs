using System.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>A row's value and slope, and what each is a sum of without cancellation.</summary>
internal readonly record struct StartOfRow(double Value, double Slope, double Size = 0, double Steepness = 0);

internal sealed partial class ClosedForm
{
    /// <summary>z̃ and z̃′ at an interval's start, without the modes, then the magnitudes that each is a sum
    /// of.</summary>
    /// <param name="stored">What the stores hold just before it.</param>
    /// <param name="waves">The sources.</param>
    /// <param name="levels">α of every exponent and source.</param>
    /// <param name="slopes">β.</param>
    /// <param name="start">Takes the four vectors.</param>
    public void PutStart(
        ReadOnlySpan<double> stored, SourceWaves waves, ReadOnlySpan<Complex> levels,
        ReadOnlySpan<Complex> slopes, Span<double> start)
    {
        var n = Form.Order;
        start.Clear();
        for (var i = 0; i < n; i++)
        {
            for (var k = 0; k < stored.Length; k++)
            {
                Add(bStores[(i * stored.Length) + k] * stored[k], ref start[i], ref start[n + n + i]);
            }
        }

        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                start[n + i] += a[(i * n) + j] * start[j];
                start[n + n + n + i] += Math.Abs(a[(i * n) + j]) * start[n + n + j];
            }
        }

        for (var s = 0; s < Form.Sources; s++)
        {
            var (level, _, _) = Source(s, waves, levels, slopes);
            for (var i = 0; i < n; i++)
            {
                Add(b[(i * Form.Sources) + s] * level, ref start[n + i], ref start[n + n + n + i]);
            }
        }
    }

    /// <summary>A row there.</summary>
    public StartOfRow RowAtStart(
        int row, SourceWaves waves, ReadOnlySpan<Complex> levels, ReadOnlySpan<Complex> slopes,
        ReadOnlySpan<double> start)
    {
        var (n, u) = (Form.Order, Form.Sources);
        double value = 0, slope = 0, size = 0, steepness = 0;
        for (var i = 0; i < n; i++)
        {
            var f = c[(row * n) + i];
            value += f * start[i];
            slope += f * start[n + i];
            size += Math.Abs(f) * start[n + n + i];
            steepness += Math.Abs(f) * start[n + n + n + i];
        }

        for (var s = 0; s < u; s++)
        {
            var (level, first, second) = Source(s, waves, levels, slopes);
            Add(Direct[(row * u) + s] * level, ref value, ref size);
            Add(Rates[(row * u) + s] * first, ref value, ref size);
            Add(Direct[(row * u) + s] * first, ref slope, ref steepness);
            Add(Rates[(row * u) + s] * second, ref slope, ref steepness);
        }

        return new StartOfRow(value, slope, size, steepness);
    }

    private static void Add(double term, ref double sum, ref double size)
    {
        sum += term;
        size += Math.Abs(term);
    }

    /// <summary>u, u′ and u″ of a source where τ = 0.</summary>
    private static (double Level, double First, double Second) Source(
        int source, SourceWaves waves, ReadOnlySpan<Complex> levels, ReadOnlySpan<Complex> slopes)
    {
        double level = 0, first = 0, second = 0;
        for (var e = 0; e < waves.Exponents.Length; e++)
        {
            var exponent = waves.Exponents[e];
            var (a, b) = (levels[(e * waves.SourceCount) + source], slopes[(e * waves.SourceCount) + source]);
            level += a.Real;
            first += (b + (exponent * a)).Real;
            second += (exponent * ((2 * b) + (exponent * a))).Real;
        }

        return (level, first, second);
    }
}
