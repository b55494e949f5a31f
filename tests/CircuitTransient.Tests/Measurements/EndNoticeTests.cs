using CircuitTransient.Tests.OutsideChecks;

namespace CircuitTransient.Tests.Measurements;

/// <summary>A peak at the end of the study is a warning where a later end would show more.</summary>
public sealed class EndNoticeTests
{
    private const string Charging = """
        source Feed at a : 10 V
        resistor R1 from a to b : 1 kΩ
        capacitor C1 at b : 1 µF

        """;

    [Fact]
    public void An_end_that_was_chosen_is_not_warned_of() =>
        Assert.Empty(SolvedText.Of(Charging).Result.Warnings);

    [Fact]
    public void A_limit_that_is_all_but_reached_is_no_news() =>
        Assert.Empty(SolvedText.Of(Charging + "observe voltage of b\nuntil 7 ms").Result.Warnings);

    [Fact]
    public void What_only_adds_up_is_greatest_at_every_end() => Assert.Empty(SolvedText.Of(
        Charging + "resistor R2 at b : 1 kΩ\nobserve energy in R1\nobserve I²t through R1\nuntil 50 ms")
        .Result.Warnings);

    [Fact]
    public void A_study_that_ends_too_soon_is_told() => Assert.Equal(
        [
            "voltage of b is greatest at the end of the study and still rises: look further with a later "
            + "`until`",
        ],
        SolvedText.Of(Charging + "observe voltage of b\nuntil 2 ms").Result.Warnings.Select(w => w.Text));

    // 1 mA into 1 µF: 1 V a millisecond for ever, while the end follows from the other mode.
    [Fact]
    public void What_grows_for_ever_is_told_where_the_end_was_chosen_too() => Assert.Equal(
        [
            "voltage of c is greatest at the end of the study and still rises: look further with a later "
            + "`until`",
        ],
        SolvedText.Of(
            Charging + "source J from ground to c : 1 mA\ncapacitor C2 at c : 1 µF\nobserve voltage of c")
            .Result.Warnings.Select(w => w.Text));
}
