using System.Text.Json;
using CircuitTransient.Cli;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Tests.Reports;
using CircuitTransient.Tests.Studies.Scans;

namespace CircuitTransient.Tests.Cli;

public sealed class ScanTests : IDisposable
{
    private const string Ringing = """
        circuit "A cable meets a capacitor"
        source    Feed at s : 48 V
        switch    K from s to a : open, closes at 1 µs
        inductor  L from a to b : 4 µH
        resistor  R from b to c : 100 mΩ
        capacitor C from c to ground : 10 µF, rated 100 V
        observe voltage of c
        require voltage of c at most 80 V because "the input's limit"
        until 200 µs
        """;

    private const string Range = "R from 50 mΩ to 1 Ω in 4 steps";

    private static readonly DocumentSchema Schema = new(ScanJson.Schema);

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void What_breaks_somewhere_ends_with_1_and_the_verdict_stands_first()
    {
        var run = Scan("--part", "R from 50 mΩ to 1 Ω in 20 steps a decade");

        Assert.Equal((ExitStatus.RequirementBroken, ""), (run.Status, run.Error));
        var lines = run.Output.Split('\n');
        // 48 V (1 + exp(−π ζ/√(1 − ζ²))) = 80 V with ζ = R/2 · √(C/L): R = 0.1619 Ω
        Assert.Equal(
            "For R everything required and rated breaks below 161.9 mΩ, holds from there on.", lines[1]);
        Assert.All(lines, line => Assert.True(line.Length <= 100, line));
        Assert.Equal(
            ["plant/report.html", "plant/scan.csv", "plant/scan.json", "plant/scan.png", "plant/scan.svg"],
            commandLine.Written);
    }

    [Fact]
    public void What_holds_throughout_ends_with_0()
    {
        var run = Scan("--part", "R from 200 mΩ to 1 Ω in 5 steps", "--quiet");

        Assert.Equal((ExitStatus.Success, "", ""), (run.Status, run.Output, run.Error));
    }

    [Theory]
    [InlineData("--part", "R from 50 mΩ to 1 Ω in 4 steps")]
    [InlineData("--event", "K closes from 0 s to 10 µs in 4 steps")]
    [InlineData("--scatter", "K closes by 1 µs")]
    public void The_document_obeys_its_schema(string option, string words)
    {
        var run = Scan(option, words, "--json", "--no-files");

        Assert.Empty(Schema.Faults(run.Output));
        Assert.NotEmpty(Schema.Faults(run.Output.Replace("scan 1", "scan 2")));
        Assert.Empty(commandLine.Written);
    }

    [Fact]
    public void Two_values_make_a_map()
    {
        var run = Scan(
            "--part", "R from 50 mΩ to 1 Ω in 4 steps", "--part", "L from 1 µH to 10 µH in E3", "--json");

        Assert.Empty(Schema.Faults(run.Output));
        using var document = JsonDocument.Parse(run.Output);
        Assert.Equal(5 * 4, document.RootElement.GetProperty("points").GetArrayLength());
        var second = document.RootElement.GetProperty("points")[1].GetProperty("at");
        Assert.Equal((0.05, 2.2e-6), (second[0].GetDouble(), second[1].GetDouble()));
    }

    [Fact]
    public void The_table_of_points_has_a_row_each()
    {
        Scan("--part", "R from 50 mΩ to 1 Ω in 4 steps", "--quiet");

        var rows = File.ReadAllText(Path.Combine(commandLine.Results, "plant", "scan.csv")).Split("\r\n");
        Assert.StartsWith("R (Ω),max of voltage of c (V),time of max of voltage of c (s)", rows[0]);
        Assert.Equal(1 + 5 + 1, rows.Length);
        Assert.StartsWith("0.05,", rows[1]);
    }

    [Fact]
    public void The_report_shows_the_scan_after_the_verdict_and_the_command_again()
    {
        Scan("--part", "R from 50 mΩ to 1 Ω in 4 steps", "--quiet");

        var page = File.ReadAllText(Path.Combine(commandLine.Results, "plant", "report.html"));
        Assert.Contains("As written: The requirement is broken;", page);
        Assert.Contains("Scan: <bdi>For R everything required and rated", page);
        Assert.Contains(
            "circuit-transient scan plant.cause --part &quot;R from 50 mΩ to 1 Ω in 4 steps&quot;", page);
    }

    [Theory]
    [InlineData("say what to scan")]
    [InlineData("the range runs backwards", "--part", "R from 1 Ω to 50 mΩ")]
    [InlineData("there is no part `Q`", "--part", "Q from 1 Ω to 5 Ω")]
    [InlineData("3 values are to be scanned at once", "--part", "R from 1 Ω to 2 Ω", "--part",
        "L from 1 µH to 2 µH", "--part", "C from 1 µF to 2 µF")]
    [InlineData("`now` stands where", "--part", "R from 1 Ω to 2 Ω in 5 steps now")]
    public void A_wrong_command_line_ends_with_2_and_writes_nothing(string message, params string[] words)
    {
        var run = Scan(words);

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains(message, run.Error);
        Assert.Empty(commandLine.Written);
    }

