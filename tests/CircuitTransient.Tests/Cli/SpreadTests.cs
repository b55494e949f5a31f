using System.Text.Json;
using CircuitTransient.Cli;
using CircuitTransient.Tests.Studies.Spreads;

namespace CircuitTransient.Tests.Cli;

public sealed class SpreadTests : IDisposable
{
    private const string Divider = """
        source   Feed at in : 10 V ±10 %
        resistor R1 from in to a : 100 Ω ±5 %
        resistor R2 from a to ground : 100 Ω ±5 %
        capacitor C1 from a to ground : 1 µF
        require voltage of a at most 5.6 V
        until 2 ms
        """;

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void A_circuit_that_holds_with_every_tolerance_ends_with_0_and_its_files()
    {
        var run = Spread(Divider.Replace("5.6 V", "6 V", StringComparison.Ordinal), "--draws", "50");

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Contains("Holds with every tolerance: the requirement holds.", run.Output);
        Assert.Equal(
            [
                "divider/report.html", "divider/spread.csv", "divider/spread.json", "divider/spread.png",
                "divider/spread.svg",
            ],
            commandLine.Written);
    }

    [Fact]
    public void One_that_breaks_at_a_corner_ends_with_1_and_names_it()
    {
        var run = Spread(Divider, "--draws", "50");

        // 11 V · 105/(105 + 95) = 5.775 V.
        Assert.Equal((ExitStatus.RequirementBroken, ""), (run.Status, run.Error));
        Assert.Contains("Does not hold with every tolerance: the requirement is broken.", run.Output);
        Assert.Contains("5.775 V", run.Output);
        Assert.Contains("Feed 11.00 V (+10 %)", run.Output);
        Assert.Contains("R1 95.00 Ω (-5 %)", run.Output);
        Assert.Contains("Feed drives it most", run.Output);
    }

    [Fact]
    public void The_page_says_beside_the_verdict_as_written_that_the_tolerances_break_it()
    {
        Spread(Divider, "--draws", "0", "--quiet");

        var page = File.ReadAllText(Path.Combine(commandLine.Results, "divider/report.html"));
        Assert.Contains(
            """
            <h2 id="verdict-heading">Verdict</h2>
            <p class="lead" id="verdict-words">As written: The requirement holds.</p>
            <p class="lead study-words">Tolerances: <bdi>Does not hold with every tolerance: \
            the requirement is broken.</bdi></p>
            """.Replace("\\\n", "", StringComparison.Ordinal),
            page);
    }

    [Fact]
    public void The_document_on_stdout_is_the_one_in_the_folder()
    {
        var run = Spread(Divider, "--draws", "20", "--json");

        Assert.Equal(File.ReadAllText(Path.Combine(commandLine.Results, "divider/spread.json")), run.Output);
    }

    [Fact]
    public void Without_draws_there_are_only_extremes()
    {
        var run = Spread(Divider, "--draws", "0", "--json", "--no-files");
        using var document = JsonDocument.Parse(run.Output);

        Assert.Equal(JsonValueKind.Null, document.RootElement.GetProperty("draws").ValueKind);
        var worst = document.RootElement.GetProperty("worst");
        Assert.Equal(5.775, worst.GetProperty("reached").GetDouble(), 1e-9);
        Assert.Empty(commandLine.Written);
    }

    [Theory]
    [InlineData("--draws many", "error: `many` is not a whole number from 0 to 100000000\n")]
    [InlineData("--draws -1", "error: `-1` is not a whole number from 0 to 100000000\n")]
    [InlineData("--seed x", "error: `x` is not a whole number from 0 to 2147483647\n")]
    [InlineData("--write-worst divider.cause", " cannot be written: it exists already")]
    [InlineData("--resume --no-files", "error: `--resume` needs the folder of results")]
    [InlineData("--resume", "error: there is nothing to go on with: ")]
    [InlineData("another.cause", "error: `spread` studies one circuit at a time\n")]
    public void A_wrong_command_line_ends_with_2_and_says_why(string words, string message)
    {
        var circuit = commandLine.Circuit("divider.cause", Divider);
        var args = words.Split(' ').Select(w => w == "divider.cause" ? circuit : w);

        var run = commandLine.Run(["spread", circuit, "--out", commandLine.Results, .. args]);

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains(message, run.Error);
        Assert.Empty(commandLine.Written);
    }

    [Fact]
    public void A_circuit_without_tolerances_ends_with_2_and_says_how_to_write_one()
    {
        var run = Spread(Circuits.Holding);

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains("no value has a tolerance, so there is nothing to spread", run.Error);
    }

    [Fact]
    public void A_tolerance_that_reaches_zero_ends_with_2() =>
        Assert.Contains(
            "the tolerance of `R1` reaches zero",
            Spread(Divider.Replace("100 Ω ±5 %", "100 Ω ±100 %", StringComparison.Ordinal)).Error);

    [Fact]
    public void The_worst_case_is_written_as_a_circuit_that_comes_to_the_same()
    {
        var worst = Path.Combine(commandLine.Folder, "worst.cause");
        Spread(Divider, "--draws", "0", "--write-worst", worst);

        Assert.Contains("resistor R1 from in to a : 95 Ω\n", File.ReadAllText(worst));
        Assert.StartsWith("# The worst case of divider.cause", File.ReadAllText(worst));
        var again = commandLine.Solve("--json", "--no-files", worst);
        using var document = JsonDocument.Parse(again.Output);
        Assert.Equal(
            5.775,
            document.RootElement.GetProperty("requirements")[0].GetProperty("worst").GetProperty("value")
                .GetDouble(),
            1e-9);
    }

