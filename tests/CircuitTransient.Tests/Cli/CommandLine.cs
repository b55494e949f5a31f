using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>Runs the command line inside the test, with a folder of its own for circuits and
/// results.</summary>
public sealed class CommandLine : IDisposable
{
    private readonly DirectoryInfo folder = Directory.CreateTempSubdirectory("circuit-transient-");

    /// <summary>The folder of circuits.</summary>
    public string Folder => folder.FullName;

    /// <summary>The folder of results.</summary>
    public string Results => Path.Combine(Folder, "results");

    /// <summary>Every file below the folder of results, by its path from there.</summary>
    public IEnumerable<string> Written =>
        Directory.Exists(Results)
            ? Directory.EnumerateFiles(Results, "*", SearchOption.AllDirectories)
                .Select(path => Path.GetRelativePath(Results, path).Replace('\\', '/'))
                .Order(StringComparer.Ordinal)
            : [];

    /// <summary>Puts a circuit into the folder.</summary>
    /// <returns>Its path.</returns>
    public string Circuit(string name, string text)
    {
        var path = Path.Combine(Folder, name);
        File.WriteAllText(path, text);
        return path;
    }

    /// <summary>Runs <c>solve</c> with its results below <see cref="Results"/>.</summary>
    public CommandLineAnswer Solve(params string[] args) => Run(["solve", "--out", Results, .. args]);

    /// <summary>Runs one command line.</summary>
    public CommandLineAnswer Run(params string[] args)
    {
        using var output = new StringWriter { NewLine = "\n" };
        using var error = new StringWriter { NewLine = "\n" };
        using var streams = new Streams(output, error);
        var status = App.Run(args, streams, TestContext.Current.CancellationToken);
        return new CommandLineAnswer(status, output.ToString(), error.ToString());
    }

    /// <summary>Puts the unfinished work of a study into the folder of results.</summary>
    public void Leave(string study, string stem, string sha256, string asked, Action<BinaryWriter> save)
    {
        using var error = new StringWriter();
        using var streams = new Streams(TextWriter.Null, error);
        StudyPartial.In(Results, $"{stem}.cause", study, "work")
            .Leave(new PartialIdentity(sha256, "", asked), save, "a part", [study], streams);
        Assert.StartsWith("stopped after a part; go on with `circuit-transient ", error.ToString());
    }

    /// <inheritdoc/>
    public void Dispose() => folder.Delete(recursive: true);
}

/// <summary>What one command line came to.</summary>
public sealed record CommandLineAnswer(int Status, string Output, string Error);
