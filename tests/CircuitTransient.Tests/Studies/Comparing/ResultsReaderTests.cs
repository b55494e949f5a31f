using CircuitTransient.Reports;
using CircuitTransient.Studies.Comparing;
using CircuitTransient.Tests.Reports;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Studies.Comparing;

public sealed class ResultsReaderTests
{
    [Fact]
    public void What_is_written_is_read_back()
    {
        var result = SampleResults.Inrush();
        var read = SampleDocuments.Read(JsonReport.Write(result));

        Assert.Equal(result.Circuit.Source.Sha256, read.Circuit.Sha256);
        Assert.Equal(result.Causes.Select(c => c.Name), read.Causes);
        Assert.Equal(result.Observations[1].Max.Value, read.Observations[1].Max.Value);
        Assert.Equal(
            result.Requirements.Select(r => (r.Statement, r.Holds, r.Margin)),
            read.Requirements.Select(r => (r.Statement, r.Holds, r.Margin)));
        Assert.Equal(result.Parts.Select(p => p.Name), read.Parts.Select(p => p.Name));
        Assert.Equal(result.Parts.SelectMany(p => p.Ratings).Select(r => r.Used),
            read.Parts.SelectMany(p => p.Ratings).Select(r => r.Used));
    }

    [Fact]
    public void An_array_of_documents_is_read_too()
    {
        var result = SampleResults.Inrush();
        var read = ResultsReader.Read(new SourceText("a.json", JsonReport.Write([result, result])));

        Assert.Equal(2, read.Value!.Documents.Length);
    }

    [Theory]
    [InlineData("", "a.json:1:1: error: the file is empty")]
    [InlineData("resistor R1 at a : 1 kΩ", "a.json:1:1: error: this is not a results document")]
    [InlineData("{\"a\": 1,}", "a.json:1:9: error: this is not JSON from here on")]
    [InlineData("{}", "a.json:1:1: error: this is not a results document: it names no `format`")]
    [InlineData("[]", "a.json:1:1: error: the array holds no results document")]
    [InlineData("[7]", "a.json:1:2: error: this is not a results document: it names no `format`")]
    [InlineData("{\"format\": \"soup 3\"}",
        "a.json:1:12: error: this is not a results document: its format is not `circuit-transient")]
    [InlineData("{\"format\": \"circuit-transient results 2\"}",
        "a.json:1:12: error: this version reads `circuit-transient results 1`, no other number")]
    [InlineData("{\"format\": [\"circuit-transient results 1\"]}",
        "a.json:1:12: error: `format` should be a text")]
    [InlineData("{\"a\": {\"b\": 1, \"b\": 2}}", "a.json:1:16: error: `b` stands twice in one object")]
    [InlineData("{\"a\": 1e999}", "a.json:1:7: error: this number is past what a double holds")]
    [InlineData("{\"a\": \"\\ud83d\"}", "a.json:1:7: error: this text holds half a character")]
    [InlineData("{\"größe\": \n \"µ\", \"µ\": x}", "a.json:2:12: error: this is not JSON from here on")]
    public void What_is_no_results_document_is_refused_with_its_place(string text, string message)
    {
        var read = ResultsReader.Read(new SourceText("a.json", text));

        Assert.False(read.Succeeded);
        Assert.StartsWith(message, DiagnosticText.Render(read.Diagnostics[0]), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("\"until\": 14", "\"until\": \"14 s\"", "`study.until` should be a number")]
    [InlineData("\"holds\": false", "\"holds\": \"no\"", "`requirements[1].holds` should be true or false")]
    [InlineData("\"until\": 14", "\"end\": 14", "`until` is missing here")]
    [InlineData("\"nodes\": 4", "\"nodes\": -4", "`circuit.nodes` should be a whole number from zero up")]
    public void A_value_of_another_kind_is_named(string found, string put, string message)
    {
        var json = JsonReport.Write(SampleResults.Inrush());
        var place = json.IndexOf(found, StringComparison.Ordinal);
        var read = ResultsReader.Read(
            new SourceText("a.json", json[..place] + put + json[(place + found.Length)..]));

        Assert.Equal(message, Assert.Single(read.Diagnostics).Message);
        Assert.True(read.Diagnostics[0].Span.Start > 0);
    }

    [Fact]
    public void Deep_nesting_is_refused()
    {
        var text = new string('[', 100_000);
        var read = ResultsReader.Read(new SourceText("a.json", text));

        Assert.Equal("the values are nested deeper than 64", Assert.Single(read.Diagnostics).Message);
    }

    [Fact]
    public void A_document_cut_anywhere_is_refused_and_never_throws()
    {
        var json = JsonReport.Write(SampleResults.Inrush()).TrimEnd();
        for (var length = 0; length < json.Length; length += 37)
        {
            Assert.False(ResultsReader.Read(new SourceText("a.json", json[..length])).Succeeded);
        }
    }

    [Fact]
    public void No_more_than_twenty_mistakes_are_listed()
    {
        var json = "{\"format\": \"circuit-transient results 1\", \"causes\": ["
            + string.Join(',', Enumerable.Repeat("1", 500)) + "]}";

        Assert.Equal(20, ResultsReader.Read(new SourceText("a.json", json)).Diagnostics.Length);
    }
}
