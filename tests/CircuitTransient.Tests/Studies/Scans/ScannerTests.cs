using CircuitTransient.Numerics;
using CircuitTransient.Studies.Scans;
using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Studies.Scans;

public class ScannerTests
{
    private const string Divider = """
        source    Feed at a : 10 V
        resistor  R1 from a to b : 2 kΩ, rated 40 mW
        resistor  R2 from b to ground : 1 kΩ
        observe voltage of b
        require voltage of b at most 4 V
        until 1 ms
        """;

    [Fact]
    public void Where_a_requirement_begins_to_break_is_the_root_and_not_a_point_of_the_grid()
    {
        // 10 V · 1 kΩ/(R1 + 1 kΩ) = 4 V at R1 = 1.5 kΩ
        var result = Scanning.Run(Divider, ("--part", "R1 from 500 Ω to 5 kΩ in 7 steps"));
        var margin = result.Findings.Single(f => f.Worst is not null && f.Figure.Unit == "V");

        var found = Assert.Single(margin.Breaks);
        Assert.Equal(1500, found.At[0], 1e-8);
        Assert.True(found.IsBySlope);
        Assert.False(found.HoldsBelow);
        Assert.Equal([new ScanStretch(found.At[0], 5000)], margin.Holding);
        Assert.Equal((500, 4 - (10 / 1.5)), (margin.Worst!.At[0], margin.Worst.Value));
    }

    [Fact]
    public void The_greatest_power_of_a_divider_is_where_the_resistances_match()
    {
        // maximum power transfer: R1 = R2, (10 V)²/(4 · 1 kΩ) = 25 mW of the 40 mW it is rated for
        var rating = Scanning.Run(Divider, ("--part", "R1 from 300 Ω to 5 kΩ in 6 steps"))
            .Findings[^1];

        Assert.Equal(25.0 / 40, rating.Greatest!.Value, 1e-12);
        Assert.Equal(1000, rating.Greatest.At[0], 1e-4); // the slope's root, not the flat crest's
        Assert.True(rating.HoldsThroughout);
    }

    // Exact ratio computed; the worst instant is at voltage zero for any ratio of resistance to reactance.
    [Fact]
    public void The_worst_closing_angle_onto_an_inductive_load_is_found_between_the_scanned_ones()
    {
        var impedance = double.Hypot(1, double.Tau * 50 * 0.045);
        var current = Scanning.Run(
            $"""
            source E at s : sine of {impedance} V rms at 50 Hz phase 10°
            resistor R from s to r : 1 Ω
            inductor L from r to ground : 45 mH
            observe current through L
            until 40 ms
            """,
            ("--phase", "E from -64° to 60° in 9° steps")).Of("max of current through L");

        Assert.Equal(2.551751173, current.Greatest!.Value, 1e-9);
        Assert.Equal(0, current.Greatest.At[0], 1e-8); // radians
        Assert.Equal(RangeExtremeKind.Smooth, current.Greatest.How);
    }

    [Fact]
    public void A_figure_that_jumps_is_said_with_the_place()
    {
        // Ring down from 1 V with 2πf = ωd: the last crest over 0.3 V changes as the damping passes
        // exp(−α k π/ωd) = 0.3, and the time from which it stays below falls by about half a period.
        var figure = Scanning.Run(
            """
            capacitor C from a to ground : 1 µF, charged to 1 V
            inductor  L from a to b : 1 mH
            resistor  R from b to ground : 5 Ω
            observe time after which voltage of a stays below 0.3 V
            until 3 ms
            """,
            ("--part", "R from 4 Ω to 12 Ω in 40 steps")).Findings[0];

        Assert.NotEmpty(figure.Jumps);
        foreach (var jump in figure.Jumps)
        {
            var alpha = jump.At / (2 * 1e-3);
            var omega = Math.Sqrt((1 / (1e-3 * 1e-6)) - (alpha * alpha));
            var crests = Math.Log(1 / 0.3) * omega / (alpha * Math.PI); // a whole number at a jump
            Assert.Equal(Math.Round(crests), crests, 1e-6);
            Assert.InRange(jump.Before - jump.After, 0.4 * Math.PI / omega, 1.2 * Math.PI / omega);
        }
    }

    [Fact]
    public void A_named_value_inside_a_wave_is_scanned_with_its_true_effect()
    {
        // A pulse of 10 V and width Wide onto 1 kΩ and 1 µF peaks at 10 V (1 − exp(−Wide/1 ms)): 5 V at ln 2
        // ms.
        var result = Scanning.Run(
            """
            value Wide : 1 ms
            source    Kick at a : rectangular pulse of 10 V from 0 s to Wide
            resistor  R from a to b : 1 kΩ
            capacitor C from b to ground : 1 µF
            observe voltage of b
            require voltage of b at most 5 V
            until 5 ms
            """,
            ("--value", "Wide from 0.2 ms to 2 ms in 9 steps"));

        foreach (var point in result.Points)
        {
            var peak = 10 * (1 - Math.Exp(-point.At[0] / 1e-3));
            Assert.Equal(peak, point.Found!.Values[0]!.Value, 1e-10);
        }

        var margin = result.Findings[^1];
        Assert.Equal(1e-3 * Math.Log(2), Assert.Single(margin.Breaks).At[0], 1e-12);
        Assert.True(margin.Breaks[0].HoldsBelow);
        Assert.False(margin.Breaks[0].IsBySlope); // parts' derivatives know nothing of a pulse's width
    }

