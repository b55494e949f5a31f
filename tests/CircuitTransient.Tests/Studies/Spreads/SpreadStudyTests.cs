using System.Text;
using CircuitTransient.Reports.Studies;

namespace CircuitTransient.Tests.Studies.Spreads;

public class SpreadStudyTests
{
    private const string Charging = """
        source    Feed at in : 10 V ±10 %
        resistor  R1 from in to a : 1 kΩ ±20 % normal
        capacitor C1 from a to ground : 1 µF ±10 %, rated 10.5 V
        observe voltage of a
        require voltage of a at most 9 V from 0 s to 1.5 ms
        until 2 ms
        """;

    [Fact]
    public void The_extremes_are_those_of_the_closed_form()
    {
        var spread = Spreading.Of(Charging);
        // U (1 − e^(−t/RC)) is greatest with U greatest and RC least.
        var greatest = 11 * (1 - Math.Exp(-2e-3 / (0.8e3 * 0.9e-6)));
        var least = 9 * (1 - Math.Exp(-2e-3 / (1.2e3 * 1.1e-6)));

        var range = spread.Figure("max of voltage of a");
        Assert.Equal(greatest, range.Greatest!.Value, 1e-9);
        Assert.Equal(least, range.Least!.Value, 1e-9);
        Assert.Equal(9 - (11 * (1 - Math.Exp(-1.5e-3 / (0.8e3 * 0.9e-6)))),
            spread.Figure("margin of voltage of a at most 9 V from 0 s to 1.5 ms").Least!.Value, 1e-9);
        var used = spread.Figure("peak voltage of C1 against its rating").Greatest!.Value;
        Assert.Equal(greatest / 10.5, used, 1e-9);
    }

    [Fact]
    public void What_does_not_matter_is_left_nominal()
    {
        var spread = Spreading.Of(Charging.Replace(
            "until", "resistor R2 from in to ground : 50 Ω ±5 %\nuntil", StringComparison.Ordinal));
        var greatest = spread.Figure("max of voltage of a").Greatest!;

        Assert.Equal([true, true, true, false], greatest.Matters);
        Assert.Equal(50, greatest.Point[3]);
        Assert.True(greatest.IsCorner);
    }

    // One draw is shared by all who use it: 2 · 3 V ± 5 %.
    [Fact]
    public void A_named_value_in_two_terms_of_a_wave_is_drawn_once()
    {
        var spread = Spreading.Of(
            """
            value Vx : 3 V ±5 %
            source S at a : Vx + step of Vx at 1 ms
            resistor R1 at a : 1 kΩ
            until 2 ms
            """);
        var range = spread.Figure("max of voltage of a");
        Assert.Equal(5.7, range.Least!.Value, 1e-12);
        Assert.Equal(6.3, range.Greatest!.Value, 1e-12);
    }

    [Fact]
    public void The_draws_tell_the_probability_of_the_closed_form()
    {
        var spread = Spreading.Of(Charging, draws: 4000);
        var holding = spread.Draws!.Figures[2].Holding!;

        // The probability that 10 V·u (1 − e^(−1.5/(r c))) stays below 9 V, u even in 1 ± 0.1, c even in 1
        // ± 0.1, r normal in 1 ± 0.2: by summing over a fine grid of the same laws.
        Assert.InRange(Probability(), holding.Interval.Low, holding.Interval.High);
        Assert.Equal(4000, holding.All);
    }

    [Fact]
    public void Threads_change_no_byte()
    {
        var one = SpreadJson.Write(Spreading.Of(Charging, draws: 1200, threads: 1));
        var two = SpreadJson.Write(Spreading.Of(Charging, draws: 1200, threads: 2));

        Assert.Equal(one, two);
    }

    [Fact]
    public void Another_seed_makes_other_draws_and_the_same_extremes()
    {
        var one = Spreading.Of(Charging, draws: 100, seed: 1);
        var two = Spreading.Of(Charging, draws: 100, seed: 2);

        Assert.NotEqual(one.Draws!.Rows, two.Draws!.Rows);
        Assert.Equal(one.Figures.Select(f => f.Greatest!.Value), two.Figures.Select(f => f.Greatest!.Value));
    }

