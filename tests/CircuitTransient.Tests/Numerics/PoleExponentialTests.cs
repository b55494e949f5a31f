using System.Numerics;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class PoleExponentialTests
{
    // ω = 2π · 50 to double-double; cos and sin of ω t for these doubles t computed with mpmath 1.3.0.
    private static readonly DoubleDouble Omega = new(314.1592653589793, -1.964386723728472e-15);

    [Theory]
    [InlineData(3183.0, 1.0, 1.1631132438917263e-29)]
    [InlineData(0.1, 1.0, 1.7439342490043159e-15)]
    [InlineData(33333.333333333336, -0.4999999993401436, -0.8660254041654069)]
    public void The_phase_is_kept_after_a_million_radians(double t, double cos, double sin)
    {
        Complex z = PoleExponential.Of(new DoubleDoubleComplex(0, Omega), t);

        Assert.Equal(cos, z.Real, 2.3e-16);
        Assert.Equal(sin, z.Imaginary, 2.3e-16);
    }

    [Fact]
    public void A_decay_far_past_its_end_is_zero() =>
        Assert.Equal(0, PoleExponential.Of((DoubleDouble)(-1e12), 1));
}
