using System.Collections.Immutable;
using CircuitTransient.Numerics;

namespace CircuitTransient.Tests.Numerics;

public class RangeDipsTests
{
    [Fact]
    public void A_dip_far_narrower_than_the_samples_stand_apart_is_followed_to_its_bottom()
    {
        // 1 − 2/(1 + ((x − 0.237)/0.001)²) is below zero within 0.001 of 0.237; beside a deeper dip at 0.82.
        var found = Below(x => Resonance(x, 0.237, 1e-3, 2).Plus(Resonance(x, 0.82, 1e-2, 3)).Plus(1));

        Assert.Contains(found, s => Math.Abs(s.X - 0.237) < 1e-3);
        Assert.Contains(found, s => Math.Abs(s.X - 0.82) < 2e-2);
    }

    [Fact]
    public void An_island_within_what_is_below_is_found_as_well()
    {
        var given = RangeExtremeSearchTests.Samples(Island, 0, 1, 10);
        var found = new List<SlopedSample>();
        RangeDips.Search(given, Noted(Island, found));

        Assert.Contains(found, s => s.Y > 0);

        static SlopedSample Island(double x) => Resonance(x, 0.237, 1e-3, 2).Plus(1).Negate();
    }

    [Fact]
    public void A_bend_that_shows_in_values_against_slopes_is_looked_into()
    {
        // Between 0.9 and 1 it falls below zero by 0.0005, and at both its slope is positive.
        var found = Below(x => new(
            x, 0.302 - (0.3 * x) + (0.01 * Math.Sin(20 * Math.PI * x)),
            (0.2 * Math.PI * Math.Cos(20 * Math.PI * x)) - 0.3));

        Assert.NotEmpty(found);
        Assert.All(found, s => Assert.InRange(s.X, 0.9, 1));
    }

    [Fact]
    public void A_dip_that_is_as_its_slopes_foretell_costs_a_look_and_what_has_none_costs_nothing()
    {
        var (looked, none) = (new List<SlopedSample>(), new List<SlopedSample>());
        RangeDips.Search(
            RangeExtremeSearchTests.Samples(Bowl, 0, 1, 10), Noted(Bowl, looked));
        RangeDips.Search(
            RangeExtremeSearchTests.Samples(Rising, 0, 1, 10), Noted(Rising, none));

        Assert.Equal(0.537, Assert.Single(looked).X, 1e-12);
        Assert.Empty(none);

        static SlopedSample Bowl(double x) => new(x, 1 + ((x - 0.537) * (x - 0.537)), 2 * (x - 0.537));
        static SlopedSample Rising(double x) => new(x, Math.Exp(x), Math.Exp(x));
    }

    [Fact]
    public void A_dip_that_only_just_holds_is_followed_until_nothing_can_be_hidden()
    {
        var looked = new List<SlopedSample>();
        var search = RangeDips.Search(
            RangeExtremeSearchTests.Samples(Close, 0, 1, 10), Noted(Close, looked));

        Assert.Equal((0, true), (search.LeftOver, looked.Count is > 2 and < 60));
        Assert.DoesNotContain(looked, s => s.Y < 0);

        static SlopedSample Close(double x) => new(x, 1e-6 + ((x - 0.537) * (x - 0.537)), 2 * (x - 0.537));
    }

    [Fact]
    public void Without_slopes_every_dip_of_the_values_is_followed()
    {
        // Three dips; of the second, to −0.0005, the nearest samples are 0.0011 and 0.0020.
        var found = Below(x => new(
            x, Math.Min(Math.Min(Square(x - 0.15) + 0.01, Square(x - 0.54) - 5e-4), Square(x - 0.85) + 0.001),
            double.NaN));

        Assert.NotEmpty(found);
        Assert.All(found, s => Assert.InRange(s.X, 0.5, 0.6));
    }

    [Fact]
    public void What_cannot_be_searched_to_its_end_is_counted()
    {
        // Five dips by the slopes of samples close to zero, and no slope at all between them.
        var given = Enumerable.Range(0, 11)
            .Select(i => new SlopedSample(i, 1e-3, i % 2 == 0 ? -1 : 1)).ToImmutableArray();

        Assert.Equal(5, RangeDips.Search(given, x => new(x, 1, double.NaN)).LeftOver);
    }

    private static SlopedSample Resonance(double x, double at, double width, double height)
    {
        var u = (x - at) / width;
        return new(x, -height / (1 + (u * u)), 2 * height * u / width / Math.Pow(1 + (u * u), 2));
    }

    private static double Square(double x) => x * x;

    /// <summary>The looks that are below zero, while no sample is.</summary>
    private static List<SlopedSample> Below(Func<double, SlopedSample> function)
    {
        var given = RangeExtremeSearchTests.Samples(function, 0, 1, 10);
        Assert.DoesNotContain(given, s => s.Y < 0);
        var looked = new List<SlopedSample>();
        Assert.Equal(0, RangeDips.Search(given, Noted(function, looked)).LeftOver);
        return [.. looked.Where(s => s.Y < 0)];
    }

    private static Func<double, SlopedSample> Noted(
        Func<double, SlopedSample> function, List<SlopedSample> looked) => x =>
    {
        looked.Add(function(x));
        return looked[^1];
    };
}

/// <summary>Sums of functions.</summary>
file static class SlopedSums
{
    public static SlopedSample Plus(this SlopedSample one, SlopedSample other) =>
        new(one.X, one.Y + other.Y, one.Slope + other.Slope);

    public static SlopedSample Plus(this SlopedSample one, double constant) =>
        one with { Y = one.Y + constant };
}
