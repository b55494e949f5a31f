using System.Diagnostics;
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

    [Fact]
    public async Task An_interrupt_stops_the_work_and_leaves_nothing_half_written()
    {
        commandLine.Circuit("grid.cause", Circuits.Slow);
        using var solving = Shell.Start(commandLine.Folder, "exec dotnet \"$PROGRAM\" solve grid.cause");
        await Task.Delay(400, TestContext.Current.CancellationToken);
        Assert.False(solving.HasExited);

        var elapsed = Stopwatch.StartNew();
        using var signal = Process.Start("kill", ["-INT", $"{solving.Id}"]);
        await solving.WaitForExitAsync(TestContext.Current.CancellationToken);

        // How soon is a measurement, not a test: a busy machine decides it.
        TestContext.Current.TestOutputHelper?.WriteLine($"stopped after {elapsed.ElapsedMilliseconds} ms");
        Assert.Equal(ExitStatus.Interrupted, solving.ExitCode);
        Assert.Equal("", await solving.StandardError.ReadToEndAsync(TestContext.Current.CancellationToken));
        var left = Directory.EnumerateFiles(commandLine.Folder, "*", SearchOption.AllDirectories);
        Assert.Equal(["grid.cause"], left.Select(Path.GetFileName));
    }
}
