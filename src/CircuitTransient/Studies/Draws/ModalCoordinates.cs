using CircuitTransient.Numerics;

namespace CircuitTransient.Studies.Draws;

/// <summary>Coordinates z = P ζ in which a nominal circuit's modes stand apart, found and applied in
/// double-double: the small poles of a stiff circuit are then rounded one by one, not as parts of the
/// large.</summary>
internal sealed class ModalCoordinates
{
    private readonly DoubleDoubleMatrix p;
    private readonly DoubleDoubleMatrix inverse;
    private readonly DoubleDoubleMatrix columns; // sizes of the entries of P
    private readonly DoubleDoubleMatrix lines; // and of its inverse

    private ModalCoordinates(DoubleDoubleMatrix a, DoubleDoubleMatrix p, int zeros)
    {
        this.p = p;
        inverse = LuFactorization.Of(p).Solve(DoubleDoubleMatrix.Identity(p.Rows));
        columns = Sizes(p.Transposed()).Transposed();
        lines = Sizes(inverse);
        var product = inverse.Times(a.Times(p));
        Matrix = Cleaned(product, lines.Times(Absolute(a)).Times(columns));
        for (var i = 0; i < p.Rows; i++)
        {
            Matrix[i, i] = (double)product[i, i]; // however small, a pole is one
            for (var j = 0; j < zeros; j++)
            {
                Matrix[i, j] = 0;
            }
        }
    }

    /// <summary>P⁻¹ A P; what only rounding leaves, and the columns of exact zero poles, are zero.</summary>
    public double[,] Matrix { get; }

    /// <summary>The coordinates of a matrix: exact zero poles first, then by falling magnitude.</summary>
    public static ModalCoordinates Of(DoubleDoubleMatrix a)
    {
        var directions = new List<(bool IsZero, double Size, DoubleDouble[] Column)>();
        foreach (var block in SpectralBlocks.Of(a).Blocks)
        {
            var size = Enumerable.Range(0, block.Size).Max(i => block.Pole(i).Magnitude);
            var isZero = block is { Size: 1, IsReal: true } && block.Pole(0).IsZero;
            directions.AddRange(Independent(Directions(block), block.IsReal ? block.Size : 2 * block.Size)
                .Select(c => (isZero, size, c)));
        }

        var ordered = directions.OrderByDescending(c => c.IsZero).ThenByDescending(c => c.Size).ToArray();
        var basis = new DoubleDoubleMatrix(a.Rows, a.Rows);
        for (var j = 0; j < ordered.Length; j++)
        {
            for (var i = 0; i < a.Rows; i++)
            {
                basis[i, j] = ordered[j].Column[i];
            }
        }

        return new ModalCoordinates(a, basis, ordered.Count(c => c.IsZero));
    }

    /// <summary>P⁻¹ B.</summary>
    public double[,] Inputs(DoubleDoubleMatrix b) => Cleaned(inverse.Times(b), lines.Times(Absolute(b)));

    /// <summary>C P.</summary>
    public double[,] Outputs(DoubleDouble[][] c)
    {
        var matrix = new DoubleDoubleMatrix(c.Length, p.Rows);
        for (var i = 0; i < c.Length; i++)
        {
            for (var j = 0; j < p.Rows; j++)
            {
                matrix[i, j] = c[i][j];
            }
        }

        return Cleaned(matrix.Times(p), Absolute(matrix).Times(columns));
    }

    /// <summary>Powers of two that make what the instruments feed back about as large in each row as in its
    /// column.</summary>
    public static double[] Balance(double[,] a, double[,] b, double[,] c, int first, double[] weights)
    {
        var n = a.GetLength(0);
        var sum = new DoubleDoubleMatrix(n, n);
        for (var i = 0; i < n; i++)
        {
            for (var j = 0; j < n; j++)
            {
                var entry = Math.Abs(a[i, j]);
                for (var k = 0; k < weights.Length; k++)
                {
                    entry += Math.Abs(b[i, first + k] * weights[k] * c[k, j]);
                }

                sum[i, j] = entry;
            }
        }

        return [.. Balancing.Of(sum).Exponents.Select(e => Math.ScaleB(1, e))];
    }

