using CircuitTransient.Studies;
using CircuitTransient.Studies.Draws;

namespace CircuitTransient.Tests.Studies.Draws;

/// <summary>What the fast evaluation does not serve it says, and never gives a figure for.</summary>
public sealed class DrawRefusalTests
{
    private const string Charging =
        """
        source E at s : 10 V ±10 %
        resistor R from s to a : 1 kΩ ±10 %
        switch S from a to b : open, closes at 1 ms
        switch T from b to ground : open, closes at 4 ms
        capacitor C from b to ground : 1 µF ±10 %
        resistor Rl from b to ground : 10 kΩ
        observe voltage of b
        until 10 ms
        """;

    [Fact]
    public void Events_that_the_answer_decides_go_to_the_exact_engine()
    {
        var drawn = DrawnText.Of(
            Charging.Replace("closes at 4 ms", "closes when voltage of b rises above 5 V"));

        Assert.Null(drawn.Kernel);
        Assert.Equal("the answer decides when `T` acts", drawn.Reason);
    }

    [Fact]
    public void Coils_coupled_without_leakage_go_to_the_exact_engine()
    {
        var drawn = DrawnText.Of(
            """
            source E at s : 10 V
            resistor R from s to p : 1 Ω
            inductor Lp from p to ground : 10 mH ±10 %
            inductor Ls from q to ground : 2.5 mH ±10 %
            coupling M of Lp and Ls : 1
            resistor R2 from q to ground : 2 Ω
            observe voltage of q
            until 40 ms
            """);

        Assert.Null(drawn.Kernel);
        Assert.Equal("`Lp` sees derivatives of other varied parts or of stored quantities", drawn.Reason);
    }

    // the pulse's width follows the value, which no formula tells
    [Fact]
    public void A_named_value_that_a_wave_follows_goes_to_the_exact_engine()
    {
        var drawn = DrawnText.Of(
            """
            value Width : 1 ms
            source E at s : rectangular pulse of 10 V from 0 s to Width
            resistor R from s to a : 1 kΩ
            capacitor C from a to ground : 1 µF
            observe voltage of a
            until 10 ms
            """,
            new NamedValueTarget("Width"));

        Assert.Null(drawn.Kernel);
        Assert.StartsWith("double precision gives ", drawn.Reason);
    }

    [Fact]
    public void A_figure_read_off_the_waveform_is_left_to_the_exact_engine()
    {
        var drawn = DrawnText.Of(Charging.Replace(
            "observe voltage of b", "observe voltage of b\nobserve ring frequency of voltage of b"));

        Assert.Equal([null, null, "it is read off the whole waveform"], drawn.Kernel!.Unserved);
    }

    [Theory]
    [InlineData(0.9e-3, true)]
    [InlineData(3.9e-3, true)]
    [InlineData(4.1e-3, false)] // after T, which was to close later
    [InlineData(11e-3, false)] // after the end
    public void A_draw_whose_events_leave_their_order_is_doubtful(double closes, bool keepsOrder)
    {
        var drawn = DrawnText.Of(Charging, new EventTimeTarget("S", true));

        var (status, values, _) = drawn.Evaluate([closes]);

        Assert.Equal(keepsOrder ? DrawStatus.Reliable : DrawStatus.Doubtful, status);
        Assert.Equal(keepsOrder, !double.IsNaN(values[0]));
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(-1e-6)]
    [InlineData(double.NaN)]
    public void A_draw_with_a_value_that_no_part_can_have_is_doubtful(double capacitance)
    {
        var drawn = DrawnText.Of(Charging, new PartValueTarget("C"));

        Assert.Equal(DrawStatus.Doubtful, drawn.Evaluate([capacitance]).Status);
    }

    [Fact]
    public void A_workspace_of_another_kernel_is_refused()
    {
        var (one, other) = (DrawnText.Of(Charging), DrawnText.Of(Charging));

        Assert.Throws<ArgumentException>(
            () => one.Evaluate([10, 1e3, 1e-6], other.Kernel!.CreateWorkspace()));
    }
}
