namespace CircuitTransient.Tests;

public class FirstTest
{
    [Fact]
    public void Builds() => Assert.True(Environment.Version.Major >= 10);
}