    [Fact]
    public void Points_without_a_unique_solution_are_counted_and_part_the_range()
    {
        // v = g·v has any current as its solution where g = 1.
        var result = Scanning.Run(
            """
            source Feed at a : 1 V
            resistor R from a to b : 1 kΩ
            dependent source E from b to ground : 2 times voltage of b
            observe current through R
            until 1 ms
            """,
            ("--part", "E from 0.5 to 1.5 in 4 steps"));

        Assert.Equal(1, result.UnsolvedCount);
        var unsolved = result.Points[2];
        Assert.Equal(1, unsolved.At[0]);
        Assert.Null(unsolved.Found);
        Assert.Equal("`E` leaves no unique solution: its law says nothing", unsolved.Trouble);
    }

    [Fact]
    public void The_least_margin_over_two_values_is_found_between_the_points()
    {
        var result = Scanning.Run(
            """
            source    Feed at a : 10 V
            resistor  Ri from a to b : 1 kΩ
            resistor  Ra from b to c : 200 Ω
            resistor  Rb from c to ground : 300 Ω
            observe power in Rb
            require power in Rb at most 20 mW
            until 1 ms
            """,
            ("--part", "Ra from 10 Ω to 400 Ω in 5 steps"), ("--part", "Rb from 200 Ω to 5 kΩ in 6 steps"));
        var power = result.Findings[0].Greatest!;

        // With Ra at its least the greatest power is at Rb = Ri + Ra: 100/(4 · 1010) W.
        Assert.Equal(100.0 / 4040, power.Value, 1e-12);
        Assert.Equal((10, 1010), (power.At[0], Math.Round(power.At[1], 1)));
        Assert.All(result.Findings[^1].Breaks, found =>
        {
            var (ra, rb) = (found.At[0], found.At[1]);
            Assert.Equal(0.02, 100 * rb / Math.Pow(1000 + ra + rb, 2), 1e-10);
        });
        Assert.False(result.AllHold);
    }

    [Fact]
    public void A_scatter_has_the_quantiles_of_its_curve_and_not_of_draws()
    {
        // 1 mA into 1 kΩ and 1 µF until the switch opens at t: the peak is 1 V (1 − exp(−t/1 ms)).
        var result = Scanning.Run(
            """
            source    I from ground to a : 1 mA
            switch    S from a to b : closed, opens at 3 ms
            resistor  R from a to ground : 1 kΩ
            capacitor C from b to ground : 1 µF
            observe voltage of b
            require voltage of b at most 0.95 V
            until 10 ms
            """,
            ("--scatter", "S opens by 1 ms"));
        var scatter = result.Scatter!;
        var peak = scatter.Figures[0];

        static double At(double fraction) => 1 - Math.Exp(-(2 + (2 * fraction)));
        Assert.All(peak.Quantiles, q => Assert.Equal(At(q.Fraction), q.Value, 1e-5));
        Assert.Equal(1 - ((Math.Exp(-2) - Math.Exp(-4)) / 2), peak.Mean!.Value, 1e-6);
        Assert.Equal((-Math.Log(0.05) - 2) / 2, scatter.Figures[^1].Holding!.Value, 1e-9);
    }

    [Fact]
    public void The_same_scan_gives_the_same_figures_again()
    {
        var (first, second) = (Once(), Once());

        Assert.Equal(first.Select(f => f.Greatest!.Value), second.Select(f => f.Greatest!.Value));
        static IEnumerable<FigureScan> Once() =>
            Scanning.Run(Divider, ("--part", "R1 from 500 Ω to 5 kΩ in 30 steps")).Findings;
    }

    // The demo plant's own figures: 31.3 A with 56 Ω (computed twice by sampled methods, good to 0.2 %).
    [Fact]
    public void The_second_inrush_of_the_demo_follows_the_charging_resistor()
    {
        var result = Scanning.Run(
            Repository.Read("netlists/bullwheel-bus.cause"), ("--part", "Rpre from 56 Ω to 82 Ω in 1 steps"));
        var margin = result.Findings.First(f => f.Worst is not null && f.Figure.Unit == "A").Figure;
        var index = result.Figures.IndexOf(margin);

        Assert.Equal(31.3, 200 - result.Points[0].Found!.Values[index]!.Value, 0.002 * 31.3);
        Assert.Equal(129.5, 200 - result.Points[1].Found!.Values[index]!.Value, 0.002 * 129.5);
    }

    // With the sources on for ever nothing tells a later closing from another phase.
    [Fact]
    public void Closing_later_is_closing_at_another_phase()
    {
        var text = Repository.Read("netlists/bank-gallery.cause").Replace("until 30 ms", "until 22 ms");
        var later = Scanning.Run(text, ("--event", "KB closes from 18.5 ms to 20 ms in 3 steps"))
            .Of("max of current through KB").Greatest!;
        var turned = Scanning.Run(text, ("--phase", "Grid from 63° to 90° in 3 steps"))
            .Of("max of current through KB").Greatest!;

        Assert.Equal(turned.Value, later.Value, 1e-9 * turned.Value);
        Assert.Equal(turned.At[0], (Math.PI / 2) + (double.Tau * ((50 * later.At[0]) - 1)), 1e-7);
        Assert.Equal(RangeExtremeKind.Smooth, later.How);
    }
}
