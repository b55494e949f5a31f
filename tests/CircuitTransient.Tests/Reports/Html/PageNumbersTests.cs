using CircuitTransient.Reports.Html;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports.Html;

/// <summary>The page writes numbers as the tool does.</summary>
[Collection(nameof(Browser))]
public class PageNumbersTests(Browser browser)
{
    private static readonly string[] Units = ["V", "A", "s", "W", "J", "A²s", "V/s", "A/s", "%", "Hz", ""];

    [Fact]
    public async Task Numbers_are_written_alike()
    {
        var values = Enumerable.Range(-19, 40).SelectMany(e => new[] { 1.0, -1.23456, 9.9996, 4.5675 }
            .Select(m => m * Math.Pow(10, e))).Append(0).ToArray();
        await using var opened = await browser.Open("<!DOCTYPE html><title>x</title>");
        using var stream = typeof(HtmlReport).Assembly.GetManifestResourceStream("report-numbers.js")!;
        using var reader = new StreamReader(stream);
        var script = await reader.ReadToEndAsync(TestContext.Current.CancellationToken);
        var written = await opened.Page.EvaluateAsync<string[]>(
            $"([values, units]) => {{ {script}\n"
                + "return units.flatMap((u) => values.map((v) => engineering(v, u))); }",
            new object[] { values, Units });

        Assert.Equal(Units.SelectMany(u => values.Select(v => EngineeringNumber.Format(v, u))), written);
    }
}
