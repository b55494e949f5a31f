using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Syntax;

public class ScannedParserTests
{
    [Theory]
    [InlineData(ScannedKind.Part, "Rsn from 10 Ω to 1 kΩ in 50 steps", "Rsn", 10, 1000)]
    [InlineData(ScannedKind.Part, "Stage1/R[3] from 4k7 to 10k in E12", "Stage1/R[3]", 4700, 10000)]
    [InlineData(ScannedKind.Phase, "Grid from -90° to 90° in 5° steps", "Grid", -Math.PI / 2, Math.PI / 2)]
    [InlineData(ScannedKind.Event, "\"K main\" closes from 0 s to 20 ms in 200 steps", "K main", 0, 0.02)]
    [InlineData(ScannedKind.Value, "Vdc from \u22121 V to 2 V", "Vdc", -1, 2)]
    public void A_name_and_a_range_are_read(
        ScannedKind kind, string text, string name, double from, double to)
    {
        var scanned = ScannedParser.Parse(new SourceText("--scanned", text), kind).Value!;

        Assert.Equal(name, scanned.Name);
        Assert.Equal((from, to), (scanned.Range!.From.Value, scanned.Range.To.Value));
    }

    [Theory]
    [InlineData("in 50 steps", typeof(StepCountSyntax))]
    [InlineData("in 20 steps a decade", typeof(StepsADecadeSyntax))]
    [InlineData("in 5 Ω steps", typeof(StepWidthSyntax))]
    [InlineData("in E96", typeof(PreferredValuesSyntax))]
    [InlineData("", typeof(StepCountSyntax))]
    public void A_range_is_divided_in_four_ways(string spacing, Type expected)
    {
        var text = new SourceText("--part", $"R from 10 Ω to 1 kΩ {spacing}");

        Assert.IsType(expected, ScannedParser.Parse(text, ScannedKind.Part).Value!.Range!.Spacing);
    }

    [Fact]
    public void A_name_may_stand_alone()
    {
        var scanned = ScannedParser.Parse(new SourceText("--event", "KB opens"), ScannedKind.Event).Value!;

        Assert.Equal(("KB", false), (scanned.Name, scanned.Closes));
        Assert.Null(scanned.Range);
    }

    [Theory]
    [InlineData(
        ScannedKind.Part, "",
        "--part:1:1: error: nothing is named\n  → write `Rsn from 10 Ω to 1 kΩ in 20 steps a decade`")]
    [InlineData(
        ScannedKind.Part, "Rsn fron 10 Ω to 1 kΩ",
        "--part:1:5: error: `fron` stands where `from` should\n  Rsn fron 10 Ω to 1 kΩ\n      ^^^^\n"
        + "  → did you mean `from`?")]
    [InlineData(
        ScannedKind.Event, "Kmain from 0 s to 1 s",
        "--part:1:7: error: `from` stands where `closes` or `opens` should\n  Kmain from 0 s to 1 s\n"
        + "        ^^^^\n  → write `Kmain closes from 0 s to 20 ms in 200 steps`")]
    [InlineData(
        ScannedKind.Part, "Rsn from 10 Ω to 1 kΩ in E13",
        "--part:1:26: error: there is no series `E13`\n  Rsn from 10 Ω to 1 kΩ in E13\n"
        + "                           ^^^\n  → the series of IEC 60063 are E3, E6, E12, E24, E48, E96, E192")]
    [InlineData(
        ScannedKind.Part, "Rsn from 10 Ω to 1 kΩ in 0 steps",
        "--part:1:26: error: `0` is not a number of steps\n  Rsn from 10 Ω to 1 kΩ in 0 steps\n"
        + "                           ^\n  → steps are counted with a whole number from 1 on")]
    [InlineData(
        ScannedKind.Part, "Rsn from 10 Ω to 1 kΩ in steps",
        "--part:1:26: error: `steps` stands where a number of steps should\n"
        + "  Rsn from 10 Ω to 1 kΩ in steps\n                           ^^^^^\n"
        + "  → write `in 50 steps`, `in 20 steps a decade`, `in 5 Ω steps` or `in E12`")]
    [InlineData(
        ScannedKind.Part, "R[k] from 10 Ω to 1 kΩ",
        "--part:1:2: error: there is no counter `k` on the command line\n  R[k] from 10 Ω to 1 kΩ\n"
        + "   ^^^\n  → write which one, such as `R[1]`")]
    [InlineData(
        ScannedKind.Part, "Rsn from 10 Ω to 1 kΩ in 5 steps now",
        "--part:1:34: error: `now` stands where the end should\n  Rsn from 10 Ω to 1 kΩ in 5 steps now\n"
        + "                                   ^^^\n"
        + "  → write `Rsn from 10 Ω to 1 kΩ in 20 steps a decade`")]
    public void A_slip_is_shown_in_its_place(ScannedKind kind, string text, string message)
    {
        var outcome = ScannedParser.Parse(new SourceText("--part", text), kind);

        Assert.False(outcome.Succeeded);
        Assert.Equal(message, DiagnosticText.Render(Assert.Single(outcome.Diagnostics)));
    }
}
