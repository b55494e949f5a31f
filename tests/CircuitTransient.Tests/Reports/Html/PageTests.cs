using CircuitTransient.Text;
using Deque.AxeCore.Playwright;
using Microsoft.Playwright;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>The page in a real browser: quiet, accessible, by keyboard, on paper.</summary>
[Collection(nameof(Browser))]
public class PageTests(Browser browser)
{
    public static TheoryData<string> Demos => [.. SolvedPages.Demos];

    [Theory]
    [MemberData(nameof(Demos))]
    public async Task A_demo_opens_from_disk_without_a_network_or_a_complaint(string demo)
    {
        await using var opened = await browser.Open(SolvedPages.Page(SolvedPages.Demo(demo)));
        await opened.Observation(0);

        Assert.Empty(opened.Trouble);
        Assert.StartsWith("file:", Assert.Single(opened.Requests));
    }

    [Theory]
    [InlineData("bullwheel-bus", ColorScheme.Light, 1280)]
    [InlineData("bullwheel-bus", ColorScheme.Dark, 1280)]
    [InlineData("intake-bay", ColorScheme.Light, 390)]
    [InlineData("load-pin", ColorScheme.Light, 1280)] // nanoseconds
    public async Task An_accessibility_engine_finds_no_violation(string demo, ColorScheme scheme, int width)
    {
        var html = SolvedPages.Page(SolvedPages.Demo(demo));
        await using var opened = await browser.Open(html, scheme, width, forAxe: true);
        await opened.Scale(0, 1.5);
        await opened.Observation(0);
        var found = await opened.Page.RunAxe();

        Assert.NotEmpty(found.Passes);
        Assert.Empty(found.Violations.Select(v => $"{v.Id}: {v.Nodes[0].Html}"));
    }

    [Fact]
    public async Task Dragging_zooms_every_panel_and_a_double_click_returns()
    {
        await using var opened = await browser.Open(SolvedPages.Page(SolvedPages.AsItStands));
        var first = (await opened.Observation(0)).Locator(".panel").First;
        await opened.Observation(1);
        var second = opened.Page.Locator("#observation-1 .panel").First;
        await first.ScrollIntoViewIfNeededAsync();
        var box = (await first.BoundingBoxAsync())!;

        await opened.Page.Mouse.MoveAsync(box.X + 300, box.Y + 100);
        await opened.Page.Mouse.DownAsync();
        await opened.Page.Mouse.MoveAsync(box.X + 400, box.Y + 120, new() { Steps = 4 });
        await opened.Page.Mouse.MoveAsync(box.X + 500, box.Y + 120, new() { Steps = 4 });
        await opened.Page.Mouse.UpAsync();
        var (from, to) = await Window(first);
        await opened.Observation(1);
        var linked = await Window(second);
        await first.ScrollIntoViewIfNeededAsync();
        await first.DblClickAsync();

        Assert.InRange(from, 1e-3, 0.02);
        Assert.InRange(to - from, 1e-3, 0.012);
        Assert.Equal((from, to), linked);
        Assert.Equal((0, 0.03), await Window(first));
    }

    [Fact]
    public async Task Every_step_goes_by_keyboard()
    {
        await using var opened = await browser.Open(SolvedPages.Page(SolvedPages.AsItStands));
        await opened.Observation(0);
        var panel = opened.Page.Locator("#observation-0 .panel").First;
        await opened.Page.Locator("#observation-0 .tools select:last-child").FocusAsync();
        await opened.Page.Keyboard.PressAsync("Tab");
        Assert.Equal("slider", await opened.Page.Locator(":focus").GetAttributeAsync("role"));

        var peak = await Now(panel);
        await opened.Page.Keyboard.PressAsync("ArrowRight");
        var later = await Now(panel);
        await opened.Page.Keyboard.PressAsync("p");
        var again = await Now(panel);
        await opened.Page.Keyboard.PressAsync("+");
        var near = await Window(panel);
        await opened.Page.Keyboard.PressAsync("e");
        var atEvent = await Now(panel);
        await opened.Page.Keyboard.PressAsync("0");

        Assert.True(later > peak);
        Assert.Equal(peak, again);
        Assert.InRange(near.To - near.From, 0.0149, 0.0151);
        Assert.Equal(0.012, atEvent, 1e-12);
        Assert.Equal((0, 0.03), await Window(panel));
        Assert.Contains("total", await opened.Text("#observation-0 .readout"));

        await opened.Page.Locator("#cause-0").FocusAsync();
        await opened.Page.Keyboard.PressAsync("Space");
        Assert.Contains("Feed off", await opened.Text("#explored"));
    }

