using System.Text.RegularExpressions;
using CircuitTransient.Cli;
using CircuitTransient.Tests.Cli;

namespace CircuitTransient.Tests.Project;

/// <summary>What the README shows is what happens.</summary>
public sealed partial class ReadmeTests : IDisposable
{
    private static readonly string Readme = Repository.Read("README.md");

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void Each_command_prints_what_stands_below_it()
    {
        foreach (var circuit in Blocks("cause"))
        {
            var text = circuit.Groups["text"].Value;
            commandLine.Circuit(text.Split('\n')[0].Trim('#', ' '), text);
        }

        var commands = Blocks("console")
            .SelectMany(block => Command().Matches(block.Groups["text"].Value))
            .ToList();

        Assert.NotEmpty(commands);
        Assert.All(commands, command =>
        {
            var run = Shell.Run(commandLine.Folder, command.Groups["line"].Value);
            Assert.Equal(Plain(command.Groups["answer"].Value), Plain(run.Output + run.Error));
        });
    }

    [Fact]
    public void The_demonstration_is_solved_and_holds()
    {
        var line = Demonstration().Match(Readme).Groups["words"].Value;
        Assert.NotEmpty(line);
        var words = line.Split(' ').Select(word => word.EndsWith(".cause", StringComparison.Ordinal)
            ? Path.Combine(Repository.Root, word)
            : word);

        var run = commandLine.Run([.. words, "--out", commandLine.Results]);

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
    }

    [Fact]
    public void The_program_lies_where_its_name_is_said_to_lead()
    {
        var path = ProgramPath().Match(Readme).Groups["path"].Value;
        var configuration = new DirectoryInfo(AppContext.BaseDirectory).Parent!.Name;

        Assert.NotEmpty(path);
        Assert.True(File.Exists(Path.Combine(Repository.Root, path.Replace("Release", configuration))), path);
    }

    /// <summary>The text without the self-checks' figures, which are rounding and may differ between
    /// processors; that all of them hold stays.</summary>
    private static string Plain(string text) =>
        RoundingFigures().Replace(text, "all hold.").TrimEnd();

    [GeneratedRegex(@"all \d+ hold; nearest to its limit is .*? allowed\.",
        RegexOptions.Singleline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex RoundingFigures();

    private static IEnumerable<Match> Blocks(string language) =>
        Block().Matches(Readme).Where(block => block.Groups["language"].Value == language);

    [GeneratedRegex(@"^```(?<language>\w+)\n(?<text>.*?)^```$",
        RegexOptions.Multiline | RegexOptions.Singleline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Block();

    [GeneratedRegex("""^alias circuit-transient="dotnet '\$PWD/(?<path>.*)'"$""",
        RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex ProgramPath();

    [GeneratedRegex("^dotnet run .* -- (?<words>.*)$",
        RegexOptions.Multiline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Demonstration();

    [GeneratedRegex(@"^\$ (?<line>[^\n]*)\n(?<answer>(?!\$ ).*?)(?=^\$ |\z)",
        RegexOptions.Multiline | RegexOptions.Singleline | RegexOptions.ExplicitCapture, 1000)]
    private static partial Regex Command();
}
