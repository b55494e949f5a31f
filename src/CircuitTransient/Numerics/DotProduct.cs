using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace CircuitTransient.Numerics;

/// <summary>The sum of products of two vectors in double precision, in four fixed lanes: the same bits
/// everywhere.</summary>
public static class DotProduct
{
    /// <summary>a · b.</summary>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static double Of(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        if (a.Length != b.Length)
        {
            throw new ArgumentException("the vectors have different lengths", nameof(b));
        }

        var lanes = Vector256<double>.Zero;
        var i = 0;
        for (; i + 4 <= a.Length; i += 4)
        {
            lanes += Vector256.LoadUnsafe(ref MemoryMarshal.GetReference(a), (nuint)i)
                * Vector256.LoadUnsafe(ref MemoryMarshal.GetReference(b), (nuint)i);
        }

        var sum = lanes[0] + lanes[1] + lanes[2] + lanes[3];
        for (; i < a.Length; i++)
        {
            sum += a[i] * b[i];
        }

        return sum;
    }
}
