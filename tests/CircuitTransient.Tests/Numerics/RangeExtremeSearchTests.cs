using System.Collections.Immutable;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class RangeExtremeSearchTests
{
    [Fact]
    public void A_crest_between_samples_is_found_to_rounding()
    {
        // sin x has its crest at π/2, between the samples at 1.5 and 2
        var found = RangeExtremeSearch.Greatest(Samples(Sine, 0, 3, 6), Sine)!;

        Assert.Equal(RangeExtremeKind.Smooth, found.Kind);
        Assert.Equal(1, found.At.Y, 1e-15);
        // the slope is exact, so the place is as good as the value
        Assert.Equal(Math.PI / 2, found.At.X, 1e-9);
    }

    [Fact]
    public void A_crest_that_no_sample_is_near_shows_in_the_slopes()
    {
        // exp(−(20 (x − 0.47))²): at 0.4 and 0.5 it is 0.14 and 0.70 and still rises towards the middle
        var found = RangeExtremeSearch.Greatest(Samples(Bell, 0, 1, 10), Bell)!;

        Assert.Equal(1, found.At.Y, 1e-12);
        Assert.Equal(0.47, found.At.X, 1e-8);
    }

    [Fact]
    public void The_least_of_the_higher_of_two_lines_stands_at_their_kink()
    {
        // max(1 − x, 2x − 0.3): equal at x = 1.3/3
        var found = RangeExtremeSearch.Least(Samples(Valley, 0, 1, 7), Valley)!;

        Assert.Equal(RangeExtremeKind.Kink, found.Kind);
        Assert.Equal(1.3 / 3, found.At.X, 1e-10);
    }

    [Fact]
    public void A_function_that_only_rises_has_its_greatest_value_at_the_end()
    {
        var found = RangeExtremeSearch.Greatest(Samples(Rising, 0, 1, 5), Rising)!;

        Assert.Equal(RangeExtremeKind.End, found.Kind);
        Assert.Equal((1, Math.E), (found.At.X, found.At.Y));
    }

    [Fact]
    public void Without_slopes_the_crest_is_compared_out()
    {
        var found = RangeExtremeSearch.Greatest(Samples(SineWithoutSlope, 0, 3, 6), SineWithoutSlope)!;

        Assert.Equal(RangeExtremeKind.Compared, found.Kind);
        Assert.Equal(1, found.At.Y, 1e-14);
        Assert.Equal(Math.PI / 2, found.At.X, 1e-7); // values tell a flat place to the root of rounding
    }

    [Fact]
    public void A_place_without_a_value_parts_the_range()
    {
        var found = RangeExtremeSearch.Greatest(Samples(Broken, 0, 1, 10), Broken)!;

        Assert.Equal(0.5, found.At.X);
        Assert.Equal(RangeExtremeKind.End, found.Kind);
    }

    [Fact]
    public void Nothing_has_no_greatest_value() =>
        Assert.Null(RangeExtremeSearch.Greatest(
            Samples(x => new(x, double.NaN, double.NaN), 0, 1, 3), x => new(x, double.NaN, double.NaN)));

    private static SlopedSample Sine(double x) => new(x, Math.Sin(x), Math.Cos(x));

    private static SlopedSample SineWithoutSlope(double x) => new(x, Math.Sin(x), double.NaN);

    private static SlopedSample Bell(double x)
    {
        var value = Math.Exp(-Math.Pow(20 * (x - 0.47), 2));
        return new(x, value, -800 * (x - 0.47) * value);
    }

    private static SlopedSample Valley(double x) =>
        1 - x > (2 * x) - 0.3 ? new(x, 1 - x, -1) : new(x, (2 * x) - 0.3, 2);

    private static SlopedSample Rising(double x) => new(x, Math.Exp(x), Math.Exp(x));

    private static SlopedSample Broken(double x) => x > 0.55 && x < 0.65
        ? new(x, double.NaN, double.NaN)
        : new(x, x < 0.6 ? x : x - 1, 1);

    internal static ImmutableArray<SlopedSample> Samples(
        Func<double, SlopedSample> function, double from, double to, int steps) =>
        [.. Enumerable.Range(0, steps + 1).Select(i => function(from + ((to - from) * i / steps)))];
}
