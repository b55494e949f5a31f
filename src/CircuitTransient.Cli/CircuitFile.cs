using System.Diagnostics;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>A circuit file that was read, or the exit status that says why not.</summary>
public sealed class CircuitFile
{
    private readonly string path;
    private readonly SortedDictionary<string, string> beside = new(StringComparer.Ordinal);

    private CircuitFile(string path, SourceText? source, int status)
    {
        this.path = path;
        Source = source;
        Status = status;
    }

    /// <summary>Its text; null where it could not be read.</summary>
    public SourceText? Source { get; }

    /// <summary>Success, or what kept it, or a file it names, from being read.</summary>
    public int Status { get; private set; }

    /// <summary>SHA-256 of every file that was read beside it, in the order of their names.</summary>
    public IEnumerable<string> BesideSha256 => beside.Values;

    /// <summary>Reads a file; what is wrong with it has been said when this returns.</summary>
    public static CircuitFile Read(string path, Streams streams)
    {
        try
        {
            var text = Decode(path);
            streams.Report(text.Diagnostics);
            return new(path, text.Value, text.Succeeded ? ExitStatus.Success : ExitStatus.Mistake);
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            var reason = Directory.Exists(path) ? "it is a folder" : FileTrouble.Reason(trouble);
            streams.Complain($"{path} cannot be read: {reason}");
            return new(path, null, ExitStatus.FileTrouble);
        }
    }

    /// <summary>Says why nothing came of the file.</summary>
    /// <returns>The exit status of that.</returns>
    public int Refuse(AnalysisOutcome refused, Streams streams)
    {
        switch (refused)
        {
            case NoUniqueSolution trouble:
                streams.Report(trouble.Diagnostics);
                return ExitStatus.NoUniqueSolution;
            case Mistakes mistakes:
                streams.Report(mistakes.Diagnostics);
                return Math.Max(ExitStatus.Mistake, Status);
            default:
                throw new UnreachableException($"no status for {refused}");
        }
    }

    /// <summary>Reads a file that the circuit names, found beside the circuit; nothing where that
    /// fails.</summary>
    public Outcome<SourceText> ReadBeside(string name)
    {
        var place = Path.Combine(Path.GetDirectoryName(path) ?? "", name);
        try
        {
            var text = Decode(place);
            beside[name] = text.Value?.Sha256 ?? "";
            return text;
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            Status = ExitStatus.FileTrouble;
            return new(null, []);
        }
    }

    private static Outcome<SourceText> Decode(string path) =>
        SourceText.Read(path, BoundedFile.Read(path, SourceText.LargestFile));
}
