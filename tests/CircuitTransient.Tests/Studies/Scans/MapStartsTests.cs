using System.Collections.Immutable;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Tests.Studies.Scans;

public class MapStartsTests
{
    // Margins at 3 × 3 points with the middles of their four fields.
    private static readonly double[] Values = [1, 9, 9, 9, 9, 9, 9, 9, 2];

    [Fact]
    public void What_is_not_judged_starts_from_its_best_place_alone() =>
        Assert.Equal([1], Starts([9, 9, 9, 9], margin: null));

    [Fact]
    public void What_stands_out_by_more_than_its_margin_is_a_start_of_its_own() =>
        Assert.Equal([1, 2, 4], Starts([9, 4, 9, 9], v => v));

    [Fact]
    public void What_stands_out_by_less_than_its_margin_is_none() =>
        Assert.Equal([1, 2], Starts([9, 6, 9, 9], v => v));

    [Fact]
    public void The_middle_of_a_field_may_be_the_lowest_of_all() =>
        Assert.Equal(0.5, Starts([9, 9, 0.5, 9], margin: null).Single());

    private static IEnumerable<double> Starts(double[] between, Func<double, double>? margin) =>
        new MapStarts(Points(9), Values, Points(4), between, 3).Of(-1, margin).Select(s => s.Value);

    private static ImmutableArray<ScanPoint> Points(int count) =>
        [.. Enumerable.Range(0, count).Select(i => new ScanPoint([i], new StudyPoint([], []), [], null))];
}
