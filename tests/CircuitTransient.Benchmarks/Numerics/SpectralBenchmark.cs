using System.Numerics;
using BenchmarkDotNet.Attributes;
using CircuitTransient.Numerics;

namespace CircuitTransient.Benchmarks.Numerics;

/// <summary>The cost of the double-double spectral work on full random matrices.</summary>
public class SpectralBenchmark
{
    private DoubleDoubleMatrix matrix = new(0, 0);
    private BlockExponential block = new(new DoubleDoubleComplexMatrix(1, 1));
    private Complex[] result = [];

    /// <summary>Order of the matrix.</summary>
    [Params(5, 20, 100)]
    public int Order { get; set; }

    /// <summary>Fills the matrix, the same each time, and a chain of six poles.</summary>
    [GlobalSetup]
    public void Fill()
    {
        Random random = new(7);
        matrix = new(Order, Order);
        for (int k = 0; k < Order * Order; k++)
        {
            matrix[k / Order, k % Order] = (2 * random.NextDouble()) - 1;
        }

        DoubleDoubleComplexMatrix chain = new(6, 6);
        for (int i = 0; i < 6; i++)
        {
            chain[i, i] = new(-1, i * 1e-3);
            for (int j = i + 1; j < 6; j++)
            {
                chain[i, j] = random.NextDouble();
            }
        }

        block = new(chain);
        result = new Complex[36];
    }

    /// <summary>The real Schur form with its vectors.</summary>
    [Benchmark]
    public RealSchur Schur() => RealSchur.Of(matrix);

    /// <summary>The whole way to decoupled blocks.</summary>
    [Benchmark]
    public SpectralBlocks Blocks() => SpectralBlocks.Of(matrix);

    /// <summary>One instant of a block of six poles, squarings included.</summary>
    [Benchmark]
    public Complex Instant()
    {
        block.Evaluate(1234.5, result);
        return result[5];
    }
}
