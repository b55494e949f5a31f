using CircuitTransient.Circuits;
using CircuitTransient.Syntax;
using CircuitTransient.Tests.Project;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Circuits;

/// <summary>The plants that ship with the program are circuits without a mistake or a warning.</summary>
public class DemoPlantTests
{
    public static TheoryData<string> Plants =>
        [.. Repository.Files.Where(f => f.StartsWith("netlists/", StringComparison.Ordinal)
            && f.EndsWith(".cause", StringComparison.Ordinal))];

    [Theory]
    [MemberData(nameof(Plants))]
    public void A_plant_is_checked_without_a_word(string path)
    {
        var source = new SourceText(path, string.Join('\n', Repository.Lines(path)));
        var (syntax, diagnostics) = CircuitParser.ParseWhatCanBe(source);

        var outcome = CircuitChecker.Check(syntax, diagnostics);

        Assert.Empty(outcome.Diagnostics.Select(DiagnosticText.Render));
        Assert.NotEmpty(outcome.Value!.Observations);
        Assert.NotNull(outcome.Value.Title);
    }

    [Fact]
    public void There_are_six_plants_or_more() => Assert.True(Plants.Count >= 6);
}
