namespace CircuitTransient.Tests.OutsideChecks;

/// <summary>Charge that two capacitors, or a source and a capacitor, share.</summary>
/// <remarks>Equal capacitors lose one half: an article on two capacitors, quoted (V2); the general fraction:
/// Singal, arXiv:1309.5034, quoted (V2); figures computed (C).</remarks>
public sealed class RedistributionTests
{
    private const string Pair = """
        capacitor C1 from a to ground : 100 µF, charged to 12 V
        capacitor C2 from b to ground : 47 µF
        observe voltage of a
        observe voltage of b
        observe energy in C1
        """;

    [Theory]
    [InlineData("1 mΩ", 31.972789115646258e-9)]
    [InlineData("1 Ω", 31.972789115646258e-6)]
    [InlineData("1 kΩ", 31.972789115646258e-3)]
    public void The_energy_lost_does_not_depend_on_the_resistance(string resistance, double timeConstant)
    {
        var solved = SolvedText.Of(
            $"""
            {Pair}
            resistor R from a to c : {resistance}
            switch S from c to b : open, closes at 1 ms
            observe energy in R
            until 2 s
            """,
            0, 2);
        Close.To(8.16326530612245, solved.Sample("voltage of a", 1));
        Close.To(8.16326530612245, solved.Sample("voltage of b", 1));
        Close.To(7.2e-3, solved.Sample("energy in C1", 0));
        Close.To(2.3020408163265306e-3, solved.Sample("energy in R", 1));
        Close.To(-1 / timeConstant, solved.Poles(1).Single(p => p.Re != 0).Re);
    }

    [Fact]
    public void Without_resistance_the_charge_passes_in_an_impulse_that_loses_as_much()
    {
        var solved = SolvedText.Of(
            $"""
            {Pair}
            switch S from a to b : open, closes at 1 ms
            until 2 ms
            """,
            1e-3);
        Close.To(8.16326530612245, solved.Sample("voltage of a", 0));
        Close.To(8.16326530612245, solved.Sample("voltage of b", 0));
        var impulses = solved.Result.Intervals[1].Impulses;
        Close.To(383.6734693877551e-6, impulses.Single(i => i.Part == "S").Charge!.Value);
        Close.To(383.6734693877551e-6, impulses.Single(i => i.Part == "C2").Charge!.Value);
        Close.To(-383.6734693877551e-6, impulses.Single(i => i.Part == "C1").Charge!.Value);
        Close.To(2.3020408163265306e-3, solved.Result.Intervals[1].EnergyLost);
    }

    [Fact]
    public void Two_equal_capacitors_lose_half_their_energy()
    {
        var solved = SolvedText.Of(
            """
            capacitor C1 from a to ground : 10 µF, charged to 100 V
            capacitor C2 from b to ground : 10 µF
            switch S from a to b : open, closes at 0 s
            observe voltage of b
            until 1 ms
            """);
        Close.To(25e-3, solved.Result.Intervals[0].EnergyLost);
        Close.To(50, solved.Max("voltage of b"));
    }

    [Fact]
    public void An_ideal_source_on_a_capacitor_loses_as_much_as_is_stored()
    {
        var solved = SolvedText.Of(
            """
            source E at s : step of 10 V at 1 ms
            capacitor C from s to ground : 100 µF
            observe energy in C
            observe voltage of s
            until 2 ms
            """,
            2e-3);
        var interval = Assert.Single(solved.Result.Intervals);
        Close.To(1000e-6, interval.Impulses.Single(i => i.Part == "C").Charge!.Value);
        Close.To(5e-3, interval.EnergyLost);
        Close.To(5e-3, solved.Sample("energy in C", 0));
    }
}
