using CircuitTransient.Cli;
using CircuitTransient.Reports.Studies;
using CircuitTransient.Tests.Reports;

namespace CircuitTransient.Tests.Cli;

public sealed class SizeTests : IDisposable
{
    private const string Divider =
        """
        circuit "A divider"
        source    Feed at s : step of 10 V
        resistor  R1 from s to a : 1 kΩ ±1 %
        resistor  R2 from a to ground : 1 kΩ ±1 %, rated 50 mW
        capacitor C1 from a to ground : 1 nF
        require voltage of a between 5.4 V and 6 V from 20 µs
        until 50 µs
        """;

    private static readonly DocumentSchema Schema = new(SizeJson.Schema);

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void Values_that_hold_are_proposed_with_their_files()
    {
        var run = Size("--part", "R2", "--series", "E12");

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        var lines = run.Output.Split('\n');
        Assert.Equal(
            "R2 1.2 kΩ: everything holds, confirmed by a full solution with its self-checks.", lines[1]);
        Assert.Contains("As it stands (R2 1 kΩ) the circuit does not hold: voltage of a between", run.Output);
        Assert.All(lines, line => Assert.True(line.Length <= 100, line));
        Assert.Equal(
            ["size/report.html", "size/size.csv", "size/size.json", "size/size.png", "size/size.svg"],
            commandLine.Written);
        var page = File.ReadAllText(Path.Combine(commandLine.Results, "size/report.html"));
        Assert.Contains("With the proposed values: The requirement holds; the rating holds.", page);
        Assert.Contains("Sizing: <bdi>R2 1.2 kΩ: everything holds,", page);
        Assert.Contains("1.2 kΩ", page);
    }

    [Fact]
    public void No_value_at_all_ends_with_1_and_says_why()
    {
        var run = Size("--part", "R2 from 2 kΩ to 20 kΩ");

        Assert.Equal(ExitStatus.RequirementBroken, run.Status);
        Assert.Contains("No value of R2 in the range looked at meets every requirement", run.Output);
        Assert.Contains("Whatever the value, this is broken: voltage of a between 5.4 V and 6 V", run.Output);
    }

    [Fact]
    public void Two_parts_with_tolerances_get_a_map_and_a_table()
    {
        var run = Size(
            "--part", "R1 from 500 Ω to 2 kΩ", "--part", "R2 from 500 Ω to 2 kΩ", "--series", "E12",
            "--with-spread", "--least", "power in R2");

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Contains("at all 4 corners of the tolerances too", run.Output);
        Assert.Contains("◆", run.Output);
        var rows = File.ReadAllLines(Path.Combine(commandLine.Results, "size/size.csv"));
        Assert.StartsWith("R1 (Ω),R2 (Ω),holds,power in R2 (W),margin of voltage of a", rows[0]);
        Assert.Equal(1 + (7 * 7), rows.Length); // E12 has 560 680 820 1000 1200 1500 1800 in that range
    }

    [Theory]
    [InlineData("R2")]
    [InlineData("R2 from 2 kΩ to 20 kΩ")]
    [InlineData("R2 from 1.21 kΩ to 1.4 kΩ")]
    public void The_document_obeys_its_schema(string part)
    {
        Assert.Empty(Schema.Faults(Size("--part", part, "--series", "E12", "--json", "--no-files").Output));
        var two = Size(
            "--part", part, "--part", "R1", "--series", "E6", "--json", "--no-files", "--with-spread");
        Assert.Empty(Schema.Faults(two.Output));
        Assert.NotEmpty(Schema.Faults(two.Output.Replace("size 1", "size 2")));
    }

    [Fact]
    public void The_circuit_with_the_proposed_values_becomes_a_new_file_and_never_an_old_one()
    {
        var sized = Path.Combine(commandLine.Folder, "sized.cause");
        var run = Size("--part", "R2", "--series", "E12", "--no-files", "--write-sized", sized);

        Assert.Equal(ExitStatus.Success, run.Status);
        Assert.Equal(Divider.Replace("R2 from a to ground : 1 kΩ", "R2 from a to ground : 1.2 kΩ"),
            File.ReadAllText(sized));
        Assert.Equal(ExitStatus.Success, commandLine.Run("solve", sized, "--no-files", "--quiet").Status);
        var again = Size("--part", "R2", "--no-files", "--write-sized", sized);
        Assert.Equal(ExitStatus.Mistake, again.Status);
        Assert.Contains("it exists already", again.Error);
        var inFile = Path.Combine(sized, "nowhere.cause");
        var nowhere = Size("--part", "R2", "--no-files", "--write-sized", inFile);
        Assert.Equal(ExitStatus.FileTrouble, nowhere.Status);
    }

    [Fact]
    public void What_lies_on_its_bound_is_said_to_and_doubts_stand_beneath_the_verdict()
    {
        // 5 V of the divider is the bound itself; C1 is still charging at the end.
        var circuit = commandLine.Circuit("late.cause",
            """
            source    Feed at s : 10 V
            resistor  R1 from s to a : 1 kΩ
            resistor  R2 from a to ground : 1 kΩ
            capacitor C1 from s to ground : 1 nF, linear up to 8 V
            source    Slow at r : step of 10 V
            resistor  R3 from r to b : 1 kΩ
            capacitor C2 from b to ground : 1 µF
            require voltage of a at most 5 V
            observe voltage of b
            until 1 ms
            """);
        var run = commandLine.Run("size", circuit, "--part", "R2", "--greatest", "R2", "--no-files");

        Assert.Equal(ExitStatus.Success, run.Status);
        var lines = run.Output.Split('\n');
        Assert.StartsWith("R2 1 kΩ: everything holds", lines[1]);
        Assert.StartsWith("In doubt: C1 is linear up to 8.000 V but reaches 10.00 V", lines[2]);
        Assert.Contains(lines[3..6], line =>
            line.StartsWith("In doubt: voltage of b still rises at the study's end, 1.000 ms"));
        Assert.Contains("on the bound  voltage of a at most 5 V", run.Output);
    }

    [Theory]
    [InlineData("say which part's value is sought")]
    [InlineData("size finds the values of one or two parts", "--part", "R1", "--part", "R2", "--part", "C1")]
    [InlineData("`R1` is named twice", "--part", "R1", "--part", "R1")]
    [InlineData("`E13` is no series of IEC 60063", "--part", "R1", "--series", "E13")]
    [InlineData("either --least or --greatest", "--part", "R1", "--least", "R1", "--greatest", "R1")]
    [InlineData("there is no part `R7`", "--part", "R7")]
    [InlineData("neither a sized part nor a quantity", "--part", "R1", "--least", "R2")]
    public void What_cannot_be_asked_ends_with_2(string message, params string[] words)
    {
        var run = Size([.. words, "--no-files"]);

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains(message, run.Error);
    }

    [Fact]
    public void Another_aim_chooses_another_value()
    {
        Assert.Contains("R2 1.2 kΩ: everything", Of("--least"));
        Assert.Contains("R2 1.5 kΩ: everything", Of("--greatest"));

        string Of(string aim) => Size("--part", "R2", "--series", "E24", aim, "R2", "--no-files").Output;
    }

    private CommandLineAnswer Size(params string[] words) => commandLine.Run(
        ["size", commandLine.Circuit("size.cause", Divider), "--out", commandLine.Results, .. words]);
}
