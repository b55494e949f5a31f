using System.Text.Json;
using CircuitTransient.Reports;
using CircuitTransient.Reports.Html;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Reports;

/// <summary>What is explained where a requirement's worst value is no extreme of what is observed.</summary>
/// <remarks>A link held at 400 V discharges from 100 ms on through 4.7 kΩ beside 470 µF: 400 V e^(−t/RC),
/// whose one cause since the opening is the charge.</remarks>
public sealed class WithinRequirementTests
{
    private const double Rc = 4.7e3 * 470e-6;
    private const string Link =
        """
        source   Feed at a : 400 V
        switch   Q from a to b : closed, opens at 100 ms
        resistor R1 from b to bus : 1 Ω
        capacitor C1 from bus to ground : 470 µF, charged to 400 V
        resistor Rd from bus to ground : 4.7 kΩ
        until 8 s
        """;

    // The link stands at 400 V · 4700/4701 but for what remains of the first 100 ms: e^(−213).
    private static double Value(double after) => 400 * (4700.0 / 4701) * Math.Exp(-after / Rc);

    [Theory]
    [InlineData("voltage of bus", "")]
    [InlineData("voltage of bus", " from 0 s to 90 ms")]
    [InlineData("voltage from ground to bus", "")]
    [InlineData("voltage of a", "")]
    public void The_worst_value_itself_is_explained(string observed, string window)
    {
        var result = SolvedText.Of(
            $"{Link}\nobserve {observed}{window}\n"
            + "require voltage of bus at most 60 V from 2 s after Q opens").Result;
        var worst = WorstObservation.Find(result)!;

        Assert.Equal("the requirement exceeded most", worst.Why);
        Assert.Equal(2.1, worst.Extreme.Time, 1e-12);
        Assert.Equal(Value(2), worst.Extreme.Value!.Value, 1e-9);
        AreSum(worst.Extreme.Value.Value, worst.Observation.Contributions.Select(worst.Share));
        var since = worst.Since!;
        Assert.Equal("Q opens", since.Event);
        AreSum(worst.Extreme.Value.Value, since.Parts.Select(p => p.Value));
        Assert.Equal(Value(2), since.Parts.Single(p => p.Cause.StartsWith("C1")).Value!.Value, 1e-9);
        Assert.Matches(
            @"What makes the 161\.7 V of voltage of bus \(at 2\.100 s, 2\.000 s after Q opens; the\s+"
            + @"requirement\s+exceeded\s+most\)",
            TerminalSummary.Write(result, []));
    }

    [Fact]
    public void A_held_requirement_is_explained_by_its_own_value()
    {
        var worst = WorstObservation.Find(SolvedText.Of(
            $"{Link}\nobserve voltage of bus\n"
            + "require voltage of bus at most 60 V from 5 s after Q opens").Result)!;

        Assert.Equal("nearest to its requirement", worst.Why);
        Assert.Equal(Value(5), worst.Extreme.Value!.Value, 1e-9);
    }

    [Fact]
    public void The_same_value_at_another_instant_is_explained_at_the_required_one()
    {
        var result = SolvedText.Of(
            """
            source   Feed at a : 10 V
            resistor R from a to b : 1 Ω
            capacitor C at b : 1 mF, charged to 10 V
            observe voltage of b
            require voltage of b at most 9 V from 20 ms
            until 30 ms
            """).Result;
        var worst = WorstObservation.Find(result)!;

        // At t = 0 the charge alone makes the 10 V; e^(−20) of it is left at 20 ms at most.
        Assert.True(worst.Extreme.Time >= 0.02);
        var charge = worst.Observation.Contributions.Single(c => c.Cause == "C initial charge");
        Assert.Equal(10 * Math.Exp(-worst.Extreme.Time / 1e-3), worst.Share(charge)!.Value, 1e-12);
    }

    [Fact]
    public void An_extreme_that_is_observed_is_explained_as_before()
    {
        var result = SolvedText.Of(
            $"{Link}\nobserve voltage of bus\nrequire voltage of bus at most 390 V").Result;
        var worst = WorstObservation.Find(result)!;

        Assert.Null(result.Requirements[0].Within);
        Assert.Same(result.Observations[0], worst.Observation);
        Assert.True(worst.AtMax);
    }

    [Fact]
    public void A_value_that_cannot_be_explained_is_not_named_beside_another()
    {
        var result = SolvedText.Of(
            $"{Link}\nobserve voltage of bus\n"
            + "require voltage of bus at most 60 V from 2 s after Q opens").Result;
        var bare = result with { Requirements = [result.Requirements[0] with { Within = null }] };

        Assert.Equal("the first observed", WorstObservation.Find(bare)!.Why);
    }

    [Fact]
    public void A_figure_is_said_to_be_read_off_the_waveform()
    {
        var result = SolvedText.Of(
            """
            source    S at a : step of 24 V
            resistor  R from a to b : 1 Ω
            inductor  L from b to c : 1 mH
            capacitor C from c to ground : 1 µF
            observe voltage of c
            require overshoot of voltage of c at most 10 %
            until 20 ms
            """).Result;

        Assert.Equal("the requirement exceeded most is read off it", WorstObservation.Find(result)!.Why);
    }

    [Fact]
    public void The_page_and_the_document_tell_it_too()
    {
        var result = SolvedText.Of(
            $"{Link}\nobserve voltage of bus\n"
            + "require voltage of bus at most 60 V from 2 s after Q opens").Result;
        var json = JsonReport.Write(result);

        Assert.Empty(ResultsSchema.Faults(json));
        var required = JsonDocument.Parse(json).RootElement.GetProperty("requirements")[0];
        AreSum(
            required.GetProperty("worst").GetProperty("value").GetDouble(),
            required.GetProperty("contributions").EnumerateArray()
                .Select(c => (double?)c.GetProperty("value").GetDouble()));
        Assert.Equal("Q opens", required.GetProperty("since").GetProperty("event").GetString());
        Assert.Matches(
            @"161\.7.V of\s+<bdi>voltage of bus</bdi>: the requirement exceeded most\.",
            HtmlReport.Write(result, "solve"));
    }

    private static void AreSum(double total, IEnumerable<double?> shares) =>
        Assert.Equal(1, shares.Sum(s => s!.Value) / total, 1e-12);
}
