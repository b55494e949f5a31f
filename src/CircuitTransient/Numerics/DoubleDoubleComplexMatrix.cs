using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>A dense complex matrix in double-double: a real matrix for each part.</summary>
/// <param name="re">The real parts.</param>
/// <param name="im">The imaginary parts, of the same shape.</param>
public sealed class DoubleDoubleComplexMatrix(DoubleDoubleMatrix re, DoubleDoubleMatrix im)
{
    /// <summary>A matrix of zeros.</summary>
    public DoubleDoubleComplexMatrix(int rows, int columns)
        : this(new DoubleDoubleMatrix(rows, columns), new DoubleDoubleMatrix(rows, columns))
    {
    }

    /// <summary>Real parts.</summary>
    public DoubleDoubleMatrix Re { get; } = re;

    /// <summary>Imaginary parts.</summary>
    public DoubleDoubleMatrix Im { get; } = im;

    /// <summary>How many rows.</summary>
    public int Rows => Re.Rows;

    /// <summary>How many columns.</summary>
    public int Columns => Re.Columns;

    /// <summary>One entry.</summary>
    public DoubleDoubleComplex this[int row, int column]
    {
        get => new(Re[row, column], Im[row, column]);
        set
        {
            Re[row, column] = value.Re;
            Im[row, column] = value.Im;
        }
    }

    /// <summary>The identity.</summary>
    public static DoubleDoubleComplexMatrix Identity(int n) => From(DoubleDoubleMatrix.Identity(n));

    /// <summary>A real matrix, taken over without copying.</summary>
    public static DoubleDoubleComplexMatrix From(DoubleDoubleMatrix re)
    {
        ArgumentNullException.ThrowIfNull(re);
        return new(re, new(re.Rows, re.Columns));
    }

    /// <summary>A matrix of the array's entries.</summary>
    public static DoubleDoubleComplexMatrix From(DoubleDoubleComplex[,] values)
    {
        ArgumentNullException.ThrowIfNull(values);
        DoubleDoubleComplexMatrix result = new(values.GetLength(0), values.GetLength(1));
        for (var i = 0; i < result.Rows; i++)
        {
            for (var j = 0; j < result.Columns; j++)
            {
                result[i, j] = values[i, j];
            }
        }

        return result;
    }

    /// <summary>The entries as an array.</summary>
    public DoubleDoubleComplex[,] ToArray()
    {
        var result = new DoubleDoubleComplex[Rows, Columns];
        for (var i = 0; i < Rows; i++)
        {
            for (var j = 0; j < Columns; j++)
            {
                result[i, j] = this[i, j];
            }
        }

        return result;
    }

    /// <summary>A copy.</summary>
    public DoubleDoubleComplexMatrix Copy() => new(Re.Copy(), Im.Copy());

    /// <summary>The transposed matrix, not conjugated.</summary>
    public DoubleDoubleComplexMatrix Transposed() => new(Re.Transposed(), Im.Transposed());

    /// <summary>The transposed and conjugated matrix.</summary>
    public DoubleDoubleComplexMatrix Adjoint() => new(Re.Transposed(), Im.Transposed().Negative());

    /// <summary>Multiplies every entry.</summary>
    public void Scale(DoubleDouble factor)
    {
        for (var i = 0; i < Rows; i++)
        {
            Re.Row(i).Scale(factor);
            Im.Row(i).Scale(factor);
        }
    }

    /// <summary>A rectangle of entries, copied.</summary>
    public DoubleDoubleComplexMatrix Part(int row, int column, int rows, int columns) =>
        new(Re.Part(row, column, rows, columns), Im.Part(row, column, rows, columns));

    /// <summary>this · <paramref name="right"/>.</summary>
    public DoubleDoubleComplexMatrix Times(DoubleDoubleComplexMatrix right)
    {
        ArgumentNullException.ThrowIfNull(right);
        DoubleDoubleComplexMatrix result = new(Rows, right.Columns);
        result.Re.AddProduct(1, Re, right.Re);
        result.Re.AddProduct(-1, Im, right.Im);
        result.Im.AddProduct(1, Re, right.Im);
        result.Im.AddProduct(1, Im, right.Re);
        return result;
    }

    /// <summary>this · <paramref name="right"/>.</summary>
    public DoubleDoubleComplexMatrix Times(DoubleDoubleMatrix right) => new(Re.Times(right), Im.Times(right));

    /// <summary>Row <paramref name="row"/> from column <paramref name="start"/> on, plus f times that stretch
    /// of a row of another matrix.</summary>
    public void AddScaledRow(
        int row, DoubleDoubleComplex f, DoubleDoubleComplexMatrix x, int xRow, int start = 0)
    {
        ArgumentNullException.ThrowIfNull(x);
        var yRe = Re.Row(row, start);
        var yIm = Im.Row(row, start);
        var xRe = x.Re.Row(xRow, start);
        var xIm = x.Im.Row(xRow, start);
        yRe.AddScaled(f.Re, xRe);
        yRe.AddScaled(-f.Im, xIm);
        yIm.AddScaled(f.Re, xIm);
        yIm.AddScaled(f.Im, xRe);
    }

    /// <summary>The root of the sum of squared magnitudes.</summary>
    public double FrobeniusNorm() => double.Hypot(Re.FrobeniusNorm(), Im.FrobeniusNorm());

    /// <summary>The nearest numbers in doubles.</summary>
    public Complex[,] ToComplex()
    {
        var result = new Complex[Rows, Columns];
        for (var i = 0; i < Rows; i++)
        {
            for (var j = 0; j < Columns; j++)
            {
                result[i, j] = (Complex)this[i, j];
            }
        }

        return result;
    }
}
