using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Syntax;

public class ScatterParserTests
{
    [Theory]
    [InlineData("Kmain closes by 0.5 ms", "Kmain", true)]
    [InlineData("\"K 1\" opens by ±0.5 ms", "K 1", false)]
    [InlineData("0.5 ms", null, false)]
    public void An_event_and_a_time_are_read(string text, string? name, bool closes)
    {
        var scatter = ScatterParser.Parse(new SourceText("--scatter", text)).Value!;

        Assert.Equal((name, closes, 0.5e-3), (scatter.Switch, scatter.Closes, scatter.By.Value));
    }

    [Theory]
    [InlineData(
        "Kmain closes 0.5 ms",
        "--scatter:1:14: error: `0.5` stands where `by` should\n  Kmain closes 0.5 ms\n               ^^^\n"
        + "  → write `Kmain closes by 0.5 ms`: half a millisecond to either side")]
    [InlineData(
        "Kmain closes by 0.5",
        "--scatter:1:17: error: `0.5` has no unit; a scatter is in seconds\n  Kmain closes by 0.5\n"
        + "                  ^^^\n  → write `0.5 s`")]
    [InlineData(
        "5 V", "--scatter:1:1: error: `5 V` is not a time; a scatter is in seconds\n  5 V\n  ^^^")]
    [InlineData(
        "0 s",
        "--scatter:1:1: error: a scatter of `0 s` is none\n  0 s\n  ^^^\n"
        + "  → write how far to either side, more than 0 s")]
    public void A_slip_is_shown_in_its_place(string text, string message)
    {
        var outcome = ScatterParser.Parse(new SourceText("--scatter", text));

        Assert.False(outcome.Succeeded);
        Assert.Equal(message, DiagnosticText.Render(Assert.Single(outcome.Diagnostics)));
    }
}
