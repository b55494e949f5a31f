using System.Text.RegularExpressions;
using CircuitTransient.Measurements;
using CircuitTransient.Syntax;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Project;

/// <summary>The reference of the circuit language says what the program does.</summary>
public sealed partial class LanguageTests
{
    private static readonly string Reference = Repository.Read("docs/language.md");

    public static TheoryData<string> WholeCircuits => [.. Blocks("cause").Select(block => block.Text)];

    public static TheoryData<string> Fragments => [.. Blocks("lines").Select(block => block.Text)];

    [Theory]
    [MemberData(nameof(WholeCircuits))]
    public void Each_whole_circuit_is_solved_without_a_remark_and_with_every_self_check(string circuit)
    {
        var outcome = TransientAnalysis.Run(
            new SourceText("example.cause", circuit), new AnalysisOptions([], 16), Beside,
            TestContext.Current.CancellationToken);

        var result = Assert.IsType<Solved>(outcome).Result;
        Assert.Empty(result.Warnings);
        Assert.NotEmpty(result.SelfChecks);
        Assert.All(result.SelfChecks, check => Assert.True(check.Holds, check.Name));
    }

    [Theory]
    [MemberData(nameof(Fragments))]
    public void Each_fragment_is_read_without_a_mistake(string lines)
    {
        var read = CircuitParser.Parse(new SourceText("fragment.cause", lines));

        Assert.Equal("", DiagnosticText.Render(read.Diagnostics));
        Assert.Equal(lines.TrimEnd().Split('\n').Length, read.Value!.Statements.Length);
    }

    [Fact]
    public void What_is_refused_gets_the_words_below_it()
    {
        var (refused, place) = Assert.Single(Blocks("refused"));
        var words = Blocks("text").First(block => block.Place > place).Text;

        var outcome = TransientAnalysis.Check(new SourceText("wrong.cause", refused), Beside);

        Assert.False(outcome.Succeeded);
        Assert.Equal(words.TrimEnd(), DiagnosticText.Render(outcome.Diagnostics).TrimEnd());
    }

    [Fact]
    public void Each_wave_in_the_table_is_read()
    {
        var waves = TableOf("Waves").ToArray();

        Assert.True(waves.Length >= 14, $"the table has {waves.Length} waves");
        Assert.All(waves, wave => Assert.Equal("", Reading($"source S at a : {wave}")));
    }

    [Fact]
    public void Each_way_to_act_in_the_table_is_read()
    {
        var events = TableOf("Switches and what makes them act").ToArray();

        Assert.True(events.Length >= 8, $"the table has {events.Length} events");
        Assert.All(events, acts => Assert.Equal("",
            Reading($"switch S from a to b : {(acts.StartsWith('c') ? "open" : "closed")}, {acts}")));
    }

    [Fact]
    public void Each_figure_in_the_table_is_read()
    {
        var figures = TableOf("Figures").ToArray();

        Assert.True(figures.Length >= 8, $"the table has {figures.Length} figures");
        Assert.All(figures, figure =>
            Assert.Equal("", Reading($"observe {figure.Replace("Q", "voltage of bus")}")));
    }

    [Fact]
    public void Every_key_word_is_in_an_example()
    {
        var first = Blocks("cause").Concat(Blocks("lines"))
            .SelectMany(block => block.Text.Split('\n'))
            .Select(line => line.Trim().Split(' ')[0]);

        Assert.Empty(StatementKeyWords.All.Except(first).Except(["circuit", "note", "reference"]));
    }

    private static string Reading(string statement) =>
        DiagnosticText.Render(CircuitParser.Parse(new SourceText("row.cause", statement)).Diagnostics);

    /// <summary>The file that an example of a wave names.</summary>
    private static Outcome<SourceText> Beside(string path) =>
        new(new SourceText(path, Assert.Single(Blocks("csv")).Text), []);

    private static IEnumerable<(string Text, int Place)> Blocks(string language) =>
        from block in Block().Matches(Reference)
        where block.Groups["language"].Value == language
        select (block.Groups["text"].Value, block.Index);

    /// <summary>The first column of the table under a heading.</summary>
    private static IEnumerable<string> TableOf(string heading) =>
        from row in Row().Matches(Section().Matches(Reference)
            .Single(section => section.Groups["heading"].Value == heading).Value)
        select row.Groups["written"].Value;

    [GeneratedRegex(@"^```(?<language>\w+)\n(?<text>.*?)^```$",
        RegexOptions.Multiline | RegexOptions.Singleline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Block();

    [GeneratedRegex(@"^## (?<heading>[^\n]*)\n.*?(?=^## |\z)",
        RegexOptions.Multiline | RegexOptions.Singleline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Section();

    [GeneratedRegex(@"^\| `(?<written>[^`]*)` \|",
        RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Row();
}
