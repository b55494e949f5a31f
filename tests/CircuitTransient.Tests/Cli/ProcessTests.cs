using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>What only a process of its own can show: its folder, its pipes, its signals.</summary>
public sealed class ProcessTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void Results_go_to_output_below_the_current_folder()
    {
        commandLine.Circuit("filter.cause", Circuits.Holding);

        var run = Shell.Run(commandLine.Folder, "circuit-transient solve filter.cause");

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.True(File.Exists(Path.Combine(commandLine.Folder, "output/filter/results.json")));
    }

    [Fact]
    public void A_reader_that_leaves_early_is_no_trouble()
    {
        commandLine.Circuit("filter.cause", Circuits.Holding);

        var run = Shell.Run(
            commandLine.Folder,
            "circuit-transient solve filter.cause --json --no-files | head -c 1; exit ${PIPESTATUS[0]}");

        Assert.Equal(new CommandLineAnswer(ExitStatus.Success, "{", ""), run);
    }

    [Fact]
    public void A_full_disk_is_said()
    {
        Assert.SkipUnless(File.Exists("/dev/full"), "this system has no device that is always full");
        commandLine.Circuit("filter.cause", Circuits.Holding);

        var run = Shell.Run(
            commandLine.Folder, "circuit-transient solve filter.cause --no-files > /dev/full");

        Assert.Equal(
            new CommandLineAnswer(
                ExitStatus.FileTrouble, "", "error: the output cannot be written: the disk is full\n"),
            run);
    }

    // The circuit comes through a pipe with a name, which opens for writing only once the program opens it
    // for reading: by then it listens. A shell with jobs tells "Exit 130" from "Interrupt" and "Terminated",
    // which is what the signals do to a process that does not listen; it says so by itself or when asked.
    [Theory]
    [InlineData("INT")]
    [InlineData("TERM")]
    public void An_interrupt_stops_the_work_and_leaves_nothing_half_written(string signal)
    {
        commandLine.Circuit("grid.text", Circuits.Slow);

        var run = Shell.Run(
            commandLine.Folder,
            "set -m; mkfifo grid.cause; dotnet \"$PROGRAM\" solve grid.cause > said 2>&1 & program=$!; "
            + $"timeout 60 tee grid.cause < grid.text > /dev/null; kill -{signal} $program; "
            + "while kill -0 $program 2> /dev/null; do sleep 0.02; done; jobs");

        Assert.Matches($@"^\[1\]\+  Exit {ExitStatus.Interrupted} ", run.Error + run.Output);
        Assert.Equal("", File.ReadAllText(Path.Combine(commandLine.Folder, "said")));
        var left = Directory.EnumerateFiles(commandLine.Folder, "*", SearchOption.AllDirectories);
        Assert.Equal(["grid.cause", "grid.text", "said"], left.Select(Path.GetFileName).Order());
    }
}
