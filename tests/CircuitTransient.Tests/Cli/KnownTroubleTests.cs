using CircuitTransient.Cli;

namespace CircuitTransient.Tests.Cli;

/// <summary>What <c>check</c> finds without solving is what <c>solve</c> would refuse, with one
/// status.</summary>
public sealed class KnownTroubleTests : IDisposable
{
    private readonly CommandLine commandLine = new();

    public void Dispose() => commandLine.Dispose();

    [Theory]
    [InlineData("check")]
    [InlineData("solve")]
    [InlineData("spread")]
    [InlineData("formula")]
    public void Where_nothing_decays_the_text_lacks_an_end(string command) =>
        Refused(
            command,
            """
            source Feed at a : 10 V
            resistor R1 at a : 1 kΩ
            """,
            ExitStatus.Mistake,
            """
            plant.cause:1:1: error: nothing in this circuit decays or rings, \
            so the end of the study is not known
              source Feed at a : 10 V
              ^^^^^^^^^^^^^^^^^^^^^^^
              → say how long to look: write `until 10 ms`

            """);

    [Theory]
    [InlineData("check")]
    [InlineData("solve")]
    public void The_end_asked_for_lies_after_the_last_event(string command) =>
        Refused(
            command,
            """
            source Feed at a : 10 V
            inductor L1 from a to b : 1 mH
            switch K1 from b to ground : open, closes at 20 ms
            """,
            ExitStatus.Mistake,
            """
            plant.cause:3:36: error: nothing in this circuit decays or rings after 20.00 ms, \
            so the end of the study is not known
              switch K1 from b to ground : open, closes at 20 ms
                                                 ^^^^^^^^^^^^^^^
              → say how long to look: write `until 40 ms`

            """);

    [Theory]
    [InlineData("check")]
    [InlineData("solve")]
    public void A_source_across_a_coil_does_not_settle(string command) =>
        Refused(
            command,
            """
            source Feed at a : 10 V
            inductor L1 at a : 1 mH
            start settled
            until 1 ms
            """,
            ExitStatus.NoUniqueSolution,
            """
            plant.cause:1:1: error: there is no settled state to start from: \
            `Feed` drives a charge or current that nothing limits
              source Feed at a : 10 V
              ^^^^^^^^^^^^^^^^^^^^^^^
              → put in the resistance that damps it, or start as stated

            """);

    [Fact]
    public void An_instant_past_the_end_is_told_the_way_out() => Assert.Equal(
        new CommandLineAnswer(
            ExitStatus.Mistake,
            "",
            """
            --at:1:1: error: the study ends before it, at 5.000 ms
              1 min
              ^^^^^
              → ask for one up to 5.000 ms, or end the study later: `until 1 min`

            """),
        commandLine.Solve(commandLine.Circuit("plant.cause", Circuits.Holding), "--at", "1 min"));

    [Fact]
    public void A_comparison_asks_for_two_documents() => Assert.Equal(
        new CommandLineAnswer(
            ExitStatus.Mistake,
            "",
            """
            error: say which two results documents: `circuit-transient compare BEFORE AFTER`
            see `circuit-transient compare --help`

            """),
        commandLine.Run("compare", "results.json"));

    private void Refused(string command, string text, int status, string message)
    {
        var path = commandLine.Circuit("plant.cause", text);
        var answer = commandLine.Run(command, path);
        Assert.Equal(message.Replace("\\\n", "", StringComparison.Ordinal),
            answer.Error.Replace(path, "plant.cause", StringComparison.Ordinal));
        Assert.Equal(status, answer.Status);
        Assert.Equal("", answer.Output);
    }
}
