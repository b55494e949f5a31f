using CircuitTransient.Measurements;
using CircuitTransient.Measurements.Breakdowns;
using CircuitTransient.Tests.OutsideChecks;
using CircuitTransient.Tests.Project;

namespace CircuitTransient.Tests.Measurements.Breakdowns;

/// <summary>Extremes by causes and modes.</summary>
public class ModeBreakdownTests
{
    [Fact]
    public void A_series_ring_has_a_steady_part_and_one_mode()
    {
        // v = V − V e^(−σt) (cos ωt + σ/ω sin ωt), first crest at π/ω: V (1 + e^(−σπ/ω)); over a cycle coil
        // and capacitor hold alike, |i|² = ω₀² C² |v|²
        var observed = SolvedText.By(
            Breakdown.Mode,
            """
            source Feed at a : step of 10 V
            resistor R from a to b : 3 Ω
            inductor L from b to c : 100 µH
            capacitor C at c : 1 µF
            observe voltage of c
            until 400 µs
            """)["voltage of c"];
        var modes = observed.ByMode!.AtMax!.Modes;

        var (sigma, natural) = (3 / (2 * 100e-6), 1 / Math.Sqrt(100e-6 * 1e-6));
        var damped = Math.Sqrt((natural * natural) - (sigma * sigma));
        Assert.Equal(["steady", "15.92 kHz: L with C"], modes.Select(m => m.Name));
        Close.To(10, modes[0].Value);
        Close.To(10 * Math.Exp(-sigma * Math.PI / damped), modes[1].Value);
        Close.To(-sigma, modes[1].Rate.Real);
        Close.To(damped, modes[1].Rate.Imaginary);
        Assert.Equal(["L", "C"], modes[1].Parts.Select(p => p.Part));
        Close.To(0.5, modes[1].Parts[0].Share);
        Close.To(0.5, modes[1].Parts[1].Share);
    }

    [Theory]
    [InlineData(21)]
    [InlineData(22)]
    [InlineData(23)]
    [InlineData(24)]
    [InlineData(25)]
    public void Causes_and_modes_add_up_to_the_extreme_and_modes_to_the_causes(int seed)
    {
        var drawn = RandomNetwork.Draw(seed);
        var resistor = drawn.Parts.First(p => p.Kind == "resistor").Name;
        var solved = SolvedText.By(Breakdown.Mode, drawn.Text($"observe power in {resistor}"));
        foreach (var observed in solved.Result.Observations)
        {
            var scale = Math.Max(Math.Abs(observed.Max.Value!.Value), Math.Abs(observed.Min.Value!.Value));
            AddUp(observed, observed.ByMode!.AtMax!, observed.Max.Value!.Value, scale, c => c.AtMax!.Value);
            AddUp(observed, observed.ByMode.AtMin!, observed.Min.Value!.Value, scale, c => c.AtMin!.Value);
        }
    }

    [Theory]
    [InlineData(31)]
    [InlineData(32)]
    [InlineData(33)]
    [InlineData(35)]
    [InlineData(34)]
    public void Energies_of_modes_and_what_is_joint_sum_to_what_is_stored(int seed)
    {
        var drawn = RandomNetwork.Draw(seed);
        string[] energies =
        [
            .. drawn.Parts.Where(p => p.Kind is "capacitor" or "inductor").Select(p => $"energy in {p.Name}"),
        ];
        StoredIs(drawn.Text([.. energies.Select(e => "observe " + e)]), energies);
    }

    [Fact]
    public void They_do_with_coupled_coils()
    {
        const string text = """
            source Feed at a : step of 10 V
            resistor R from a to b : 3 Ω
            inductor L1 from b to ground : 1 mH
            inductor L2 from c to ground : 4 mH
            coupling M of L1 and L2 : 0.9
            capacitor C at c : 1 µF
            resistor Rl at c : 1 kΩ
            observe energy in L1
            observe energy in L2
            observe energy in M
            observe energy in C
            observe voltage of c
            until 1 ms

            """;
        StoredIs(text, ["energy in L1", "energy in L2", "energy in M", "energy in C"]);
        var modes = SolvedText.By(Breakdown.Mode, text)["voltage of c"].ByMode!.AtMax!.Modes;
        Assert.All(modes.Where(m => !m.IsForced), m => Close.To(1, m.Parts.Sum(p => p.Share)));
    }

