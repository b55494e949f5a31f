using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements.Figures;

/// <summary>Figures of one time constant, whose closed forms are logarithms; windows; what has no
/// figure.</summary>
public sealed class FirstOrderFigureTests
{
    [Fact]
    public void A_first_order_step_rises_in_ln_9_time_constants_and_settles_in_ln_50()
    {
        var solved = Charging("");
        Close.To(Math.Log(9) * 1e-3, solved.Figure("rise time of voltage of c"));
        Close.To(Math.Log(50) * 1e-3, solved.Figure("settling time of voltage of c within 2 %"));
        Assert.Equal(0, solved.Figure("overshoot of voltage of c"));
    }

    // Seen from 1 ms on, the change still to come rises just as fast; settling counts from there.
    [Fact]
    public void A_window_s_figures_count_from_its_start()
    {
        var solved = Charging(" from 1 ms");
        Close.To(Math.Log(9) * 1e-3, solved.Figure("rise time of voltage of c"));
        Close.To((Math.Log(50) - 1) * 1e-3, solved.Figure("settling time of voltage of c within 2 %"));
    }

    [Fact]
    public void A_figure_of_a_power_is_read_like_any_other()
    {
        var solved = SolvedText.Of(
            """
            source E at a : step of 10 V
            resistor R from a to c : 1 kΩ
            capacitor C from c to ground : 1 µF
            observe time after which power in R stays below 1 mW
            observe time after which rate of change of voltage of c stays below 100 V/s
            observe settling time of energy in R within 1 %
            until 20 ms
            """);
        // p = 100 mW e^(−2t/τ); dv/dt = 10 kV/s e^(−t/τ); W = 50 µJ (1 − e^(−2t/τ))
        Close.To(Math.Log(100) / 2 * 1e-3,
            solved.Figure("time after which power in R stays below 1 mW"));
        Close.To(Math.Log(100) * 1e-3,
            solved.Figure("time after which rate of change of voltage of c stays below 100 V/s"));
        Close.To(Math.Log(100) / 2 * 1e-3, solved.Figure("settling time of energy in R within 1 %"));
    }

    [Fact]
    public void A_negative_charge_stays_below_a_level_in_magnitude()
    {
        var solved = SolvedText.Of(
            """
            capacitor C from c to ground : 1 µF, charged to -325 V
            resistor R from c to ground : 1 MΩ
            observe time after which voltage of c stays below 60 V
            until 10 s
            """);
        Close.To(Math.Log(325.0 / 60), solved.Figure("time after which voltage of c stays below 60 V"));
    }

    [Theory]
    [InlineData("time after which voltage of c stays below 1 V")] // it ends at 10 V
    [InlineData("settling time of current through C within 2 %")] // it ends at zero: a band of no width
    [InlineData("overshoot of current through C")] // it returns to where it began, after an impulse
    [InlineData("rise time of rate of change of voltage of c")] // a jump makes it infinite
    public void What_the_waveform_does_not_have_is_null(string figure)
    {
        var solved = SolvedText.Of(
            $"""
            source E at c : step of 10 V at 1 ms
            resistor R from c to ground : 1 kΩ
            capacitor C from c to ground : 1 µF
            observe {figure}
            until 20 ms
            """);
        Assert.Null(solved.Result.Figures.Single().Value);
    }

    [Fact]
    public void Every_figure_says_how_it_is_defined() =>
        Assert.Equal(
            "from the window's start to the last instant outside that band about the final value",
            Charging("").Result.Figures[1].Definition);

    [Fact]
    public void A_required_figure_is_judged_by_its_value()
    {
        var solved = SolvedText.Of(
            """
            source E at a : step of 10 V
            resistor R from a to c : 1 kΩ
            capacitor C from c to ground : 1 µF
            observe voltage of c
            require rise time of voltage of c at most 2 ms
            require rise time of voltage of c between 2.1 ms and 2.3 ms
            require settling time of voltage of c within 2 % at most 4 ms
            require overshoot of voltage of c at most 5 %
            until 20 ms
            """).Result.Requirements;
        Assert.Equal([false, true, true, true], solved.Select(r => r.Holds));
        Close.To(0.002 - (Math.Log(9) * 1e-3), solved[0].Margin!.Value, 1e-7);
        Close.To((Math.Log(9) * 1e-3) - 0.0021, solved[1].Margin!.Value, 1e-7);
        Close.To(Math.Log(50) * 1e-3, solved[2].Worst.Value!.Value);
        Assert.Equal(5, solved[3].Margin);
    }

    [Fact]
    public void A_required_figure_that_the_waveform_does_not_have_is_broken()
    {
        var verdict = SolvedText.Of(
            """
            source E at c : step of 10 V at 1 ms
            resistor R from c to ground : 1 kΩ
            observe voltage of c
            require time after which voltage of c stays below 1 V at most 5 ms
            until 20 ms
            """).Result.Requirements.Single();
        Assert.False(verdict.Holds);
        Assert.Equal((null, null), (verdict.Worst.Value, verdict.Margin));
    }

    private static SolvedText Charging(string window) => SolvedText.Of(
        $"""
        source E at a : step of 10 V
        resistor R from a to c : 1 kΩ
        capacitor C from c to ground : 1 µF
        observe rise time of voltage of c{window}
        observe settling time of voltage of c within 2 %{window}
        observe overshoot of voltage of c{window}
        until 20 ms
        """);
}
