using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

/// <summary>A real matrix taken apart into invariant blocks as small as good conditioning allows: simple
/// poles stand alone, poles too nearly defective to be parted stay together.</summary>
/// <param name="Order">Rows of the matrix.</param>
/// <param name="Blocks">The blocks; of a conjugate pair of blocks the one with positive imaginary
/// parts.</param>
public sealed record SpectralBlocks(int Order, ImmutableArray<SpectralBlock> Blocks)
{
    /// <summary>Takes a square matrix of finite entries apart.</summary>
    public static SpectralBlocks Of(DoubleDoubleMatrix a)
    {
        ArgumentNullException.ThrowIfNull(a);
        Shape.MustAgree(a.Rows, a.Columns);
        var blocks = ImmutableArray.CreateBuilder<SpectralBlock>();
        foreach (var places in ConnectedParts.Of(a))
        {
            DoubleDoubleMatrix part = new(places.Length, places.Length);
            for (var i = 0; i < places.Length; i++)
            {
                for (var j = 0; j < places.Length; j++)
                {
                    part[i, j] = a[places[i], places[j]];
                }
            }

            blocks.AddRange(SpectralSplit.Of(part).Select(block => Embedded(block, places, a.Rows)));
        }

        return new(a.Rows, blocks.ToImmutable());
    }

    private static SpectralBlock Embedded(SpectralBlock block, int[] places, int n)
    {
        DoubleDoubleComplexMatrix v = new(n, block.Size);
        DoubleDoubleComplexMatrix w = new(block.Size, n);
        for (var i = 0; i < places.Length; i++)
        {
            for (var k = 0; k < block.Size; k++)
            {
                v[places[i], k] = block.V[i, k];
                w[k, places[i]] = block.W[k, i];
            }
        }

        return block with { V = v, W = w };
    }
}
