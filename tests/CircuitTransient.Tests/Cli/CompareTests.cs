using CircuitTransient.Cli;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Tests.Reports;
using CircuitTransient.Tests.Studies.Comparing;

namespace CircuitTransient.Tests.Cli;

public sealed class CompareTests : IDisposable
{
    private static readonly string Plain = SampleDocuments.Json(SampleDocuments.Text());
    private static readonly string Halved = SampleDocuments.Json(SampleDocuments.Text(ohms: 500));
    private static readonly DocumentSchema Schema = new(CompareJson.Schema);

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void A_verdict_that_turns_for_the_worse_ends_with_1_and_stands_first()
    {
        var run = Compare(Plain, Halved);

        Assert.Equal((ExitStatus.RequirementBroken, ""), (run.Status, run.Error));
        var lines = run.Output.Split('\n');
        Assert.Equal(
            "One verdict turned for the worse. Before, 2 of 2 requirements and ratings hold; now 1 of 2",
            lines[1]);
        Assert.Contains(lines, line => line.StartsWith("  held → broken  voltage of b at most 9 V"));
        Assert.Contains(lines, line => line.Contains("1.000 kΩ  → 500.0 Ω"));
        Assert.All(lines, line => Assert.True(line.Length <= 100, line));
    }

    [Fact]
    public void No_verdict_for_the_worse_ends_with_0()
    {
        Assert.Equal(ExitStatus.Success, Compare(Halved, Plain).Status);
        var same = Compare(Plain, Plain);
        Assert.Equal(ExitStatus.Success, same.Status);
        Assert.Contains("The two are the same.", same.Output);
    }

    [Fact]
    public void The_document_obeys_its_schema()
    {
        var run = Compare(Plain, Halved, "--json");

        Assert.Empty(Schema.Faults(run.Output));
        Assert.NotEmpty(Schema.Faults(run.Output.Replace("compare 1", "compare 2")));
    }

    [Fact]
    public void What_is_within_a_fraction_is_overlooked()
    {
        Assert.Contains("max  8.782 V", Compare(Plain, Halved).Output);
        Assert.DoesNotContain("max  8.782 V", Compare(Plain, Halved, "--within", "20 %").Output);
    }

    [Theory]
    [InlineData("20", "`20` is not in per cent")]
    [InlineData("1 V", "`1 V` is not in per cent")]
    [InlineData("-1 %", "`-` stands where a number in per cent should")]
    [InlineData("", "nothing is given")]
    public void A_fraction_that_is_none_ends_with_2(string within, string message)
    {
        var run = Compare(Plain, Halved, "--within", within);

        Assert.Equal(ExitStatus.Mistake, run.Status);
        Assert.Contains(message, run.Error);
    }

    [Fact]
    public void Arrays_are_compared_circuit_by_circuit()
    {
        var both = $"[{Plain},{SampleDocuments.Json(SampleDocuments.Text(), "other.cause")}]";
        var turned = $"[{SampleDocuments.Json(SampleDocuments.Text(), "other.cause")},{Halved}]";

        var run = Compare(both, turned, "--json");
        Assert.Equal(ExitStatus.RequirementBroken, run.Status);
        Assert.Empty(Schema.Faults(run.Output));
        var lone = Compare(both, Halved);
        Assert.Equal(ExitStatus.Mistake, lone.Status);
        Assert.Contains("a.json holds results of other.cause", lone.Error);
    }

    [Fact]
    public void A_circuit_is_told_to_be_solved_first()
    {
        var circuit = commandLine.Circuit("rc.cause", SampleDocuments.Text());
        var run = commandLine.Run("compare", circuit, circuit);

        Assert.Equal(ExitStatus.Mistake, run.Status);
        Assert.Contains("is a circuit, not its results: solve it first", run.Error);
    }

    [Fact]
    public void A_file_that_is_not_there_ends_with_5_and_one_that_is_no_document_with_2()
    {
        Assert.Equal(ExitStatus.FileTrouble, commandLine.Run("compare", "none.json", "none.json").Status);
        Assert.Equal(ExitStatus.Mistake, Compare(Plain, "{\"format\": \"circuit-transient scan 1\"}").Status);
        var path = commandLine.Circuit("bytes.json", "");
        File.WriteAllBytes(path, [0x7B, 0xFF, 0x7D]);
        Assert.Contains("not UTF-8 text: byte 2", commandLine.Run("compare", path, path).Error);
    }

    [Fact]
    public void A_folder_of_results_is_named_with_the_file_in_it()
    {
        commandLine.Solve(commandLine.Circuit("rc.cause", SampleDocuments.Text()));
        var folder = Path.Combine(commandLine.Results, "rc");
        var run = commandLine.Run("compare", folder, folder);

        Assert.Equal(ExitStatus.FileTrouble, run.Status);
        Assert.Contains("it is a folder; give " + Path.Combine(folder, "results.json"), run.Error);
    }

    private CommandLineAnswer Compare(string before, string after, params string[] more) => commandLine.Run(
        ["compare", commandLine.Circuit("a.json", before), commandLine.Circuit("b.json", after), .. more]);

    [Fact]
    public void Documents_of_different_circuits_are_said_to_be_and_end_with_1_where_a_verdict_is_gone()
    {
        var other = SampleDocuments.Json(
            """
            source   Supply at in : 1 V
            resistor Rload at in : 1 Ω
            observe current through Rload
            until 1 ms
            """, "other.cause");

        var run = Compare(Plain, other);

        Assert.Equal(ExitStatus.RequirementBroken, run.Status);
        var lines = run.Output.Split('\n');
        Assert.StartsWith(
            "2 requirements and ratings are no longer judged. The two documents are of different circuits,",
            lines[1]);
        Assert.StartsWith("rc.cause and other.cause. Of what both judge, no verdict turned.", lines[2]);
        Assert.Empty(Schema.Faults(Compare(Plain, other, "--json").Output));
        Assert.Equal(ExitStatus.Success, Compare(other, Plain).Status);
    }

    [Fact]
    public void A_requirement_taken_out_of_the_same_circuit_is_said_first_and_ends_with_0()
    {
        var less = SampleDocuments.Json(
            SampleDocuments.Text().Replace("require voltage of b at most 9 V", ""));

        var run = Compare(Plain, less);

        Assert.Equal(ExitStatus.Success, run.Status);
        Assert.StartsWith(
            "One requirement is no longer judged. Of what both judge,", run.Output.Split('\n')[1]);
        Assert.DoesNotContain("different circuits", run.Output);
    }
}
