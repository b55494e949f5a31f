using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

// Expected values: computed to 120 digits with the arbitrary-precision library mpmath 1.3.0 and cut into two
// doubles.
public class DoubleDoubleFunctionsTests
{
    private const double Tolerance = 20 * DoubleDouble.Rounding; // a few tens of rounded operations each

    public static TheoryData<double, DoubleDouble> Exponentials => new()
    {
        { 1.0, new(2.718281828459045, 1.4456468917292502e-16) },
        { -1.0, new(0.36787944117144233, -1.2428753672788363e-17) },
        { 0.5, new(1.6487212707001282, -4.731568479435833e-17) },
        { 1e-10, new(1.0000000001, -8.269037096265652e-18) },
        { -37.25, new(6.64554417291507e-17, -5.891784267265031e-34) },
        { 300.0, new(1.9424263952412558e+130, 1.1143145370175699e+114) },
        { 0.1, new(1.1051709180756477, -8.149523913327619e-17) },
    };

    public static TheoryData<double, DoubleDouble> ExponentialsLessOne => new()
    {
        { 1e-18, new(1e-18, 5.0000000000000005e-37) },
        { -1e-18, new(-1e-18, 5.0000000000000005e-37) },
        { 1e-05, new(1.0000050000166668e-05, -3.111926571619883e-22) },
        { -1e-05, new(-9.999950000166666e-06, -7.687946724313578e-22) },
        { 0.3, new(0.3498588075760031, 1.6549155728191776e-17) },
        { -0.3, new(-0.2591817793182821, -1.805530505953e-18) },
        { 1.0, new(1.7182818284590453, -7.747991575210629e-17) },
        { -20.0, new(-0.9999999979388464, 4.1293110494709923e-17) },
    };

    public static TheoryData<double, DoubleDouble, DoubleDouble> SinesAndCosines => new()
    {
        { 1e-10, new(1e-10, -1.6666666666666669e-31), new(1.0, -5.0000000000000005e-21) },
        { 0.5, new(0.479425538604203, -5.103969860556013e-18),
            new(0.8775825618903728, -4.2623149864279997e-17) },
        { 1.0, new(0.8414709848078965, 1.776845092935536e-18),
            new(0.5403023058681398, -4.760954612604417e-17) },
        { -2.0, new(-0.9092974268256817, 1.4020906557816256e-17),
            new(-0.4161468365471424, 1.990596398957495e-17) },
        { Math.PI, new(1.2246467991473532e-16, -2.99476980971834e-33), new(-1.0, 7.498798913309288e-33) },
        { 10.0, new(-0.5440211108893698, -3.8949898668223557e-17),
            new(-0.8390715290764524, -1.4147119988953418e-17) },
        { 1e6, new(-0.34999350217129294, -1.5952848809323968e-17),
            new(0.9367521275331447, 4.637088260214747e-17) },
        { 1e12, new(-0.6112387023768895, -1.1491613964488177e-17),
            new(0.7914463018528902, 4.843622374857678e-17) },
        { -123456789.0, new(-0.9901147518020355, 8.980618906983069e-18),
            new(0.14025968153390964, -5.935903437627408e-18) },
    };

    public static TheoryData<double, DoubleDouble> Logarithms => new()
    {
        { 2.0, new(0.6931471805599453, 2.3190468138462996e-17) },
        { 10.0, new(2.302585092994046, -2.1707562233822494e-16) },
        { 1e-30, new(-69.07755278982137, -2.286179106246918e-15) },
        { 1.0000001, new(9.999999505838704e-08, 1.5249709528441489e-24) },
        { 3e+200, new(461.61563088747727, -1.9777331590804144e-14) },
    };

    [Theory]
    [MemberData(nameof(Exponentials))]
    public void The_exponential_is_right_in_both_words(double x, DoubleDouble expected) =>
        AssertClose(expected, DoubleDouble.Exp(x));

    [Theory]
    [MemberData(nameof(ExponentialsLessOne))]
    public void The_exponential_less_one_is_right_near_zero_too(double x, DoubleDouble expected) =>
        AssertClose(expected, DoubleDouble.ExpM1(x));

    [Theory]
    [MemberData(nameof(SinesAndCosines))]
    public void Sine_and_cosine_are_right_in_both_words(double x, DoubleDouble sin, DoubleDouble cos)
    {
        (DoubleDouble actualSin, DoubleDouble actualCos) = DoubleDouble.SinCos(x);

        AssertClose(sin, actualSin);
        AssertClose(cos, actualCos);
    }

    [Theory]
    [MemberData(nameof(Logarithms))]
    public void The_logarithm_is_right_in_both_words(double x, DoubleDouble expected) =>
        AssertClose(expected, DoubleDouble.Log(x));

    [Fact]
    public void The_exponential_runs_out_to_zero_and_infinity()
    {
        Assert.True(DoubleDouble.Exp(-800).IsZero);
        Assert.True(double.IsPositiveInfinity(DoubleDouble.Exp(800).Hi));
    }

    [Fact]
    public void The_hypotenuse_of_huge_legs_does_not_overflow() =>
        AssertClose(
            Math.ScaleB(5, 1000),
            DoubleDouble.Hypotenuse(Math.ScaleB(3, 1000), Math.ScaleB(-4, 1000)));

    private static void AssertClose(DoubleDouble expected, DoubleDouble actual) =>
        Assert.True(
            Math.Abs((actual - expected).Hi) <= Tolerance * Math.Abs(expected.Hi),
            $"expected {expected}, actual {actual}, error {(actual - expected).Hi / expected.Hi:E2}");
}
