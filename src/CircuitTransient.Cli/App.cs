using System.CommandLine;
using System.CommandLine.Invocation;

namespace CircuitTransient.Cli;

/// <summary>The whole command line: each command is a file beside this one.</summary>
public static class App
{
    private const string Name = "circuit-transient";

    /// <summary>Runs one command line.</summary>
    /// <param name="args">The words after the program's name.</param>
    /// <param name="streams">Where to write.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>One of <see cref="ExitStatus"/>.</returns>
    public static int Run(string[] args, Streams streams, CancellationToken cancellation)
    {
        try
        {
            var parsed = Commands().Parse(args, new() { ResponseFileTokenReplacer = null });
            var status = parsed.Action is ParseErrorAction
                ? Refuse(parsed, streams)
                : Invoke(parsed, streams);
            streams.Output.Flush();
            return status;
        }
        catch (OperationCanceledException)
        {
            return ExitStatus.Interrupted;
        }
        catch (IOException trouble)
        {
            streams.Error.WriteLine($"error: the output could not be written: {trouble.Message}");
            return ExitStatus.FileTrouble;
        }
        catch (Exception defect)
        {
            streams.Error.WriteLine($"error: a defect of {Name}, not of your circuit: {defect.Message}");
            streams.Error.WriteLine("please report it together with the circuit file");
            return ExitStatus.SelfCheckFailed;
        }
    }

    private static RootCommand Commands() =>
        new("Exact transients of switched RLC circuits, every peak traced to its causes.");

    private static int Invoke(ParseResult parsed, Streams streams) =>
        parsed.Invoke(new()
        {
            EnableDefaultExceptionHandler = false,
            Output = streams.Output,
            Error = streams.Error,
        });

    private static int Refuse(ParseResult parsed, Streams streams)
    {
        foreach (var error in parsed.Errors)
        {
            streams.Error.WriteLine($"error: {error.Message}");
        }

        return ExitStatus.Mistake;
    }
}
