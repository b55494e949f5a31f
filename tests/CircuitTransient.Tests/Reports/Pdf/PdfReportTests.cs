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
        var titles = Title().Matches(Text)
            .Select(m => Convert.FromHexString(m.Groups["letters"].Value))
            .Select(Encoding.BigEndianUnicode.GetString)
            .ToArray();

        string[] chapters =
            ["Verdict", "Events", "What every part bears", "Poles", "Self-checks", "The circuit file"];
        Assert.Equal(
            ["Two feeds and a charge", .. chapters[..2],
                .. SolvedPages.AsItStands.Observations.Select(o => o.Name), .. chapters[2..]],
            titles);
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
    public void Names_of_ten_thousand_letters_and_of_any_script_are_drawn() =>
        Assert.All(
            [
                SampleResults.Awkward(), SampleResults.Bare(),
                SampleResults.Inrush(title: new string('w', 10_000)),
            ],
            result => Assert.InRange(Write(result).Length, 10_000, 5_000_000));

    private static byte[] Write(TransientResult result) =>
        PdfReport.Write(result, "circuit-transient solve x");

    [GeneratedRegex(@"/Title <FEFF(?<letters>[0-9A-F]+)>", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Title();

    [GeneratedRegex(@"/Dest \[(?<page>\d+) 0 R /Fit\]", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Destination();

    [GeneratedRegex(@"startxref\n(?<place>\d+)", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex StartOfTable();

    [GeneratedRegex(@"(?<number>\d+) 1\n(?<place>\d{10}) 00000 n", RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Entry();
}
