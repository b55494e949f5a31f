using System.Numerics;

namespace CircuitTransient.Tests.Reports.Formula;

/// <summary>The divided difference of e^(p τ), by its own definition for one rate and else as the upper right
/// element of the exponential of a bidiagonal matrix (G. Opitz, "Steigungsmatrizen", ZAMM 44 (1964), from
/// memory), by halving the time and squaring.</summary>
internal static class DividedDifference
{
    public static Complex Of(IReadOnlyList<Complex> rates, double tau)
    {
        var n = rates.Count;
        if (n == 1)
        {
            return Complex.Exp(rates[0] * tau);
        }

        var mean = rates.Aggregate((a, b) => a + b) / n;
        var size = rates.Max(r => (r - mean).Magnitude) * tau;
        var halvings = size > 0.5 ? (int)Math.Ceiling(Math.Log2(size)) + 1 : 0;
        var step = Math.ScaleB(tau, -halvings);
        var power = Identity(n);
        var sum = Identity(n);
        for (var k = 1; k < 60; k++)
        {
            power = Times(
                power, (i, j) => i == j ? (rates[i] - mean) * step / k : i + 1 == j ? step / k : 0, n);
            for (var i = 0; i < n; i++)
            {
                for (var j = i; j < n; j++)
                {
                    sum[i, j] += power[i, j];
                }
            }
        }

        for (var k = 0; k < halvings; k++)
        {
            var half = sum;
            sum = Times(half, (i, j) => half[i, j], n);
        }

        return sum[0, n - 1] * Complex.Exp(mean * tau);
    }

    private static Complex[,] Identity(int n)
    {
        var identity = new Complex[n, n];
        for (var i = 0; i < n; i++)
        {
            identity[i, i] = 1;
        }

        return identity;
    }

    private static Complex[,] Times(Complex[,] left, Func<int, int, Complex> right, int n)
    {
        var product = new Complex[n, n];
        for (var i = 0; i < n; i++)
        {
            for (var j = i; j < n; j++)
            {
                for (var k = i; k <= j; k++)
                {
                    product[i, j] += left[i, k] * right(k, j);
                }
            }
        }

        return product;
    }
}
