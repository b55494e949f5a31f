using System.Text.Json;
using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>What a sign-off asks of the command line: the second breakdown, and strictness.</summary>
public sealed class SignOffTests : IDisposable
{
    private const string Bypass =
        """
        source    Feed  at rail : 48 V
        resistor  Rpre  from rail to bus : 47 Ω
        switch    Kmain from rail to a : open, closes at 150 ms
        resistor  Rbar  from a to b : 8 mΩ
        inductor  Lbar  from b to bus : 2 µH
        capacitor Cbus  from bus to ground : 1 mF, charged to 12 V, linear up to 40 V
        observe current through Kmain
        require current through Kmain at most 60 A
        until 155 ms
        """;

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Theory]
    [InlineData("Kmain closes")]
    [InlineData("\"Kmain\" closes")]
    [InlineData("last")]
    [InlineData("150 ms")]
    [InlineData("0.152 s")]
    public void Asked_for_the_breakdown_since_an_event_stands_in_the_document(string after)
    {
        var run = Solve("--json", "--after", after);
        using var document = JsonDocument.Parse(run.Output);
        var since = document.RootElement.GetProperty("observations")[0].GetProperty("contributionsAfter")
            .GetProperty("atMax");
        Assert.Equal("Kmain closes", since.GetProperty("event").GetString());
        Assert.Equal(
            ["Feed", "Cbus charge when Kmain closes"],
            since.GetProperty("parts").EnumerateArray().Select(p => p.GetProperty("cause").GetString()));
        var parts = since.GetProperty("parts").EnumerateArray().Sum(p => p.GetProperty("value").GetDouble());
        var max = document.RootElement.GetProperty("observations")[0].GetProperty("max").GetProperty("value");
        Assert.Equal(max.GetDouble(), parts, 1e-9 * 939);
    }

    [Fact]
    public void Not_asked_for_it_stands_in_the_summary_alone()
    {
        Assert.DoesNotContain("contributionsAfter", Solve("--json").Output, StringComparison.Ordinal);
        var summary = Solve().Output;
        Assert.Contains("Since Kmain closes: what each part held", summary, StringComparison.Ordinal);
        Assert.Contains(
            "difference: Feed 48.00 V against Cbus charge when\n    Kmain closes 46.52 V: 1.480 V",
            summary, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("Kmian closes",
        "error: FILE: --after: there is no event `Kmian closes`; did you mean `Kmain closes`?\n")]
    [InlineData("Kmain opens",
        "error: FILE: --after: there is no event `Kmain opens`; there are `Kmain closes`\n")]
    [InlineData("Q closes", "error: FILE: --after: there is no event `Q closes`; there are `Kmain closes`\n")]
    [InlineData("1 ms",
        "error: FILE: --after: no switch acts up to 1.000 ms; the first is Kmain closes at 150.0 ms\n")]
    [InlineData("1 s", "error: FILE: --after: the study ends before 1.000 s, at 155.0 ms\n")]
    [InlineData("soon", "--after:1:5: error: the statement ends where `closes` or `opens` should stand\n"
        + "  soon\n      ^\n"
        + "  → write a switching such as `Kmain closes`, an instant such as `6 s`, or `last`\n")]
    [InlineData("1 ms, 2 ms", "--after:1:5: error: `,` stands where the end should\n"
        + "  1 ms, 2 ms\n      ^\n"
        + "  → write a switching such as `Kmain closes`, an instant such as `6 s`, or `last`\n")]
    public void An_event_that_is_not_there_is_a_mistake_and_nothing_is_written(string after, string message)
    {
        var run = Solve("--after", after);
        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Equal(message, run.Error.Replace(Path.Combine(commandLine.Folder, "bypass.cause"), "FILE",
            StringComparison.Ordinal));
        Assert.Empty(commandLine.Written);
    }

    [Fact]
    public void A_passed_linear_range_puts_every_requirement_in_doubt()
    {
        var run = Solve("--json");
        using var document = JsonDocument.Parse(run.Output);
        var requirement = document.RootElement.GetProperty("requirements")[0];
        Assert.Equal(
            "Cbus leaves the range its value is good for", requirement.GetProperty("doubt").GetString());
        Assert.True(requirement.GetProperty("holds").GetBoolean());
        Assert.Equal(ExitStatus.Success, run.Status);
    }

    [Fact]
    public void Strictly_a_passed_linear_range_counts_as_broken() =>
        Assert.Equal(ExitStatus.RequirementBroken, Solve("--strict").Status);

    [Fact]
    public void Strictly_nothing_is_broken_where_nothing_is_in_doubt()
    {
        var plain = Bypass.Replace(", linear up to 40 V", "", StringComparison.Ordinal);
        Assert.Equal(
            ExitStatus.Success, commandLine.Solve("--strict", commandLine.Circuit("a.cause", plain)).Status);
    }

    [Fact]
    public void Strictly_a_warning_counts_as_broken()
    {
        var plain = Bypass.Replace(", linear up to 40 V", "", StringComparison.Ordinal)
            + "\nresistor Rloose from bus to nowhere : 1 kΩ";
        var file = commandLine.Circuit("a.cause", plain);
        Assert.Equal(
            (ExitStatus.Success, ExitStatus.RequirementBroken),
            (commandLine.Solve(file).Status, commandLine.Solve("--strict", file).Status));
    }

    private CommandLineAnswer Solve(params string[] options) =>
        commandLine.Solve([.. options, commandLine.Circuit("bypass.cause", Bypass)]);
}
