using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

/// <summary>A share r/(s − p)ʲ⁺¹ of a rational function; in time r τʲ/j! e^(p τ).</summary>
/// <param name="Pole">p.</param>
/// <param name="Power">j, zero for a simple pole.</param>
/// <param name="Residue">r.</param>
public sealed record FractionShare(DoubleDoubleComplex Pole, int Power, DoubleDoubleComplex Residue);

/// <summary>1/Π(s − pₖ) as a sum of shares of single poles.</summary>
public static class PartialFractions
{
    /// <summary>The shares; poles that are equal to the last bit are one pole with its multiplicity. The
    /// nearer two others are, the larger their shares, which cancel.</summary>
    public static ImmutableArray<FractionShare> Of(IReadOnlyList<DoubleDoubleComplex> poles)
    {
        var groups = poles.GroupBy(p => p).Select(g => (Pole: g.Key, Count: g.Count())).ToArray();
        var shares = ImmutableArray.CreateBuilder<FractionShare>();
        foreach (var (pole, count) in groups)
        {
            var series = new DoubleDoubleComplex[count]; // of the other factors, about this pole
            series[0] = DoubleDoubleComplex.One;
            foreach (var (other, times) in groups.Where(g => g.Pole != pole))
            {
                for (var k = 0; k < times; k++)
                {
                    series = Divided(series, pole - other);
                }
            }

            for (var n = 0; n < count; n++)
            {
                shares.Add(new FractionShare(pole, count - 1 - n, series[n]));
            }
        }

        return shares.ToImmutable();
    }

    /// <summary>A power series in h divided by d + h: qₙ = (aₙ − qₙ₋₁)/d.</summary>
    private static DoubleDoubleComplex[] Divided(DoubleDoubleComplex[] series, DoubleDoubleComplex d)
    {
        var quotient = new DoubleDoubleComplex[series.Length];
        for (var n = 0; n < series.Length; n++)
        {
            quotient[n] = (n == 0 ? series[0] : series[n] - quotient[n - 1]) / d;
        }

        return quotient;
    }
}
