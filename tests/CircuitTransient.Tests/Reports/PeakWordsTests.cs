using CircuitTransient.Measurements;
using CircuitTransient.Reports;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Tests.Project;
using CircuitTransient.Text;

namespace CircuitTransient.Tests.Reports;

/// <summary>The sentences on what made a peak.</summary>
/// <remarks>The figures of the plants were found apart from this program: state equations from each
/// interval's network of resistors, with capacitors as voltage and coils as current sources; their
/// eigenvalues and vectors with 40 digits (mpmath 1.3.0); the crest where the derivative is zero; each cause
/// and each pair of modes at that instant. Frequencies are |p|/2π. More digits stand beside each.</remarks>
public class PeakWordsTests
{
    [Theory]
    // 129.474773 A = 150.385834 − 20.911062; 932 V − 905.639770 V = 26.360230 V; one volt on Cbus as Kmain
    // closes makes −4.910719 A at that instant, one of Supply 4.910747 A; 158.4797 Hz
    [InlineData("bullwheel-bus",
        "Supply makes 150.4 A of it, Cbus initial charge takes 20.91 A off; it swings at 158.5 Hz (Ls "
        + "with Cbus). What drives it is the 26.36 V between Supply (932.0 V) and Cbus charge when Kmain "
        + "closes (905.6 V): each volt less between them takes 4.911 A off.")]
    // 96.055959 V = 42.730479 + 53.325480; 25.07303 kHz
    [InlineData("cabin-dock",
        "Charger alone makes it; 42.73 V of it swing at 25.07 kHz (Lcab with Cin). Nothing stored adds "
        + "to it; without that swing 53.33 V would be left at that instant.")]
    // 1155.148608 V: Lcoil 993.308315, Coilsupply 211.302729, Csn −49.462436; the swing 950.148608 at
    // 38.58363 Hz; without Lcoil's current 275.519235
    [InlineData("caliper-deck",
        "Lcoil initial current makes 993.3 V of it and Coilsupply 211.3 V; 950.1 V of it swing at "
        + "38.58 Hz (Lcoil with Csn). Of what was stored, change Lcoil initial current first: without it "
        + "the highest value would be 275.5 V.")]
    // 12017.34768 V: Grid 10089.56130, CB 1927.78637; 4068.33011 at 4197.075 Hz, 2906.39930 at 356.805 Hz;
    // without CB's charge 10089.56960
    [InlineData("bank-gallery",
        "Grid makes 10.09 kV of it and CB initial charge 1.928 kV; 4.068 kV of it swing at 4.197 kHz "
        + "(CB with LA and LB) and 2.906 kV at 356.8 Hz (Ls with CA and CB). Of what was stored, change "
        + "CB initial charge first: without it the highest value would be 10.09 kV.")]
    // −43701.33214 V: Ll 97.243919 %; 1100.806 Hz; without its current −8631.561406
    [InlineData("intake-bay",
        "Ll initial current makes 97.2 % of it; it swings at 1.101 kHz (Cl with Ll). Of what was "
        + "stored, change Ll initial current first: without it the lowest value would be -8.632 kV.")]
    // 22.373819 V = 10.382493 + 11.991325; 43.12217 MHz
    [InlineData("load-pin",
        "Edge alone makes it; 10.38 V of it swing at 43.12 MHz (Llp with Cn). Nothing stored adds to "
        + "it; without that swing 11.99 V would be left at that instant.")]
    public void The_worst_peak_of_each_plant_is_explained(string plant, string words)
    {
        var result = SolvedText.Of(Repository.Read($"netlists/{plant}.cause")).Result;
        var worst = WorstObservation.Find(result)!;

        Assert.Equal(words, PeakWords.Of(result, worst.Observation, worst.AtMax));
        Assert.Null(PhaseWords.Of(result, worst.Observation, worst.AtMax));
    }

