using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Equations;

/// <summary>Dependent sources that follow a capacitor's current across a source, or a coil's voltage under
/// one: every stage differentiates once more.</summary>
public sealed class HigherIndexTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void A_chain_of_differentiators_gives_the_derivative_of_a_settled_sine(int stages)
    {
        const double omega = 2 * Math.PI * 50;
        var solved = SolvedText.Of($"""
            source Feed at n[1] : sine of 10 V at 50 Hz phase 20°
            repeat {stages} as k
              capacitor C[k] at n[k] : 1 µF
              dependent source D[k] at n[k+1] : 3 kΩ times current through C[k]
            end
            resistor Load at n[{stages + 1}] : 1 kΩ
            observe voltage of "n[{stages + 1}]" as "answer"
            start settled
            until 40 ms
            """, 3e-3, 11e-3);
        Assert.Empty(solved.Poles());
        var size = 10 * Math.Pow(3e-3 * omega, stages);
        foreach (var (t, value) in new[] { 3e-3, 11e-3 }.Zip(solved.Samples("answer")))
        {
            var phase = (omega * t) + (20 * Math.PI / 180) + (stages * Math.PI / 2);
            Close.OfScale(size, size * Math.Sin(phase), value, 1e-12);
        }
    }

    [Fact]
    public void A_chain_of_differentiators_of_a_ramp_ends_in_an_impulse_at_each_corner()
    {
        var solved = SolvedText.Of("""
            source Feed at a : ramp of 10 V from 1 ms to 3 ms
            capacitor Ca at a : 1 µF
            dependent source D1 at b : 1 kΩ times current through Ca
            capacitor Cb at b : 1 µF
            resistor R from b to ground : 1 kΩ
            observe voltage of b
            observe current through Cb
            until 5 ms
            """, 2e-3);
        Close.To(5, solved.Sample("voltage of b", 0)); // 1 kΩ · 1 µF · 10 V / 2 ms
        var impulses = solved.Result.Intervals[0].Impulses.Where(i => i.Part == "Cb").ToArray();
        Assert.Equal([1e-3, 3e-3], impulses.Select(i => i.Time));
        Close.To(5e-6, impulses[0].Charge!.Value);
        Close.To(-5e-6, impulses[1].Charge!.Value);
    }

    [Fact]
    public void A_loop_of_a_capacitor_and_a_follower_of_its_own_current_has_one_pole()
    {
        // v = 10 V − r i with i = C v′: the dependent source is a resistance that the capacitor charges
        // through.
        var solved = SolvedText.Of("""
            source Feed at in : 10 V
            dependent source H from in to a : 1 kΩ times current through C
            capacitor C at a : 1 µF
            observe voltage of a
            until 5 ms
            """, 1e-3);
        Close.To(-1000, Assert.Single(solved.Poles()).Re);
        Close.To(10 * (1 - Math.Exp(-1)), solved.Sample("voltage of a", 0));
    }

    [Fact]
    public void A_coil_driven_by_the_current_of_a_capacitor_across_a_source_gives_the_second_derivative()
    {
        const double omega = 1000;
        var solved = SolvedText.Of("""
            source Feed at a : sine of 5 V at 159.15494309189535 Hz
            capacitor C at a : 1 µF
            dependent source F from ground to b : 20 times current through C
            inductor L at b : 10 mH
            observe voltage of b
            start settled
            until 20 ms
            """, 1.1e-3);
        var expected = -10e-3 * 20 * 1e-6 * omega * omega * 5 * Math.Sin(omega * 1.1e-3);
        Close.OfScale(1, expected, solved.Sample("voltage of b", 0), 1e-12);
    }

    [Fact]
    public void A_differentiated_jump_is_infinite_and_its_derivative_is_so_both_ways()
    {
        var solved = SolvedText.Of("""
            source Feed at a : step of 10 V at 1 ms
            capacitor Ca at a : 1 µF
            dependent source D1 at b : 1 kΩ times current through Ca
            capacitor Cb at b : 1 µF
            observe voltage of b
            observe current through Cb
            until 5 ms
            """);
        Assert.Equal((null, 1e-3), (solved["voltage of b"].Max.Value, solved["voltage of b"].Max.Time));
        Assert.Equal(0, solved.Min("voltage of b"));
        Assert.Null(solved["current through Cb"].Max.Value);
        Assert.Null(solved["current through Cb"].Min.Value);
    }
}
