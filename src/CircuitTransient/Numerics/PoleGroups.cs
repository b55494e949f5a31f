using System.Collections.Immutable;
using System.Numerics;

namespace CircuitTransient.Numerics;

public sealed record PoleGroup(Complex Value, int Multiplicity);

public static class PoleGroups
{
    public static ImmutableArray<PoleGroup> Of(ImmutableArray<SpectralBlock> blocks) =>
        [.. blocks.SelectMany(b => Enumerable.Range(0, b.Size).Select(i => new PoleGroup((Complex)b.T[i, i], 1))).Where(p => p.Value.Imaginary >= 0).OrderBy(p => p.Value.Magnitude)];
}
