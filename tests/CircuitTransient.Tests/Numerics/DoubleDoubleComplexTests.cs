using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class DoubleDoubleComplexTests
{
    [Fact]
    public void A_number_can_be_written() =>
        Assert.Equal("(1.5) + (-2) i", new DoubleDoubleComplex(1.5, -2).ToString());
}
