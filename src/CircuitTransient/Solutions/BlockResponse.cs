using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>The response of one spectral block, ζ′ = T ζ + w u, to (a + b τ) e^(μ τ).</summary>
internal static class BlockResponse
{
    /// <summary>x₁ = (μ − T)⁻¹ w and x₂ = −(μ − T)⁻¹ x₁: the forced response is (a x₁ + b x₂ + b x₁ τ) e^(μ
    /// τ).</summary>
    public static (DoubleDoubleComplex[] First, DoubleDoubleComplex[] Second) Forced(
        SpectralBlock block, DoubleDoubleComplex[] w, DoubleDoubleComplex exponent)
    {
        var first = SolveShifted(block, w, exponent);
        var second = SolveShifted(block, first, exponent);
        for (var i = 0; i < second.Length; i++)
        {
            second[i] = -second[i];
        }

        return (first, second);
    }

    /// <summary>T as an array.</summary>
    public static DoubleDoubleComplex[,] TriangleOf(SpectralBlock block)
    {
        var t = new DoubleDoubleComplex[block.Size, block.Size];
        for (var i = 0; i < block.Size; i++)
        {
            for (var j = i; j < block.Size; j++)
            {
                t[i, j] = block.T[i, j];
            }
        }

        return t;
    }

    /// <summary>[T w; 0 μ], or [T w 0; 0 μ 1; 0 0 μ] with slopes: the block and the exponential as one
    /// triangle.</summary>
    public static DoubleDoubleComplex[,] Join(
        SpectralBlock block, DoubleDoubleComplex[] w, DoubleDoubleComplex exponent, bool withSlopes)
    {
        var m = block.Size;
        var order = withSlopes ? m + 2 : m + 1;
        var joined = new DoubleDoubleComplex[order, order];
        for (var i = 0; i < m; i++)
        {
            for (var j = i; j < m; j++)
            {
                joined[i, j] = block.T[i, j];
            }

            joined[i, m] = w[i];
        }

        joined[m, m] = exponent;
        if (withSlopes)
        {
            joined[m, m + 1] = DoubleDoubleComplex.One;
            joined[m + 1, m + 1] = exponent;
        }

        return joined;
    }

    /// <summary>ζ at the segment's end.</summary>
    public static DoubleDoubleComplex[] AtEnd(
        SegmentModes modes, IntervalModel model, int b, Motion motion, DoubleDouble length)
    {
        var block = model.Blocks[b];
        var carriers = modes.CarriersAtEnd;
        var free = (DoubleDoubleComplex[])motion.State[b].Clone();
        var end = new DoubleDoubleComplex[free.Length];
        foreach (var forcing in motion.Forcings)
        {
            var w = model.Drive(b, forcing.Input);
            if (modes.IsJoined(b, forcing, out var joined))
            {
                AddJoined(end, modes.Basis.Modes[joined], carriers[joined], w, forcing);
                continue;
            }

            var (first, second) = Forced(block, w, forcing.Exponent);
            var growth = DoubleDoubleComplex.Exp(forcing.Exponent * length);
            for (var i = 0; i < free.Length; i++)
            {
                var level = (first[i] * forcing.Amplitude) + (second[i] * forcing.Slope);
                free[i] -= level;
                end[i] += growth * (level + (first[i] * forcing.Slope * length));
            }
        }

        var mode = modes.Basis.Modes[b];
        for (var i = 0; i < free.Length; i++)
        {
            for (var j = i; j < free.Length; j++)
            {
                end[i] += carriers[b][mode.Carrier(i, j)] * free[j];
            }
        }

        return end;
    }

    private static void AddJoined(
        DoubleDoubleComplex[] end, Mode mode, DoubleDoubleComplex[] carriers, DoubleDoubleComplex[] w,
        Forcing forcing)
    {
        var m = end.Length;
        for (var i = 0; i < m; i++)
        {
            var unit = m == 1 ? w[0] : DoubleDoubleComplex.One;
            end[i] += unit * carriers[mode.Carrier(i, m)] * forcing.Amplitude;
            if (mode.Order > m + 1)
            {
                end[i] += unit * carriers[mode.Carrier(i, m + 1)] * forcing.Slope;
            }
        }
    }

    private static DoubleDoubleComplex[] SolveShifted(
        SpectralBlock block, DoubleDoubleComplex[] right, DoubleDoubleComplex exponent)
    {
        var x = new DoubleDoubleComplex[right.Length];
        for (var i = x.Length - 1; i >= 0; i--)
        {
            var sum = right[i];
            for (var j = i + 1; j < x.Length; j++)
            {
                sum += block.T[i, j] * x[j];
            }

            x[i] = sum / (exponent - block.T[i, i]);
        }

        return x;
    }
}
