using CircuitTransient.Studies;

namespace CircuitTransient.Tests.Studies.Sizes;

public sealed class SizeStudyTests
{
    // A current step into R parallel C: v(t) = I·R·(1 − e^(−t/RC)).
    private const string Charged =
        """
        source    Feed from ground to a : step of 1 mA
        resistor  R1 from a to ground : 1 kΩ ±10 %, rated 1 W
        capacitor C1 from a to ground : 1 µF ±20 %
        require voltage of a at most 1.5 V
        until 20 ms
        """;

    [Fact]
    public void The_stretch_that_holds_ends_where_the_bound_is_met()
    {
        var result = Sizing.Run(Charged, Sizing.Ask(["R1 from 100 Ω to 2 kΩ"]));

        var interval = Assert.Single(result.Intervals);
        Assert.Equal(100, interval.From.Values[0]);
        Assert.Null(interval.Below);
        // From 20 ms/RC = 13 on the step's end is 2e-6 below I·R; the bound is met where they agree.
        var r = interval.To.Values[0];
        Assert.Equal(1.5, 1e-3 * r * (1 - Math.Exp(-20e-3 / (r * 1e-6))), 1e-11);
        Assert.Equal("voltage of a at most 1.5 V", result.Problem.Constraints[interval.Above!.Value].Name);
        Assert.True(interval.To.Holds);
    }

    [Fact]
    public void Stretches_that_are_apart_are_both_shown()
    {
        // The coil rings with C1 against the window: the voltage at 10 ms swings with C1.
        var result = Sizing.Run(
            """
            inductor  L1 from a to ground : 1 H, carrying 1 A
            capacitor C1 from a to ground : 1 µF
            resistor  R1 from a to ground : 1 kΩ
            require voltage of a at least 0 V from 9.9 ms to 10 ms
            until 10 ms
            """,
            Sizing.Ask(["C1 from 100 nF to 20 µF"]));

        Assert.True(result.Intervals.Length > 1);
        Assert.All(result.Intervals.Zip(result.Intervals.Skip(1)),
            pair => Assert.True(pair.First.To.Values[0] < pair.Second.From.Values[0]));
    }

    [Fact]
    public void The_proposed_value_of_a_series_is_the_best_that_holds()
    {
        var result = Sizing.Run(Charged, Sizing.Ask(["R1"], greatest: "R1", series: PreferredSeries.E12));

        Assert.Equal(1500, result.Chosen!.Values[0], 1e-9);
        Assert.True(result.IsFound);
        // 1 kΩ leaves 0.5 V of 1.5 V.
        Assert.Equal(1 / 3.0, result.AsItStands.Shares[0], 1e-8);
        Assert.Contains("resistor  R1 from a to ground : 1.5 kΩ ±10 %, rated 1 W", result.ProposedText);
        Assert.Equal(result.Preferred.Count(p => p.Holds), result.Preferred.Count(p => p.Values[0] <= 1500));
    }

    [Fact]
    public void With_tolerances_it_holds_at_every_corner_and_its_own_moves_with_it()
    {
        var result = Sizing.Run(
            Charged, Sizing.Ask(["R1"], greatest: "R1", withSpread: true));

        // The worst corner has R1 at +10 %: I·1.1·R·(1 − e^(−20 ms/(1.1·R·0.8 µF))) is the bound.
        var r = 1.1 * result.Exact!.Values[0];
        Assert.Equal(1.5, 1e-3 * r * (1 - Math.Exp(-20e-3 / (r * 0.8e-6))), 1e-11);
        Assert.Equal(4, result.Account.Count);
        Assert.True(result.IsFound);
        Assert.NotEmpty(result.Confirmed);
    }

    [Fact]
    public void The_least_of_a_quantity_is_found_between_scanned_values()
    {
        // Matching: the power in R1 from a source of 1 V with 50 Ω is greatest at 50 Ω: 5 mW.
        var result = Sizing.Run(
            """
            source   Feed at s : 1 V
            resistor Rs from s to a : 50 Ω
            resistor R1 from a to ground : 70 Ω
            require voltage of a at most 1 V
            until 1 ms
            """,
            Sizing.Ask(["R1"], greatest: "power in R1"));

        Assert.Equal(5e-3, result.Chosen!.Aim!.Value, 1e-12);
        Assert.Equal(50, result.Chosen.Values[0], 1e-4);
    }

    [Fact]
    public void Two_parts_meet_at_the_corner_of_their_bounds()
    {
        // The step charges C1 through R1: at 1 ms at least 0.9 of it (RC at most 1 ms/ln 10), and the current
        // 10 V/R1 at most 10 mA. The least R1 is 1 kΩ; with it the greatest C1 is 1 ms/(1 kΩ·ln 10).
        var result = Sizing.Run(Step, Sizing.Ask(["R1", "C1"], greatest: "C1"));

        Assert.Equal(1000, result.Chosen!.Values[0], 1e-5);
        Assert.Equal(1e-3 / (1000 * Math.Log(10)), result.Exact!.Values[1], 1e-14);
        Assert.True(result.IsFound);
    }

