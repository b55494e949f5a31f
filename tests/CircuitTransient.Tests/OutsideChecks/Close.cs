namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Asserts that figures agree as far as their source says.</summary>
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
