using System.Collections.Immutable;
using CircuitTransient.Reports;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;

namespace CircuitTransient.Tests.Reports.Studies;

public class MapLinesTests
{
    private static readonly ImmutableArray<ScanAxis> Axes = [Axis("A"), Axis("B")];

    [Fact]
    public void A_plane_is_cut_by_a_level_in_a_straight_line()
    {
        var values = new double[4, 3];
        for (var i = 0; i < 4; i++)
        {
            for (var j = 0; j < 3; j++)
            {
                values[i, j] = (2 * i) + j;
            }
        }

        var pieces = MapLines.Equal(values, null, 3.5, 1).ToArray();

        Assert.NotEmpty(pieces);
        Assert.All(
            pieces.SelectMany(p => new[] { p.A, p.B }),
            at => Assert.Equal(3.5, (2 * at.X) + at.Y, 1e-12));
    }

    [Fact]
    public void A_field_with_a_gap_has_no_line() =>
        Assert.Empty(MapLines.Equal(new[,] { { 0, 1.0 }, { 1, double.NaN } }, null, 0.5, 1));

    [Fact]
    public void A_field_whose_middle_tells_of_a_jump_has_no_line()
    {
        double[,] values = { { 0, 10 }, { 0, 10 } };

        Assert.NotEmpty(MapLines.Equal(values, new[,] { { 5.4 } }, 2, 1));
        Assert.Empty(MapLines.Equal(values, new[,] { { 9.9 } }, 2, 1));
    }

    [Fact]
    public void The_line_of_breaking_joins_the_places_found_wherever_they_lie_between_the_points()
    {
        // Points 0, 10, 20 of both values; found at B = 9.9 for A = 0 and 9.8 for A = 10.
        ImmutableArray<ScanBreak> found = [Found(0, 9.9, before: 0), Found(10, 9.8, before: 3)];

        var (a, b) = Assert.Single(MapLines.Breaking(Axes, found));

        Assert.Equal(
            [new PlotPoint(0, 0.99), new PlotPoint(1, 0.98)],
            new[] { a, b }.OrderBy(p => p.X).Select(p => new PlotPoint(p.X, Math.Round(p.Y, 12))));
    }

    [Fact]
    public void A_place_found_alone_in_its_field_is_joined_to_nothing() =>
        Assert.Empty(MapLines.Breaking(Axes, [Found(0, 9.9, before: 0)]));

    private static ScanBreak Found(double a, double b, int before) =>
        new([a, b], 1, true, false, true) { Before = before };

    private static ScanAxis Axis(string name) => new(
        new VariedValue(name, "Ω", 10, null, VariedKind.Parameter), "", ScanSpacing.Even, [0, 10, 20]);
}
