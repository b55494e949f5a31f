using System.Globalization;
using CircuitTransient.Studies;
using CircuitTransient.Tests.Studies.Sizes;

namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Sizes found by others: snubbers, a damped filter, discharge resistors.</summary>
public sealed class SizingTests
{
    // Least peak of an RC snubber across an opening switch, after the question of W. McMurray, "Optimum
    // snubbers for power semiconductors", IEEE Trans. Ind. Appl. IA-8 (1972), from memory; its chart was not
    // seen. The values are computed (C): the damping ratio that makes the peak least for an
    // initial current factor χ = (I/E)·√(L/C), and that peak over E.
    [Theory]
    [InlineData(0.25, 2.0555, 1.05390)]
    [InlineData(0.75, 0.7910, 1.33345)]
    [InlineData(1.5, 0.5060, 1.87597)]
    public void The_snubber_with_the_least_peak_has_the_known_damping(double chi, double damping, double peak)
    {
        // E = 1 V, L = 1 H, C = 1 F: I = χ amperes, and ζ = R/2.
        var result = Sizing.Run(
            Text($"""
                source    Supply at s : 1 V
                inductor  L1 from s to a : 1 H, carrying {chi} A
                resistor  Rs from a to b : 1 Ω
                capacitor Cs from b to ground : 1 F
                require voltage of a at most 5 V
                until 30 s
                """),
            Sizing.Ask(["Rs from 0.5 Ω to 8 Ω"], least: "voltage of a"));

        // The listed damping ratios are steps of 0.0005.
        Assert.Equal(damping, result.Chosen!.Values[0] / 2, 2.5e-4);
        Assert.Equal(peak, result.Chosen.Aim!.Value, 6e-6);
        Assert.True(result.IsFound);
    }

    // Textbook example: M. H. Rashid, Power Electronics (from memory): L = 50 µH, 220 V, 20 A, R = 6.6 Ω,
    // limit 1.5 times the supply: C = 0.735 µF. The network with C = 0.734618916437 µF really peaks at
    // 330.103726958 V (C).
    [Fact]
    public void The_textbook_snubber_is_the_smallest_capacitor_for_its_peak()
    {
        var result = Sizing.Run(
            """
            source    Supply at s : 220 V
            inductor  L1 from s to a : 50 µH, carrying 20 A
            resistor  Rs from a to b : 6.6 Ω
            capacitor Cs from b to ground : 1 µF
            require voltage of a at most 330.103726958 V
            until 200 µs
            """,
            Sizing.Ask(["Cs"], least: "Cs"));

        Close.To(0.734618916437e-6, result.Exact!.Values[0], 1e-9);
        Assert.InRange(result.Chosen!.Values[0], 0.73e-6, 0.735e-6 + 0.0005e-6); // the book's three digits
        Assert.NotNull(Assert.Single(result.Intervals).Below);
    }

    // Parallel-damped filter, n = 4: the damping resistor that R. W. Erickson, "Optimal single resistor
    // damping of input filters", makes √((2+n)(4+3n)/(2n²(4+n))) of √(L/C) (formula from memory, confirmed by
    // search); with it a load step of 1 A sags by 0.480615728298 V (C). It is the
    // largest resistor that keeps to that sag.
    [Fact]
    public void The_damping_resistor_is_the_largest_that_keeps_the_sag()
    {
        var result = Sizing.Run(
            """
            source    Supply at in : 0 V
            inductor  L1 from in to out : 1 H
            capacitor C1 from out to ground : 1 F
            resistor  Rd from out to d : 1 Ω
            capacitor Cb from d to ground : 4 F
            source    Load from out to ground : step of 1 A
            require voltage of out at least -0.480615728298 V
            until 60 s
            """,
            Sizing.Ask(["Rd"], greatest: "Rd"));

        Close.To(Math.Sqrt(6 * 16 / (2.0 * 16 * 8)), result.Exact!.Values[0], 1e-9);
    }

    // Discharge resistors of a 50 kvar bank, 400 V, 50 Hz, by a capacitor maker's note on IEC 60831 (75 V
    // after 3 min) and the older IEC 70 (50 V after 1 min): R = t/(k·C·ln(√2·U/Ur)), printed 268 kΩ and
    // 74.5 kΩ (grade V2); the longer figures are that formula's.
    [Theory]
    [InlineData("75 V", 180, 268672.987123, 268e3, 220e3, 240e3)]
    [InlineData("50 V", 60, 74589.6983341, 74.5e3, 68e3, 68e3)]
    public void A_discharge_resistor_is_the_makers(
        string limit, double seconds, double computed, double printed, double ofE12, double ofE24)
    {
        var circuit = Text($"""
            capacitor C1 at a : {Bank} F, charged to {400 * Math.Sqrt(2)} V
            resistor  R1 at a : 100 kΩ
            require voltage of a at most {limit} from {seconds} s
            until 600 s
            """);
        var result = Sizing.Run(circuit, Sizing.Ask(["R1"], greatest: "R1", series: PreferredSeries.E12));

        Close.To(computed, result.Exact!.Values[0], 1e-9);
        Assert.InRange(result.Exact.Values[0], printed, 1.003 * printed); // the note cuts its digits
        Assert.Equal(ofE12, result.Chosen!.Values[0]);
        var finer = Sizing.Run(circuit, Sizing.Ask(["R1"], greatest: "R1", series: PreferredSeries.E24));
        Assert.Equal(ofE24, finer.Chosen!.Values[0]);
    }

    // The same bank with two resistors in a V: the slowest mode is 3RC, so k = 3 (grade V2; computed).
    [Fact]
    public void Two_discharge_resistors_in_a_V_are_a_third_of_one_in_delta()
    {
        var half = 400 * Math.Sqrt(2) / 2;
        var result = Sizing.Run(
            Text($"""
                value     R : 100 kΩ
                capacitor C1 from a to ground : {Bank} F, charged to {-half} V
                capacitor C2 from ground to c : {Bank} F, charged to {-half} V
                capacitor C3 from c to a : {Bank} F, charged to {2 * half} V
                resistor  R1 from a to ground : R
                resistor  R2 from ground to c : R
                require voltage across C3 at most 75 V from 180 s
                until 600 s
                """),
            Sizing.Ask([], greatest: "R", values: ["R"]));

        Close.To(89557.6623744, result.Exact!.Values[0], 1e-9);
    }

    private const double Bank = 331.572798108e-6; // 50 kvar at 400 V and 50 Hz in delta

    private static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);
}
