using System.Diagnostics;
using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>Runs the program as a process of its own, by way of the shell, with
/// <c>circuit-transient</c> as a word.</summary>
internal static class Shell
{
    private static readonly string Program = Path.ChangeExtension(typeof(App).Assembly.Location, ".dll");

    /// <summary>Runs a line of the shell in a folder; its status is that of its last command.</summary>
    public static CommandLineAnswer Run(string folder, string line)
    {
        using var shell = Start(folder, line);
        var error = shell.StandardError.ReadToEndAsync(TestContext.Current.CancellationToken);
        var output = shell.StandardOutput.ReadToEnd();
        shell.WaitForExit();
        return new CommandLineAnswer(shell.ExitCode, output, error.Result);
    }

    /// <summary>Starts a line of the shell in a folder; <c>exec</c> makes the program the process
    /// itself.</summary>
    public static Process Start(string folder, string line)
    {
        var start = new ProcessStartInfo("bash", ["-c", line])
        {
            WorkingDirectory = folder,
            UseShellExecute = false,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        };
        start.Environment["BASH_FUNC_circuit-transient%%"] = $"() {{ dotnet '{Program}' \"$@\"; }}";
        start.Environment["PROGRAM"] = Program;
        return Process.Start(start)!;
    }
}
