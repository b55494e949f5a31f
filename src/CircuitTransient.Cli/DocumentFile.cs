using System.Text;
using CircuitTransient.Studies.Comparing;
using CircuitTransient.Text;

namespace CircuitTransient.Cli;

/// <summary>A file of results documents.</summary>
internal static class DocumentFile
{
    private const string DocumentName = "results.json";

    private static readonly UTF8Encoding Strict = new(false, throwOnInvalidBytes: true);

    /// <summary>Reads a file; what is wrong with it has been said when this returns.</summary>
    public static (ResultsFile? Results, int Status) Read(string path, Streams streams)
    {
        try
        {
            if (Path.GetExtension(path) == ".cause")
            {
                streams.Complain(
                    $"{path} is a circuit, not its results: solve it first, then compare the " +
                    $"{DocumentName} that `solve` writes");
                return (null, ExitStatus.Mistake);
            }

            var bytes = BoundedFile.Read(path, ResultsReader.LargestFile);
            if (bytes.Length > ResultsReader.LargestFile)
            {
                streams.Complain($"{path} has more than 256 MiB: compare does not read it");
                return (null, ExitStatus.Mistake);
            }

            var text = Strict.GetString(bytes).TrimStart('\uFEFF');
            var read = ResultsReader.Read(new SourceText(path, text));
            streams.Report(read.Diagnostics);
            return (read.Value, read.Succeeded ? ExitStatus.Success : ExitStatus.Mistake);
        }
        catch (DecoderFallbackException fault)
        {
            streams.Complain($"{path} is not UTF-8 text: byte {fault.Index + 1} is none of it");
            return (null, ExitStatus.Mistake);
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            streams.Complain($"{path} cannot be read: {Reason(path, trouble)}");
            return (null, ExitStatus.FileTrouble);
        }
    }

    private static string Reason(string path, Exception trouble)
    {
        if (!Directory.Exists(path))
        {
            return FileTrouble.Reason(trouble);
        }

        var inside = Path.Combine(path, DocumentName);
        return File.Exists(inside) ? $"it is a folder; give {inside}" : "it is a folder";
    }
}
