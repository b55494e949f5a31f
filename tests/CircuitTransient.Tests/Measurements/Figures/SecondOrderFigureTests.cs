using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements.Figures;

/// <summary>Overshoot, settling, peak and ring of the step of 1/(s² + 2ζs + 1).</summary>
/// <remarks>All values are mathematics, computed (C, the grades of <see cref="Close"/>).</remarks>
public sealed class SecondOrderFigureTests
{
    [Theory]
    [InlineData(0.1, 72.9247614288, 3.157419417, 38.3832804869)]
    [InlineData(0.2, 52.662059933, 3.2063745754, 19.6019037304)]
    [InlineData(0.3, 37.2326104927, 3.29328394192, 11.2300814678)]
    [InlineData(0.4, 25.382672198, 3.42775860424, 8.40931962766)]
    [InlineData(0.5, 16.3033534822, 3.62759872847, 8.07634897393)]
    [InlineData(0.6, 9.47802248422, 3.92699081699, 5.94298787864)]
    [InlineData(0.7, 4.59879102603, 4.39910962495, 5.9787923674)]
    [InlineData(0.8, 1.51646198645, 5.23598775598, 3.75584130531)]
    [InlineData(0.9, 0.152375582052, 7.20730784146, 4.69959698909)]
    public void It_overshoots_and_settles_by_the_closed_form(
        double damping, double overshoot, double peak, double settled)
    {
        var solved = Step("step of 1 V", damping);
        Close.To(overshoot, solved.Figure("overshoot of voltage of c"), 1e-9 / (overshoot / 100));
        Close.To(peak, solved.Figure("time of peak of voltage of c"), Close.Instant);
        Close.To(settled, solved.Figure("settling time of voltage of c within 2 %"));
    }

    [Fact]
    public void A_falling_response_is_read_mirrored()
    {
        var solved = Step("step of 8 V - step of 4 V at 200 s", 0.4, " from 200 s");
        Close.To(25.382672198, solved.Figure("overshoot of voltage of c"), 1e-8);
        Close.To(8.40931962766, solved.Figure("settling time of voltage of c within 2 %"), 1e-8);
    }

    // 90 % overshoot, as where a probe's ring is used to find stray parts: ζ = 0.0335184491057 (C).
    [Fact]
    public void The_ring_frequency_is_that_of_the_damped_mode()
    {
        const double damping = 0.0335184491057;
        var expected = Math.Sqrt(1 - (damping * damping)) / double.Tau;
        var solved = Step("step of 1 V", damping);
        Close.To(expected, solved.Figure("ring frequency of voltage of c"), 1e-12);
        Close.To(90, solved.Figure("overshoot of voltage of c"));
    }

    [Fact]
    public void Four_times_the_capacitance_rings_at_half_the_frequency()
    {
        var plain = Ring("1 nF").Figure("ring frequency of voltage of c");
        var loaded = Ring("4 nF").Figure("ring frequency of voltage of c");
        Close.To(plain / 2, loaded, 1e-12);
    }

    [Fact]
    public void A_response_without_a_ring_has_no_ring_frequency()
    {
        var solved = Step("step of 1 V", 2);
        Assert.Null(solved.Result.Figures.Single(f => f.Name == "ring frequency of voltage of c").Value);
        Assert.Equal(0, solved.Figure("overshoot of voltage of c"));
    }

    // t·e^(−t): 10–90 % 0.570120042987 of its time constant (C).
    [Fact]
    public void The_critically_damped_current_rises_to_its_peak()
    {
        var solved = SolvedText.Of(
            """
            source E at s : step of 1 V
            resistor R from s to r : 2 Ω
            inductor L from r to c : 1 H
            capacitor C from c to ground : 1 F
            observe rise time of current through L
            observe front time of current through L
            until 60 s
            """);
        Close.To(0.570120042987, solved.Figure("rise time of current through L"));
        Close.To(1.25 * 0.570120042987, solved.Figure("front time of current through L"));
    }

    private static SolvedText Ring(string capacitance) => SolvedText.Of(
        $"""
        inductor L from ground to c : 1 mH, carrying 1 A
        capacitor C from c to ground : {capacitance}
        observe ring frequency of voltage of c
        until 1 ms
        """);

    private static SolvedText Step(string wave, double damping, string window = "") => SolvedText.Of(
        $"""
        source E at s : {wave}
        resistor R from s to r : {2 * damping} Ω
        inductor L from r to c : 1 H
        capacitor C from c to ground : 1 F
        observe overshoot of voltage of c{window}
        observe settling time of voltage of c within 2 %{window}
        observe time of peak of voltage of c{window}
        observe ring frequency of voltage of c{window}
        until 600 s
        """);
}
