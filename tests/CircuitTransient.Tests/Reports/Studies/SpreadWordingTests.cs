using CircuitTransient.Reports.Studies;
using CircuitTransient.Studies.Spreads;
using CircuitTransient.Tests.Studies.Spreads;

namespace CircuitTransient.Tests.Reports.Studies;

/// <summary>What a study of tolerances says is true of the figures it stands beside.</summary>
public class SpreadWordingTests
{
    // Nominal 10 V over a rating of 8 V, under a requirement that 11 V at the corner breaks.
    private const string Rated = """
        source    Feed at in : 10 V ±10 %
        resistor  R1 from in to a : 1 Ω
        capacitor C1 from a to ground : 1 µF, rated 8 V
        require voltage of a at most 10.5 V
        until 1 ms
        """;

    // The coil carries 1 A until K1 opens at 5 ms: the instant of its peak is any up to there.
    private const string Plateau = """
        source    Batt at p : 24 V ±20 %
        switch    K1 from p to a : closed, opens at 5 ms
        resistor  Rc from a to m : 24 Ω ±8 %
        inductor  Lc from m to ground : 0.42 H ±15 %, rated 2 A
        resistor  Rs from a to ground : 1 kΩ
        start settled
        until 20 ms
        """;

    // v = 10 V e^(−α t) (cos ω t + α/ω sin ω t): the release jumps as a crest passes 4.1 V.
    private const string Release = """
        resistor  R1 from a to b : 55 Ω ±10 %
        inductor  L1 from b to ground : 10 mH
        capacitor C1 from a to ground : 1 µF ±5 %, charged to 10 V
        observe time after which voltage of a stays below 4.1 V
        require time after which voltage of a stays below 4.1 V at most 8 ms
        until 10 ms
        """;

    [Fact]
    public void What_fails_nominally_is_told_apart_from_what_fails_at_a_corner() => Assert.Equal(
        "Does not hold even with every value nominal, where the requirement holds and the rating is "
            + "exceeded; over the tolerances the requirement is broken; the rating is exceeded.",
        SpreadWords.Verdict(Spreading.Of(Rated)));

    [Fact]
    public void Where_as_much_fails_nominally_it_is_said_once() => Assert.Equal(
        "Does not hold even with every value nominal: the requirement is broken; the rating is exceeded.",
        SpreadWords.Verdict(Spreading.Of(Rated.Replace("10.5 V", "9 V", StringComparison.Ordinal))));

    [Fact]
    public void On_a_level_stretch_no_crest_takes_over()
    {
        var spread = Spreading.Of(Plateau);

        Assert.DoesNotContain(
            spread.Figures.SelectMany(f => new[] { f.Least, f.Greatest }).OfType<ExtremePoint>()
                .SelectMany(e => e.Jumps), jump => !jump.IsOfValue);
        Assert.DoesNotContain("takes over", SpreadSummary.Write(spread, []));
    }

    [Fact]
    public void A_required_figure_is_told_in_its_own_values_and_its_jump_once()
    {
        var spread = Spreading.Of(Release);
        var words = string.Join(' ', SpreadSummary.Write(spread, []).Split(
            (char[])[' ', '\n'], StringSplitOptions.RemoveEmptyEntries));

        Assert.DoesNotContain("a margin of", words);
        var told = words.Split(" it jumps from ")[1..]
            .Select(w => w.Split(" of the way")[0]).ToArray();
        Assert.NotEmpty(told);
        Assert.Equal(told.Distinct(), told);
        Assert.Single(
            words.Split(" at most 8 ms jumps from ")[1..].Concat(words.Split(" 4.1 V jumps from ")[1..]));
        Assert.DoesNotContain("its instant jumps", words);
    }

    [Fact]
    public void Of_a_lower_bound_no_share_is_told()
    {
        var spread = Spreading.Of(Rated.Replace("at most 10.5 V", "at least 15 V", StringComparison.Ordinal)
            .Replace(", rated 8 V", "", StringComparison.Ordinal));

        Assert.NotNull(spread.Worst);
        Assert.Equal("", SpreadWords.Used(spread, spread.Worst));
    }
}
