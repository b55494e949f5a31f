using System.Numerics;

namespace CircuitTransient.Numerics;

/// <summary>The discrete Fourier transform of a power of two of values, in place.</summary>
public static class FourierTransform
{
    /// <summary>X_k = Σ x_n e^(−2πi kn/N), or the same with + and no factor for the inverse.</summary>
    /// <remarks>Cooley and Tukey (1965), radix 2, from memory.</remarks>
    /// <exception cref="ArgumentException">The length is no power of two.</exception>
    public static void Transform(Span<Complex> x, bool isInverse = false)
    {
        if (!BitOperations.IsPow2(x.Length))
        {
            throw new ArgumentException("the length is no power of two", nameof(x));
        }

        Reorder(x);
        var turns = new Complex[Math.Max(1, x.Length / 2)];
        for (var k = 0; k < turns.Length; k++)
        {
            var (sin, cos) = Math.SinCos(2 * Math.PI * k / x.Length);
            turns[k] = new Complex(cos, isInverse ? sin : -sin);
        }

        for (var half = 1; half < x.Length; half *= 2)
        {
            var step = x.Length / (2 * half);
            for (var start = 0; start < x.Length; start += 2 * half)
            {
                for (var k = 0; k < half; k++)
                {
                    var odd = turns[k * step] * x[start + half + k];
                    var even = x[start + k];
                    x[start + k] = even + odd;
                    x[start + half + k] = even - odd;
                }
            }
        }
    }

    /// <summary>The cross-correlation Σ a_(n+ℓ) b_n of two real rows, for every ℓ from −(length of b − 1) to
    /// length of a − 1.</summary>
    public static double[] Correlate(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        var count = a.Length + b.Length - 1;
        var size = (int)BitOperations.RoundUpToPowerOf2((uint)count);
        var (x, y) = (new Complex[size], new Complex[size]);
        for (var i = 0; i < a.Length; i++)
        {
            x[i] = a[i];
        }

        for (var i = 0; i < b.Length; i++)
        {
            y[b.Length - 1 - i] = b[i];
        }

        Transform(x);
        Transform(y);
        for (var k = 0; k < size; k++)
        {
            x[k] *= y[k];
        }

        Transform(x, isInverse: true);
        var sums = new double[count];
        for (var i = 0; i < count; i++)
        {
            sums[i] = x[i].Real / size;
        }

        return sums;
    }

    private static void Reorder(Span<Complex> x)
    {
        for (int i = 1, j = 0; i < x.Length; i++)
        {
            var bit = x.Length >> 1;
            for (; (j & bit) != 0; bit >>= 1)
            {
                j ^= bit;
            }

            j ^= bit;
            if (i < j)
            {
                (x[i], x[j]) = (x[j], x[i]);
            }
        }
    }
}
