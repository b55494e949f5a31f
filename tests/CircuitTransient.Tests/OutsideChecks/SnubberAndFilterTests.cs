namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Damped contacts, filters and ringing leads.</summary>
public sealed class SnubberAndFilterTests
{
    // Rashid, Power Electronics, two textbook examples, from memory; the real peaks are computed (C).
    [Fact]
    public void A_snubber_designed_for_one_and_a_half_keeps_near_it()
    {
        var wave = Snubber("0.734618916437 µF", 20)["voltage of contact"];
        Close.To(330.103726957683, wave.Max.Value!.Value);
        Close.To(10.1983946382793e-6, wave.Max.Time, Close.Instant);
    }

    [Fact]
    public void A_snubber_without_current_has_its_peak_and_rates()
    {
        var solved = Snubber("0.75 µF", 0);
        Close.To(299.294030433434, solved.Max("voltage of contact"));
        Close.To(15.4615863456367e-6, solved["voltage of contact"].Max.Time, Close.Instant);
        var rate = solved["rate of change of voltage of contact"];
        Close.To(29.04e6, rate.Start!.Value);
        Close.To(31.1530971051527e6, rate.Max.Value!.Value);
        Close.To(2.15974869767478e-6, rate.Max.Time, Close.Instant);
    }

    // The damping that makes the peak least for a given current: computed (C), as peak over E.
    [Theory]
    [InlineData(0.25, 2.0555, 1.05390)]
    [InlineData(0.5, 1.0960, 1.17728)]
    [InlineData(0.75, 0.7910, 1.33345)]
    [InlineData(1, 0.6450, 1.50624)]
    [InlineData(1.5, 0.5060, 1.87597)]
    [InlineData(2, 0.4405, 2.26100)]
    public void The_best_damping_has_a_lower_peak_than_its_neighbours(
        double current, double damping, double peak)
    {
        var least = Peak(damping);
        Close.AsPrinted(peak, least, 5);
        Assert.True(least < Peak(damping * 1.03));
        Assert.True(least < Peak(damping * 0.97));

        double Peak(double ratio) => SolvedText.Of(
            $"""
            source E at s : 1 V
            inductor L from s to contact : 1 H, carrying {current} A
            resistor R from contact to c : {2 * ratio:R} Ω
            capacitor C from c to ground : 1 F
            observe voltage of contact
            until 30 s
            """).Max("voltage of contact");
    }

    // Erickson, optimal single-resistor damping (first page quoted, V2; formulas from memory): n = 4; the
    // sag under a step of load is computed (C).
    [Fact]
    public void An_optimally_damped_filter_sags_by_its_computed_figure()
    {
        var wave = SolvedText.Of(
            """
            value n : 4
            source E at s : 0 V
            source Load from out to ground : step of 1 A
            inductor L from s to out : 1 H
            capacitor C from out to ground : 1 F
            resistor Rd from out to d : 1 Ω * sqrt((2 + n)*(4 + 3*n)/(2*n^2*(4 + n)))
            capacitor Cb from d to ground : 4 F
            observe voltage of out
            until 30 s
            """)["voltage of out"];
        Close.To(-0.480615728297953, wave.Min.Value!.Value);
        Close.To(1.35271319675773, wave.Min.Time, Close.Instant);
    }

    // RC snubbing for the lab, an application article, quoted (V2): a 10 V step that rings to 19 V; the next
    // extremes and the damping are computed (C).
    [Fact]
    public void A_step_that_rings_to_19_volts_swings_back_to_1_9_and_17_29()
    {
        var solved = SolvedText.Of(
            """
            source E at s : step of 10 V
            resistor R from s to r : 2 * 0.0335184491056764 Ω
            inductor L from r to out : 1 H
            capacitor C from out to ground : 1 F
            observe voltage of out
            observe voltage of out as "swing back" from 4 s
            observe voltage of out as "third" from 7 s
            observe overshoot of voltage of out
            until 12 s
            """);
        Close.To(19, solved.Max("voltage of out"));
        Close.To(1.9, solved.Min("swing back"));
        Close.To(17.29, solved.Max("third"));
        Close.To(90, solved.Figure("overshoot of voltage of out"));
    }

    [Fact]
    public void Three_times_the_stray_capacitance_more_halves_the_ringing_frequency()
    {
        Close.To(2, Frequency("1 nF") / Frequency("4 nF"));

        static double Frequency(string capacitance) => SolvedText.Of(
            $"""
            source E at s : step of 10 V
            inductor L from s to out : 100 nH
            capacitor C from out to ground : {capacitance}
            observe ring frequency of voltage of out
            until 1 µs
            """).Figure("ring frequency of voltage of out");
    }

    private static SolvedText Snubber(string capacitance, double amperes) => SolvedText.Of(
        $"""
        source E at s : 220 V
        inductor L from s to contact : 50 µH, carrying {amperes} A
        switch S from contact to ground : closed, opens at 0 s
        resistor R from contact to c : 6.6 Ω
        capacitor C from c to ground : {capacitance}
        observe voltage of contact
        observe rate of change of voltage of contact
        until 60 µs
        """);
}
