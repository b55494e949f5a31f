namespace CircuitTransient.Studies.Designs;

/// <summary>Random bits by counting: each follows from the seed, a stream and an index alone, so that a draw
/// is the same whichever thread makes it and whenever.</summary>
/// <param name="seed">Any number; one seed always gives the same bits.</param>
public readonly struct CounterGenerator(ulong seed)
{
    // The odd number nearest to 2⁶⁴ over the golden ratio, and the finalizer below: Steele, Lea and Flood,
    // "Fast splittable pseudorandom number generators", OOPSLA 2014 (from memory; outputs checked in tests).
    private const ulong Golden = 0x9E3779B97F4A7C15;

    private readonly ulong key = Mix(seed + Golden);

    /// <summary>Turns a counter into bits that look independent of those of its neighbours.</summary>
    public static ulong Mix(ulong z)
    {
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }

    /// <summary>The bits of an index in a stream.</summary>
    public ulong Bits(ulong stream, ulong index) =>
        Mix(Mix(key ^ Mix((stream + 1) * Golden)) + ((index + 1) * Golden));

    /// <summary>A number between 0 and 1, neither of them, from 2⁵³ evenly spaced ones.</summary>
    public double Uniform(ulong stream, ulong index) =>
        ((Bits(stream, index) >> 11) + 0.5) * (1.0 / (1UL << 53));

    /// <summary>A whole number from 0 up to and without a bound; the bias, bound/2⁶⁴, is beyond
    /// notice.</summary>
    public int Below(int bound, ulong stream, ulong index) =>
        (int)Math.BigMul(Bits(stream, index), (ulong)bound, out _);
}
