using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Solutions;

/// <summary>A charge that nothing can reach.</summary>
public class HeldChargeTests
{
    [Fact]
    public void It_stays_to_the_last_digit_while_a_slow_sine_swings_elsewhere()
    {
        // Up to the step the sine turns by less than a radian: it and the pole at zero are kept together.
        var solved = SolvedText.Of(
            """
            source Feed at a : sine of 20 V at 300 Hz + step of 10 V at 0.4 ms
            resistor R from a to b : 40 Ω
            capacitor C at b : 3 µF
            switch Q from b to e : open, closes when voltage of b rises above 60 V
            capacitor Cheld at e : 1 µF, charged to 3 V
            observe voltage of e
            observe rate of change of voltage of e
            until 6 ms
            """);

        Assert.Equal((3.0, 3.0), (solved.Max("voltage of e"), solved.Min("voltage of e")));
        Assert.Equal(
            (0.0, 0.0),
            (solved.Max("rate of change of voltage of e"), solved.Min("rate of change of voltage of e")));
    }

    [Fact]
    public void It_stays_while_a_ramp_charges_capacitors_that_float_with_it()
    {
        // Three zero poles of one part of the network: their vectors share the charge that stays.
        var solved = SolvedText.Of(
            """
            resistor R0 from n1 to ground : 63.9 Ω
            capacitor C2 from n3 to n1 : 1.6 µF, charged to 24.1 V
            capacitor C5 from n6 to n1 : 7.7 µF, charged to 57.9 V
            capacitor C6 from n6 to n7 : 1.3 µF, charged to 94.4 V
            resistor R7 from n7 to ground : 179 Ω
            source J from ground to n6 : ramp of 5.87 A from 0.5 ms to 4 ms
            observe voltage across C2
            until 8 ms
            """);

        Close.To(24.1, solved.Max("voltage across C2"), 1e-15);
        Close.To(24.1, solved.Min("voltage across C2"), 1e-15);
    }
}
