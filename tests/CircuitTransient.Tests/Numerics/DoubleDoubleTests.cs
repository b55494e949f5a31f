using System.Numerics;
using CircuitTransient.Numerics;
using CsCheck;

namespace CircuitTransient.Tests.Numerics;

public class DoubleDoubleTests
{
    // Bounds of the cited paper: 3u² for the sum (of its exact value), 5u² for the product, 15u² for the
    // quotient.
    private const double SquaredRounding = 1.232595164407831e-32;

    private static readonly Gen<DoubleDouble> Numbers =
        Gen.Select(Gen.Double[-1, 1], Gen.Double[-1, 1], Gen.Int[-60, 60]).Where((a, _, _) => a != 0)
            .Select((a, b, n) => DoubleDouble.ScaleByPowerOfTwo(DoubleDouble.FromSum(a, a * b * 1.1e-16), n));

    [Fact]
    public void The_sum_is_right_to_its_proven_bound() => Gen.Select(Numbers, Numbers).OnEach(
        (x, y) =>
            RelativeError(x + y, Exact(x) + Exact(y)) <= 3.1 * SquaredRounding,
        seed: "0N0XIzNsQ0O2",
        iter: 2000);

    [Fact]
    public void A_sum_that_cancels_keeps_its_relative_accuracy() =>
        Gen.Select(Numbers, Gen.Double[-1, 1]).OnEach(
        (x, e) =>
        {
            DoubleDouble y = DoubleDouble.FromSum(-x.Hi, x.Lo * e);
            return RelativeError(x + y, Exact(x) + Exact(y)) <= 3.1 * SquaredRounding;
        },
        seed: "0N0XIzNsQ0O2",
        iter: 2000);

    [Fact]
    public void The_product_is_right_to_its_proven_bound() => Gen.Select(Numbers, Numbers).OnEach(
        (x, y) =>
            RelativeError(x * y, Exact(x) * Exact(y)) <= 5 * SquaredRounding,
        seed: "0N0XIzNsQ0O2",
        iter: 2000);

    [Fact]
    public void The_quotient_is_right_to_its_proven_bound() => Gen.Select(Numbers, Numbers).OnEach(
        (x, y) =>
            RelativeError((x / y) * y, Exact(x)) <= 20 * SquaredRounding,
        seed: "0N0XIzNsQ0O2",
        iter: 2000);

    [Fact]
    public void The_square_root_squared_is_the_number() => Numbers.OnEach(
        x => RelativeError(Squared(DoubleDouble.Sqrt(DoubleDouble.Abs(x))), Exact(DoubleDouble.Abs(x)))
            <= 16 * SquaredRounding,
        seed: "0N0XIzNsQ0O2",
        iter: 2000);

    [Fact]
    public void Order_looks_at_the_low_word_too()
    {
        DoubleDouble x = new(1, 1e-20);

        Assert.True(x > 1 && x >= 1 && !(x < 1) && !(x <= 1) && x.CompareTo(1) > 0);
    }

    [Fact]
    public void Division_by_zero_behaves_as_for_doubles()
    {
        Assert.Equal(double.PositiveInfinity, ((DoubleDouble)1 / 0.0).Hi);
        Assert.False(((DoubleDouble)0 / 0.0).IsFinite);
    }

    private static DoubleDouble Squared(DoubleDouble x) => x * x;

    private static double RelativeError(DoubleDouble x, Rational exact)
    {
        Rational gap = Exact(x) - exact;
        return gap.Numerator.IsZero ? 0 : Math.Abs(gap.RatioTo(exact));
    }

    private static Rational Exact(DoubleDouble x) => Rational.From(x.Hi) + Rational.From(x.Lo);

    /// <summary>Numerator · 2^Exponent, exact arithmetic to judge the rounded one by.</summary>
    private readonly record struct Rational(BigInteger Numerator, int Exponent)
    {
        public static Rational From(double x)
        {
            long bits = BitConverter.DoubleToInt64Bits(x);
            int exponent = (int)((bits >> 52) & 0x7FF);
            long mantissa = bits & 0xFFFFFFFFFFFFFL;
            mantissa = exponent == 0 ? mantissa << 1 : mantissa | (1L << 52);
            return new(x < 0 ? -mantissa : mantissa, exponent - 1075);
        }

        public static Rational operator +(Rational a, Rational b)
        {
            int low = Math.Min(a.Exponent, b.Exponent);
            return new((a.Numerator << (a.Exponent - low)) + (b.Numerator << (b.Exponent - low)), low);
        }

        public static Rational operator -(Rational a, Rational b) =>
            a + new Rational(-b.Numerator, b.Exponent);

        public static Rational operator *(Rational a, Rational b) =>
            new(a.Numerator * b.Numerator, a.Exponent + b.Exponent);

        public double RatioTo(Rational b) => Math.Exp(
            BigInteger.Log(BigInteger.Abs(Numerator)) - BigInteger.Log(BigInteger.Abs(b.Numerator))
            + ((Exponent - b.Exponent) * Math.Log(2)));
    }
}
