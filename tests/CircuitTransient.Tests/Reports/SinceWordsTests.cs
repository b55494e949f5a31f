using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports;

/// <summary>Why a breakdown since an event is missing, and for which window figures stand.</summary>
public sealed class SinceWordsTests
{
    private const string Discharge = """
        source Feed at a : step of 10 V
        switch K1 from a to b : closed, opens at 6 ms
        resistor R1 from b to c : 1 kΩ
        capacitor C1 at c : 1 µF
        resistor R2 at c : 1 kΩ

        """;

    private static readonly AfterEvent Opening = new AfterSwitching("K1", Closes: false);

    [Fact]
    public void A_peak_before_the_event_is_said() => Assert.Equal(
        "Since K1 opens at 6.000 ms: the peak lies before it, at 2.000 ms, so nothing of it follows from it.",
        WhyNone("observe voltage of c from 0 s to 2 ms\nuntil 10 ms"));

    [Fact]
    public void An_integral_is_said_to_have_none() => Assert.Equal(
        "Since K1 opens at 6.000 ms: an integral over time is not broken down since an event, because what "
        + "gathered before it follows from causes before it; the causes from the start stand above.",
        WhyNone("observe I²t through R2\nuntil 10 ms"));

    [Fact]
    public void What_is_shown_in_its_place_is_not_called_the_first_observed()
    {
        var result = Solve(
            "observe I²t through R2\nobserve voltage across K1\nuntil 10 ms", Opening);
        Assert.Equal("the first observed", WorstObservation.Find(result)!.Why);
        Assert.Equal("the first that follows the event", WorstObservation.FindSinceEvent(result)!.Why);
    }

    [Fact]
    public void Without_an_event_asked_for_nothing_is_said()
    {
        var result = Solve("observe I²t through R2\nuntil 10 ms", null);
        Assert.Null(SinceWords.WhyNone(result, WorstObservation.Find(result)!));
    }

    [Theory]
    [InlineData("observe voltage of c from 5 ms to 6 ms", "Observed from 5.000 ms to 6.000 ms")]
    [InlineData("observe voltage of c", "Observed from 0 s to 10.00 ms")]
    public void The_window_that_all_share_stands_above(string observe, string heading) =>
        Assert.Contains(heading + "\n", Summary(observe), StringComparison.Ordinal);

    [Fact]
    public void A_window_of_one_stands_beside_it()
    {
        var summary = Summary("observe voltage of c from 5 ms to 6 ms\nobserve voltage of b");
        Assert.Contains("Observed from 0 s to 10.00 ms\n", summary, StringComparison.Ordinal);
        var lines = summary.Split('\n');
        var row = Array.FindIndex(lines, line => line.Contains("from 5.000 ms to 6.000 ms"));
        Assert.Contains("min", lines[row]);
        Assert.Contains("voltage of c", lines[row - 1]);
    }

    private static string Summary(string observe) =>
        TerminalSummary.Write(Solve(observe + "\nuntil 10 ms", null), []);

    private static string? WhyNone(string rest)
    {
        var result = Solve(rest, Opening);
        return SinceWords.WhyNone(result, WorstObservation.Find(result)!);
    }

    private static TransientResult Solve(string rest, AfterEvent? after) => Assert.IsType<Solved>(
        TransientAnalysis.Run(
            new SourceText("plant.cause", Discharge + rest), new AnalysisOptions([], 16, after),
            _ => new Outcome<SourceText>(null, []))).Result;
}
