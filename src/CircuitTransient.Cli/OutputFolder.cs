using System.Text;

namespace CircuitTransient.Cli;

/// <summary>A file to be written: its name in the folder and its whole content.</summary>
public sealed record OutputFile(string Name, ReadOnlyMemory<byte> Content)
{
    /// <summary>A text file, in UTF-8 without a byte-order mark.</summary>
    public static OutputFile OfText(string name, string text) => new(name, Encoding.UTF8.GetBytes(text));
}

/// <summary>The folder of one circuit's results.</summary>
public static class OutputFolder
{
    /// <summary>The folder for a circuit file: its stem below the folder asked for.</summary>
    public static string For(string folder, string file) => Path.Combine(folder, StemOf(file));

    /// <summary>A file's name without its folder and extension.</summary>
    public static string StemOf(string file) =>
        Path.GetFileNameWithoutExtension(file) is { Length: > 0 } stem ? stem : Path.GetFileName(file);

    /// <summary>What in the folder's place or in it keeps files from being written; null where nothing
    /// is seen.</summary>
    public static string? Hindrance(string folder, IReadOnlyList<OutputFile> files)
    {
        if (FileInTheWay(folder) is { } obstacle)
        {
            return $"{obstacle} is a file, not a folder";
        }

        var places = files.Select(file => Path.Combine(folder, file.Name));
        return places.FirstOrDefault(Directory.Exists) is { } place
            ? $"{place} is a folder, not a file"
            : null;
    }

    /// <summary>Writes all files, or says why that cannot be done.</summary>
    public static bool TryWrite(
        string folder, IReadOnlyList<OutputFile> files, Streams streams, CancellationToken cancellation)
    {
        try
        {
            Write(folder, files, cancellation);
            return true;
        }
        catch (Exception trouble) when (trouble.IsFileTrouble())
        {
            var reason = Hindrance(folder, files)
                ?? (Directory.Exists(folder) || trouble is UnauthorizedAccessException
                    ? FileTrouble.Reason(trouble)
                    : "the folder cannot be made there");
            streams.Complain($"the results cannot be written to {folder}: {reason}");
            return false;
        }
    }

    /// <summary>The file that stands where a folder is needed; null where none does.</summary>
    private static string? FileInTheWay(string folder)
    {
        for (var place = folder; !string.IsNullOrEmpty(place); place = Path.GetDirectoryName(place))
        {
            if (File.Exists(place))
            {
                return place;
            }
        }

        return null;
    }

    /// <summary>Writes all files under temporary names, then puts all of them in place: none is ever seen
    /// half written.</summary>
    public static void Write(string folder, IReadOnlyList<OutputFile> files, CancellationToken cancellation)
    {
        Directory.CreateDirectory(folder);
        var unfinished = new List<UnfinishedFile>();
        try
        {
            foreach (var file in files)
            {
                cancellation.ThrowIfCancellationRequested();
                unfinished.Add(new UnfinishedFile(Path.Combine(folder, file.Name), file.Content));
            }

            unfinished.ForEach(file => file.Finish());
        }
        finally
        {
            unfinished.ForEach(file => file.Dispose());
        }
    }
}