    [Fact]
    public void Nothing_but_unsolvable_points_ends_with_3()
    {
        var file = commandLine.Circuit("plant.cause", Circuits.WithoutUniqueSolution);

        var run = commandLine.Run("scan", file, "--part", "R1 from 1 kΩ to 2 kΩ in 2 steps");

        Assert.Equal(ExitStatus.NoUniqueSolution, run.Status);
        Assert.Contains("no point of the scan has a solution", run.Error);
    }

    [Fact]
    public void Points_without_a_solution_are_shown_and_end_with_3()
    {
        // v = g·v has any current as its solution where g = 1.
        var file = commandLine.Circuit(
            "plant.cause",
            """
            source Feed at a : 1 V
            resistor R from a to b : 1 kΩ
            dependent source E from b to ground : 2 times voltage of b
            observe current through R
            until 1 ms
            """);

        var run = commandLine.Run("scan", file, "--no-files", "--part", "E from 0.5 to 1.5 in 4 steps");

        Assert.Equal(ExitStatus.NoUniqueSolution, run.Status);
        Assert.Contains("One of 5 points has no solution.", run.Output.Replace("\n", " "));
        Assert.Contains("  E = 1.000: ", run.Output);
    }

    [Theory]
    [InlineData(3)] // of the five points
    [InlineData(5)] // in the search between them
    public void An_unfinished_scan_is_gone_on_with_to_the_same_bytes_and_its_file_goes(int solved)
    {
        Scan("--part", Range, "--quiet");
        var whole = commandLine.Written.ToDictionary(name => name, Content);
        LeaveUnfinished(solved);

        var resumed = Scan("--part", Range, "--quiet", "--resume");

        Assert.Equal((ExitStatus.RequirementBroken, ""), (resumed.Status, resumed.Error));
        Assert.Equal(whole.Keys, commandLine.Written);
        Assert.All(whole, file => Assert.Equal(file.Value, Content(file.Key)));

        byte[] Content(string name) => File.ReadAllBytes(Path.Combine(commandLine.Results, name));
    }

    [Theory]
    [InlineData("100 mΩ", "110 mΩ", Range, "it is of another circuit, or the circuit has changed since")]
    [InlineData("100 mΩ", "100 mΩ", "R from 50 mΩ to 1 Ω in 3 steps",
        $"it was asked for --part \"{Range}\", which goes on with it")]
    public void An_unfinished_scan_of_something_else_is_refused(
        string before, string after, string range, string reason)
    {
        LeaveUnfinished(solved: 3);
        var circuit = commandLine.Circuit(
            "plant.cause", Ringing.Replace(before, after, StringComparison.Ordinal));

        var run = commandLine.Run(
            "scan", circuit, "--out", commandLine.Results, "--part", range, "--resume");

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains($"scan.partial cannot be taken up: {reason}; without `--resume`", run.Error);
        Assert.Equal(["plant/scan.partial"], commandLine.Written);
    }

    [Fact]
    public void A_new_scan_replaces_an_unfinished_one_and_says_so()
    {
        LeaveUnfinished(solved: 3);

        var run = Scan("--part", Range, "--quiet");

        Assert.Contains(
            "scan.partial holds unfinished points, which this run replaces; `--resume`", run.Error);
        Assert.DoesNotContain("plant/scan.partial", commandLine.Written);
    }

    [Theory]
    [InlineData("error: there is nothing to go on with: ", "--resume")]
    [InlineData("error: `--resume` needs the folder of results", "--resume", "--no-files")]
    public void Nothing_can_be_gone_on_with_where_nothing_was_left(string message, params string[] words)
    {
        var run = Scan(["--part", Range, .. words]);

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.StartsWith(message, run.Error);
    }

    /// <summary>What an interruption leaves after some points.</summary>
    private void LeaveUnfinished(int solved)
    {
        using var stop =
            CancellationTokenSource.CreateLinkedTokenSource(TestContext.Current.CancellationToken);
        var plan = Scanning.Plan(Ringing, ("--part", Range)).Value!;
        var memory = new ScanMemory();
        var left = solved;
        Assert.ThrowsAny<OperationCanceledException>(() => Scanner.Run(plan, memory, Count, stop.Token));
        commandLine.Leave(
            "scan", "plant", plan.Varied.Circuit.Source.Sha256, $"--part \"{Range}\"", memory.Save);

        void Count(int more)
        {
            if (Interlocked.Add(ref left, -more) <= 0)
            {
                stop.Cancel();
            }
        }
    }

    private CommandLineAnswer Scan(params string[] words) => commandLine.Run(
        ["scan", commandLine.Circuit("plant.cause", Ringing), "--out", commandLine.Results, .. words]);
}
