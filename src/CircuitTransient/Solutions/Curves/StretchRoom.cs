namespace CircuitTransient.Solutions.Curves;

/// <summary>How many numbers may still be kept of the stretches that searches look at.</summary>
internal sealed class StretchRoom(long numbers)
{
    /// <summary>The fewest functions of a segment for which keeping them is cheaper than evaluating
    /// them.</summary>
    public const int Worthwhile = 48;

    private long left = numbers;

    /// <summary>Takes room; false where there is none left.</summary>
    public bool Take(int count) => Volatile.Read(ref left) >= count && Interlocked.Add(ref left, -count) >= 0;
}