    [Fact]
    public void Coinciding_poles_are_one_mode()
    {
        // R L C critically damped, R = 2 √(L/C) = 20 Ω: a double pole at −1e5 1/s
        var modes = SolvedText.By(
            Breakdown.Mode,
            """
            source Feed at a : step of 10 V
            resistor R from a to b : 20 Ω
            inductor L from b to c : 100 µH
            capacitor C at c : 1 µF
            observe current through L
            until 100 µs
            """)["current through L"].ByMode!.AtMax!.Modes;

        var mode = Assert.Single(modes);
        Assert.Equal(2, mode.Multiplicity);
        Assert.StartsWith("10.00 µs (2 poles): ", mode.Name);
        Close.To(10 / 20.0 * 2 / Math.E, mode.Value); // V t e^(−t/τ) / L at t = τ
    }

    [Fact]
    public void A_source_is_a_mode_of_its_own_unless_a_pole_is_too_slow_to_be_parted_from_it()
    {
        var solved = SolvedText.By(
            Breakdown.Mode,
            """
            source Grid at a : sine of 10 V at 50 Hz
            source Slow at b : step of 5 V
            resistor R from a to c : 1 kΩ
            resistor Rs from b to d : 1 MΩ
            capacitor C at c : 1 µF
            capacitor Cs at d : 1 mF
            observe voltage of c
            observe voltage of d
            until 100 ms
            """);

        Assert.Equal(
            ["source at 50.00 Hz", "1.000 ms: C"],
            solved["voltage of c"].ByMode!.AtMax!.Modes.Select(m => m.Name));
        var slow = Assert.Single(solved["voltage of d"].ByMode!.AtMax!.Modes);
        Assert.Equal(("1.000 ks: Cs", true), (slow.Name, slow.IsDriven));
        Close.To(5 * -double.ExpM1(-0.1 / 1000), slow.Value, 1e-7); // ExpM1 of .NET 10 is naive near zero
    }

    [Fact]
    public void An_integral_over_time_has_no_modes_at_an_instant()
    {
        var solved = SolvedText.By(
            Breakdown.Mode, Repository.Read("netlists/bank-gallery.cause"));

        Assert.Null(solved["I²t through KB"].ByMode!.AtMax);
        Assert.Equal(
            ["4.197 kHz: CB with LA and LB", "356.8 Hz: Ls with CA and CB", "source at 50.00 Hz"],
            solved["current through KB"].ByMode!.AtMax!.Modes.Select(m => m.Name));
    }

    private static void AddUp(
        ObservationResult observed, ModeBreakdown breakdown, double total, double scale,
        Func<Contribution, double> share)
    {
        var all = breakdown.Causes.Sum(c => c.Values.Sum());
        if (!observed.Contributions.Any(c => c.Cause == "joint"))
        {
            Assert.Equal(0, breakdown.Joint);
            Close.OfScale(scale, total, breakdown.Modes.Sum(m => m.Value), 1e-12);
            for (var c = 0; c < breakdown.Causes.Length; c++)
            {
                var own = breakdown.Causes[c].Values.Sum();
                Close.OfScale(scale, share(observed.Contributions[c]), own, 1e-12);
            }
        }

        Close.OfScale(scale, total, all + breakdown.Joint, 1e-12);
    }

    /// <summary>At the maximum of each energy, the sum of all stored ones, read at that instant, against the
    /// modes' own with their joint part.</summary>
    private static void StoredIs(string text, string[] energies)
    {
        var first = SolvedText.By(Breakdown.Mode, text);
        foreach (var name in energies)
        {
            var extreme = first[name].Max;
            var breakdown = first[name].ByMode!.AtMax!;
            if (extreme.Side == InstantSide.Before)
            {
                continue; // a sample at a jump is the value after it
            }

            var there = SolvedText.Of(text, extreme.Time);
            Close.To(energies.Sum(e => there.Sample(e, 0)), breakdown.Energies!.Stored);
        }
    }
}
