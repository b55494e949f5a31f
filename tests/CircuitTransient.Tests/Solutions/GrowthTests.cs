using CircuitTransient.Solutions;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Circuits with modes that grow.</summary>
public sealed class GrowthTests
{
    private const string Growing = """
        capacitor C at a : 1 µF, charged to 1 mV
        resistor Rn at a : -1 kΩ
        observe voltage of a

        """;

    [Fact]
    public void A_growing_mode_is_followed_over_a_hundred_decades()
    {
        var solved = SolvedText.Of($"{Growing}until 230 ms", 230e-3);
        Close.To(1e-3 * Math.Exp(230), solved.Sample("voltage of a", 0));
    }

    [Fact]
    public void Past_every_number_the_study_is_refused_with_the_instant()
    {
        var refused = Assert.Single(Solve($"{Growing}until 1 s").Diagnostics);
        Assert.Equal(
            "a mode of this circuit grows with a time constant of 1.000 ms: by 300.0 ms it has passed every "
            + "number",
            refused.Message);
        Assert.Equal(
            "end the study earlier, or look for a gain or a negative resistance of the wrong sign",
            refused.Advice);
    }

    [Fact]
    public void A_switch_that_the_growth_itself_closes_ends_it_in_time()
    {
        var solved = SolvedText.Of($"""
            {Growing}
            switch Q from a to b : open, closes when voltage of a rises above 10 V
            resistor R at b : 500 Ω
            until 1 s
            """, 0.5);
        Close.Within(1e-12, 1e-3 * Math.Log(1e4), Assert.Single(solved.Result.Events).Time);
        Close.To(10, solved.Max("voltage of a"));
    }

    private static Outcome<TransientSolution> Solve(string text)
    {
        var source = new SourceText("growth.cause", text);
        var circuit = TransientAnalysis.Check(source, _ => throw new InvalidOperationException()).Value!;
        return TransientSolver.Solve(
            circuit, CauseList.FromStart(circuit), TestContext.Current.CancellationToken);
    }
}
