using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>The directions that a block spans, to tell how nearly parallel two blocks are; a figure for
/// choosing, so doubles do.</summary>
/// <param name="basis">The block.</param>
internal sealed class BlockDirections(InvariantBasis basis)
{
    private readonly Complex[][] right = Orthonormalised(basis.Right);
    private readonly Complex[][] left = Orthonormalised(basis.Left);

    /// <summary>Product of the cosines between the right and between the left spans; 1 where both are
    /// parallel.</summary>
    public double CosineTo(BlockDirections other) =>
        Cosine(right, other.right) * Cosine(left, other.left);

    /// <summary>The root mean square cosine over the smaller span; 1 where one lies in the other.</summary>
    private static double Cosine(Complex[][] u, Complex[][] v)
    {
        double sum = 0;
        foreach (var a in u)
        {
            foreach (var b in v)
            {
                var overlap = Overlap(a, b);
                sum += (overlap.Real * overlap.Real) + (overlap.Imaginary * overlap.Imaginary);
            }
        }

        return Math.Min(1, Math.Sqrt(sum / Math.Min(u.Length, v.Length)));
    }

    private static Complex[][] Orthonormalised(DoubleDoubleComplexMatrix rows)
    {
        var result = new Complex[rows.Rows][];
        for (var i = 0; i < rows.Rows; i++)
        {
            var row = new Complex[rows.Columns];
            for (var j = 0; j < row.Length; j++)
            {
                row[j] = (Complex)rows[i, j];
            }

            Scale(row);
            for (var k = 0; k < 2 * i; k++)
            {
                var overlap = Overlap(result[k % i], row);
                for (var j = 0; j < row.Length; j++)
                {
                    row[j] -= overlap * result[k % i][j];
                }
            }

            Scale(row);
            result[i] = row;
        }

        return result;
    }

    private static Complex Overlap(Complex[] a, Complex[] b)
    {
        Complex sum = 0;
        for (var j = 0; j < a.Length; j++)
        {
            sum += Complex.Conjugate(a[j]) * b[j];
        }

        return sum;
    }

    private static void Scale(Complex[] row)
    {
        var size = Math.Sqrt(Overlap(row, row).Real);
        for (var j = 0; j < row.Length && size > 0; j++)
        {
            row[j] /= size;
        }
    }
}
