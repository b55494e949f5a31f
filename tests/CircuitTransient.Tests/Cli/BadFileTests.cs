using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public sealed class BadFileTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void A_missing_file_is_named()
    {
        var path = Path.Combine(commandLine.Folder, "none.cause");

        Assert.Equal(
            new CommandLineAnswer(
                ExitStatus.FileTrouble, "", $"error: {path} cannot be read: there is no such file\n"),
            commandLine.Solve(path));
    }

    [Fact]
    public void A_folder_is_not_a_circuit() =>
        Assert.Equal(
            new CommandLineAnswer(
                ExitStatus.FileTrouble, "", $"error: {commandLine.Folder} cannot be read: it is a folder\n"),
            commandLine.Run("check", commandLine.Folder));

    [Fact]
    public void A_file_where_the_folder_of_results_should_be_is_named_and_the_answer_still_given()
    {
        File.WriteAllText(commandLine.Results, "");

        var run = commandLine.Solve(commandLine.Circuit("filter.cause", Circuits.Holding));

        Assert.Equal(ExitStatus.FileTrouble, run.Status);
        Assert.Equal(
            $"error: the results cannot be written to {commandLine.Results}/filter: "
            + $"{commandLine.Results} is a file, not a folder\n",
            run.Error);
        Assert.Contains("The requirement holds.", run.Output);
    }

    [Fact]
    public void A_folder_where_a_file_of_results_should_be_is_named()
    {
        Directory.CreateDirectory(Path.Combine(commandLine.Results, "filter", "results.json"));

        var run = commandLine.Solve(commandLine.Circuit("filter.cause", Circuits.Holding));

        Assert.Equal(ExitStatus.FileTrouble, run.Status);
        Assert.Equal(
            $"error: the results cannot be written to {commandLine.Results}/filter: "
            + $"{commandLine.Results}/filter/results.json is a folder, not a file\n",
            run.Error);
    }

    [Fact]
    public void A_folder_of_results_that_cannot_be_made_is_said_in_words_of_our_own()
    {
        // No file system takes a name of 300 characters.
        var folder = new string('x', 300);

        var run = commandLine.Run(
            "solve", "--out", folder, commandLine.Circuit("filter.cause", Circuits.Holding));

        Assert.Equal(ExitStatus.FileTrouble, run.Status);
        Assert.Equal(
            $"error: the results cannot be written to {folder}/filter: the folder cannot be made there\n",
            run.Error);
    }

    [Theory]
    [InlineData("check")]
    [InlineData("solve")]
    public void Bytes_that_are_no_circuit_are_mistakes(string command)
    {
        var noise = new byte[5000];
        new Random(20250601).NextBytes(noise);
        var files = new (string Name, byte[] Bytes)[]
        {
            ("empty.cause", []),
            ("noise.cause", noise),
            ("letters.cause", [.. noise.Select(b => (byte)(32 + (b % 95)))]),
            ("quotes.cause", [.. noise.Select(b => (byte)"\"\n:+-^()[]#,"[b % 12])]),
            ("large.cause", new byte[17 << 20]),
            ("long.cause", [.. Enumerable.Repeat((byte)'x', 1_000_000)]),
            ("deep.cause", [.. "resistor R from a to b : "u8, .. Enumerable.Repeat((byte)'(', 1_000_000)]),
        };

        Assert.All(files, file =>
        {
            var path = Path.Combine(commandLine.Folder, file.Name);
            File.WriteAllBytes(path, file.Bytes);

            var run = commandLine.Run(command, path);

            Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
            Assert.Contains($"{path}:", run.Error);
            Assert.DoesNotContain("   at ", run.Error);
            Assert.InRange(run.Error.Length, 1, 20_000);
        });
    }
}
