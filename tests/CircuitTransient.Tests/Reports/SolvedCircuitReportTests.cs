using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports;

/// <summary>The reports of a circuit that was really solved.</summary>
public class SolvedCircuitReportTests
{
    private const string Plant = """
        circuit "Winch drive: pre-charge"
        reference is minus
        source    Feed at rail : 540 V
        switch    K1 from rail to a : open, closes at 10 ms
        resistor  Rpre from a to b : 47 Ω, rated 1 kJ
        inductor  Lcable from b to "DC+" : 12 µH
        capacitor Clink from "DC+" to minus : 1.2 mF, charged to 60 V, rated 600 V
        resistor  Rbleed from "DC+" to minus : 22 kΩ
        observe voltage of "DC+"
        observe current through Lcable as "inrush, first"
        observe energy in Rpre
        require current through Lcable at most 10 A because "contactor"
        until 400 ms
        """;

    private static readonly TransientResult Result = Solve();

    [Fact]
    public void The_results_document_obeys_its_schema() =>
        Assert.Empty(ResultsSchema.Faults(JsonReport.Write(Result)));

    [Fact]
    public void Every_row_of_the_waveforms_adds_up()
    {
        var rows = CsvReport.Write(Result).Split("\r\n");
        Assert.Contains(
            ",\"inrush, first (A)\",\"inrush, first from Feed (A)\",",
            rows[0],
            StringComparison.Ordinal);
        foreach (var row in rows[1..^1])
        {
            var values = row.Split(',').Select(double.Parse).ToArray();
            Assert.Equal(11, values.Length); // time, two totals of two causes, one with a joint term too
            Assert.Equal(values[1], values[2] + values[3], 1e-9 * 540);
            Assert.Equal(values[4], values[5] + values[6], 1e-9 * 10.2);
            Assert.Equal(values[7], values[8] + values[9] + values[10], 1e-9 * 140);
        }
    }

    [Fact]
    public void The_summary_tells_what_is_broken_and_by_whom()
    {
        // The crest is within a percent of (540 V − 60 V) / 47 Ω, by Ohm's law at the closing.
        var lines = TerminalSummary.Write(Result, []).Split('\n');
        Assert.Equal("The requirement is broken; both ratings hold.", lines[1]);
        Assert.Contains(lines, line => line.StartsWith("  broken by 212.", StringComparison.Ordinal));
        Assert.Contains(lines, line =>
            line.StartsWith("What makes the 10.21 A of inrush, first", StringComparison.Ordinal));
        Assert.All(lines, line => Assert.InRange(DisplayWidth.Of(line), 0, 100));
    }

    [Fact]
    public void The_short_inrush_is_drawn_enlarged() =>
        Assert.Contains("inrush, first: the first ", WaveformPlot.Svg(Result), StringComparison.Ordinal);

    private static TransientResult Solve()
    {
        var outcome = TransientAnalysis.Run(
            new SourceText("winch.cause", Plant),
            AnalysisOptions.Default,
            _ => throw new InvalidOperationException());
        return Assert.IsType<Solved>(outcome).Result;
    }
}
