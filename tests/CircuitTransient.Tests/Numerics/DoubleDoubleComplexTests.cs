using CircuitTransient.Numerics;
using CsCheck;

namespace CircuitTransient.Tests.Numerics;

// Expected values: computed to 60 digits with mpmath 1.3.0 and cut into two doubles.
public class DoubleDoubleComplexTests
{
    private const double Tolerance = 20 * DoubleDouble.Rounding; // a few tens of rounded operations each

    private static readonly Gen<DoubleDoubleComplex> Numbers =
        Gen.Select(Gen.Double[-1, 1], Gen.Double[-1, 1], Gen.Int[-60, 60])
            .Where((re, im, _) => Math.Abs(re) + Math.Abs(im) > 1e-3)
            .Select((re, im, n) => new DoubleDoubleComplex(re, im).ScaleByPowerOfTwo(n));

    [Fact]
    public void A_quotient_is_right_in_both_parts() => AssertNear(
        new(
            new(0.38235294117647056, 2.6122894697062506e-17),
            new(0.029411764705882353, 4.0817022964160166e-19)),
        new DoubleDoubleComplex(1, 2) / new DoubleDoubleComplex(3, 5));

    [Fact]
    public void An_exponential_is_right_in_both_parts() => AssertNear(
        new(
            new(-1.1312043837568135, -1.0216536027388577e-16),
            new(2.4717266720048188, 1.575826685505911e-16)),
        DoubleDoubleComplex.Exp(new(1, 2)));

    [Fact]
    public void A_square_root_is_the_one_with_a_positive_real_part() => AssertNear(
        new(
            new(1.442615274452683, -8.502276782134592e-17),
            new(-1.0397782600555705, -3.148047676585436e-17)),
        DoubleDoubleComplex.Sqrt(new(1, -3)));

    [Fact]
    public void A_magnitude_has_both_words()
    {
        var expected = new DoubleDouble(3.605551275463989, 1.682605221251197e-16);

        Assert.Equal(0, (double)(DoubleDoubleComplex.Abs(new(2, 3)) - expected), 4 * Tolerance);
    }

    [Theory]
    [InlineData(1e300)]
    [InlineData(1e-300)]
    public void A_divisor_whose_square_has_no_double_is_no_trouble(double size)
    {
        var quotient = new DoubleDoubleComplex(size, size) / new DoubleDoubleComplex(size, -size);

        AssertNear(new(0, 1), quotient);
    }

    [Fact]
    public void What_is_divided_and_multiplied_is_as_before() => Gen.Select(Numbers, Numbers).OnEach(
        (x, y) => IsNear(x, x / y * y),
        seed: "0N0XIzNsQ0O2",
        iter: 1000);

    [Fact]
    public void A_square_root_squared_is_the_number() => Numbers.OnEach(
        x => IsNear(x, DoubleDoubleComplex.Sqrt(x) * DoubleDoubleComplex.Sqrt(x)),
        seed: "0N0XIzNsQ0O2",
        iter: 1000);

    [Fact]
    public void A_number_times_its_conjugate_is_its_magnitude_squared() => Numbers.OnEach(
        x =>
        {
            var size = DoubleDoubleComplex.Abs(x);
            return IsNear(size * size, x * x.Conjugate);
        },
        seed: "0N0XIzNsQ0O2",
        iter: 1000);

    [Fact]
    public void A_number_can_be_written() =>
        Assert.Equal("(1.5) + (-2) i", new DoubleDoubleComplex(1.5, -2).ToString());

    private static void AssertNear(DoubleDoubleComplex expected, DoubleDoubleComplex actual) =>
        Assert.True(IsNear(expected, actual), $"{actual} is not {expected}");

    private static bool IsNear(DoubleDoubleComplex expected, DoubleDoubleComplex actual) =>
        (actual - expected).Magnitude <= Tolerance * expected.Magnitude;
}
