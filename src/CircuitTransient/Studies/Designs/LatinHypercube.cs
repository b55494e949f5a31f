namespace CircuitTransient.Studies.Designs;

/// <summary>Random points in the unit cube of which each slice of each coordinate gets its share (McKay,
/// Beckman and Conover, Technometrics 21 (1979) 239; from memory). A long series is a row of cubes, so that
/// it streams; every cube follows from the seed and its own number alone.</summary>
/// <param name="seed">The seed of the whole series.</param>
/// <param name="coordinates">How many coordinates a point has.</param>
/// <param name="count">How many points the series has.</param>
public sealed class LatinHypercube(ulong seed, int coordinates, long count)
{
    /// <summary>The most points of one cube.</summary>
    public const int MostInCube = 5000;

    private readonly CounterGenerator generator = new(seed);

    /// <summary>How many points a cube has: all have the same number, but the last one may have
    /// fewer.</summary>
    public int SizeOf(long cube) => (int)Math.Min(MostInCube, count - (cube * MostInCube));

    /// <summary>The points of a cube, one after another, each coordinate between 0 and 1.</summary>
    public double[] Points(long cube)
    {
        var size = SizeOf(cube);
        var points = new double[size * coordinates];
        var slices = new int[size];
        for (var c = 0; c < coordinates; c++)
        {
            var stream = 2 * (((ulong)cube * (ulong)coordinates) + (ulong)c);
            Shuffle(slices, stream);
            for (var i = 0; i < size; i++)
            {
                points[(i * coordinates) + c] =
                    (slices[i] + generator.Uniform(stream + 1, (ulong)i)) / size;
            }
        }

        return points;
    }

    // Every order equally likely: Durstenfeld's exchange (Communications of the ACM 7, 1964, 420; from
    // memory).
    private void Shuffle(int[] slices, ulong stream)
    {
        for (var i = 0; i < slices.Length; i++)
        {
            var other = generator.Below(i + 1, stream, (ulong)i);
            slices[i] = slices[other];
            slices[other] = i;
        }
    }
}
