using System.Collections.Concurrent;

namespace CircuitTransient.Cli;

/// <summary>A file under its temporary name: it becomes the real one by a move, or is removed.</summary>
public sealed class UnfinishedFile : IDisposable
{
    // The one piece of state of the process: what an interruption has to sweep away.
    private static readonly ConcurrentDictionary<string, byte> Unfinished = new(StringComparer.Ordinal);

    private readonly string path;
    private readonly string temporaryPath;

    /// <summary>Writes the whole content beside its place.</summary>
    public UnfinishedFile(string path, ReadOnlyMemory<byte> content)
        : this(path, file => file.Write(content.Span))
    {
    }

    /// <summary>Writes the whole content beside its place.</summary>
    /// <param name="path">Its place.</param>
    /// <param name="write">Writes the content.</param>
    public UnfinishedFile(string path, Action<Stream> write)
    {
        this.path = path;
        temporaryPath = $"{path}.{Environment.ProcessId}.unfinished";
        Unfinished[temporaryPath] = 0;
        try
        {
            using var file = File.Create(temporaryPath);
            write(file);
        }
        catch
        {
            Dispose();
            throw;
        }
    }

    /// <summary>Whether something is being written anywhere in the process.</summary>
    public static bool IsAny => !Unfinished.IsEmpty;

    /// <summary>Removes what is unfinished anywhere in the process.</summary>
    public static void RemoveAll()
    {
        foreach (var temporary in Unfinished.Keys)
        {
            File.Delete(temporary);
        }
    }

    /// <summary>Puts the file in its place.</summary>
    /// <param name="overwrites">Whether what stood there goes; else it is an error that something
    /// does.</param>
    public void Finish(bool overwrites = true)
    {
        File.Move(temporaryPath, path, overwrites);
        Unfinished.TryRemove(temporaryPath, out _);
    }

    /// <summary>Removes the file if it was not finished.</summary>
    public void Dispose()
    {
        if (Unfinished.TryRemove(temporaryPath, out _))
        {
            File.Delete(temporaryPath);
        }
    }
}
