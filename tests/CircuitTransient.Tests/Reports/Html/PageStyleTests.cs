using System.Text.RegularExpressions;
using CircuitTransient.Reports.Html;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>The page's colours, light and dark, for every kind of sight.</summary>
public partial class PageStyleTests
{
    private static readonly string[] Causes = [.. Enumerable.Range(0, 6).Select(i => $"cause-{i}")];

    public static TheoryData<int> Themes => [0, 1, 2]; // light, dark, print

    [Theory]
    [MemberData(nameof(Themes))]
    public void Lines_differ_for_every_kind_of_sight(int theme)
    {
        var colours = Colours(theme);

        // Found by search; a difference of 10 is plain to see between lines (common practice, no source).
        string[] lines = [colours["ink"], .. Causes.Select(c => colours[c])];
        Assert.InRange(ColourSight.LeastDistance(lines), 20, 200);
    }

    [Theory]
    [MemberData(nameof(Themes))]
    public void Texts_and_lines_stand_out(int theme)
    {
        var colours = Colours(theme);
        string[] texts = ["ink", "grey", "limit", "accent"];
        string[] grounds = ["page", "paper", "wash"];

        // WCAG 2.2, 1.4.3 and 1.4.11, from memory: 4.5 for text, 3 for lines that carry meaning.
        Assert.All(texts.SelectMany(t => grounds.Select(g => ColourSight.Contrast(colours[t], colours[g]))),
            contrast => Assert.InRange(contrast, 4.5, 21));
        Assert.All(Causes.Select(c => ColourSight.Contrast(colours[c], colours["paper"])),
            contrast => Assert.InRange(contrast, 3, 21));
    }

    [Fact]
    public void The_page_asks_for_nothing_from_elsewhere()
    {
        var html = SolvedPages.Page(SampleResults.Inrush());

        Assert.DoesNotMatch(@"(src|href)=""[^#""]", html);
        Assert.DoesNotContain("@import", html);
        Assert.DoesNotContain("url(h", html);
        Assert.Contains("default-src 'none'", html);
    }

    [Fact]
    public void The_same_result_makes_the_same_page() =>
        Assert.Equal(SolvedPages.Page(SampleResults.Inrush()), SolvedPages.Page(SampleResults.Inrush()));

    private static Dictionary<string, string> Colours(int theme)
    {
        using var stream = typeof(HtmlReport).Assembly.GetManifestResourceStream("report.css")!;
        using var reader = new StreamReader(stream);
        var block = Root().Matches(reader.ReadToEnd())[theme].Value;
        return Variable().Matches(block)
            .ToDictionary(m => m.Groups["name"].Value, m => m.Groups["colour"].Value);
    }

    [GeneratedRegex(@":root \{[^}]*\}", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Root();

    [GeneratedRegex(@"--(?<name>[\w-]+): (?<colour>#[0-9a-f]{6})", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Variable();
}
