using CircuitTransient.Measurements;
using Microsoft.Playwright;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>The menu of how contributions are counted, against the engine's own breakdowns.</summary>
[Collection(nameof(Browser))]
public class BreakdownMenuTests(Browser browser)
{
    // Four digits are written, and samples stand for the curve; of the largest share.
    private const double PlottingAccuracy = 1e-3;

    [Fact]
    public async Task By_edge_each_step_has_its_curve_and_its_share_of_the_peak()
    {
        var engine = Steps(by: Breakdown.Edge).Observations[0];
        await using var opened = await browser.Open(SolvedPages.Page(Steps()));
        var rows = await Rows(opened, 0, "Causes by edge");

        Assert.Equal(5, engine.Contributions.Length);
        AssertRows(engine.Contributions.Select(c => (c.Cause, c.AtMax)), rows);
        Assert.Equal(
            "What made the highest value",
            (await opened.Text("#observation-0 .other caption"))[..27]);
        Assert.Empty(opened.Trouble);
    }

    [Fact]
    public async Task Since_an_event_the_shares_are_those_of_the_engine()
    {
        var engine = Steps().Observations[0].After!.AtMax!;
        await using var opened = await browser.Open(SolvedPages.Page(Steps()));
        var rows = await Rows(opened, 0, $"Causes since {engine.Event}");

        AssertRows(engine.Parts.Select(p => (p.Cause, p.Value)), rows);
    }

    [Theory]
    [InlineData(0.5, 1)]
    [InlineData(1.5, 0.4)]
    public async Task They_follow_the_scales_of_the_causes_they_come_from(double feed, double charge)
    {
        var engine = Steps(feed, charge).Observations[0].After!.AtMax!;
        await using var opened = await browser.Open(SolvedPages.Page(Steps()));
        await opened.Scale(0, feed);
        await opened.Scale(2, charge);
        var rows = await Rows(opened, 0, $"Causes since {engine.Event}");

        AssertRows(engine.Parts.Select(p => (p.Cause, p.Value)), rows);
    }

    [Fact]
    public async Task Pulses_of_a_long_train_are_whole_and_those_that_matter_least_are_joined()
    {
        await using var opened = await browser.Open(SolvedPages.Page(Train()));
        var rows = await Rows(opened, 0, "Causes by edge");
        var peak = Train().Observations[0].Max.Value!.Value;

        Assert.Contains(rows, r => r.Name.StartsWith("Drive pulse 5 from", StringComparison.Ordinal));
        Assert.Contains(rows, r => r.Name.EndsWith("others together", StringComparison.Ordinal));
        Assert.InRange(rows.Length, 10, 14);
        Assert.Equal(peak, rows.Sum(r => r.Then), PlottingAccuracy * Math.Abs(peak));
    }

    [Fact]
    public async Task It_goes_by_keyboard_and_back()
    {
        await using var opened = await browser.Open(SolvedPages.Page(Steps()));
        var section = await opened.Observation(0);
        var before = await section.InnerTextAsync();
        await section.Locator("select.counted").FocusAsync();
        await opened.Page.Keyboard.PressAsync("ArrowDown");
        Assert.Contains("by edge", await opened.Text("#observation-0 .other caption"));

        await opened.Page.Keyboard.PressAsync("ArrowUp");
        Assert.Equal(before, await section.InnerTextAsync());
    }

    [Fact]
    public async Task A_power_of_ten_causes_follows_them()
    {
        await using var opened = await browser.Open(SolvedPages.Page(TenSources()));
        await opened.Scale(3, 0);
        await opened.Scale(7, 1.7);
        var engine = TenSources(fourth: 0, eighth: 1.7);
        for (var i = 0; i < engine.Observations.Length; i++)
        {
            var section = await opened.Observation(i);
            await section.Locator(".extremes.explored").WaitForAsync();
            var highest = await section.Locator(".extremes strong").First.InnerTextAsync();
            var expected = engine.Observations[i].Max.Value!.Value;
            Assert.Equal(expected, ExploringTests.Number(highest), PlottingAccuracy * expected);
        }
    }

    [Fact]
    public async Task What_a_switch_saw_before_the_start_is_not_known()
    {
        await using var opened = await browser.Open(SolvedPages.Page(SolvedPages.Demo("intake-bay")));

        Assert.Contains("not known before the start", await opened.Text("#events"));
        Assert.DoesNotContain("undetermined", await opened.Text("#events"));
    }

    private static void AssertRows(
        IEnumerable<(string Name, double? Value)> expected, (string Name, double Then)[] rows)
    {
        var shares = expected.ToDictionary(e => e.Name, e => e.Value!.Value, StringComparer.Ordinal);
        var largest = shares.Values.Max(Math.Abs);
        Assert.NotEmpty(rows);
        Assert.All(rows, row => Assert.Equal(
            shares.GetValueOrDefault(row.Name), row.Then, PlottingAccuracy * largest));
        Assert.All(shares.Where(s => Math.Abs(s.Value) > PlottingAccuracy * largest), share =>
            Assert.Contains(share.Key, rows.Select(r => r.Name)));
    }

    private static async Task<(string Name, double Then)[]> Rows(OpenPage opened, int index, string choice)
    {
        var section = await opened.Observation(index);
        await section.Locator("select.counted")
            .SelectOptionAsync(new SelectOptionValue { Label = choice });
        var rows = await section.Locator(".other tbody tr").AllAsync();
        var read = new List<(string, double)>();
        foreach (var row in rows)
        {
            var then = await row.Locator("td").First.InnerTextAsync();
            read.Add((await row.Locator("th").InnerTextAsync(), ExploringTests.Number(then)));
        }

        return [.. read];
    }

    private static TransientResult Steps(
        double feed = 1, double charge = 1, Breakdown by = Breakdown.Origin) => SolvedPages.Solve($"""
        source    Feed at a : step of {100 * feed} V at 1 ms +
                              rectangular pulse of {40 * feed} V from 3 ms to 5 ms
        source    Aid at d : sine of 40 V at 200 Hz
        resistor  R1 from a to b : 3 Ω
        inductor  L1 from b to c : 10 mH
        capacitor C1 from c to ground : 100 µF, charged to {30 * charge} V
        resistor  R2 from d to c : 100 Ω
        switch    S1 from c to e : open, closes at 4 ms
        resistor  R3 from e to ground : 50 Ω
        observe voltage of c
        until 30 ms
        """, "steps.cause", AnalysisOptions.Default with { By = by });

    private static TransientResult Train() => SolvedPages.Solve("""
        source    Drive at a : pulse train of 12 V width 40 µs every 101 µs from 20 µs count 12
        resistor  R1 from a to l : 2 Ω
        inductor  L1 from l to b : 100 µH
        capacitor C1 from b to ground : 2.2 µF
        observe voltage of b
        until 2 ms
        """, "train.cause", AnalysisOptions.Default);

    private static TransientResult TenSources(double fourth = 1, double eighth = 1) => SolvedPages.Solve(
        string.Join('\n',
        [
            .. Enumerable.Range(1, 10).Select(k =>
                $"""
                source E{k} at s{k} : sine of {10 * (k == 4 ? fourth : k == 8 ? eighth : 1)} V at {50 * k} Hz
                resistor R{k} from s{k} to b : {100 + k} Ω
                """),
            "resistor Load from b to ground : 40 Ω",
            "capacitor C from b to ground : 10 µF",
            "observe power in Load",
            "observe energy in C",
            "observe energy in Load",
            "until 20 ms",
        ]), "ten.cause", AnalysisOptions.Default);
}
