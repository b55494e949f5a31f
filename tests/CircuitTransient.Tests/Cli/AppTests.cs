using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public sealed class AppTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Theory]
    [InlineData("",
        "error: say what to do: check, solve, spread, scan, size, formula, overlay or compare\n"
        + "see `circuit-transient --help`\n")]
    [InlineData("slove",
        "error: there is no command `slove`; did you mean `solve`?\nsee `circuit-transient --help`\n")]
    [InlineData("draw",
        "error: there is no command `draw`, only check, solve, spread, scan, size, formula, overlay, "
        + "compare\nsee `circuit-transient --help`\n")]
    [InlineData("solve a.cause --strct",
        "error: there is no option `--strct`; did you mean `--strict`?\n"
        + "see `circuit-transient solve --help`\n")]
    [InlineData("solve a.cause --samples many",
        "error: `many` is not a whole number from 2 to 1000000\nsee `circuit-transient solve --help`\n")]
    [InlineData("solve",
        "error: say which circuit file: `circuit-transient solve FILE`\n"
        + "see `circuit-transient solve --help`\n")]
    [InlineData("check",
        "error: say which circuit file: `circuit-transient check FILE`\n"
        + "see `circuit-transient check --help`\n")]
    [InlineData("solve a.cause --out",
        "error: `--out` needs a value: `--out DIR`\nsee `circuit-transient solve --help`\n")]
    [InlineData("solve a.cause ./a.cause", "error: `a.cause` is given twice\n")]
    [InlineData("solve a/x.cause b/x.cause",
        "error: two files are named `x`: their results would overwrite each other\n")]
    public void A_wrong_command_line_is_answered_on_stderr_in_a_sentence(string line, string answer)
    {
        var run = commandLine.Run(line.Split(' ', StringSplitOptions.RemoveEmptyEntries));

        Assert.Equal(new CommandLineAnswer(ExitStatus.Mistake, "", answer), run);
    }

    [Theory]
    [InlineData("--help")]
    [InlineData("-h")]
    [InlineData("solve --help")]
    [InlineData("check --help")]
    public void Help_stands_on_stdout(string line)
    {
        var run = commandLine.Run(line.Split(' '));

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Contains("Usage:", run.Output);
    }

    [Theory]
    [InlineData("--version")]
    [InlineData("solve --version")]
    public void The_version_is_that_of_the_program(string line)
    {
        var version = typeof(App).Assembly.GetName().Version!.ToString(3);

        Assert.Equal(new CommandLineAnswer(0, $"{version}\n", ""), commandLine.Run(line.Split(' ')));
    }

    [Theory]
    [InlineData("circuit-transient so", "solve\n")]
    [InlineData("circuit-transient solve --st", "--strict\n")]
    public void A_shell_can_complete_commands_options_and_values(string line, string completions) =>
        Assert.Equal(completions, commandLine.Run($"[suggest:{line.Length}]", line).Output);

    [Fact]
    public void A_shell_can_complete_circuit_files()
    {
        commandLine.Circuit("bus.cause", "");
        commandLine.Circuit("bus.txt", "");
        var line = $"circuit-transient check {commandLine.Folder}/b";

        var completions = commandLine.Run($"[suggest:{line.Length}]", line).Output;

        Assert.Equal($"{commandLine.Folder}/bus.cause\n", completions);
    }
}
