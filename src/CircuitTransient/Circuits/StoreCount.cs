namespace CircuitTransient.Circuits;

/// <summary>Refuses a network of more capacitors and inductors than its modes can be computed for.</summary>
internal static class StoreCount
{
    // The modes of n stored quantities are found by dense matrices in double-double: 2000 of them take 64 MB
    // a matrix and minutes, and both grow by the square and the cube.
    public const int Most = 2000;

    public static void Check(CheckState state)
    {
        var stores = state.Declared.Where(p => p.Kind is "capacitor" or "inductor").ToArray();
        if (stores.Length > Most)
        {
            state.Findings.Error(stores[Most].NameSyntax.Span,
                $"the circuit has {stores.Length} capacitors and inductors; {Most} are the most",
                "lump neighbouring sections of a ladder into fewer");
        }
    }
}
