using CircuitTransient.Reports;

namespace CircuitTransient.Tests.Reports;

public class TerminalSummaryTests
{
    [Fact]
    public void No_line_is_wider_than_a_hundred_columns()
    {
        foreach (var result in new[] { SampleResults.Inrush(), SampleResults.Awkward(), SampleResults.Bare() })
        {
            var text = TerminalSummary.Write(result, [new string('x', 250)]);
            Assert.All(text.Split('\n'), line => Assert.InRange(DisplayWidth.Of(line), 0, 100));
        }
    }

    [Fact]
    public void The_whole_summary_reads_so() => Assert.Equal("", TerminalSummary.Write(SampleResults.Inrush(), ["output/bullwheel-bus/results.json"]));

    [Fact]
    public void The_whole_summary_reads_so2() => Assert.Equal("", TerminalSummary.Write(SampleResults.Awkward(), ["output/bullwheel-bus/results.json"]));

    [Fact]
    public void The_whole_summary_reads_so3() => Assert.Equal("", TerminalSummary.Write(SampleResults.Bare(), []));
}