    [Fact]
    public void Of_two_parts_a_series_is_searched_pair_by_pair()
    {
        var result = Sizing.Run(
            Step, Sizing.Ask(["R1", "C1"], greatest: "C1", series: PreferredSeries.E6));

        // 1 kΩ with 0.43 µF at most: 330 nF.
        Assert.Equal([1000.0, 330e-9], result.Chosen!.Values);
        Assert.Equal(result.Axes[0].Length * result.Axes[1].Length, result.Points.Length);
        Assert.All(result.Points, p => Assert.Equal(
            p.Values[0] >= 1000 && p.Values[0] * p.Values[1] <= 1e-3 / Math.Log(10), p.Holds));
    }

    [Fact]
    public void Two_requirements_that_exclude_each_other_are_named_with_what_is_missing()
    {
        // I·R at most 1 V and at least 1.5 V: nearest where both are missed by the same fraction.
        var result = Sizing.Run(
            """
            source   Feed from ground to a : 1 mA
            resistor R1 from a to ground : 1 kΩ
            require voltage of a at most 1 V
            require voltage of a at least 1.5 V
            require current through R1 at most 2 mA
            until 1 ms
            """,
            Sizing.Ask(["R1"]));

        Assert.Null(result.Chosen);
        Assert.False(result.IsFound);
        var conflict = result.Conflict!;
        Assert.Empty(conflict.Alone);
        var pair = Assert.Single(conflict.Pairs);
        Assert.Equal((0, 1), (pair.First, pair.Second));
        // (V − 1)/1 = (1.5 − V)/1.5 at V = 1.2: each is missed by a fifth.
        Assert.Equal(1200, pair.Nearest.Values[0], 1e-6);
        Assert.Equal(-0.2, pair.Nearest.Shares[0], 1e-9);
        Assert.Equal(-0.2, pair.Nearest.Shares[1], 1e-9);
    }

    [Fact]
    public void A_requirement_that_no_value_meets_is_named_alone()
    {
        var result = Sizing.Run(
            Charged + "\nrequire current through R1 at most 0.5 A\nrequire voltage of a at least 1 kV",
            Sizing.Ask(["R1"]));

        var alone = Assert.Single(result.Conflict!.Alone);
        Assert.Equal("voltage of a at least 1 kV", result.Problem.Constraints[alone].Name);
    }

    [Fact]
    public void A_series_that_is_too_coarse_is_told_from_no_value_at_all()
    {
        var result = Sizing.Run(
            """
            source   Feed from ground to a : 1 mA
            resistor R1 from a to ground : 1 kΩ
            require voltage of a between 1.02 V and 1.08 V
            until 1 ms
            """,
            Sizing.Ask(["R1"], series: PreferredSeries.E24));

        Assert.Null(result.Chosen);
        Assert.Null(result.Conflict);
        Assert.InRange(result.Exact!.Values[0], 1020, 1080);
    }

    [Fact]
    public void Values_without_a_unique_solution_count_as_broken()
    {
        // At 1 H and 1 F the drive is in resonance with an undamped mode: no settled start exists.
        var result = Sizing.Run(
            """
            source    Feed at s : sine of 1 V at 1/(2*pi*1 s)
            inductor  L1 from s to a : 1 H
            capacitor C1 from a to ground : 1 F
            require voltage of a at most 3 V
            start settled
            until 5 s
            """,
            Sizing.Ask(["L1 from 0.1 H to 10 H"]));

        Assert.Equal(1, result.Unsolved);
        Assert.False(result.AsItStands.IsSolved);
        Assert.DoesNotContain(result.Intervals,
            interval => interval.From.Values[0] <= 1 && interval.To.Values[0] >= 1);
    }

    private const string Step =
        """
        source    Feed at s : step of 10 V
        resistor  R1 from s to a : 2.2 kΩ
        capacitor C1 from a to ground : 100 nF
        require voltage of a at least 9 V from 1 ms
        require current through R1 at most 10 mA
        until 1 ms
        """;

    [Fact]
    public void A_value_between_the_scanned_ones_is_proposed_to_six_digits_on_the_side_that_holds()
    {
        // The step charges C1: 0.9 of it at 1 ms, so R1 is at most 1 ms/(C·ln 10) = 434.294482 Ω.
        const string circuit =
            """
            source    Feed at s : step of 10 V
            resistor  R1 from s to a : 100 Ω
            capacitor C1 from a to ground : 1 µF
            require voltage of a at least 9 V from 1 ms
            until 2 ms
            """;

        var result = Sizing.Run(circuit, Sizing.Ask(["R1"], greatest: "R1"));

        Assert.Equal(1e-3 / (1e-6 * Math.Log(10)), result.Exact!.Values[0], 1e-7);
        Assert.Equal(434.294, result.Chosen!.Values[0]);
        Assert.True(result.IsFound);
        Assert.Contains("R1 from s to a : 434.294 Ω", result.ProposedText);
    }

    [Fact]
    public void Where_no_short_value_holds_all_digits_stay()
    {
        // 100 µV of 10 V to either side of 434.2944819 Ω leave no room for six digits.
        const string circuit =
            """
            source    Feed at s : step of 10 V
            resistor  R1 from s to a : 434.2944819 Ω
            capacitor C1 from a to ground : 1 µF
            require voltage of a between 8.9999999 V and 9.0000001 V from 1 ms to 1 ms
            until 2 ms
            """;

        var result = Sizing.Run(circuit, Sizing.Ask(["R1"]));

        Assert.True(result.IsFound);
        Assert.Equal(434.2944819, result.Chosen!.Values[0], 1e-4);
        Assert.Equal(result.Exact!.Values[0], result.Chosen.Values[0]);
    }
}
