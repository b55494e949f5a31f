using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>Studies of named values that move nothing, or that stay at their nominal values.</summary>
public sealed class IdleValueTests : IDisposable
{
    private const string Plant = """
        value Lstray : 60 µH ±20 %
        source V at a : 400 V
        resistor R from a to b : 2 Ω ±5 %
        inductor L from b to c : 50 µH
        capacitor C at c : 10 µF ±10 %
        require voltage of c at most 700 V
        until 3 ms
        """;

    private const string Warning = """
        plant.cause:1:7: warning: `Lstray` is used nowhere
          value Lstray : 60 µH ±20 %
                ^^^^^^
          → write `Lstray` where it belongs, such as in the value of `L`, or leave it out

        """;

    private static readonly string[] NoFiles = ["--no-files"];

    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Theory]
    [InlineData("scan", "Lstray from 10 µH to 100 µH in 4 steps")]
    [InlineData("size", "Lstray from 10 µH to 100 µH")]
    public void A_study_of_a_value_used_nowhere_is_refused(string study, string words)
    {
        var run = Run(study, Plant, "--value", words);

        Assert.Equal(
            (ExitStatus.Mistake, "",
                Warning + $"""
                --value:1:1: error: `Lstray` is used nowhere
                  {words}
                  ^^^^^^
                  → write `Lstray` where it belongs, such as in the value of `L`, or leave it out

                """),
            (run.Status, run.Output, run.Error));
    }

    [Fact]
    public void A_value_used_nowhere_is_not_among_those_that_are_spread()
    {
        var run = Run("spread", Plant, "--draws", "0");

        Assert.Equal((ExitStatus.Success, Warning), (run.Status, run.Error));
        Assert.Contains("All 4 corners of the 2 values that have a tolerance were solved", run.Output);
        Assert.DoesNotContain("Lstray", run.Output);
    }

    [Fact]
    public void A_switching_instant_and_a_window_are_drawn_and_an_instant_of_a_wave_and_a_bound_stay_nominal()
    {
        var run = Run("spread", """
            value Twave : 2 ms ±10 %
            value Tswitch : 3 ms ±10 %
            value Most : 90 V ±10 %
            value Tend : 4 ms ±10 %
            source V at a : step of 100 V at Twave
            switch K from a to b : open, closes at Tswitch
            resistor R from b to c : 10 Ω ±5 %
            capacitor C at c : 100 µF
            require voltage of c at most Most from 1 ms to Tend
            until 10 ms
            """, "--draws", "0");

        Assert.Equal(
            """
            plant.cause:5:34: warning: `Twave` is held at its nominal value here
              source V at a : step of 100 V at Twave
                                               ^^^^^
              → its tolerance is drawn in part values, wave levels, switching instants and windows only
            plant.cause:9:30: warning: `Most` is held at its nominal value here
              require voltage of c at most Most from 1 ms to Tend
                                           ^^^^
              → its tolerance is drawn in part values, wave levels, switching instants and windows only

            """,
            run.Error);
        Assert.Contains("All 8 corners of the 3 values that have a tolerance were solved", run.Output);
        // from 2.7 ms to 4.4 ms, with 9.5 Ω: 100 V (1 − exp(−1.7/0.95)) = 83.295 V
        Assert.Contains("worst 83.30 V", run.Output);
        Assert.Contains("Tswitch 2.700 ms (-10 %)", run.Output);
        Assert.Contains("Tend 4.400 ms (+10 %)", run.Output);
    }

    [Fact]
    public void A_wave_that_waits_for_a_drawn_switching_says_that_it_stays_where_it_is()
    {
        var run = Run("check", """
            value T : 3 ms ±10 %
            source V at a : 10 V + step of 5 V at 1 ms after K closes
            switch K from a to b : open, closes at T
            resistor R from b to ground : 10 Ω
            until 10 ms
            """);

        Assert.Equal(
            """
            plant.cause:2:39: warning: `T` is held at its nominal value here
              source V at a : 10 V + step of 5 V at 1 ms after K closes
                                                    ^^^^^^^^^^^^^^^^^^^
              → its tolerance is drawn in part values, wave levels, switching instants and windows only

            """,
            run.Error);
    }

    [Fact]
    public void Where_no_value_with_a_tolerance_is_drawn_nothing_is_spread()
    {
        var run = Run("spread", Plant.Replace(" ±5 %", "", StringComparison.Ordinal)
            .Replace(" ±10 %", "", StringComparison.Ordinal));

        Assert.Equal(
            (ExitStatus.Mistake,
                "error: plant.cause: every value that has a tolerance stays at its nominal value, so "
                + "there is nothing to spread; `check` says where\n"),
            (run.Status, run.Error));
    }

    // Messages without the folder of this run.
    private CommandLineAnswer Run(string study, string text, params string[] args)
    {
        var path = commandLine.Circuit("plant.cause", text);
        var answer = commandLine.Run([study, .. study == "check" ? [] : NoFiles, .. args, path]);
        return answer with { Error = answer.Error.Replace(path, "plant.cause", StringComparison.Ordinal) };
    }
}
