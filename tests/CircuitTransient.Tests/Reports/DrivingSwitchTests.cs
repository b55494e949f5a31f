using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports;

/// <summary>A switching is said to drive a value only where the figures show it.</summary>
public class DrivingSwitchTests
{
    private const string Coil = """
        source    Batt at p : 24 V
        switch    K from p to a : closed, opens at 5 ms
        resistor  Rc from a to b : 38 Ω
        inductor  Lc from b to ground : 0.42 H, carrying 600 mA
        capacitor Cs from a to ground : 1 µF, charged to 24 V
        require voltage across K at most 1 kV in magnitude
        observe voltage across K
        until 50 ms
        """;

    // K opens no current worth a word: what C1 holds decays.
    private const string Stored = """
        source    Feed at a : 400 V
        switch    K from a to bus : closed, opens at 100 ms
        capacitor C1 from bus to ground : 470 µF, charged to 400 V
        resistor  Rd from bus to ground : 4.7 kΩ
        require voltage of bus at most 60 V from 5 s after K opens
        observe voltage of bus
        until 8 s
        """;

    // K2 closes onto a branch beside: K1 made what the figure is.
    private const string Beside = """
        source    Feed at a : 100 V
        resistor  R1 from a to b : 1 Ω
        switch    K1 from b to c : open, closes at 1 ms
        capacitor C1 from c to ground : 1 mF
        switch    K2 from b to d : open, closes at 20 ms
        resistor  R2 from d to ground : 1 MΩ
        require voltage of c at most 90 V from 21 ms
        observe voltage of c from 21 ms
        until 30 ms
        """;

    private const string Waving = """
        source    Feed at a : sine of 100 V at 50 Hz
        switch    K1 from a to b : open, closes at 7 ms
        resistor  R1 from b to c : 1 Ω
        capacitor C1 from c to ground : 1 mF
        require voltage of c at most 90 V from 21 ms
        observe voltage of c from 21 ms
        until 30 ms
        """;

    [Fact]
    public void A_coil_s_current_that_is_interrupted_drives_what_it_makes() =>
        Assert.Contains("what drives it: the ", Summary(Coil));

    [Fact]
    public void What_was_stored_is_not_driven_by_the_current_interrupted() =>
        Assert.DoesNotContain("what drives it", Summary(Stored));

    [Fact]
    public void A_closing_drives_what_the_answer_with_it_has_more() =>
        Assert.Contains(
            "what drives it: the 100.0 V across K1 just before it closes",
            Summary(Beside.Replace("switch    K2", "# ", StringComparison.Ordinal)));

    [Theory]
    [InlineData(Beside)]
    [InlineData(Waving)]
    public void One_that_makes_little_or_whose_source_has_changed_since_is_not_said_to(string text) =>
        Assert.DoesNotContain("what drives it", Summary(text));

    [Fact]
    public void Modes_that_cancel_are_not_told_as_a_negative_share()
    {
        Assert.Equal(
            "1.000 J; the modes, each alone, would store 76.00 J in all, for in part they cancel",
            ReportWords.Stored(new([76], 1, -75)));
        Assert.Equal(
            "1.000 J, of which 250.0 mJ belongs to no mode alone", ReportWords.Stored(new([0.75], 1, 0.25)));
    }

    [Fact]
    public void What_rounding_left_beside_the_currents_of_the_circuit_is_nothing()
    {
        var result = SampleResults.Inrush();
        var switching = result.Events[0] with { CurrentBefore = -6.5e-13, CurrentAfter = 1.6e-15 };
        result = result with { Events = [switching] };

        Assert.DoesNotContain("fA", TerminalSummary.Write(result, []));
    }

    private static string Summary(string text)
    {
        var options = AnalysisOptions.Default with { By = Breakdown.Switching };
        var outcome = TransientAnalysis.Run(
            new SourceText("check.cause", text), options, _ => new Outcome<SourceText>(null, []));
        return TerminalSummary.Write(Assert.IsType<Solved>(outcome).Result, []);
    }
}