    /// <summary>D⁻¹ A D and D⁻¹ B.</summary>
    public static void Scale(double[,] a, double[,] b, double[] d)
    {
        for (var i = 0; i < d.Length; i++)
        {
            for (var j = 0; j < d.Length; j++)
            {
                a[i, j] *= d[j] / d[i];
            }

            for (var j = 0; j < b.GetLength(1); j++)
            {
                b[i, j] /= d[i];
            }
        }
    }

    /// <summary>The real and imaginary parts of a block's basis.</summary>
    private static List<DoubleDouble[]> Directions(SpectralBlock block)
    {
        var directions = new List<DoubleDouble[]>();
        for (var j = 0; j < block.Size; j++)
        {
            var (real, imaginary) = (new DoubleDouble[block.V.Rows], new DoubleDouble[block.V.Rows]);
            for (var i = 0; i < block.V.Rows; i++)
            {
                (real[i], imaginary[i]) = (block.V[i, j].Re, block.V[i, j].Im);
            }

            directions.Add(real);
            directions.Add(imaginary);
        }

        return directions;
    }

    /// <summary>The most independent of some vectors, each after what the chosen ones leave of it is
    /// largest.</summary>
    private static IEnumerable<DoubleDouble[]> Independent(List<DoubleDouble[]> vectors, int count)
    {
        var rest = vectors.Select(v => (DoubleDouble[])v.Clone()).ToArray();
        for (var k = 0; k < count; k++)
        {
            var chosen = Enumerable.Range(0, rest.Length).MaxBy(i => Dot(rest[i], rest[i]).Hi);
            var length = DoubleDouble.Sqrt(Dot(rest[chosen], rest[chosen]));
            DoubleDouble[] unit = [.. rest[chosen].Select(x => x / length)];
            foreach (var other in rest)
            {
                var share = Dot(unit, other);
                for (var i = 0; i < unit.Length; i++)
                {
                    other[i] -= share * unit[i];
                }
            }

            Array.Clear(rest[chosen]);
            var scale = DoubleDouble.Sqrt(Dot(vectors[chosen], vectors[chosen]));
            yield return [.. vectors[chosen].Select(x => x / scale)];
        }
    }

    private static DoubleDouble Dot(DoubleDouble[] a, DoubleDouble[] b)
    {
        var sum = DoubleDouble.Zero;
        for (var i = 0; i < a.Length; i++)
        {
            sum += a[i] * b[i];
        }

        return sum;
    }

    /// <summary>The nearest doubles to a product; an entry far below the terms it is a sum of is
    /// zero.</summary>
    private static double[,] Cleaned(DoubleDoubleMatrix product, DoubleDoubleMatrix terms)
    {
        const double rounding = 1e-22; // double-double leaves some 1e-30, a poor basis costs some digits
        var result = product.ToDoubles();
        for (var i = 0; i < product.Rows; i++)
        {
            for (var j = 0; j < product.Columns; j++)
            {
                result[i, j] = Math.Abs(result[i, j]) <= rounding * terms[i, j].Hi ? 0 : result[i, j];
            }
        }

        return result;
    }

    /// <summary>Magnitudes, those of a row's small entries raised: rounding may have left them where nothing
    /// is.</summary>
    private static DoubleDoubleMatrix Sizes(DoubleDoubleMatrix matrix)
    {
        const double least = 1e-6; // times the rounding above: 1e-28 of a vector's length
        var sizes = Absolute(matrix);
        for (var i = 0; i < matrix.Rows; i++)
        {
            double largest = 0;
            for (var j = 0; j < matrix.Columns; j++)
            {
                largest = Math.Max(largest, sizes[i, j].Hi);
            }

            for (var j = 0; j < matrix.Columns; j++)
            {
                sizes[i, j] = Math.Max(sizes[i, j].Hi, least * largest);
            }
        }

        return sizes;
    }

    private static DoubleDoubleMatrix Absolute(DoubleDoubleMatrix matrix)
    {
        var result = new DoubleDoubleMatrix(matrix.Rows, matrix.Columns);
        for (var i = 0; i < matrix.Rows; i++)
        {
            for (var j = 0; j < matrix.Columns; j++)
            {
                result[i, j] = Math.Abs(matrix[i, j].Hi);
            }
        }

        return result;
    }
}
