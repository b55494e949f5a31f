using System.Text;
using System.Text.RegularExpressions;
using CircuitTransient.Measurements;
using CircuitTransient.Reports.Pdf;
using CircuitTransient.Tests.Reports.Html;

namespace CircuitTransient.Tests.Reports.Pdf;

/// <summary>The report on paper.</summary>
public partial class PdfReportTests
{
    private static readonly byte[] Document = Write(SolvedPages.AsItStands);

    private static readonly string Text = Encoding.Latin1.GetString(Document);

    [Fact]
    public void The_same_result_makes_the_same_bytes_with_its_title() =>
        Assert.Multiple(
            () => Assert.Equal(Document, Write(SolvedPages.AsItStands)),
            () => Assert.StartsWith("%PDF-", Text),
            () => Assert.Contains("/Title (Two feeds and a charge)", Text),
            () => Assert.DoesNotContain("/CreationDate", Text));

    [Fact]
    public void Its_font_is_embedded() => Assert.Contains("/FontFile2", Text);

    [Fact]
    public void Each_chapter_and_observation_stands_in_the_outline()
    {
        string[] chapters =
            ["Verdict", "Events", "What every part bears", "Poles", "Self-checks", "The circuit file"];
        Assert.Equal(
            ["Two feeds and a charge", .. chapters[..2],
                .. SolvedPages.AsItStands.Observations.Select(o => o.Name), .. chapters[2..]],
            TitlesOf(Text));
    }

    [Fact]
    public void Each_outline_entry_leads_to_a_page()
    {
        var pages = Destination().Matches(Text).Select(m => m.Groups["page"].Value).ToArray();

        Assert.NotEmpty(pages);
        Assert.All(pages, page => Assert.Matches($@"\n{page} 0 obj\n<</Type /Page\n", Text));
    }

    [Fact]
    public void The_table_of_the_update_points_at_its_objects()
    {
        var start = int.Parse(StartOfTable().Matches(Text)[^1].Groups["place"].Value);
        var entries = Entry().Matches(Text[start..]);

        Assert.StartsWith("xref\n", Text[start..]);
        Assert.NotEmpty(entries);
        Assert.All(entries, entry => Assert.StartsWith(
            $"{entry.Groups["number"].Value} 0 obj\n", Text[int.Parse(entry.Groups["place"].Value)..]));
    }

    [Fact]
    public void Names_of_any_script_stand_in_the_outline_as_they_are_written()
    {
        var result = SampleResults.Awkward();
        var titles = TitlesOf(Encoding.Latin1.GetString(Write(result)));

        Assert.Equal(result.Circuit.Title, titles[0]);
        Assert.All(result.Observations, observation => Assert.Contains(observation.Name, titles));
    }

    [Fact]
    public void A_circuit_without_a_title_is_named_by_its_file()
    {
        var result = SampleResults.Bare();

        Assert.Equal(result.Circuit.Source.Name, TitlesOf(Encoding.Latin1.GetString(Write(result)))[0]);
    }

    [Fact]
    public void A_title_of_ten_thousand_letters_makes_no_more_pages_than_it_needs()
    {
        var plain = PagesOf(SampleResults.Inrush());
        var longer = PagesOf(SampleResults.Inrush(title: new string('w', 10_000)));

        Assert.InRange(longer, plain, plain + 5);
        int PagesOf(TransientResult result) =>
            Page().Count(Encoding.Latin1.GetString(Write(result)));
    }

    private static string[] TitlesOf(string text) =>
    [
        .. Title().Matches(text)
            .Select(m => Convert.FromHexString(m.Groups["letters"].Value))
            .Select(Encoding.BigEndianUnicode.GetString),
    ];

    private static byte[] Write(TransientResult result) =>
        PdfReport.Write(result, "circuit-transient solve x");

    [GeneratedRegex(@"<</Type /Page\n", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Page();

    [GeneratedRegex(@"/Title <FEFF(?<letters>[0-9A-F]+)>", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Title();

    [GeneratedRegex(@"/Dest \[(?<page>\d+) 0 R /Fit\]", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Destination();

    [GeneratedRegex(@"startxref\n(?<place>\d+)", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex StartOfTable();

    [GeneratedRegex(@"(?<number>\d+) 1\n(?<place>\d{10}) 00000 n", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Entry();
}