    [Fact]
    public void A_charge_that_holds_a_peak_down_is_said_to()
    {
        var result = SolvedText.Of(
            """
            source Feed at a : step of 100 V
            resistor R from a to b : 10 Ω
            capacitor C at b : 1 mF, charged to 40 V
            observe current through R
            until 30 ms
            """).Result;

        Assert.Equal(
            "Feed makes 10.00 A of it, C initial charge takes 4.000 A off. C initial charge holds it "
            + "down: without it the highest value would be 10.00 A.",
            PeakWords.Of(result, result.Observations[0], atMax: true));
    }

    [Fact]
    public void A_product_has_a_part_that_no_cause_has_alone()
    {
        var result = SolvedText.Of(
            """
            source Feed at a : step of 100 V
            resistor R from a to b : 10 Ω
            capacitor C at b : 1 mF, charged to -40 V
            observe power in R
            until 30 ms
            """).Result;

        // (10 A + 4 A)² · 10 Ω = 1000 W + 160 W + 2 · 10 A · 4 A · 10 Ω
        Assert.Equal(
            "Feed makes 1.000 kW of it, what no cause has alone 800.0 W and C initial charge 160.0 W. "
            + "Of what was stored, change C initial charge first: without it the highest value would be "
            + "1.000 kW.",
            PeakWords.Of(result, result.Observations[0], atMax: true));
    }

    [Fact]
    public void Nothing_is_said_of_what_is_nothing_or_infinite()
    {
        var result = SolvedText.Of(
            """
            source Feed at a : step of 1 V at 1 ms
            capacitor C at a : 1 mF
            resistor R at a : 10 Ω
            observe current through C
            observe voltage of a
            until 3 ms
            """).Result;

        Assert.Null(PeakWords.Of(result, result.Observations[0], atMax: true));
        Assert.Null(PeakWords.Of(result, result.Observations[1], atMax: false));
    }

    [Fact]
    public void Of_a_train_the_pulses_in_phase_with_the_ring_are_told()
    {
        // The ring's period is 62.8 µs: pulses come in phase, and the later the less they have decayed.
        var result = SolvedText.By(
            Breakdown.Edge,
            """
            source Feed at a : pulse train of 10 V width 10 µs every 63 µs from 5 µs count 200
            resistor R from a to b : 3 Ω
            inductor L from b to c : 100 µH
            capacitor C at c : 1 µF
            observe voltage of c
            until 400 µs
            """).Result;

        Assert.Equal(
            $"In phase with it swing Feed pulse 6 from 320 µs (+{Ring(320e-6)}), Feed pulse 5 from 257 µs "
            + $"(+{Ring(257e-6)}) and Feed pulse 4 from 194 µs (+{Ring(194e-6)}); none against it.",
            PhaseWords.Of(result, result.Observations[0], atMax: true));
        Assert.StartsWith(
            $"Feed pulse 6 from 320 µs makes {Ring(320e-6)} of it, ",
            PeakWords.Of(result, result.Observations[0], atMax: true));

        // what a step of ±10 V swings by: ∓10 V e^(−σt) (cos ωt + σ/ω sin ωt), of the rise and of the fall
        string Ring(double from)
        {
            var time = result.Observations[0].Max.Time;
            var sigma = 3 / (2 * 100e-6);
            var omega = Math.Sqrt((1 / (100e-6 * 1e-6)) - (sigma * sigma));
            return EngineeringNumber.Format(Step(time - from - 10e-6) - Step(time - from), "V");

            double Step(double t) =>
                10 * Math.Exp(-sigma * t) * (Math.Cos(omega * t) + (sigma / omega * Math.Sin(omega * t)));
        }
    }

    private static string Train(int count, string until = "600 µs") =>
        $"""
        source    Drv at a : pulse train of 24 V width 20 µs every 50 µs count {count}
        resistor  R from a to b : 3 Ω
        inductor  L from b to c : 100 µH
        capacitor C at c : 680 nF
        observe voltage of c
        until {until}
        """;

