namespace CircuitTransient.Numerics;

/// <summary>The check of sizes that every kernel makes first; a mismatch is our own mistake, so it
/// throws.</summary>
internal static class Shape
{
    /// <summary>Throws unless both are the same.</summary>
    public static void MustAgree(int expected, int actual)
    {
        if (expected != actual)
        {
            throw new InvalidOperationException($"shapes do not agree: {expected} against {actual}");
        }
    }
}
