using System.Collections.Immutable;
using CircuitTransient.Reports;
using CsCheck;

namespace CircuitTransient.Tests.Reports;

public class PlotTraceTests
{
    [Fact]
    public void Thinning_keeps_the_extremes_of_every_column() =>
        Gen.Double[-5, 5]
            .Array[2, 400]
            .OnEach(
                values =>
                {
                    ImmutableArray<PlotPoint> points =
                    [
                        .. values.Select((y, i) => new PlotPoint(i / 40.0, y)),
                    ];
                    var thinned = PlotTrace.Thinned(points, 2);
                    foreach (var column in points.GroupBy(point => Math.Floor(2 * point.X)))
                    {
                        var kept = thinned.Where(point => Math.Floor(2 * point.X) == column.Key).ToArray();
                        Assert.InRange(kept.Length, 1, 4);
                        Assert.Equal(column.Min(point => point.Y), kept.Min(point => point.Y));
                        Assert.Equal(column.Max(point => point.Y), kept.Max(point => point.Y));
                        Assert.Equal(column.First(), kept[0]);
                        Assert.Equal(column.Last(), kept[^1]);
                    }
                },
                seed: "0000KOIPe036",
                iter: 200);

    [Fact]
    public void A_window_cuts_lines_at_its_ends()
    {
        var points = PlotTrace.Within([0, 1, 2, 3], [0, 10, 20, 30], 0.5, 2.5);
        Assert.Equal([new(0.5, 5), new(1, 10), new(2, 20), new(2.5, 25)], points);
    }

    [Fact]
    public void A_jump_keeps_both_its_sides()
    {
        var points = PlotTrace.Within([0, 1, 1, 2], [0, 0, 5, 5], 0, 2);
        Assert.Equal([new(0, 0), new(1, 0), new(1, 5), new(2, 5)], points);
    }

    [Fact]
    public void What_lies_past_the_panel_is_cut_where_it_crosses()
    {
        var (time, level) = (new PlotScale(0, 4, 0, 400), new PlotScale(0, 1, 100, 0));
        var lines = PlotTrace
            .Lines([new(0, 0.5), new(1, 2.5), new(2, 0.5), new(4, 0.5)], time, level)
            .ToArray();
        Assert.Equal(2, lines.Length);
        Assert.Equal([new(0, 50), new(25, 0)], lines[0]);
        Assert.Equal([new(175, 0), new(200, 50), new(400, 50)], lines[1]);
    }

    [Theory]
    [InlineData(0, 14, "s", "0 2 4 6 8 10 12 14", "s")]
    [InlineData(-0.0015, 0.0061, "A", "-1 0 1 2 3 4 5 6", "mA")]
    [InlineData(0, 71900, "A²s", "0 10 20 30 40 50 60 70", "10³ A²s")]
    [InlineData(0, 1, "V", "0.0 0.2 0.4 0.6 0.8 1.0", "V")]
    [InlineData(930, 936, "V", "930 931 932 933 934 935 936", "V")]
    [InlineData(0, 369e6, "V/s", "0 50 100 150 200 250 300 350", "V/µs")]
    [InlineData(0, 3.5e9, "A/s", "0.0 0.5 1.0 1.5 2.0 2.5 3.0 3.5", "kA/µs")]
    [InlineData(0, 120, "%", "0 20 40 60 80 100 120", "%")]
    public void Marks_are_round_and_in_a_fitting_unit(
        double from,
        double to,
        string unit,
        string labels,
        string written)
    {
        var ticks = new PlotScale(from, to, 0, 100).Ticks(unit, 8);
        Assert.Equal(labels, string.Join(' ', ticks.Marks.Select(mark => mark.Label)));
        Assert.Equal(written, ticks.Unit);
    }

    [Fact]
    public void Names_keep_their_order_and_their_gap() =>
        Gen.Double[0, 100]
            .Array[1, 6]
            .OnEach(
                wishes =>
                {
                    Array.Sort(wishes);
                    var places = PlotPanel.Apart(wishes, 15, 0, 100);
                    Assert.All(places, place => Assert.InRange(place, -1e-9, 100));
                    Assert.All(places.Zip(places.Skip(1)), pair =>
                        Assert.True(pair.Second - pair.First >= 15 - 1e-9));
                },
                seed: "0000KOIPe036",
                iter: 200);
}
