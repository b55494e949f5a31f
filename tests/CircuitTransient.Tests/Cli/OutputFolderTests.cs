using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public sealed class OutputFolderTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Theory]
    [InlineData("bus.cause", "bus")]
    [InlineData("a/b/bus.v2.cause", "bus.v2")]
    [InlineData("bus", "bus")]
    [InlineData(".cause", ".cause")]
    public void A_folder_is_named_by_the_stem_of_its_circuit(string file, string folder) =>
        Assert.Equal(Path.Combine("output", folder), OutputFolder.For("output", file));

    [Fact]
    public void Files_are_written_whole_over_what_stood_there()
    {
        Write(OutputFile.OfText("a.txt", "long ago"));

        Write(OutputFile.OfText("a.txt", "Ω"));

        Assert.Equal([0xCE, 0xA9], File.ReadAllBytes(Path.Combine(commandLine.Results, "a.txt")));
        Assert.Equal(["a.txt"], commandLine.Written);
    }

    [Fact]
    public void A_file_that_cannot_be_put_in_place_leaves_nothing_unfinished()
    {
        Directory.CreateDirectory(Path.Combine(commandLine.Results, "b.txt"));

        Assert.ThrowsAny<Exception>(
            () => Write(OutputFile.OfText("a.txt", "a"), OutputFile.OfText("b.txt", "b")));

        Assert.Equal(["a.txt"], commandLine.Written);
    }

    [Fact]
    public void A_cancelled_writing_leaves_the_former_files()
    {
        Write(OutputFile.OfText("a.txt", "former"));

        Assert.Throws<OperationCanceledException>(() => OutputFolder.Write(
            commandLine.Results, [OutputFile.OfText("a.txt", "new")], new CancellationToken(canceled: true)));

        Assert.Equal("former", File.ReadAllText(Path.Combine(commandLine.Results, "a.txt")));
        Assert.Equal(["a.txt"], commandLine.Written);
    }

    private void Write(params OutputFile[] files) =>
        OutputFolder.Write(commandLine.Results, files, TestContext.Current.CancellationToken);
}
