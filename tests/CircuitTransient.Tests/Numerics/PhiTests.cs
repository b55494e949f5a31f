using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

// Expected values: computed to 120 digits with mpmath 1.3.0 and cut into two doubles.
public class PhiTests
{
    public static TheoryData<double, DoubleDouble> Real => new()
    {
        { 0, 1 },
        { 1e-300, new(1.0, 0.0) },
        { 1e-18, new(1.0, 5e-19) },
        { -1e-18, new(1.0, -5e-19) },
        { 1e-09, new(1.0000000005, -4.1203518801696056e-17) },
        { -1e-05, new(0.9999950000166666, -1.0289978410792588e-17) },
        { 0.1, new(1.0517091807564762, 1.48444409830883e-17) },
        { -0.7, new(0.7191638517265578, 1.5725014564049708e-17) },
        { 1.5, new(2.321126046892043, 5.518199376022141e-17) },
        { -40.0, new(0.025, -1.4939876371637354e-18) },
        { 20.0, new(24258259.720489513, 7.694594461413349e-10) },
    };

    public static TheoryData<double, double, DoubleDouble, DoubleDouble> OfComplex => new()
    {
        { 0, 0, 1, 0 },
        { 1e-12, 1e-10, new(1.0000000000005, -4.4451957670515864e-17),
            new(5.0000000000033335e-11, 5.395452063801248e-28) },
        { -0.0005, 0.03, new(0.9996001046472539, 3.482723927157548e-17),
            new(0.014993876421016272, 6.455500474299234e-19) },
        { 0.3, -2.0, new(0.4856538970284278, 9.44358109509134e-18),
            new(-0.85371782083329, 3.9386148441394724e-17) },
        { -3.0, 10.0, new(0.02618782176455843, 4.1712810875251537e-19),
            new(0.09632114462899821, 6.334265030574803e-18) },
        { 0.0, 1e-09, new(1.0, -1.666666666666667e-19), new(5e-10, -4.166666666666667e-29) },
    };

    [Theory]
    [MemberData(nameof(Real))]
    public void The_real_form_is_right_to_a_few_roundings(double x, DoubleDouble expected)
    {
        Assert.Equal(1, Phi.Of(x) / expected.Hi, 4 * 2.2e-16);
        Assert.True(Math.Abs((Phi.Of((DoubleDouble)x) / expected - 1).Hi) < 20 * DoubleDouble.Rounding);
    }

    [Theory]
    [MemberData(nameof(OfComplex))]
    public void The_complex_form_is_right_to_a_few_roundings_of_its_magnitude(
        double re, double im, DoubleDouble expectedRe, DoubleDouble expectedIm)
    {
        DoubleDoubleComplex expected = new(expectedRe, expectedIm);
        Complex z = new(re, im);

        double error = Complex.Abs(Phi.Of(z) - (Complex)expected) / expected.Magnitude;
        double fineError = (Phi.Of((DoubleDoubleComplex)z) - expected).Magnitude / expected.Magnitude;

        Assert.True(error < 6 * 2.2e-16, $"{error:E2}");
        Assert.True(fineError < 40 * DoubleDouble.Rounding, $"{fineError:E2}");
    }
}