    [Fact]
    public void Draws_that_were_broken_off_are_taken_up_to_the_same_bytes()
    {
        using var stop =
            CancellationTokenSource.CreateLinkedTokenSource(TestContext.Current.CancellationToken);
        var first = Spreading.Study(Charging, draws: 1600, cancellation: stop.Token);
        Assert.Throws<OperationCanceledException>(() => first.Finish(p =>
        {
            if (p.Stage == "draws" && p.Done >= 500)
            {
                stop.Cancel();
            }
        }));
        Assert.InRange(first.DrawsDone, 500, 1599);
        using var memory = new MemoryStream();
        using (var to = new BinaryWriter(memory, Encoding.UTF8, leaveOpen: true))
        {
            first.SaveDraws(to);
        }

        memory.Position = 0;
        var second = Spreading.Study(
            Charging, draws: 1600, cancellation: TestContext.Current.CancellationToken);
        second.LoadDraws(new BinaryReader(memory));

        Assert.Equal(first.DrawsDone, second.DrawsDone);
        Assert.Equal(
            SpreadJson.Write(Spreading.Of(Charging, draws: 1600)), SpreadJson.Write(second.Finish(_ => { })));
    }

    [Fact]
    public void Draws_without_a_solution_are_counted_and_hold_nothing()
    {
        // Coils whose mutual inductance is more than their flux allows, at the lower ends of their ranges.
        var spread = Spreading.Of("""
            source   Feed at in : step of 10 V
            resistor R1 from in to a : 1 Ω
            inductor L1 from a to ground : 1 mH ±10 %
            inductor L2 from b to ground : 1 mH ±10 %
            coupling M of L1 and L2 : 0.98 mH
            resistor R2 from b to ground : 10 Ω
            require voltage of b at most 20 V
            until 5 ms
            """, draws: 400);

        Assert.InRange(spread.Draws!.Unsolvable, 100, 250);
        Assert.NotEmpty(spread.Draws.UnsolvableDraws);
        var holding = spread.Draws.Figures.Single(f => f.Holding is not null).Holding!;
        Assert.Equal(400, holding.All);
        Assert.Equal(400 - spread.Draws.Unsolvable, holding.Holding);
        Assert.InRange(spread.Account.Unsolvable, 1, 1000);
        Assert.False(spread.AllHold);
        Assert.Contains("no unique solution", SpreadSummary.Write(spread, []));
    }

    [Fact]
    public void An_extreme_between_the_corners_is_found_and_said()
    {
        // A divider's greatest power in its lower part: where both are equal, inside the range.
        var spread = Spreading.Of("""
            source   Feed at in : 10 V
            resistor R1 from in to a : 100 Ω
            resistor R2 from a to ground : 90 Ω between 50 Ω and 250 Ω
            observe power in R2
            until 1 ms
            """);
        var greatest = spread.Figure("max of power in R2").Greatest!;

        Assert.Equal(0.25, greatest.Value, 1e-8); // U²/4R
        Assert.Equal(100, greatest.Point[0], 0.1);
        Assert.False(greatest.IsCorner);
        Assert.Contains("between the corners", SpreadWords.Account(spread));
    }

    private static double Probability()
    {
        const int n = 60;
        var law = new CircuitTransient.Circuits.Tolerance(0.8, 1.2, IsNormal: true);
        var held = 0.0;
        for (var i = 0; i < n; i++)
        {
            var u = 0.9 + (0.2 * (i + 0.5) / n);
            for (var j = 0; j < n; j++)
            {
                var c = 0.9 + (0.2 * (j + 0.5) / n);
                for (var k = 0; k < n; k++)
                {
                    var r = CircuitTransient.Studies.Designs.ToleranceLaw.At(law, (k + 0.5) / n);
                    held += 10 * u * (1 - Math.Exp(-1.5 / (r * c))) <= 9 ? 1 : 0;
                }
            }
        }

        return held / (n * n * n);
    }
}
