namespace CircuitTransient.Solutions.Curves;

/// <summary>A linear quantity over a stretch of time, its slow modes apart from its fast ones.</summary>
/// <param name="First">The slow modes' sum at a first instant.</param>
/// <param name="Last">Their sum at a last instant.</param>
/// <param name="Slope">The slope of their sum at the first instant.</param>
/// <param name="Size">A bound of their magnitude over the stretch.</param>
/// <param name="Rate">A bound of their first derivative.</param>
/// <param name="Bend">A bound of their second derivative.</param>
/// <param name="Fast">A bound of the fast modes' magnitude.</param>
internal readonly record struct SlowAndFast(
    double First, double Last, double Slope, double Size, double Rate, double Bend, double Fast)
{
    /// <summary>With one more slow mode.</summary>
    public SlowAndFast WithSlow(double first, double last, double slope, double size, double rate,
        double bend) => new(
        First + first, Last + last, Slope + slope, Size + size, Rate + rate, Bend + bend, Fast);
}
