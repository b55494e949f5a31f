using CircuitTransient.Studies;
using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Studies.Sensitivities;

public class ReadingSlopesTests
{
    private const string Ringing = """
        source    Feed at in : step of 10 V at 0.1 ms
        resistor  R1 from in to a : 30 Ω
        inductor  L1 from a to b : 1 mH
        capacitor C1 from b to ground : 100 nF
        resistor  R2 from b to ground : 2 kΩ
        """;

    [Theory]
    [InlineData("rise time of voltage of b")]
    [InlineData("front time of voltage of b")]
    [InlineData("overshoot of voltage of b")]
    [InlineData("settling time of voltage of b within 2 %")]
    [InlineData("ring frequency of voltage of b")]
    [InlineData("time of peak of current through L1")]
    [InlineData("time after which current through L1 stays below 8 mA")]
    [InlineData("time to half-value of current through L1")]
    [InlineData("rise time of energy in C1")]
    public void Figures_read_off_a_wave_agree_with_differences(string figure)
    {
        var derived = Derived.Of(
            $"{Ringing}\nobserve {figure} as \"it\"\nuntil 2 ms",
            [.. new[] { "Feed", "R1", "L1", "C1", "R2" }.Select(n => new PartValueTarget(n))]);
        derived.AssertFiguresAgree(["it"], step: 1e-4, rounding: 1e-7);
    }

    /// <summary>τ = RC: 10 to 90 % takes τ ln 9, within 1 % settles in τ ln 100 (any handbook).</summary>
    [Fact]
    public void A_single_time_constant_has_the_derivatives_of_its_logarithms()
    {
        var derived = Derived.Of(
            """
            source    Feed at in : 10 V
            resistor  R1 from in to a : 1 kΩ
            capacitor C1 from a to ground : 1 µF
            observe rise time of voltage of a
            observe settling time of voltage of a within 1 %
            until 20 ms
            """,
            new PartValueTarget("R1"), new PartValueTarget("C1"), new PartValueTarget("Feed"));
        var rise = derived.Figure("rise time of voltage of a");
        Close.To(1e-6 * Math.Log(9), rise.Slopes[0]!.Value);
        Close.To(1e3 * Math.Log(9), rise.Slopes[1]!.Value);
        Close.Within(1e-12, 0, rise.Slopes[2]!.Value);
        var settling = derived.Figure("settling time of voltage of a within 1 %");
        Close.To(1e-6 * Math.Log(100), settling.Slopes[0]!.Value);
    }

    [Theory]
    [InlineData("require voltage of b at most Low", "it sets what is required")]
    [InlineData("observe time after which voltage of b stays below Low", "it sets what is observed")]
    [InlineData("switch K1 at b : open, closes when voltage of b rises above Low",
        "it sets a level or a ratio of K1")]
    public void A_value_that_sets_a_level_has_no_derivative_and_it_is_said(string statement, string reason)
    {
        var derived = Derived.Of(
            $"value Low : 4 V\n{Ringing}\n{statement}\nuntil 2 ms", new NamedValueTarget("Low"));
        Assert.Equal(reason, derived.Analysis.Refusals[0]!.Reason);
    }

    [Fact]
    public void A_value_that_shapes_a_wave_has_no_derivative_and_it_is_said()
    {
        var derived = Derived.Of(
            """
            value     Wide : 1 ms
            value     High : 5 V
            source    Feed at in : rectangular pulse of High from 1 ms to (1 ms + Wide)
            resistor  R1 from in to a : 1 kΩ
            capacitor C1 from a to ground : 1 µF
            observe voltage of a
            until 5 ms
            """,
            new NamedValueTarget("Wide"), new NamedValueTarget("High"), new PartValueTarget("R1"));
        Assert.Equal(
            "it sets the shape or the instants of Feed's wave", derived.Analysis.Refusals[0]!.Reason);
        var peak = derived.Figure("max of voltage of a");
        Assert.Null(peak.Slopes[0]);
        Assert.Equal(derived.Analysis.Refusals[0]!.Reason, peak.Reasons[0]);
        Close.To(peak.Value / 5, peak.Slopes[1]!.Value);
        Assert.True(peak.Slopes[2] < 0);
    }
}
