using System.Collections.Immutable;
using CircuitTransient.Circuits;
using CircuitTransient.Numerics;
using CircuitTransient.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Tests.Circuits;
using CircuitTransient.Tests.Numerics;

namespace CircuitTransient.Tests.Studies.Scans;

public class AxisScanTests
{
    private static readonly Circuit Plant = Checking.Circuit(
        "source E at a : 1 V\nresistor R at a : 1 Ω\nrequire voltage of a at most 2 V\nuntil 1 ms");

    private static readonly StudyFigure Margin = new("margin", "V", StudyFigureKind.Margin, 0);

    [Fact]
    public void What_breaks_in_the_middle_holds_in_two_stretches()
    {
        // x² − 1/4 over −1 … 1
        var scan = Scan(x => new(x, (x * x) - 0.25, 2 * x));

        Assert.Equal([new(-1, -0.5), new(0.5, 1)], scan.Holding.Select(Rounded));
        Assert.Equal([true, false], scan.Breaks.Select(b => b.HoldsBelow));
        Assert.Equal((-0.25, RangeExtremeKind.Smooth), (scan.Worst!.Value, scan.Worst.How));
        Assert.Equal(-0.125, scan.Room!.Value, 1e-15); // of the 2 V that are allowed
        Assert.False(scan.HoldsThroughout);
    }

    [Fact]
    public void What_only_breaks_between_two_points_is_found()
    {
        // Between the points at 0.2 and 0.3 the margin dips to −0.001, at the points it is 0.0015.
        var scan = Scan(x => new(x, (x - 0.25) * (x - 0.25) - 0.001, 2 * (x - 0.25)));

        Assert.False(scan.HoldsThroughout);
        Assert.Equal(2, scan.Breaks.Length);
        Assert.Equal(0.25 - Math.Sqrt(0.001), scan.Breaks[0].At[0], 1e-12);
    }

    [Fact]
    public void A_margin_that_is_infinite_breaks_and_one_without_solution_says_nothing()
    {
        var infinite = Scan(x => new(x, x > 0.5 ? double.NegativeInfinity : 1, 0));
        var unsolved = Scan(x => new(x, x > 0.5 ? double.NaN : 1 + x, 1));

        Assert.False(infinite.HoldsThroughout);
        Assert.Equal(double.NegativeInfinity, infinite.Room);
        Assert.Equal([new(-1, 0.5)], infinite.Holding.Select(Rounded));
        Assert.True(unsolved.HoldsThroughout);
        Assert.Equal([new(-1, 0.5)], unsolved.Holding.Select(Rounded));
    }

    [Fact]
    public void Slopes_that_were_not_all_taken_are_taken_where_they_matter()
    {
        var looks = 0;
        var scan = Scan(
            x => new(x, 2 - Math.Pow(x - 0.123, 2), double.NaN),
            x =>
            {
                looks++;
                return new(x, 2 - Math.Pow(x - 0.123, 2), -2 * (x - 0.123));
            });

        Assert.Equal((2, RangeExtremeKind.Smooth), (scan.Greatest!.Value, scan.Greatest.How));
        Assert.Equal(0.123, scan.Greatest.At[0], 1e-12);
        Assert.InRange(looks, 1, 40);
    }

    [Fact]
    public void What_is_left_of_nothing_by_rounding_does_not_change()
    {
        var scan = Scan(x => new(x, 1e-15 * Math.Sin(1e3 * x), 1e-12));

        Assert.Equal((0, RangeExtremeKind.Flat), (scan.Greatest!.Value, scan.Greatest.How));
        Assert.Empty(scan.Jumps);
    }

    private static ScanStretch Rounded(ScanStretch stretch) =>
        new(Math.Round(stretch.From, 9), Math.Round(stretch.To, 9));

    private static FigureScan Scan(
        Func<double, SlopedSample> given, Func<double, SlopedSample>? function = null)
    {
        var samples = RangeExtremeSearchTests.Samples(given, -1, 1, 20)
            .Select(s => s with { X = Math.Round(s.X, 12) }).ToImmutableArray();
        return new AxisScan(Plant, Margin, function ?? given, 1).Run(samples, _ => null);
    }
}
