namespace CircuitTransient.Numerics;

/// <summary>e^(T t) of a small upper triangular matrix, in double-double.</summary>
/// <remarks>Taylor's series about the mean pole, scaled so that the poles' distances from it are small, then
/// squared (C. B. Moler, C. F. Van Loan, "Nineteen dubious ways to compute the exponential of a matrix", SIAM
/// Review 20 (1978), methods 1 and 3, from memory). Scaling goes by the poles, not by the norm, so that a
/// chain of equal poles is a polynomial in t; differences of poles are never divided.</remarks>
public static class TriangularExponential
{
    /// <summary>Farthest distance of a scaled pole from the mean; e^½ costs no digits.</summary>
    internal const double ScaledDistance = 0.5;

    private const int MostTerms = 400; // chains of m poles need about m + 30
    private const double Negligible = 1e-34;

    /// <summary>e^(T t).</summary>
    public static DoubleDoubleComplexMatrix Of(DoubleDoubleComplexMatrix t, DoubleDouble time)
    {
        ArgumentNullException.ThrowIfNull(t);
        var m = t.Rows;
        if (m == 1)
        {
            DoubleDoubleComplexMatrix single = new(1, 1);
            single[0, 0] = DoubleDoubleComplex.Exp(t[0, 0] * time);
            return single;
        }

        var centred = CentredBlock.Of(t);
        var distance = centred.Farthest * Math.Abs(time.Hi);
        var squarings = distance > ScaledDistance ? Math.ILogB(distance / ScaledDistance) + 1 : 0;
        var scaledTime = DoubleDouble.ScaleByPowerOfTwo(time, -squarings);
        var shift = time.Hi >= 0 ? centred.Rightmost : 0; // keeps every square bounded
        var result = Taylor(centred.N, scaledTime);
        result.Scale(DoubleDouble.Exp(-(shift * scaledTime)));
        for (var k = 0; k < squarings; k++)
        {
            result = result.Times(result);
        }

        return Scaled(result, DoubleDoubleComplex.Exp((centred.Mean + shift) * time));
    }

    /// <summary>e^(T t) of a triangle held as an array.</summary>
    public static DoubleDoubleComplex[,] Exact(DoubleDoubleComplex[,] t, DoubleDouble time) =>
        Of(DoubleDoubleComplexMatrix.From(t), time).ToArray();

    private static DoubleDoubleComplexMatrix Taylor(DoubleDoubleComplexMatrix n, DoubleDouble time)
    {
        var sum = DoubleDoubleComplexMatrix.Identity(n.Rows);
        var term = sum.Copy();
        var quiet = 0;
        for (var k = 1; k < MostTerms && quiet < n.Rows; k++)
        {
            term = term.Times(n);
            term.Scale(time / k);
            sum = new(sum.Re.Plus(1, term.Re), sum.Im.Plus(1, term.Im));
            quiet = term.FrobeniusNorm() <= Negligible * sum.FrobeniusNorm() ? quiet + 1 : 0;
        }

        return sum;
    }

    private static DoubleDoubleComplexMatrix Scaled(DoubleDoubleComplexMatrix a, DoubleDoubleComplex factor)
    {
        DoubleDoubleComplexMatrix result = new(a.Rows, a.Columns);
        for (var i = 0; i < a.Rows; i++)
        {
            result.AddScaledRow(i, factor, a, i);
        }

        return result;
    }
}
