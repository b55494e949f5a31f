namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Asserts that figures agree as far as their source says.</summary>
/// <remarks>Beside every figure stands where it is from, and how that was seen: <c>V1</c>, in the body's own
/// or a primary text; <c>V2</c>, where somebody quotes it; "from memory", not opened; <c>C</c>, mathematics,
/// computed apart from this program by closed forms or from state equations, with 40 digits in mpmath
/// 1.3.0.</remarks>
internal static class Close
{
    /// <summary>What every computed value must keep.</summary>
    public const double Computed = 1e-9;

    /// <summary>The instant of a flat maximum: the value there is flat to the square of this.</summary>
    public const double Instant = 1e-6;

    /// <summary>Relative to the expected value.</summary>
    public static void To(double expected, double actual, double relative = Computed) =>
        Within(relative * Math.Abs(expected), expected, actual);

    /// <summary>Relative to a scale, such as the peak of the wave that the value is taken from.</summary>
    public static void OfScale(double scale, double expected, double actual, double relative = Computed) =>
        Within(relative * scale, expected, actual);

    /// <summary>By an absolute error.</summary>
    public static void Within(double error, double expected, double actual) =>
        Assert.True(
            Math.Abs(actual - expected) <= error,
            $"expected {expected:R}, got {actual:R}: off by {Math.Abs(actual - expected):E2}, "
            + $"{Math.Abs((actual - expected) / expected):E2} of it; allowed is {error:E2}");

    /// <summary>Agrees in the digits that the source prints.</summary>
    public static void AsPrinted(double printed, double actual, int decimals) =>
        Within(0.5000001 * Math.Pow(10, -decimals), printed, actual);
}
