using CircuitTransient.Studies;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Studies.Sensitivities;

public class FigureSlopesTests
{
    /// <summary>Rounding, where the circuit is at rest.</summary>
    private static readonly string[] Nothing = ["min of charging inrush"];

    /// <summary>% per %, computed elsewhere by state space and matrix exponential with differences, good to
    /// two decimals.</summary>
    [Fact]
    public void The_second_inrush_of_the_bullwheel_bus_goes_with_its_parts_as_computed_elsewhere()
    {
        var bus = BullwheelBus();
        var relative = bus.Relative(bus.Figure("max of current through Ls"));
        Close.Within(0.005, 3.63, relative["Cbus"]);
        Close.Within(0.005, 3.26, relative["Rpre"]);
        Close.Within(0.005, 1.16, relative["Supply"]);
        Close.Within(0.005, -0.44, relative["Ls"]);
        Close.Within(0.005, -0.07, relative["Rs"]);
    }

    [Fact]
    public void Every_figure_of_the_bullwheel_bus_agrees_with_differences_of_whole_studies()
    {
        var bus = BullwheelBus();
        string[] figures = [.. StudyFigures.Of(bus.Varied.Circuit).Select(f => f.Name)];
        bus.AssertFiguresAgree(figures.Except(Nothing).ToArray(), step: 1e-3, rounding: 1e-9);
    }

    /// <summary>One kind of edge after another: a window's end that follows a switching, a jump at a
    /// switching, a kink there, and a corner of a source.</summary>
    [Theory]
    [InlineData("voltage of b", "from 0.3 ms after K1 closes to 1.7 ms")]
    [InlineData("current through Ra", "")]
    [InlineData("rate of change of voltage of b", "from 1.1 ms")]
    [InlineData("power in Rb", "")]
    [InlineData("energy in Ca", "")]
    [InlineData("energy in Ra", "")]
    [InlineData("I²t through Rb", "from 0.3 ms after K1 closes to 2 ms")]
    [InlineData("energy in Ra", "from 1.1 ms to 1.6 ms")]
    public void An_extreme_at_an_edge_moves_with_the_edge(string observed, string window)
    {
        var text = $"""
            value     Wait : 1 ms
            source    Feed at in : 10 V
            source    Kick at k : ramp of 3 V from 0.5 ms to 1.4 ms
            resistor  Ra from in to a : 1 kΩ
            capacitor Ca from a to ground : 1 µF
            resistor  Rk from k to a : 4.7 kΩ
            switch    K1 from a to b : open, closes at Wait
            switch    K2 from b to ground : open, closes at 0.8 ms after K1 closes,
                closed resistance 50 Ω ±10 %
            resistor  Rb from b to ground : 200 Ω
            capacitor Cb from b to ground : 0.1 µF
            observe {observed} as "it" {window}
            until 3 ms
            """;
        var derived = Derived.Of(
            text, new NamedValueTarget("Wait"), new PartValueTarget("Ra"), new PartValueTarget("Ca"),
            new PartValueTarget("Feed"), new EveryTolerance());
        derived.AssertFiguresAgree(["max of it", "min of it"], step: 1e-4, rounding: 1e-8);
    }

    [Fact]
    public void A_study_without_a_stated_end_ends_with_its_slowest_mode_and_that_moves()
    {
        var derived = Derived.Of(
            """
            source    Feed at in : step of 10 V at 1 ms
            resistor  R1 from in to a : 1 kΩ, rated 10 mW, rated 50 µJ
            capacitor C1 from a to b : 1 µF, charged to 2 V, rated 20 V
            resistor  R2 from b to ground : 100 Ω, rated 5 mA, rated 1e-3 A²s
            switch    K1 from a to c : open, closes when I²t through R2 rises above 20e-9 A²s
            resistor  R3 from c to ground : 4 kΩ
            observe voltage across C1
            observe current through R1
            require settling of voltage of a to 8 V within 5 % by 6 ms
            """,
            [.. new[] { "R1", "C1", "R2", "R3", "Feed" }.Select(n => new PartValueTarget(n))]);
        Assert.Single(derived.Analysis.Solution.Occurrences);
        derived.AssertFiguresAgree(
            [.. StudyFigures.Of(derived.Varied.Circuit).Select(f => f.Name)], step: 1e-4, rounding: 1e-8);
    }

    private static Derived BullwheelBus() =>
        Derived.Of(Repository.Read("netlists/bullwheel-bus.cause"), new EveryTolerance());
}
