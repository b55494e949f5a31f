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
}
