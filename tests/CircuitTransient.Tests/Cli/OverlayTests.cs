using System.Text.Json;
using CircuitTransient.Cli;
using CircuitTransient.Tests.Project;
using CircuitTransient.Tests.Reports;

namespace CircuitTransient.Tests.Cli;

public sealed class OverlayTests : IDisposable
{
    private const string Added = "load-pin-loaded: capacitor Cadd from x to pad : 220 pF";

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void A_record_that_the_model_explains_ends_with_0_and_its_files()
    {
        var run = commandLine.Run(
            "overlay", Plant, Record("bare"), "--out", commandLine.Results);

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Contains("The model explains the record to within its noise.", run.Output);
        Assert.Equal(
            [
                "load-pin/overlay.csv", "load-pin/overlay.json", "load-pin/overlay.png",
                "load-pin/overlay.svg", "load-pin/report.html",
            ],
            commandLine.Written);
        Assert.Contains("Records over the model",
            File.ReadAllText(Path.Combine(commandLine.Results, "load-pin/report.html")));
    }

    [Fact]
    public void A_record_that_the_model_does_not_explain_ends_with_1_and_names_the_part_that_would()
    {
        var run = commandLine.Run("overlay", Plant, Record("loaded"), "--no-files");

        Assert.Equal(ExitStatus.RequirementBroken, run.Status);
        Assert.Contains("In the record and not in the model: 21.68 MHz", run.Output);
        Assert.Matches(@"likeliest first:\s+220 pF from x to pad ", run.Output);
    }

    [Fact]
    public void A_part_said_to_be_added_explains_the_record()
    {
        var run = commandLine.Run(
            "overlay", Plant, Record("loaded"), "--no-files", "--json", "--with", Added);

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Empty(OverlaySchema.Faults(run.Output));
        var alignment = JsonDocument.Parse(run.Output).RootElement.GetProperty("records")[0]
            .GetProperty("alignment");
        // The record was made with 3.3 ns, 1.012 and 60 mV (its own noise lets them move by some errors).
        Within(4, 3.3e-9, alignment.GetProperty("offset"));
        Within(4, 1.012, alignment.GetProperty("gain"));
        Within(4, 0.06, alignment.GetProperty("level"));
    }

    [Fact]
    public void The_bare_record_alone_is_refused_for_single_values_and_names_what_it_determines()
    {
        var file = Path.Combine(commandLine.Folder, "fitted.cause");

        var run = commandLine.Run(
            "overlay", Plant, Record("bare"), "--no-files", "--fit", "Llp, Cn, Rd", "--write-fitted", file);

        Assert.Equal(ExitStatus.RequirementBroken, run.Status);
        Assert.Contains("The record does not tell Llp, Cn and Rd apart: only Llp·(Cn + Cpr) is determined.",
            run.Output);
        Assert.Contains("is not written: the records do not determine every value", run.Error);
        Assert.False(File.Exists(file));
    }

    [Fact]
    public void Both_records_together_determine_the_values_which_become_a_new_file()
    {
        var file = Path.Combine(commandLine.Folder, "fitted.cause");

        var run = commandLine.Run(
            "overlay", Plant, Record("bare"), Record("loaded"), "--no-files", "--json", "--with", Added,
            "--fit", "Llp, Cn, Rd", "--write-fitted", file);

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Empty(OverlaySchema.Faults(run.Output));
        var values = JsonDocument.Parse(run.Output).RootElement.GetProperty("fit").GetProperty("values");
        // What the records were made with, within a tenth of a per cent.
        Assert.Equal(182e-9, values[0].GetProperty("value").GetDouble(), 182e-12);
        Assert.Equal(71e-12, values[1].GetProperty("value").GetDouble(), 71e-15);
        Assert.Matches("inductor  Llp from a to x : 18[0-9.]+ nH\n", File.ReadAllText(file));
        var again = commandLine.Run("overlay", file, Record("bare"), "--no-files");
        Assert.Equal(ExitStatus.Success, again.Status);
    }

    [Fact]
    public void Nothing_that_stands_is_written_over()
    {
        var standing = commandLine.Circuit("standing.cause", "as it was");

        var run = commandLine.Run(
            "overlay", Plant, Record("bare"), "--no-files", "--fit", "Llp", "--write-fitted", standing);

        Assert.Equal(ExitStatus.Mistake, run.Status);
        Assert.Contains("it exists already, and nothing is written over it", run.Error);
        Assert.Equal("as it was", File.ReadAllText(standing));
    }

    [Theory]
    [InlineData(ExitStatus.FileTrouble, "missing.csv cannot be read: there is no such file", "missing.csv")]
    [InlineData(ExitStatus.Mistake, "--as:1:12: error: there is no node `nowhere`", "--as",
        "voltage of nowhere")]
    [InlineData(ExitStatus.Mistake, "--with:1:30: error: `220` has no unit", "--with",
        "capacitor C9 from x to pad : 220")]
    [InlineData(ExitStatus.Mistake, "--fit:1:6: error: there is no named value `Lp` ", "--fit", "Llp, Lp")]
    [InlineData(ExitStatus.Mistake, "--offset:1:1: error: `3` has no unit", "--offset", "3")]
    [InlineData(ExitStatus.Mistake, "the record is in V, `current through Llp` is in A", "--as",
        "current through Llp")]
    public void Mistakes_are_shown_where_they_were_made(int status, string expected, params string[] args)
    {
        var run = commandLine.Run(
            [
                "overlay", Plant, .. args is ["missing.csv"] ? args : [Record("bare"), .. args], "--no-files",
            ]);

        Assert.Equal(status, run.Status);
        Assert.Contains(expected, run.Error);
    }

    [Fact]
    public void The_instrument_and_the_generator_are_placed_by_words()
    {
        var run = commandLine.Run(
            "overlay", Plant, Record("loaded"), "--no-files", "--scope-input", "10 MΩ parallel 220 pF",
            "--generator", "1 mΩ");

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Contains("taken with oscilloscope input 10 MΩ parallel 220 pF", run.Output);
        Assert.Contains("taken with generator 1 mΩ", run.Output);
    }

    private static string Plant => Path.Combine(Repository.Root, "netlists", "load-pin.cause");

    private static string Record(string which) =>
        Path.Combine(Repository.Root, "netlists", $"load-pin-{which}.csv");

    private static void Within(double errors, double expected, JsonElement estimate) =>
        Assert.InRange(
            estimate.GetProperty("value").GetDouble() - expected,
            -errors * estimate.GetProperty("standardError").GetDouble(),
            errors * estimate.GetProperty("standardError").GetDouble());
}