    [Fact]
    public void A_worst_case_that_goes_into_no_folder_is_trouble_with_a_file()
    {
        var run = Spread(Divider, "--write-worst", Path.Combine(commandLine.Folder, "none/worst.cause"));

        Assert.Equal((ExitStatus.FileTrouble, ""), (run.Status, run.Output));
        Assert.Contains("cannot be written: there is no such folder", run.Error);
        Assert.Empty(commandLine.Written);
    }

    [Fact]
    public void Results_of_a_circuit_with_another_title_are_replaced_with_a_word()
    {
        Spread("circuit \"One\"\n" + Divider, "--draws", "0");

        var other = Spread("circuit \"Another\"\n" + Divider, "--draws", "0");
        var edited = Spread(
            "circuit \"Another\"\n" + Divider.Replace("2 ms", "3 ms", StringComparison.Ordinal),
            "--draws", "0");

        Assert.Contains("held the results of another circuit, \"One\"; these replace them", other.Error);
        Assert.Equal(ExitStatus.RequirementBroken, other.Status);
        Assert.Equal("", edited.Error);
    }

    [Fact]
    public void A_tolerance_on_top_of_a_named_value_is_written_as_what_both_come_to()
    {
        var worst = Path.Combine(commandLine.Folder, "worst.cause");
        var run = Spread(
            """
            value    Rn : 100 Ω ±10 %
            source   Feed at in : 10 V
            resistor R1 from in to a : Rn*2 ±5 %
            resistor R2 from a to ground : 100 Ω
            observe voltage of a
            until 1 ms
            """, "--draws", "0", "--write-worst", worst);

        Assert.Equal(ExitStatus.Success, run.Status);
        Assert.Contains("value    Rn : 90 Ω\n", File.ReadAllText(worst));
        Assert.Contains("resistor R1 from in to a : 171 Ω\n", File.ReadAllText(worst)); // 2 · 90 Ω · 0.95
    }

    [Fact]
    public void A_worst_case_that_one_line_cannot_say_is_refused_with_the_reason()
    {
        var worst = Path.Combine(commandLine.Folder, "worst.cause");
        var run = Spread(
            """
            source Feed at a : 12 V
            assembly leg with terminals p, q
            resistor R from p to q : 10 Ω ±10 %
            end
            place leg as Upper with p = a, q = b
            place leg as Lower with p = b, q = ground
            observe voltage of b
            require voltage of b at most 6.2 V
            until 1 ms
            """, "--draws", "0", "--write-worst", worst);

        Assert.Equal(ExitStatus.Mistake, run.Status);
        Assert.Contains("stand in one text, and their values differ", run.Error);
        Assert.False(File.Exists(worst));
    }

    [Fact]
    public void Unfinished_draws_are_taken_up_to_the_same_bytes_and_their_file_goes()
    {
        var whole = Spread(Divider, "--draws", "1500", "--json", "--no-files");
        LeaveUnfinished(Divider, draws: 1500);

        var resumed = Spread(Divider, "--draws", "1500", "--json", "--resume");

        Assert.Equal(whole.Output, resumed.Output);
        Assert.DoesNotContain("divider/spread.partial", commandLine.Written);
    }

    [Theory]
    [InlineData("±10 %", "±9 %", "1500", "it is of another circuit, or the circuit has changed since")]
    [InlineData("±10 %", "±10 %", "1600", "it was asked for --draws 1500 --seed 1, which goes on with it")]
    public void Unfinished_draws_of_another_study_are_refused(
        string before, string after, string draws, string reason)
    {
        LeaveUnfinished(Divider, draws: 1500);

        var run = Spread(
            Divider.Replace(before, after, StringComparison.Ordinal), "--draws", draws, "--resume");

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains($"spread.partial cannot be taken up: {reason}", run.Error);
        Assert.Contains("without `--resume` the study begins anew", run.Error);
    }

    [Fact]
    public void A_search_for_the_extremes_that_is_stopped_says_that_it_leaves_nothing()
    {
        using var stop = new CancellationTokenSource();
        using var output = new StringWriter();
        using var error = new StringWriter();
        using var streams = new Streams(output, error);
        var file = commandLine.Circuit("divider.cause", Divider);
        stop.Cancel();

        Assert.Equal(ExitStatus.Interrupted, App.Run(["spread", file, "--no-files"], streams, stop.Token));
        Assert.Contains("stopped before the first draw; nothing could be kept, for the ", error.ToString());
    }

    private CommandLineAnswer Spread(string text, params string[] args) =>
        commandLine.Run(
            ["spread", commandLine.Circuit("divider.cause", text), "--out", commandLine.Results, .. args]);

    /// <summary>What an interruption leaves after the first draws.</summary>
    private void LeaveUnfinished(string text, int draws)
    {
        using var stop =
            CancellationTokenSource.CreateLinkedTokenSource(TestContext.Current.CancellationToken);
        var study = Spreading.Study(text, draws, cancellation: stop.Token);
        Assert.Throws<OperationCanceledException>(() => study.Finish(_ => stop.Cancel()));
        Assert.InRange(study.DrawsDone, 1, draws - 1);
        var (varied, _) = Spreading.Varied(text);
        commandLine.Leave(
            "spread", "divider", varied.Circuit.Source.Sha256, $"--draws {draws} --seed 1", study.SaveDraws);
    }
}
