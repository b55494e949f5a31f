using System.CommandLine;
using System.CommandLine.Help;
using System.CommandLine.Invocation;
using System.CommandLine.Parsing;
using CircuitTransient.Text;

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
            var parsed = Commands(streams, cancellation)
                .Parse(args, new() { ResponseFileTokenReplacer = null });
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
            streams.Complain($"the output cannot be written: {FileTrouble.Reason(trouble)}");
            return ExitStatus.FileTrouble;
        }
        catch (Exception defect)
        {
            streams.Complain($"a defect of {Name}, not a mistake of yours:\n{defect}");
            return ExitStatus.SelfCheckFailed;
        }
    }

    private static RootCommand Commands(Streams streams, CancellationToken cancellation)
    {
        var root = new RootCommand("Exact transients of switched circuits, every peak traced to its causes.")
        {
            new CheckCommand(streams, cancellation),
            new SolveCommand(streams, cancellation),
            new SpreadCommand(streams, cancellation),
            new ScanCommand(streams, cancellation),
            new SizeCommand(streams, cancellation),
            new FormulaCommand(streams, cancellation),
            new OverlayCommand(streams, cancellation),
            new CompareCommand(streams, cancellation),
        };
        var help = root.Options.OfType<HelpOption>().Single();
        help.Aliases.Clear();
        help.Aliases.Add("-h");
        help.Description = "Show what can be said.";
        var version = root.Options.OfType<VersionOption>().Single();
        version.Description = "Show the version.";
        version.Recursive = true;
        return root;
    }

    private static int Invoke(ParseResult parsed, Streams streams) =>
        parsed.Invoke(new()
        {
            EnableDefaultExceptionHandler = false,
            Output = streams.Output,
            Error = streams.Error,
        });

    private static int Refuse(ParseResult parsed, Streams streams)
    {
        var command = parsed.CommandResult.Command;
        if (command is RootCommand)
        {
            streams.Complain(Unknown(parsed.UnmatchedTokens is [var word, ..] ? word : null, command));
            streams.Error.WriteLine($"see `{Name} --help`");
            return ExitStatus.Mistake;
        }

        foreach (var error in parsed.Errors)
        {
            streams.Complain(Words(error, command));
        }

        streams.Error.WriteLine($"see `{Name} {command.Name} --help`");
        return ExitStatus.Mistake;
    }

    /// <summary>What is missing in our words; all else says itself.</summary>
    private static string Words(ParseError error, Command command) => error.SymbolResult switch
    {
        ArgumentResult { Tokens: [], Parent: CommandResult } or CommandResult { Tokens: [] }
            when command is CompareCommand =>
            $"say which two results documents: `{Name} compare BEFORE AFTER`",
        ArgumentResult { Tokens: [], Parent: CommandResult } or CommandResult { Tokens: [] } =>
            $"say which circuit file: `{Name} {command.Name} FILE`",
        OptionResult { Tokens: [], Option: var option } =>
            $"`{option.Name}` needs a value: `{option.Name} {option.HelpName}`",
        _ => error.Message,
    };

    private static string Unknown(string? word, Command root)
    {
        var commands = root.Subcommands.Select(command => command.Name).ToList();
        if (word is null)
        {
            return $"say what to do: {string.Join(", ", commands[..^1])} or {commands[^1]}";
        }

        return NearestName.Find(word, commands) is { } nearest
            ? $"there is no command `{word}`; did you mean `{nearest}`?"
            : $"there is no command `{word}`, only {string.Join(", ", commands)}";
    }
}
