using System.Collections.Immutable;
using CircuitTransient.Studies;
using CsCheck;

namespace CircuitTransient.Tests.Studies;

/// <summary>The E series against IEC 60063 as makers quote it (grade V2: seen quoted, not in the standard);
/// the one exception of E192 is from memory (M).</summary>
public sealed class PreferredValuesTests
{
    // IEC 60063, E24, V2.
    private static readonly ImmutableArray<int> PublishedE24 =
    [
        10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91,
    ];

    [Fact]
    public void The_two_digit_series_are_the_published_ones()
    {
        Assert.Equal([10, 22, 47], PreferredValues.Decade(PreferredSeries.E3));
        Assert.Equal([10, 15, 22, 33, 47, 68], PreferredValues.Decade(PreferredSeries.E6));
        Assert.Equal(
            [10, 12, 15, 18, 22, 27, 33, 39, 47, 56, 68, 82], PreferredValues.Decade(PreferredSeries.E12));
        Assert.Equal<int>(PublishedE24, PreferredValues.Decade(PreferredSeries.E24));
    }

    [Fact]
    public void Eight_values_of_E24_are_not_what_rounding_would_give()
    {
        var rounded = Enumerable.Range(0, 24)
            .Select(i => (int)Math.Round(Math.Pow(10, 1 + (i / 24.0)))).ToArray();
        var values = PreferredValues.Decade(PreferredSeries.E24);
        var differing = Enumerable.Range(0, 24).Where(i => values[i] != rounded[i]).ToArray();

        Assert.Equal([27, 30, 33, 36, 39, 43, 47, 82], differing.Select(i => values[i]));
        Assert.Equal([26, 29, 32, 35, 38, 42, 46, 83], differing.Select(i => rounded[i]));
    }

    [Fact]
    public void E96_follows_its_formula_throughout_and_E192_fails_it_once()
    {
        Assert.Empty(Exceptions(PreferredSeries.E48));
        Assert.Empty(Exceptions(PreferredSeries.E96));
        Assert.Equal([(920, 919)], Exceptions(PreferredSeries.E192));
    }

    [Fact]
    public void Each_series_to_three_digits_holds_the_coarser_one()
    {
        var e192 = PreferredValues.Decade(PreferredSeries.E192);
        var e96 = PreferredValues.Decade(PreferredSeries.E96);
        Assert.Equal(192, e192.Distinct().Count());
        Assert.Subset(e192.ToHashSet(), e96.ToHashSet());
        Assert.Subset(e96.ToHashSet(), PreferredValues.Decade(PreferredSeries.E48).ToHashSet());
    }

    [Fact]
    public void Values_in_a_range_are_the_doubles_a_user_would_write()
    {
        Assert.Equal(
            [6.8e-6, 8.2e-6, 10e-6, 12e-6, 15e-6, 18e-6, 22e-6],
            PreferredValues.Between(PreferredSeries.E12, 6.8e-6, 22e-6));
        Assert.Empty(PreferredValues.Between(PreferredSeries.E3, 2.3, 4.6));
    }

    [Theory]
    [InlineData(470, 470, 470, 470)]
    [InlineData(471, 470, 560, 470)]
    [InlineData(513.1, 470, 560, 560)] // the middle in ratio is √(470·560) = 513.03
    [InlineData(513, 470, 560, 470)]
    [InlineData(0.95, 0.82, 1, 1)]
    [InlineData(1, 1, 1, 1)]
    public void Neighbours_and_the_nearest_in_ratio(double value, double below, double above, double nearest)
    {
        Assert.Equal(below, PreferredValues.AtMost(PreferredSeries.E12, value));
        Assert.Equal(above, PreferredValues.AtLeast(PreferredSeries.E12, value));
        Assert.Equal(nearest, PreferredValues.Nearest(PreferredSeries.E12, value));
    }

    [Fact]
    public void A_value_of_a_series_is_its_own_neighbour_in_every_decade() =>
        Gen.Select(Gen.Enum<PreferredSeries>(), Gen.Int[-15, 12], Gen.Double[1, 9.99])
            .OnEach((series, decade, mantissa) =>
            {
                var value = mantissa * Math.Pow(10, decade);
                var below = PreferredValues.AtMost(series, value);
                var above = PreferredValues.AtLeast(series, value);
                Assert.InRange(value, below, above);
                Assert.Equal(below, PreferredValues.Nearest(series, below));
                Assert.Equal(above, PreferredValues.AtLeast(series, above));
                Assert.Equal(
                    below == above ? [below] : [below, above], PreferredValues.Between(series, below, above));
            }, seed: "0000000000000", iter: 200);

    [Fact]
    public void Names_are_read_in_either_case_and_others_are_not()
    {
        Assert.True(PreferredValues.TryRead("e12", out var series));
        Assert.Equal(PreferredSeries.E12, series);
        Assert.False(PreferredValues.TryRead("E13", out _));
        Assert.False(PreferredValues.TryRead("12", out _));
        Assert.Equal("E3 E6 E12 E24 E48 E96 E192", string.Join(' ', PreferredValues.Names));
    }

    private static IEnumerable<(int Value, int Formula)> Exceptions(PreferredSeries series) =>
        PreferredValues.Decade(series)
            .Select((value, i) => (value, (int)Math.Round(100 * Math.Pow(10, i / (double)(int)series))))
            .Where(pair => pair.Item1 != pair.Item2);
}
