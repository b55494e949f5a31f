using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Solutions;

/// <summary>Switchings that the answer decides while the end of the study is not known yet.</summary>
public sealed class UnstatedEndTests
{
    [Fact]
    public void Each_switch_waits_for_its_own_level_before_a_later_fixed_event()
    {
        // Loaded with 100 kΩ from 3 V on, b tends to 10 V · 100/101 with τ = 1 ms · 100/101.
        var solved = SolvedText.Of("""
            source Feed at a : 10 V
            resistor R from a to b : 1 kΩ
            capacitor C at b : 1 µF
            switch P from b to c : open, closes when voltage of b rises above 3 V
            resistor Rc at c : 100 kΩ
            switch Q from b to d : open, closes when voltage of b rises above 6 V
            resistor Rd at d : 100 kΩ
            switch Late from b to f : open, closes at 20 ms
            resistor Rf at f : 100 kΩ
            observe voltage of b
            """);
        var first = 1e-3 * Math.Log(10 / 7.0);
        var end = 1000 / 101.0;
        var second = first + (0.1 / 101 * Math.Log((end - 3) / (end - 6)));
        Assert.Equal(["P", "Q", "Late"], solved.Result.Events.Select(e => e.Switch));
        Close.Within(20e-3 * 1e-12, first, solved.Result.Events[0].Time);
        Close.Within(20e-3 * 1e-12, second, solved.Result.Events[1].Time);
    }
}
