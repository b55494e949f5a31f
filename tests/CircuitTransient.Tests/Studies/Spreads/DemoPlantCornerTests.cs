using CircuitTransient.Studies.Spreads;
using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Studies.Spreads;

/// <summary>The corners of the demonstration plants, each computed twice by independent methods (state
/// space and matrix exponential, sampled, good to 0.2 %).</summary>
public class DemoPlantCornerTests
{
    private const double Sampled = 2e-3;

    private static readonly Lazy<SpreadResult> Bullwheel =
        new(() => Spreading.Of(Repository.Read("netlists/bullwheel-bus.cause")));

    private static FigureRange Inrush => Bullwheel.Value.Figure("max of current through Ls");

    [Fact]
    public void The_second_inrush_of_the_bullwheel_bus_reaches_439_A() =>
        Assert.Equal(439, Inrush.Greatest!.Value, 439 * Sampled);

    [Fact]
    public void Its_worst_corner_is_a_high_rail_onto_a_large_bus_through_little_of_the_choke()
    {
        var worst = Inrush.Greatest!;
        var values = Bullwheel.Value.Varied.Values.Zip(worst.Point)
            .ToDictionary(p => p.First.Name, p => p.Second);

        Assert.True(worst.IsCorner);
        Assert.Equal(1.10 * 932, values["Supply"], 1e-9);
        Assert.Equal(1.20 * 5.6e-3, values["Cbus"], 1e-9);
        Assert.Equal(1.10 * 82, values["Rpre"], 1e-9);
        Assert.Equal(0.85 * 180e-6, values["Ls"], 1e-12);
        Assert.Equal(0.75 * 18e-3, values["Rs"], 1e-9);
        Assert.Equal(0, values["Cbus initial charge"]);
    }

    [Fact]
    public void All_256_corners_of_the_bullwheel_bus_are_solved_and_none_is_outdone_inside() =>
        Assert.Equal(
            (256, 0), (Bullwheel.Value.Account.CornerPoints, Bullwheel.Value.Account.WorseInside));

    [Fact]
    public void The_making_capacity_of_the_bullwheel_bus_is_what_breaks_first()
    {
        var spread = Bullwheel.Value;

        Assert.False(spread.AllHold);
        Assert.Equal("margin of current through Ls at most 200 A from 1.8 s to 6 s",
            spread.Figures[spread.Worst!.Figure].Figure.Name);
        Assert.True(spread.Worst.Result.ChecksHold);
    }

    // 3.52 kJ in Rpre at that corner, and hardly less for any other Rpre; 2.6 kJ are rated.
    [Fact]
    public void The_charging_resistor_of_the_bullwheel_bus_takes_3_52_kJ_of_its_2_6()
    {
        var rpre = Bullwheel.Value.Worst!.Result.Parts.Single(p => p.Name == "Rpre");
        var energy = Bullwheel.Value.Figure("energy of Rpre against its rating");

        Assert.Equal(3520, rpre.Energy!.Value, 3520 * Sampled);
        Assert.False(energy.Holds);
        Assert.InRange(energy.Greatest!.Value * 2600, 3520, 3540);
    }

    [Fact]
    public void The_input_of_the_cabin_reaches_102_9_V() =>
        Assert.Equal(
            102.9,
            Spreading.Of(Repository.Read("netlists/cabin-dock.cause"))
                .Figure("max of voltage of in").Greatest!.Value,
            102.9 * Sampled);

    [Fact]
    public void The_contact_of_the_caliper_reaches_1550_V_as_drawn() =>
        Assert.Equal(
            1550,
            Spreading.Of(Repository.Read("netlists/caliper-deck.cause"))
                .Figure("max of voltage across KB").Greatest!.Value,
            1550 * Sampled);

    [Fact]
    public void With_the_second_suppressor_it_reaches_1148_V_and_the_release_jumps()
    {
        var text = Repository.Read("netlists/caliper-deck.cause")
            .Replace("470 Ω ±5 %", "560 Ω ±5 %", StringComparison.Ordinal)
            .Replace("4.7 µF ±10 %", "15 µF ±10 %", StringComparison.Ordinal)
            + "\nobserve time after which current through Lcoil stays below 310 mA as \"release\"\n";
        var spread = Spreading.Of(text);
        var release = spread.Figure("release");

        Assert.Equal(1148, spread.Figure("max of voltage across KB").Greatest!.Value, 1148 * Sampled);
        // Counted from the opening at 1 ms: 7.5 ms nominal, 24.7 ms at the worst corner.
        Assert.Equal(7.5e-3, release.Nominal!.Value - 1e-3, 0.05e-3);
        Assert.InRange(release.Greatest!.Value - 1e-3, 24.65e-3, 24.9e-3);
        var jump = Assert.Single(release.Greatest.Jumps, j => j.IsOfValue);
        Assert.InRange(jump.ValueBefore, 8e-3, 10e-3);
        Assert.InRange(jump.ValueAfter, 18e-3, 24e-3);
    }
}