    [Fact]
    public void Without_a_pulse_the_peak_over_the_whole_study_is_told()
    {
        var result = SolvedText.By(Breakdown.Edge, Train(2, "90 µs")).Result;
        var observed = result.Observations[0];
        // the same circuit without its second pulse
        var alone = SolvedText.Of(Train(1, "90 µs")).Max("voltage of c");

        Assert.Equal(alone, observed.Pulses[^1].MaxWithout.Value!.Value, 1e-9);
        var least = observed.Pulses.MinBy(p => p.MaxWithout.Value)!;
        Assert.EndsWith(
            $"Of the pulses, change {least.Pulse} first: without it the highest value would be "
            + $"{EngineeringNumber.Format(least.MaxWithout.Value!.Value, "V")}.",
            PeakWords.Of(result, observed, atMax: true));
    }

    [Fact]
    public void Where_no_one_pulse_makes_the_peak_none_is_advised_and_later_edges_are_no_rows()
    {
        var result = SolvedText.By(Breakdown.Edge, Train(12)).Result;
        var observed = result.Observations[0];

        // Steps of the closed form 1 − e^(−σt)(cos ωt + σ/ω sin ωt) added up (mpmath 1.3.0): the crest is
        // 65.582155 V, of which pulse 7 has 55.92 % and pulse 6 17.149806 V, 26.150 %; without pulse 6 a
        // later crest reaches 65.420243 V, without pulse 5 or 7 more than that.
        Assert.True(observed.Pulses.Max(p => p.AtMax) > observed.Max.Value / 2);
        Assert.EndsWith(
            "No one pulse makes it: without Drv pulse 6 from 250 µs the highest value would still be "
            + "65.42 V.",
            PeakWords.Of(result, observed, atMax: true));
        var summary = TerminalSummary.Write(result, []);
        Assert.Matches(@"10 others, after that +nothing", summary);
        Assert.Matches(@"Drv pulse 6 from 250 µs +\+17\.15 V +26\.2 % +█+▌? +65\.42 V", summary);
    }

    [Fact]
    public void Shares_below_rounding_are_zero_in_the_breakdown_file()
    {
        // the charge has died away by e^(−400) when the feed rises
        var result = SolvedText.By(
            Breakdown.Mode,
            """
            source    Feed at a : step of 10 V at 400 µs
            resistor  R from a to b : 1 Ω
            capacitor C at b : 1 µF, charged to 1 V
            observe voltage of b from 450 µs
            until 500 µs
            """).Result;

        var file = BreakdownCsv.Write(result)!;
        Assert.Contains("C initial charge", file);
        Assert.DoesNotMatch(@"E-\d{3}", file);
    }

    [Fact]
    public void The_two_edges_of_a_pulse_are_no_pulse_in_a_product()
    {
        var result = SolvedText.By(
            Breakdown.Edge,
            """
            source Feed at a : rectangular pulse of 10 V from 1 ms to 2 ms
            resistor R from a to b : 10 Ω
            capacitor C at b : 100 µF
            observe energy in C
            until 2.5 ms
            """).Result;
        var words = PeakWords.Of(result, result.Observations[0], atMax: true)!;

        Assert.StartsWith("Feed rise at 1 ms", words);
        Assert.DoesNotContain("pulse", words);
    }

    [Fact]
    public void An_edge_that_comes_against_the_ring_is_told()
    {
        // half a period of the undamped ring, 2π √(L C) / 2 = 31.4 µs, after the first step
        var result = SolvedText.By(
            Breakdown.Edge,
            """
            source Feed at a : step of 10 V at 0 s + step of 3 V at 62.83 µs + step of 3 V at 94.25 µs
            resistor R from a to b : 0.1 Ω
            inductor L from b to c : 100 µH
            capacitor C at c : 1 µF
            observe voltage of c from 150 µs to 170 µs
            until 170 µs
            """).Result;
        var words = PhaseWords.Of(result, result.Observations[0], atMax: true);

        Assert.StartsWith("In phase with it swing Feed step at 0 s (+9.", words);
        Assert.Contains("; against it Feed step at 94.25 µs (-2.", words);
    }
}
