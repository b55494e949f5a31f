using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements.Figures;

/// <summary>Front, half-value and rise of the waves that laboratories measure.</summary>
/// <remarks>The constants of the waves are from memory (IEEE C62.41, IEC 61000-4-4 and textbooks); every
/// figure is computed (C) from them. Definitions: voltage front by IEC 60060-1
/// (V2; the grades of <see cref="Close"/>).</remarks>
public sealed class ImpulseFigureTests
{
    [Fact]
    public void A_lightning_impulse_has_its_front_and_half_value()
    {
        var solved = Difference(1.037, 0.407e-6, 68.22e-6, 200e-6);
        Close.To(1.19876222e-6, solved.Figure("front time of voltage of a"), 5e-9);
        Close.To(49.9995702e-6, solved.Figure("time to half-value of voltage of a"));
        Close.To(2.086945e-6, solved.Figure("time of peak of voltage of a"), Close.Instant);
    }

    // 3155/62.48 µs is meant as 250 µs to the peak; its front is another 165 µs.
    [Fact]
    public void A_switching_impulse_has_a_front_that_is_not_its_time_to_peak()
    {
        var together = 1 / ((1 / 62.48e-6) - (1 / 3155e-6));
        var solved = Difference(1, together, 3155e-6, 8e-3);
        Close.To(249.990831e-6, solved.Figure("time of peak of voltage of a"), Close.Instant);
        Close.To(165.101694e-6, solved.Figure("front time of voltage of a"), 4e-9);
    }

    [Fact]
    public void A_fast_burst_pulse_has_its_rise() =>
        Close.To(5.00193199e-9, Difference(1.27, 3.5e-9, 55.6e-9, 500e-9).Figure("rise time of voltage of a"),
            1e-9 + 1e-9);

    // The damped cosine with an exponential front, 1.59 (1 − e^(−t/0.533 µs)) e^(−t/9.788 µs) cos 2π·10⁵ t.
    [Fact]
    public void A_ring_wave_has_its_rise_and_its_first_peak()
    {
        var fast = 1 / ((1 / 0.533e-6) + (1 / 9.788e-6));
        var solved = SolvedText.Of(
            $"""
            source E at a : cosine of 1.59 V at 100 kHz decaying in 9.788 µs -
              cosine of 1.59 V at 100 kHz decaying in {fast:R} s
            resistor R from a to ground : 1 Ω
            observe rise time of voltage of a
            observe time of peak of voltage of a
            until 100 µs
            """);
        Close.To(0.49990472e-6, solved.Figure("rise time of voltage of a"), 2e-8);
        Close.To(0.85241824e-6, solved.Figure("time of peak of voltage of a"), Close.Instant);
    }

    // The combination-wave network, element values from memory, figures computed (C).
    [Fact]
    public void A_surge_generator_has_its_open_front_and_half_value()
    {
        var solved = Generator("", "voltage of out");
        Close.To(1.20279998e-6, solved.Figure("front time of voltage of out"), 5e-9);
        Close.To(50.0311311e-6, solved.Figure("time to half-value of voltage of out"), 2e-9);
    }

    [Fact]
    public void A_surge_generator_has_its_shorted_front_and_half_value()
    {
        var solved = Generator("switch Load from out to ground : closed", "current through Load");
        Close.To(8.01323294e-6, solved.Figure("front time of current through Load"), 2e-9);
        Close.To(20.0277626e-6, solved.Figure("time to half-value of current through Load"), 3e-9);
    }

    // 100 pF at 1 kV through 1500 Ω and 5 µH: the human-body network, rise computed (C).
    [Fact]
    public void A_body_discharge_has_its_rise()
    {
        var solved = SolvedText.Of(
            """
            capacitor C from a to ground : 100 pF, charged to 1 kV
            resistor R from a to b : 1.5 kΩ
            inductor L from b to ground : 5 µH
            observe rise time of current through L
            until 1 µs
            """);
        Close.To(6.06211974e-9, solved.Figure("rise time of current through L"), 1e-9);
    }

    private static SolvedText Difference(double peak, double front, double tail, double until) =>
        SolvedText.Of(
            $"""
            source E at a : decay of {peak:R} V in {tail:R} s -
              decay of {peak:R} V in {1 / ((1 / front) + (1 / tail)):R} s
            resistor R from a to ground : 1 Ω
            observe front time of voltage of a
            observe time to half-value of voltage of a
            observe rise time of voltage of a
            observe time of peak of voltage of a
            until {until:R} s
            """);

    private static SolvedText Generator(string load, string quantity) => SolvedText.Of(
        $"""
        capacitor Cc from top to ground : 5.93 µF, charged to 1 kV
        switch Sw from top to front : open, closes at 0 s
        resistor Rs1 from front to ground : 20.2 Ω
        resistor Rm from front to mid : 0.814 Ω
        inductor Lr from mid to out : 10.9 µH
        resistor Rs2 from out to ground : 26.1 Ω
        {load}
        observe front time of {quantity}
        observe time to half-value of {quantity}
        until 90 µs
        """);
}