    [Fact]
    public async Task Reading_a_waveform_tells_time_total_and_each_cause()
    {
        var result = SolvedPages.AsItStands;
        await using var opened = await browser.Open(SolvedPages.Page(result));
        await opened.Observation(0);
        await opened.Page.Locator("#observation-0 button", new() { HasTextString = "Highest" }).ClickAsync();
        var read = await opened.Text("#observation-0 .readout");

        var peak = EngineeringNumber.Format(result.Observations[0].Max.Value!.Value, "V");
        Assert.Contains($"total {peak}", read);
        Assert.All(result.Causes, cause => Assert.Contains(cause.Name, read));
    }

    [Fact]
    public async Task Logarithmic_time_and_time_since_an_event_are_offered()
    {
        await using var opened = await browser.Open(SolvedPages.Page(SolvedPages.AsItStands));
        await opened.Observation(0);
        var panel = opened.Page.Locator("#observation-0 .panel").First;

        var origin = opened.Page.Locator(".controls select").First;
        await origin.SelectOptionAsync(new SelectOptionValue { Index = 1 });
        var since = await panel.TextContentAsync();
        await opened.Page.Locator("#logarithmic").CheckAsync();
        var logarithmic = await panel.TextContentAsync();

        Assert.Contains("after S1 closes", since);
        Assert.Equal(0.012, (await Window(panel)).From, 1e-4);
        Assert.Contains("1 ms", logarithmic);
        Assert.Contains("100 µs", logarithmic);
        Assert.Empty(opened.Trouble);
    }

    [Fact]
    public async Task Printed_each_observation_begins_a_page_and_the_controls_are_gone()
    {
        var result = SolvedPages.Demo("bullwheel-bus");
        await using var opened = await browser.Open(SolvedPages.Page(result));
        await opened.Page.EmulateMediaAsync(new() { Media = Media.Print });
        Assert.False(await opened.Page.Locator("#explorer").IsVisibleAsync());
        var third = opened.Page.Locator("#observation-2");
        Assert.Equal("page", await third.EvaluateAsync<string>("e => getComputedStyle(e).breakBefore"));

        await opened.Page.EmulateMediaAsync(new() { Media = Media.Null });
        var pdf = await opened.Page.PdfAsync(new() { Format = "A4", PreferCSSPageSize = true });
        var pages = System.Text.Encoding.Latin1.GetString(pdf).Split("/Type /Page\n").Length - 1;
        Assert.InRange(pages, result.Observations.Length + 2, 20);
    }

    [Fact]
    public async Task A_narrow_screen_needs_no_sideways_scrolling()
    {
        var html = SolvedPages.Page(SolvedPages.Demo("bank-gallery"));
        await using var opened = await browser.Open(html, width: 390);
        await opened.Observation(0);

        Assert.Equal(390, await opened.Page.EvaluateAsync<int>("document.documentElement.scrollWidth"));
    }

    [Fact]
    public async Task Names_and_notes_stay_text()
    {
        var name = "<script>alert(1)</script> \"quoted\" 'single' </title></style> זרם 🚡 "
            + new string('w', 10_000);
        const string charge = "<img src=x onerror=alert(2)>";
        var awkward = SampleResults.Inrush(name, $"{name}2", name, charge, name, name);
        awkward = awkward with { Circuit = awkward.Circuit with { Notes = [name] } };
        await using var opened = await browser.Open(SolvedPages.Page(awkward), width: 390);
        await opened.Observation(0);
        await opened.Scale(0, 0.5);

        Assert.Empty(opened.Trouble);
        Assert.Equal(2, await opened.Page.Locator("script").CountAsync());
        Assert.Equal(0, await opened.Page.Locator("img").CountAsync());
        Assert.Equal(name, await opened.Page.Locator("h1").TextContentAsync());
        Assert.Equal(name, await opened.Page.Locator("#observation-0 h3").TextContentAsync());
        Assert.Equal(390, await opened.Page.EvaluateAsync<int>("document.documentElement.scrollWidth"));
    }

    private static async Task<(double From, double To)> Window(ILocator panel) => (
        double.Parse((await panel.GetAttributeAsync("aria-valuemin"))!),
        double.Parse((await panel.GetAttributeAsync("aria-valuemax"))!));

    private static async Task<double> Now(ILocator panel) =>
        double.Parse((await panel.GetAttributeAsync("aria-valuenow"))!);
}
