using CircuitTransient.Solutions;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Switchings in no time: a few are carried out, more than a hundred are refused.</summary>
public sealed class ChatterTests
{
    [Fact]
    public void A_switch_that_undoes_its_own_condition_is_refused_after_a_hundred_switchings()
    {
        var source = new SourceText("chatter.cause", Relay(60));
        var circuit = TransientAnalysis.Check(source, _ => throw new InvalidOperationException()).Value!;

        var outcome = TransientSolver.Solve(
            circuit, CauseList.FromStart(circuit), TestContext.Current.CancellationToken);

        var refused = Assert.Single(outcome.Diagnostics);
        Assert.Equal("`Q` chatters: over 100 switchings at 1.000 ms", refused.Message);
        Assert.Equal("leave a gap between the level that opens a switch and the level that closes it",
            refused.Advice);
        Assert.Equal(4, source.LineOf(refused.Span.Start));
    }

    [Fact]
    public void A_few_switchings_at_one_instant_are_carried_out()
    {
        var solved = SolvedText.Of(Relay(3), 2e-3);
        Assert.Equal(Enumerable.Repeat(1e-3, 6), solved.Result.Events.Select(e => e.Time));
        Close.To(10, solved.Sample("voltage of a", 0)); // ends open
    }

    /// <summary>Closing halves the voltage that made it close.</summary>
    private static string Relay(int pairs) => $"""
        source Feed at in : step of 10 V at 1 ms
        resistor R1 from in to a : 1 kΩ
        resistor R2 at b : 1 kΩ
        switch Q from a to b : open, {string.Join(", ", Enumerable.Repeat(
            "closes when voltage of a rises above 8 V, opens when voltage of a falls below 6 V", pairs))}
        observe voltage of a
        until 5 ms
        """;
}
