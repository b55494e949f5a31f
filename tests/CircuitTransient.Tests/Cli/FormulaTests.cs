using System.Text.Json;
using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

public sealed class FormulaTests : IDisposable
{
    private const string Charging =
        """
        source    Feed at a : 10 V
        switch    K from a to k : open, closes at 1 ms
        resistor  R1 from k to b : 1 kΩ
        capacitor C1 from b to ground : 1 µF, charged to 2 V
        observe current through R1 as "inrush"
        observe energy in C1
        observe settling time of voltage of b within 2 %
        until 6 ms
        """;

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Fact]
    public void A_quantity_is_written_out_by_interval_and_cause()
    {
        var run = Run("--of", "voltage of b");

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.StartsWith(
            $"""
            {commandLine.Folder}/charge.cause

            voltage of b

              From 0 s until 1 ms; τ = t
                a pole at zero: it holds what it stores
                C1 initial charge
                  + 2.0000 V
                from Feed: nothing

              From 1 ms, when K closes, until 6 ms; τ = t - 1 ms
                time constant 1.000 ms
                all causes together
                  + 10.000 V
                  - 8.0000 V·e^(-τ/1.0000 ms)
                Feed
                  + 10.000 V
                  - 10.000 V·e^(-τ/1.0000 ms)
                C1 initial charge
                  + 2.0000 V·e^(-τ/1.0000 ms)

            Self-checks: all 5 hold;
            """,
            run.Output);
    }

    [Fact]
    public void Digits_are_as_many_as_asked_for() =>
        Assert.Contains(
            "+ 8.00000000 mA·e^(-τ/1.00000000 ms)", Run("--of", "inrush", "--digits", "9").Output);

    [Fact]
    public void Without_a_quantity_every_observed_waveform_is_written_and_energies_by_their_factors()
    {
        var run = Run();

        Assert.Equal((ExitStatus.Success, ""), (run.Status, run.Error));
        Assert.Contains("\ninrush\n", run.Output);
        Assert.Contains(
            "energy in C1 is 500.0 nF times the square of voltage across C1, written out below", run.Output);
        Assert.Contains("\nvoltage across C1\n", run.Output);
        Assert.DoesNotContain("settling", run.Output);
    }

    [Fact]
    public void Several_quantities_come_in_the_order_asked()
    {
        var output = Run("--of", "power in R1", "--of", "voltage of b").Output;

        Assert.Contains("power in R1 is the product of voltage across R1 and current through R1", output);
        Assert.True(output.IndexOf("\nvoltage across R1\n", StringComparison.Ordinal)
            < output.IndexOf("\nvoltage of b\n", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("voltage of bb", 12,
        "there is no node `bb`", "did you mean `b`?")]
    [InlineData("current through C2", 17,
        "there is no part `C2`", "did you mean `C1`?")]
    [InlineData("current delivered by R1", 1,
        "`R1` is a resistor; only a source delivers", "write `current through R1`")]
    [InlineData("rise time of voltage of b", 1,
        "`rise time of voltage of b` is one number, not a waveform",
        "ask the waveform it is read off: `voltage of b`")]
    public void A_quantity_that_means_nothing_is_explained(
        string words, int column, string wrong, string advice)
    {
        var run = Run("--of", words);

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.StartsWith($"--of:1:{column}: error: {wrong}\n  {words}\n", run.Error);
        Assert.EndsWith($"  → {advice}\n", run.Error);
    }

    [Theory]
    [InlineData("", "no quantity is given")]
    [InlineData("voltage", "ends where `of`, `from` or `across` should stand")]
    [InlineData("speed of b", "`speed` stands where a quantity should")]
    [InlineData("voltage of b at 2 ms", "`at` stands where the end should")]
    public void Words_that_are_no_quantity_are_explained(string words, string wrong)
    {
        var run = Run("--of", words);

        Assert.Equal((ExitStatus.Mistake, ""), (run.Status, run.Output));
        Assert.Contains(wrong, run.Error);
    }

    [Fact]
    public void Mistakes_of_all_quantities_are_told_in_one_go()
    {
        var run = Run("--of", "voltage of x", "--of", "voltage of y");

        Assert.Contains("there is no node `x`", run.Error);
        Assert.Contains("there is no node `y`", run.Error);
    }

    [Fact]
    public void A_circuit_with_a_mistake_ends_with_2() =>
        Assert.Equal(
            (ExitStatus.Mistake, ""),
            Status(commandLine.Run("formula", commandLine.Circuit("a.cause", Circuits.Mistaken))));

    [Fact]
    public void An_interval_without_a_unique_solution_ends_with_3() =>
        Assert.Equal(
            (ExitStatus.NoUniqueSolution, ""),
            Status(commandLine.Run(
                "formula", commandLine.Circuit("a.cause", Circuits.WithoutUniqueSolution))));

    [Fact]
    public void A_file_that_is_not_there_ends_with_5() =>
        Assert.Equal(
            (ExitStatus.FileTrouble, ""),
            Status(commandLine.Run("formula", Path.Combine(commandLine.Folder, "none.cause"))));

    [Fact]
    public void One_output_has_one_form()
    {
        var run = Run("--json", "--latex");

        Assert.Equal(ExitStatus.Mistake, run.Status);
        Assert.Contains("`--json` and `--latex` both ask for the output; give one of them", run.Error);
    }

    [Fact]
    public void Documents_of_several_circuits_are_an_array()
    {
        var run = commandLine.Run("formula", "--json",
            commandLine.Circuit("a.cause", Charging), commandLine.Circuit("b.cause", Circuits.Holding));
        using var document = JsonDocument.Parse(run.Output);

        Assert.Equal(2, document.RootElement.GetArrayLength());
    }

    [Fact]
    public void A_contact_s_own_current_that_the_equations_leave_open_is_said_so()
    {
        var circuit = commandLine.Circuit("open.cause",
            """
            source   Feed at a : 10 V
            switch   K1 from a to b : closed
            switch   K2 from a to b : closed
            resistor R1 from b to ground : 1 kΩ
            until 1 ms
            """);

        var run = commandLine.Run("formula", circuit, "--of", "current through K1");

        Assert.Equal(ExitStatus.Success, run.Status);
        Assert.Contains("From 0 s until 1 ms: the equations leave it open", run.Output);
    }

    private static (int Status, string Output) Status(CommandLineAnswer run) => (run.Status, run.Output);

    private CommandLineAnswer Run(params string[] words) =>
        commandLine.Run(["formula", commandLine.Circuit("charge.cause", Charging), .. words]);
}
