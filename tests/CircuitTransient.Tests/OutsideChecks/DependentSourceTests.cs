namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Networks of dependent sources whose transfer functions stand in textbooks.</summary>
/// <remarks>Sources, all from memory, none opened: R. P. Sallen and E. L. Key, "A practical method of
/// designing RC active filters", IRE Transactions on Circuit Theory 2, 1955; B. D. H. Tellegen, "The gyrator,
/// a new electric network element", Philips Research Reports 3, 1948; J. M. Miller, "Dependence of the input
/// impedance of a three-electrode vacuum tube upon the load in the plate circuit", 1920; L. O. Chua, C. A.
/// Desoer and E. S. Kuh, "Linear and Nonlinear Circuits", 1987, for the four kinds.</remarks>
public sealed class DependentSourceTests
{
    private const string Driven = """
        source Feed at in : 3 V
        resistor Rin at in : 1.5 kΩ
        resistor Rout from out to x : 1 kΩ
        capacitor C at x : 1 µF
        observe voltage of x
        until 5 ms
        """;

    [Theory]
    [InlineData("dependent source Amp at out : 10 times voltage of in", 30)]
    [InlineData("dependent source Amp at out : -10 times voltage across Feed", -30)]
    [InlineData("dependent source Amp at out : 50 Ω times current through Rin", 0.1)]
    [InlineData("dependent source Amp at out : 50 Ω times current through Feed", -0.1)]
    public void A_set_voltage_charges_the_capacitor_through_the_resistor(string amplifier, double final)
    {
        var solved = SolvedText.Of($"{Driven}\n{amplifier}", 1e-3);
        Close.To(final * (1 - Math.Exp(-1)), solved.Sample("voltage of x", 0));
    }

    [Theory]
    [InlineData("dependent source Amp from ground to x : 2 mS times voltage of in", 6e-3)]
    [InlineData("dependent source Amp from x to ground : 2 mS times voltage from in to ground", -6e-3)]
    [InlineData("dependent source Amp from ground to x : 5 times current through Rin", 10e-3)]
    public void A_set_current_charges_the_capacitor_against_the_resistor(string amplifier, double current)
    {
        var solved = SolvedText.Of($"{Driven}\n{amplifier}\nswitch Grounded at out : closed", 1e-3);
        Close.To(current * 1e3 * (1 - Math.Exp(-1)), solved.Sample("voltage of x", 0));
    }

    [Theory]
    [InlineData(1.0)]
    [InlineData(1.586)]
    [InlineData(2.9)]
    [InlineData(3.0)] // undamped
    [InlineData(3.2)] // grows
    public void The_two_pole_filter_of_Sallen_and_Key_answers_a_step(double gain)
    {
        const double tau = 1e-3;
        var solved = SolvedText.Of($"""
            source Feed at in : 1 V
            resistor R1 from in to a : 10 kΩ
            resistor R2 from a to b : 10 kΩ
            capacitor C1 from a to out : 100 nF
            capacitor C2 at b : 100 nF
            dependent source Amp at out : {gain:R} times voltage of b
            observe voltage of out
            until 20 ms
            """, 0.5e-3, 3e-3, 17e-3);

        // H = K / (1 + (3 − K) τ s + τ² s²)
        var zeta = (3 - gain) / 2;
        var ring = Math.Sqrt(1 - (zeta * zeta)) / tau;
        var scale = Math.Max(Math.Abs(solved.Max("voltage of out")), Math.Abs(solved.Min("voltage of out")));
        foreach (var (t, value) in new[] { 0.5e-3, 3e-3, 17e-3 }.Zip(solved.Samples("voltage of out")))
        {
            var answer = gain == 1
                ? 1 - ((1 + (t / tau)) * Math.Exp(-t / tau))
                : gain * (1 - (Math.Exp(-zeta * t / tau)
                    * (Math.Cos(ring * t) + (zeta / tau / ring * Math.Sin(ring * t)))));
            Close.OfScale(scale, answer, value, 1e-11);
        }
    }

    [Fact]
    public void A_gyrator_makes_a_capacitor_a_coil()
    {
        // g² = 1 mS · 1 mS: 10 nF looks like 10 mH; with 1 µF across it and 1 kΩ, a parallel resonance.
        var solved = SolvedText.Of("""
            source Feed from ground to a : 1 mA
            resistor R at a : 1 kΩ
            capacitor C at a : 1 µF
            dependent source Ga from a to ground : 1 mS times voltage of b
            dependent source Gb from ground to b : 1 mS times voltage of a
            capacitor Cg at b : 10 nF
            observe voltage of a
            until 10 ms
            """, 0.3e-3, 2e-3);
        var (alpha, l, c) = (500.0, 10e-3, 1e-6);
        var omega = Math.Sqrt((1 / (l * c)) - (alpha * alpha));
        foreach (var (t, value) in new[] { 0.3e-3, 2e-3 }.Zip(solved.Samples("voltage of a")))
        {
            Close.OfScale(0.1, 1e-3 / c / omega * Math.Exp(-alpha * t) * Math.Sin(omega * t), value, 1e-11);
        }
    }

    [Fact]
    public void Miller_capacitance_is_the_capacitance_times_one_plus_the_gain()
    {
        var solved = SolvedText.Of("""
            source Feed at in : 1 V
            resistor R from in to g : 1 MΩ
            capacitor Cm from g to d : 2 pF
            dependent source Amp at d : -99 times voltage of g
            observe voltage of d
            until 1 ms
            """, 100e-6);
        Close.To(-1 / (1e6 * 2e-12 * 100), Assert.Single(solved.Poles()).Re);
        Close.To(-99 * (1 - Math.Exp(-0.5)), solved.Sample("voltage of d", 0));
    }
}
