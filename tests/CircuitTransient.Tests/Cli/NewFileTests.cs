using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public sealed class NewFileTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void A_new_file_is_written_whole()
    {
        var path = Path.Combine(commandLine.Folder, "new.cause");

        Assert.Equal("", Write(path, isWritten: true));
        Assert.Equal("Ω", File.ReadAllText(path));
    }

    [Fact]
    public void Nothing_is_written_over()
    {
        var path = commandLine.Circuit("mine.cause", "mine");

        Assert.Equal(
            $"error: {path} cannot be written: it exists already, and nothing is written over it; name "
                + "another file\n",
            Write(path, isWritten: false));
        Assert.Equal("mine", File.ReadAllText(path));
        Assert.Single(Directory.EnumerateFileSystemEntries(commandLine.Folder));
    }

    [Fact]
    public void No_folder_is_made_for_it()
    {
        var path = Path.Combine(commandLine.Folder, "nowhere", "new.cause");

        Assert.Equal($"error: {path} cannot be written: there is no such folder\n", Write(path, false));
    }

    private static string Write(string path, bool isWritten)
    {
        using var error = new StringWriter { NewLine = "\n" };
        using var streams = new Streams(TextWriter.Null, error);
        Assert.Equal(isWritten, NewFile.TryWrite(path, "Ω", streams));
        return error.ToString();
    }
}
