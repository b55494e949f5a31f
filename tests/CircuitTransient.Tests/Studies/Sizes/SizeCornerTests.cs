using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies;

namespace CircuitTransient.Tests.Studies.Sizes;

/// <summary>Sizings at corners of many tolerances, of a divider: with every value above the tap at its lowest
/// and every one below it at its highest, the voltage at the tap is greatest. No single value away from all
/// others comes near that corner.</summary>
public sealed class SizeCornerTests
{
    // 10 V·1.1·(5 kΩ + R)/(0.9·n kΩ + 1.1·(5 kΩ + R)) at most 6 V.
    private static double Most(int above) => (0.6 * 0.9 * above * 1e3 / (0.4 * 1.1)) - 5e3;

    private static string Divider(int above) => string.Join('\n',
    [
        "source Feed at a0 : 10 V",
        .. Enumerable.Range(0, above).Select(i =>
            $"resistor A{i} from a{i} to {(i == above - 1 ? "b0" : $"a{i + 1}")} : 1 kΩ ±10 %"),
        .. Enumerable.Range(0, 5).Select(i => $"resistor B{i} from b{i} to b{i + 1} : 1 kΩ ±10 %"),
        "resistor R from b5 to ground : 1 kΩ ±10 %",
        "require voltage of b0 at most 6 V",
        "until 1 ms",
    ]);

    [Fact]
    public void Twelve_tolerances_are_looked_at_in_every_corner()
    {
        var result = Sizing.Run(Divider(6), Sizing.Ask(
            ["R from 100 Ω to 10 kΩ"], greatest: "R", series: PreferredSeries.E12, withSpread: true));

        Assert.Equal((4096, true, true), (
            result.Account.Count, result.Account.IsComplete, result.Account.ConfirmsEnds));
        Assert.Equal(Most(6), result.Exact!.Values[0], 1e-6);
        Assert.Equal(2200, result.Chosen!.Values[0], 1e-9);
        Assert.True(result.IsFound);
        Assert.All(result.Preferred, point => Assert.Equal(point.Values[0] <= Most(6), point.Holds));
        Assert.Contains("everything holds, at all 4096 corners", SizeSummary.Write(result, []));
    }

    [Fact]
    public void More_are_searched_and_the_headline_says_that_nothing_is_proven()
    {
        var result = Sizing.Run(Divider(7), Sizing.Ask(
            ["R from 100 Ω to 10 kΩ"], greatest: "R", series: PreferredSeries.E12, withSpread: true));

        Assert.False(result.Account.IsComplete);
        Assert.Equal(Most(7), result.Exact!.Values[0], 1e-6);
        Assert.Equal(3300, result.Chosen!.Values[0], 1e-9);
        var summary = SizeSummary.Write(result, []);
        Assert.Contains("R 3.3 kΩ: everything holds where it was searched, not proven", summary);
        Assert.Contains("Every value of R that holds (searched, not proven)", summary);
    }

    [Fact]
    public void The_curve_that_decides_is_drawn_however_many_there_are()
    {
        var loose = string.Join(
            '\n', Enumerable.Range(21, 8).Select(v => $"require voltage of a0 at most {v} V"));
        var result = Sizing.Run(
            Divider(6).Replace("require", $"{loose}\nrequire", StringComparison.Ordinal),
            Sizing.Ask(["R from 100 Ω to 10 kΩ"], greatest: "R"));

        Assert.Contains("voltage of b0 at most 6 V", SizePlot.Svg(result));
    }
}
