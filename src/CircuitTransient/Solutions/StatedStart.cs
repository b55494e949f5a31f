using System.Collections.Immutable;
using CircuitTransient.Equations;
using CircuitTransient.Numerics;

namespace CircuitTransient.Solutions;

/// <summary>What is stored where a start is as stated: what the file says and nothing else.</summary>
internal static class StatedStart
{
    /// <summary>What every store holds, cause by cause.</summary>
    public static DoubleDouble[][] Of(NetworkLayout layout, ImmutableArray<Cause> causes)
    {
        var stored = new DoubleDouble[causes.Length][];
        for (var c = 0; c < causes.Length; c++)
        {
            stored[c] = new DoubleDouble[layout.Stores.Length];
            if (causes[c].Store >= 0)
            {
                stored[c][layout.Stores.IndexOf(causes[c].Store)] = causes[c].Stored;
            }
        }

        return stored;
    }
}
