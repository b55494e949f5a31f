using System.Collections.Immutable;

namespace CircuitTransient.Numerics;

// Elementary functions, to a few units of the last bit. Reduction and Taylor series as in Y. Hida, X. S. Li,
// D. H. Bailey, "Library for double-double and quad-double arithmetic" (2007), from memory. Constants
// computed with 400 bits.
public readonly partial record struct DoubleDouble
{
    private const int HalvingSteps = 9; // e^r − 1 is summed at r/2⁹, |r| ≤ ln 2 / 2, where ten terms suffice

    private static readonly DoubleDouble Ln2 = new(0.6931471805599453, 2.3190468138462996e-17);
    private const double Ln2Third = 5.707708438416212e-34;

    // The first of the four parts of π/2; the others follow in ReduceToQuarter.
    private const double HalfPi1 = 1.5707963267948966;
    private const double HalfPi2 = 6.123233995736766e-17;
    private const double HalfPi3 = -1.4973849048591698e-33;
    private const double HalfPi4 = 5.562271104316826e-50;

    /// <summary>1/k! for k = 2, 3, …, 28.</summary>
    private static readonly ImmutableArray<DoubleDouble> InverseFactorials =
    [
        new(0.5, 0),
        new(0.16666666666666666, 9.25185853854297e-18),
        new(0.041666666666666664, 2.3129646346357427e-18),
        new(0.008333333333333333, 1.1564823173178714e-19),
        new(0.001388888888888889, -5.300543954373577e-20),
        new(0.0001984126984126984, 1.7209558293420705e-22),
        new(2.48015873015873e-05, 2.1511947866775882e-23),
        new(2.7557319223985893e-06, -1.858393274046472e-22),
        new(2.755731922398589e-07, 2.3767714622250297e-23),
        new(2.505210838544172e-08, -1.448814070935912e-24),
        new(2.08767569878681e-09, -1.20734505911326e-25),
        new(1.6059043836821613e-10, 1.2585294588752098e-26),
        new(1.1470745597729725e-11, 2.0655512752830745e-28),
        new(7.647163731819816e-13, 7.03872877733453e-30),
        new(4.779477332387385e-14, 4.399205485834081e-31),
        new(2.8114572543455206e-15, 1.6508842730861433e-31),
        new(1.5619206968586225e-16, 1.1910679660273754e-32),
        new(8.22063524662433e-18, 2.2141894119604265e-34),
        new(4.110317623312165e-19, 1.4412973378659527e-36),
        new(1.9572941063391263e-20, -1.3643503830087908e-36),
        new(8.896791392450574e-22, -7.911402614872376e-38),
        new(3.868170170630684e-23, -8.843177655482344e-40),
        new(1.6117375710961184e-24, -3.6846573564509766e-41),
        new(6.446950284384474e-26, -1.9330404233703465e-42),
        new(2.4795962632247976e-27, -1.2953730964765229e-43),
        new(9.183689863795546e-29, 1.4303150396787322e-45),
        new(3.279889237069838e-30, 1.5117542744029879e-46),
    ];

    /// <summary>|x|.</summary>
    public static DoubleDouble Abs(DoubleDouble x) => x.Hi < 0 ? -x : x;

    /// <summary>The larger of two.</summary>
    public static DoubleDouble Max(DoubleDouble x, DoubleDouble y) => x < y ? y : x;

    /// <summary>x · 2ⁿ, exact barring overflow and underflow.</summary>
    public static DoubleDouble ScaleByPowerOfTwo(DoubleDouble x, int n) =>
        new(Math.ScaleB(x.Hi, n), Math.ScaleB(x.Lo, n));

    /// <summary>√x by one correction of the double root (A. H. Karp, P. Markstein 1997, from
    /// memory).</summary>
    public static DoubleDouble Sqrt(DoubleDouble x)
    {
        var s = Math.Sqrt(x.Hi);
        if (s == 0 || !double.IsFinite(s))
        {
            return s;
        }

        var rest = x - FromProduct(s, s);
        return FromOrderedSum(s, rest.Hi / (2 * s));
    }

    /// <summary>√(x² + y²) without overflow of the squares.</summary>
    public static DoubleDouble Hypotenuse(DoubleDouble x, DoubleDouble y)
    {
        var largest = Math.Max(Math.Abs(x.Hi), Math.Abs(y.Hi));
        if (largest == 0 || !double.IsFinite(largest))
        {
            return largest;
        }

        var n = Math.ILogB(largest);
        var a = ScaleByPowerOfTwo(x, -n);
        var b = ScaleByPowerOfTwo(y, -n);
        return ScaleByPowerOfTwo(Sqrt((a * a) + (b * b)), n);
    }

    /// <summary>eˣ.</summary>
    public static DoubleDouble Exp(DoubleDouble x)
    {
        if (!(Math.Abs(x.Hi) < 750))
        {
            return Math.Exp(x.Hi);
        }

        var k = Math.Round(x.Hi / Ln2.Hi);
        var r = x - FromProduct(k, Ln2.Hi)
            - FromProduct(k, Ln2.Lo) - (k * Ln2Third);
        return ScaleByPowerOfTwo(ReducedExpM1(r) + 1, (int)k);
    }

    /// <summary>eˣ − 1, accurate near zero too.</summary>
    public static DoubleDouble ExpM1(DoubleDouble x) =>
        Math.Abs(x.Hi) < 0.5 * Ln2.Hi ? ReducedExpM1(x) : Exp(x) - 1;

    /// <summary>ln x by one Halley step on eʸ = x from the double logarithm.</summary>
    public static DoubleDouble Log(DoubleDouble x)
    {
        DoubleDouble y = x.Lo == 0 && x.Hi == 1 ? 0 : Math.Log(x.Hi) + (x.Lo / x.Hi);
        if (!y.IsFinite)
        {
            return y;
        }

        var exp = Exp(y);
        var gap = Math.Abs(y.Hi) < 0.25 ? x - 1 - ExpM1(y) : x - exp;
        return y + (gap * 2.0 / (x + exp));
    }

    /// <summary>sin x and cos x; the absolute error stays about 1e-31 up to |x| = 1e15.</summary>
    public static (DoubleDouble Sin, DoubleDouble Cos) SinCos(DoubleDouble x)
    {
        if (!(Math.Abs(x.Hi) < 1e15))
        {
            return (Math.Sin(x.Hi), Math.Cos(x.Hi));
        }

        (var r, var quarter) = ReduceToQuarter(x);
        var sin = SinTaylor(r);
        var cos = CosTaylor(r);
        return (quarter & 3) switch
        {
            0 => (sin, cos),
            1 => (cos, -sin),
            2 => (-sin, -cos),
            _ => (-cos, sin),
        };
    }

    private static (DoubleDouble Remainder, long Quarter) ReduceToQuarter(DoubleDouble x)
    {
        var k = Math.Round(x.Hi / HalfPi1);
        var r = x - FromProduct(k, HalfPi1) - FromProduct(k, HalfPi2)
            - FromProduct(k, HalfPi3) - (k * HalfPi4);
        return (r, (long)k);
    }

    private static DoubleDouble ReducedExpM1(DoubleDouble r)
    {
        var x = ScaleByPowerOfTwo(r, -HalvingSteps);
        var sum = InverseFactorials[8];
        for (var k = 7; k >= 0; k--)
        {
            sum = (sum * x) + InverseFactorials[k];
        }

        var s = x + (x * x * sum);
        for (var k = 0; k < HalvingSteps; k++)
        {
            s = (s * 2.0) + (s * s);
        }

        return s;
    }

    private static DoubleDouble SinTaylor(DoubleDouble x)
    {
        var square = -(x * x);
        var sum = InverseFactorials[25];
        for (var k = 23; k >= 1; k -= 2)
        {
            sum = (sum * square) + InverseFactorials[k];
        }

        return x + (x * square * sum);
    }

    private static DoubleDouble CosTaylor(DoubleDouble x)
    {
        var square = -(x * x);
        var sum = InverseFactorials[26];
        for (var k = 24; k >= 0; k -= 2)
        {
            sum = (sum * square) + InverseFactorials[k];
        }

        return (square * sum) + 1;
    }
}
