namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>The voltage that rises across a breaker's contacts as they part.</summary>
public sealed class RecoveryVoltageTests
{
    private const string Voltage = "voltage of contact";
    private const string Rate = "rate of change of voltage of contact";

    // Textbook problem, from memory: 11 kV, 50 Hz, 5 Ω a phase, 0.01 µF; figures computed (C).
    private const string SingleFrequency = """
        value Crest : 11 kV * sqrt(2/3)
        inductor L from s to contact : 5 Ω / (2*pi*50 Hz)
        capacitor C from contact to ground : 0.01 µF
        observe voltage of contact
        observe rate of change of voltage of contact
        until 60 µs
        """;

    [Fact]
    public void With_a_constant_source_it_doubles_the_crest_of_the_phase()
    {
        var solved = SolvedText.Of(SingleFrequency + "\nsource E at s : step of Crest");
        Close.To(17962.9247804, solved.Max(Voltage));
        Close.To(39.6332730e-6, solved[Voltage].Max.Time, Close.Instant);
    }

    [Fact]
    public void With_a_constant_source_it_swings_at_the_natural_frequency()
    {
        var solved = SolvedText.Of(SingleFrequency + "\nsource E at s : step of Crest");
        Close.To(12615.6626101008, Assert.Single(solved.Poles()).Im / double.Tau);
    }

    [Fact]
    public void With_a_constant_source_it_rises_at_the_rates_of_the_closed_form()
    {
        var solved = SolvedText.Of(SingleFrequency + "\nsource E at s : step of Crest");
        Close.To(0.453228397e9, solved.Max(Voltage) / solved[Voltage].Max.Time, Close.Instant);
        Close.To(0.711929501e9, solved.Max(Rate));
    }

    [Fact]
    public void With_the_50_Hz_source_it_stays_below_twice_the_crest()
    {
        var solved = SolvedText.Of(SingleFrequency + "\nsource E at s : cosine of Crest at 50 Hz");
        Close.To(17962.5107505, solved.Max(Voltage));
        Close.To(39.6326504e-6, solved[Voltage].Max.Time, Close.Instant);
    }

    // A network that produces the 12 kV envelope of IEC 62271-100: computed (C); the envelope's 20.6 kV and
    // 61 µs are from memory.
    private const string Envelope = """
        source E at s : step of 14696.9384567 V
        inductor L from s to contact : 1.32318934901 mH
        capacitor C from contact to ground : 0.388664560624 µF
        resistor R from contact to ground : 104.193016721 Ω
        observe voltage of contact
        observe overshoot of voltage of contact
        until 400 µs
        """;

    [Fact]
    public void The_network_for_the_12_kV_envelope_has_its_peak()
    {
        var solved = SolvedText.Of(Envelope);
        Close.To(20575.7138394, solved.Max(Voltage));
        Close.To(74.2124628e-6, solved[Voltage].Max.Time, Close.Instant);
    }

    [Fact]
    public void The_network_for_the_12_kV_envelope_touches_the_tangent_from_the_origin()
    {
        var undamped = 1 / Math.Sqrt(1.32318934901e-3 * 0.388664560624e-6);
        var solved = SolvedText.Of(Envelope, 2.10443528339 / undamped, 1e-6, 30e-6, 100e-6);
        var slopes = solved[Voltage].Samples.Select(s => s.Value!.Value / s.Time).ToArray();
        Close.To(20575.7138394 / 61e-6, slopes[0]); // crest over t3: 0.337306784 kV/µs
        Assert.All(slopes[1..], slope => Assert.True(slope < slopes[0]));
    }

    [Fact]
    public void The_network_for_the_12_kV_envelope_has_its_undamped_frequency()
    {
        var pole = Assert.Single(SolvedText.Of(Envelope).Poles());
        Close.To(7018.1341, double.Hypot(pole.Re, pole.Im) / double.Tau, 1e-8); // eight digits given
        Close.To(0.279997993336, -pole.Re / double.Hypot(pole.Re, pole.Im));
    }

    // Values of IEC 62271-100 (uc, t3 and the rate of rise, two parameters), from memory; the formula's
    // figures are computed (C): uc = 1.5 · 1.4 · Ur √(2/3).
    [Theory]
    [InlineData(12, 61, 20.6, 0.34)]
    [InlineData(24, 87, 41.2, 0.47)]
    [InlineData(36, 109, 61.7, 0.57)]
    public void The_envelopes_of_the_standard_are_the_formula_rounded(
        double rated, double t3, double crest, double rate)
    {
        // an undamped swing about 1.05 times the crest of the phase makes 2.1 times it
        var solved = SolvedText.Of(
            $"""
            source E at s : step of 1.05 * {rated} kV * sqrt(2/3)
            inductor L from s to contact : 1 mH
            capacitor C from contact to ground : 0.1 µF
            observe voltage of contact
            until 100 µs
            """);
        var uc = solved.Max(Voltage) / 1e3;
        Close.AsPrinted(crest, uc, 1);
        Close.AsPrinted(rate, uc / t3, 2);
    }

    // Chopping 5 A in 5 H beside 0.01 µF, from memory; V = i √(L/C) quoted (V2); the rest computed (C).
    [Fact]
    public void A_chopped_current_swings_up_to_its_surge_impedance()
    {
        var solved = SolvedText.Of(Chopped, 1e-6);
        Close.To(111803.39887498948, Math.Abs(solved[Voltage].Greatest.Value!.Value));
    }

    [Fact]
    public void The_critical_resistance_lowers_a_chopped_currents_peak()
    {
        const string critical = "\nresistor R from contact to ground : sqrt(5 H / 0.01 µF) / 2";
        var wave = SolvedText.Of(Chopped + critical)[Voltage];
        Close.To(-41130.171899198995, wave.Min.Value!.Value);
        Close.To(223.60679774997897e-6, wave.Min.Time, Close.Instant);
    }

    private const string Chopped = """
        inductor L from contact to ground : 5 H, carrying 5 A
        capacitor C from contact to ground : 0.01 µF
        observe voltage of contact
        until 1.5 ms
        """;
}
