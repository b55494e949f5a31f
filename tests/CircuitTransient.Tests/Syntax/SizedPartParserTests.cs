using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Syntax;

public class SizedPartParserTests
{
    [Theory]
    [InlineData("Rsn", "Rsn")]
    [InlineData("R[3] from 1 Ω to 2 Ω", "R[3]")]
    [InlineData("Stage1/R[2]", "Stage1/R[2]")]
    public void A_part_is_named_as_results_name_it(string text, string name) =>
        Assert.Equal(name, SizedPartParser.Parse(new SourceText("--part", text)).Value!.Name);

    [Fact]
    public void A_counter_means_no_part_outside_its_repetition()
    {
        var outcome = SizedPartParser.Parse(new SourceText("--part", "R[k] from 1 Ω to 2 Ω"));

        Assert.Equal(
            "--part:1:2: error: there is no counter `k` on the command line\n  R[k] from 1 Ω to 2 Ω\n   ^^^\n"
            + "  → write which one, such as `R[1]`",
            DiagnosticText.Render(Assert.Single(outcome.Diagnostics)));
    }
}
