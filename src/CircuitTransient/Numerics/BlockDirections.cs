using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>The directions that a block spans, to tell how nearly parallel two blocks are; a figure for
/// choosing, so doubles do.</summary>
/// <param name="basis">The block.</param>
internal sealed class BlockDirections(InvariantBasis basis)
{
    private readonly Complex[][] _right = Orthonormalised(basis.Right);
    private readonly Complex[][] _left = Orthonormalised(basis.Left);

    /// <summary>Product of the cosines between the right and between the left spans; 1 where both are
    /// parallel.
    /// </summary>
    public double CosineTo(BlockDirections other) =>
        Cosine(_right, other._right) * Cosine(_left, other._left);

    /// <summary>The root mean square cosine over the smaller span; 1 where one lies in the other.</summary>
    private static double Cosine(Complex[][] u, Complex[][] v)
    {
        double sum = 0;
        foreach (Complex[] a in u)
        {
            foreach (Complex[] b in v)
            {
                Complex overlap = Overlap(a, b);
                sum += (overlap.Real * overlap.Real) + (overlap.Imaginary * overlap.Imaginary);
            }
        }

        return Math.Min(1, Math.Sqrt(sum / Math.Min(u.Length, v.Length)));
    }

    private static Complex[][] Orthonormalised(DoubleDoubleComplexMatrix rows)
    {
        Complex[][] result = new Complex[rows.Rows][];
        for (int i = 0; i < rows.Rows; i++)
        {
            Complex[] row = new Complex[rows.Columns];
            for (int j = 0; j < row.Length; j++)
            {
                row[j] = (Complex)rows[i, j];
            }

            Scale(row);
            for (int k = 0; k < 2 * i; k++)
            {
                Complex overlap = Overlap(result[k % i], row);
                for (int j = 0; j < row.Length; j++)
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
        for (int j = 0; j < a.Length; j++)
        {
            sum += Complex.Conjugate(a[j]) * b[j];
        }

        return sum;
    }

    private static void Scale(Complex[] row)
    {
        double size = Math.Sqrt(Overlap(row, row).Real);
        for (int j = 0; j < row.Length && size > 0; j++)
        {
            row[j] /= size;
        }
    }
}
