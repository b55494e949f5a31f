using Microsoft.Playwright;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>A real Chromium for the tests of the page; where there is none, they are skipped.</summary>
public sealed class Browser : IAsyncLifetime
{
    // The variable names another place, or none.
    private static readonly string[] Places =
        Environment.GetEnvironmentVariable("CHROMIUM") is { Length: > 0 } named
            ? [named]
            : ["/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome"];

    private static readonly string[] Flags =
    [
        "--no-sandbox", "--disable-gpu", "--no-first-run", "--disable-background-networking",
        "--disable-component-update", "--disable-sync",
    ];

    private readonly string folder = Directory.CreateTempSubdirectory("report-page-").FullName;
    private IPlaywright? driver;
    private IBrowser? chromium;

    /// <inheritdoc/>
    public async ValueTask InitializeAsync()
    {
        if (Places.FirstOrDefault(File.Exists) is { } path)
        {
            driver = await Playwright.CreateAsync();
            chromium = await driver.Chromium.LaunchAsync(new() { ExecutablePath = path, Args = Flags });
        }
    }

    /// <inheritdoc/>
    public async ValueTask DisposeAsync()
    {
        await (chromium?.CloseAsync() ?? Task.CompletedTask);
        driver?.Dispose();
        Directory.Delete(folder, recursive: true);
    }

    /// <summary>A page from disk with the network off.</summary>
    public async Task<OpenPage> Open(
        string html, ColorScheme scheme = ColorScheme.Light, int width = 1280, bool forAxe = false)
    {
        Assert.SkipWhen(chromium is null, "no Chromium on this machine, so the page cannot be driven");
        var path = Path.Combine(folder, $"{Guid.NewGuid():N}.html");
        await File.WriteAllTextAsync(path, html, TestContext.Current.CancellationToken);
        var context = await chromium.NewContextAsync(new()
        {
            Offline = true,
            ColorScheme = scheme,
            ViewportSize = new() { Width = width, Height = 900 },
            BypassCSP = forAxe, // the engine is put into the page, which allows no script but its own
        });
        var page = await context.NewPageAsync();
        var opened = new OpenPage(page);
        await page.GotoAsync(new Uri(path).AbsoluteUri);
        return opened;
    }
}

/// <summary>All tests that drive the browser, one after another.</summary>
[CollectionDefinition(nameof(Browser))]
public sealed class BrowserTests : ICollectionFixture<Browser>;

/// <summary>A page with everything it complained of and asked the network for.</summary>
public sealed class OpenPage : IAsyncDisposable
{
    /// <summary>Listens to a page.</summary>
    public OpenPage(IPage page)
    {
        Page = page;
        page.Console += (_, message) => Trouble.Add($"{message.Type}: {message.Text}");
        page.PageError += (_, error) => Trouble.Add(error);
        page.Dialog += (_, dialog) => Trouble.Add($"dialog: {dialog.Message}");
        page.Request += (_, request) => Requests.Add(request.Url);
    }

    /// <summary>The page.</summary>
    public IPage Page { get; }

    /// <summary>Console messages, errors and dialogs.</summary>
    public List<string> Trouble { get; } = [];

    /// <summary>What was asked for.</summary>
    public List<string> Requests { get; } = [];

    /// <inheritdoc/>
    public async ValueTask DisposeAsync() => await Page.Context.CloseAsync();

    /// <summary>Scales a cause as the reader does.</summary>
    public async Task Scale(int cause, double scale)
    {
        await Page.EvaluateAsync("document.querySelector('#explorer details').open = true");
        await Page.Locator(".cause input[type=range]").Nth(cause).FillAsync(scale.ToString("0.##"));
    }

    /// <summary>Text of the first element, its white space made single.</summary>
    public async Task<string> Text(string selector) =>
        string.Join(' ', (await Page.Locator(selector).First.InnerTextAsync())
            .Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries));

    /// <summary>Brings an observation into view and waits until it is drawn.</summary>
    public async Task<ILocator> Observation(int index)
    {
        var section = Page.Locator($"#observation-{index}");
        await section.ScrollIntoViewIfNeededAsync();
        await section.Locator(".panel .total").First
            .WaitForAsync(new() { State = WaitForSelectorState.Attached });
        return section;
    }
}
