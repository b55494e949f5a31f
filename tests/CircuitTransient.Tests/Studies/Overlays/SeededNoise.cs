namespace CircuitTransient.Tests.Studies.Overlays;

/// <summary>Normal noise from a seed, the same on every machine.</summary>
public sealed class SeededNoise(ulong seed)
{
    private ulong state = seed;
    private double? waiting;

    /// <summary>The next value of mean 0 and variance 1, by Box and Muller's method (1958, from
    /// memory).</summary>
    public double Next()
    {
        if (waiting is { } second)
        {
            waiting = null;
            return second;
        }

        var radius = Math.Sqrt(-2 * Math.Log(1 - Uniform()));
        var (sin, cos) = Math.SinCos(2 * Math.PI * Uniform());
        waiting = radius * sin;
        return radius * cos;
    }

    /// <summary>The next value, even between 0 and 1.</summary>
    public double Uniform() => (Bits() >> 11) * (1.0 / (1UL << 53));

    // Steele, Lea and Flood's mix of a counter (2014, from memory).
    private ulong Bits()
    {
        state += 0x9E3779B97F4A7C15;
        var z = state;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }
}
