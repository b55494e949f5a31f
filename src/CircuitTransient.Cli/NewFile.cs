using System.Text;

namespace CircuitTransient.Cli;

/// <summary>A file that a command makes and that must not stand there yet.</summary>
public static class NewFile
{
    /// <summary>Why a file cannot be made new at a path, before any work is done for it; null where nothing
    /// is seen.</summary>
    public static string? Hindrance(string path) =>
        File.Exists(path) ? "it exists already, and nothing is written over it; name another file"
        : Directory.Exists(path) ? "it is a folder"
        : Path.GetDirectoryName(Path.GetFullPath(path)) is { } folder && !Directory.Exists(folder)
            ? "there is no such folder"
        : null;

    /// <summary>Says why a file cannot be made new at a path.</summary>
    /// <returns>The status to end with before any work: a mistake where something stands there, trouble with
    /// files where it cannot be written; null where nothing is seen.</returns>
    public static int? Refusal(string path, Streams streams)
    {
        if (Hindrance(path) is not { } hindrance)
        {
            return null;
        }

        streams.Complain($"{path} cannot be written: {hindrance}");
        return File.Exists(path) ? ExitStatus.Mistake : ExitStatus.FileTrouble;
    }

    /// <summary>Writes the whole file, or says why not.</summary>
    public static bool TryWrite(string path, string text, Streams streams)
    {
        try
        {
            if (Refusal(path, streams) is not null)
            {
                return false;
            }

            using var unfinished = new UnfinishedFile(path, Encoding.UTF8.GetBytes(text));
            unfinished.Finish(overwrites: false);
            return true;
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            streams.Complain($"{path} cannot be written: {FileTrouble.Reason(trouble)}");
            return false;
        }
    }
}
