using System.Text.Json;
using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public sealed class SolveTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void A_circuit_that_holds_ends_with_0_a_summary_and_its_files()
    {
        var run = commandLine.Solve(commandLine.Circuit("filter.cause", Circuits.Holding));

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Contains("The requirement holds.", run.Output);
        Assert.Contains("results/filter/results.json", run.Output);
        Assert.Equal(
            [
                "filter/report.html", "filter/results.json", "filter/waveforms.csv", "filter/waveforms.png",
                "filter/waveforms.svg",
            ],
            commandLine.Written);
    }

    [Fact]
    public void A_broken_requirement_ends_with_1_and_the_same_files()
    {
        var run = commandLine.Solve(commandLine.Circuit("filter.cause", Circuits.Broken));

        Assert.Equal((ExitStatus.RequirementBroken, ""), (run.Status, run.Error));
        Assert.Contains("The requirement is broken.", run.Output);
        Assert.Equal(5, commandLine.Written.Count());
    }

    [Fact]
    public void A_mistake_ends_with_2_on_stderr_and_without_files()
    {
        var run = commandLine.Solve(commandLine.Circuit("filter.cause", Circuits.Mistaken));

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains("filter.cause:1:32: error: ", run.Error);
        Assert.Empty(commandLine.Written);
    }

    [Fact]
    public void An_interval_without_a_unique_solution_ends_with_3_on_stderr_and_without_files()
    {
        var run = commandLine.Solve(commandLine.Circuit("filter.cause", Circuits.WithoutUniqueSolution));

        Assert.Equal((ExitStatus.NoUniqueSolution, ""), (run.Status, run.Output));
        Assert.Contains("Tie", run.Error);
        Assert.Empty(commandLine.Written);
    }

    [Fact]
    public void Several_files_get_a_line_each_and_the_worst_status()
    {
        var run = commandLine.Solve(
            "--no-files",
            commandLine.Circuit("a.cause", Circuits.Broken),
            commandLine.Circuit("b.cause", Circuits.Mistaken),
            commandLine.Circuit("c.cause", Circuits.Holding));

        Assert.Equal(ExitStatus.Mistake, run.Status);
        Assert.Equal(
            $"{commandLine.Folder}/a.cause: The requirement is broken.\n"
            + $"{commandLine.Folder}/b.cause: not solved, it has mistakes\n"
            + $"{commandLine.Folder}/c.cause: The requirement holds.\n",
            run.Output);
    }

    [Fact]
    public void The_document_on_stdout_is_the_one_in_the_folder()
    {
        var run = commandLine.Solve("--json", commandLine.Circuit("filter.cause", Circuits.Holding));

        Assert.Equal(File.ReadAllText(Path.Combine(commandLine.Results, "filter/results.json")), run.Output);
    }

    [Fact]
    public void Several_documents_on_stdout_are_an_array_of_those_that_were_solved()
    {
        var run = commandLine.Solve(
            "--json", "--no-files",
            commandLine.Circuit("a.cause", Circuits.Holding),
            commandLine.Circuit("b.cause", Circuits.Mistaken),
            commandLine.Circuit("c.cause", Circuits.Broken));
        using var document = JsonDocument.Parse(run.Output);

        Assert.Equal(
            ["a.cause", "c.cause"],
            document.RootElement.EnumerateArray()
                .Select(d => Path.GetFileName(d.GetProperty("circuit").GetProperty("file").GetString())));
    }

    [Fact]
    public void The_same_file_gives_the_same_bytes()
    {
        var circuit = commandLine.Circuit("filter.cause", Circuits.Holding);
        var first = commandLine.Solve(circuit);
        var firstFiles = commandLine.Written.ToDictionary(f => f, Bytes);

        var second = commandLine.Solve(circuit);

        Assert.Equal(first, second);
        Assert.NotEmpty(firstFiles);
        Assert.All(firstFiles, file => Assert.Equal(file.Value, Bytes(file.Key)));
    }

    [Fact]
    public void Quiet_without_files_says_nothing_but_the_status() =>
        Assert.Equal(
            new CommandLineAnswer(ExitStatus.RequirementBroken, "", ""),
            commandLine.Solve("--quiet", "--no-files", commandLine.Circuit("filter.cause", Circuits.Broken)));

    private byte[] Bytes(string file) => File.ReadAllBytes(Path.Combine(commandLine.Results, file));
}
