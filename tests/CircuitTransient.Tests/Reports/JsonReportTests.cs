using System.Text.Json;
using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public class JsonReportTests
{
    [Fact]
    public void A_full_document_obeys_the_schema() => AssertObeys(JsonReport.Write(SampleResults.Inrush()));

    [Fact]
    public void A_document_of_almost_nothing_obeys_the_schema() =>
        AssertObeys(JsonReport.Write(SampleResults.Bare()));

    [Fact]
    public void Awkward_names_obey_the_schema() => AssertObeys(JsonReport.Write(SampleResults.Awkward()));

    [Fact]
    public void Several_circuits_make_an_array() =>
        AssertObeys(JsonReport.Write([SampleResults.Inrush(), SampleResults.Bare()]));

    [Theory]
    [InlineData("\"format\": \"circuit-transient results 1\"", "\"format\": \"circuit-transient results 2\"")]
    [InlineData("\"side\": \"at\"", "\"side\": \"sometimes\"")]
    [InlineData("\"holds\": false", "\"held\": false")]
    public void The_schema_refuses_what_is_not_a_result(string right, string wrong)
    {
        var text = JsonReport.Write(SampleResults.Inrush());
        Assert.Contains(right, text, StringComparison.Ordinal);
        Assert.NotEmpty(ResultsSchema.Faults(text.Replace(right, wrong, StringComparison.Ordinal)));
    }

    [Fact]
    public void Every_double_reads_back_to_the_same_bits()
    {
        var result = SampleResults.Inrush();
        using var document = JsonDocument.Parse(JsonReport.Write(result));
        var max = document.RootElement.GetProperty("observations")[1].GetProperty("max");
        Assert.Equal(result.Observations[1].Max.Value, max.GetProperty("value").GetDouble());
        Assert.Equal(result.Observations[1].Max.Time, max.GetProperty("time").GetDouble());
    }

    [Fact]
    public void What_is_infinite_or_undetermined_is_null()
    {
        var result = SampleResults.Bare();
        var observation = result.Observations[0] with
        {
            Start = double.NaN,
            End = double.PositiveInfinity,
            Final = null,
        };
        var text = JsonReport.Write(result with { Observations = [observation] });
        using var document = JsonDocument.Parse(text);
        var written = document.RootElement.GetProperty("observations")[0];
        Assert.All(
            ["start", "end", "final"],
            name => Assert.Equal(JsonValueKind.Null, written.GetProperty(name).ValueKind));
    }

    [Fact]
    public void A_negative_zero_is_written_as_zero() =>
        Assert.DoesNotContain("-0,", JsonReport.Write(SampleResults.Inrush()), StringComparison.Ordinal);

    [Fact]
    public void An_impulse_is_a_charge_or_volt_seconds()
    {
        using var document = JsonDocument.Parse(JsonReport.Write(SampleResults.Inrush()));
        var impulses = document.RootElement.GetProperty("intervals")[2].GetProperty("impulses");
        Assert.Equal(1.2e-6, impulses[0].GetProperty("charge").GetDouble());
        Assert.False(impulses[0].TryGetProperty("voltSeconds", out _));
        Assert.Equal(0.02, impulses[1].GetProperty("voltSeconds").GetDouble());
        Assert.False(impulses[1].TryGetProperty("charge", out _));
    }

    [Fact]
    public void Samples_list_every_cause()
    {
        using var document = JsonDocument.Parse(JsonReport.Write(SampleResults.Inrush()));
        var sample = document.RootElement.GetProperty("observations")[1].GetProperty("samples")[1];
        Assert.Equal(2.5e-3, sample.GetProperty("time").GetDouble());
        var causes = sample.GetProperty("byCause").EnumerateObject().Select(p => (p.Name, p.Value.ValueKind));
        Assert.Equal(
            [("Supply", JsonValueKind.Number), ("Cbus initial charge", JsonValueKind.Null)], causes);
    }

    [Fact]
    public void Causes_since_an_event_stand_beside_those_from_the_start()
    {
        using var document = JsonDocument.Parse(JsonReport.Write(
            SampleResults.Inrush() with { IsAfterAsked = true }));
        var observations = document.RootElement.GetProperty("observations");
        var after = observations[1].GetProperty("contributionsAfter");
        Assert.Equal("Kmain closes", after.GetProperty("atMax").GetProperty("event").GetString());
        Assert.Equal(JsonValueKind.Null, after.GetProperty("atMin").ValueKind);
        Assert.False(observations[0].TryGetProperty("contributionsAfter", out _));
    }

    [Fact]
    public void Causes_since_an_event_stand_only_where_they_were_asked_for()
    {
        using var document = JsonDocument.Parse(JsonReport.Write(SampleResults.Inrush()));
        var observations = document.RootElement.GetProperty("observations").EnumerateArray();
        Assert.All(observations, o => Assert.False(o.TryGetProperty("contributionsAfter", out _)));
    }

    [Fact]
    public void The_circuit_is_known_by_its_hash_and_counts()
    {
        using var document = JsonDocument.Parse(JsonReport.Write(SampleResults.Inrush()));
        var circuit = document.RootElement.GetProperty("circuit");
        // From sha256sum of GNU coreutils over the same bytes.
        Assert.Equal(
            "e5b24a4b013f13b5fee7465117af399c7227be0802334b8f3d1175806b12c28e",
            circuit.GetProperty("sha256").GetString());
        Assert.Equal(3, circuit.GetProperty("parts").GetInt32());
        Assert.Equal(4, circuit.GetProperty("nodes").GetInt32());
        Assert.Equal(2, circuit.GetProperty("storedQuantities").GetInt32());
    }

    [Fact]
    public void Letters_stay_readable_and_markup_does_not_survive()
    {
        var text = JsonReport.Write(SampleResults.Awkward());
        Assert.Contains("電流", text, StringComparison.Ordinal);
        Assert.DoesNotContain("<script>", text, StringComparison.Ordinal);
        using var document = JsonDocument.Parse(text);
        Assert.Equal(
            "bus, \"plus\" & <script>alert('1')</script>",
            document.RootElement.GetProperty("observations")[0].GetProperty("name").GetString());
    }

    [Fact]
    public void The_same_result_gives_the_same_text() =>
        Assert.Equal(JsonReport.Write(SampleResults.Inrush()), JsonReport.Write(SampleResults.Inrush()));

    private static void AssertObeys(string json) => Assert.Empty(ResultsSchema.Faults(json));
}
