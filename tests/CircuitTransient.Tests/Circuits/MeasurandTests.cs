using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>Observed and required quantities: their names, units and bounds.</summary>
public class MeasurandTests
{
    private const string Plant =
        """
        source Feed at a : 10 V
        resistor R1 from a to "DC+" : 1 kΩ
        capacitor C1 at "DC+" : 1 µF
        inductor L1 at "DC+" : 1 mH
        inductor L2 at "DC+" : 1 mH
        coupling M1 of L1 and L2 : 0.5
        switch K1 from a to "DC+" : open, closes at 1 s, opens at 2 s
        until 14 s

        """;

    [Theory]
    [InlineData("voltage of \"DC+\"", "voltage of DC+", "V")]
    [InlineData("voltage  from a to  \"DC+\"", "voltage from a to DC+", "V")]
    [InlineData("voltage across C1", "voltage across C1", "V")]
    [InlineData("current through L1", "current through L1", "A")]
    [InlineData("current delivered by Feed", "current delivered by Feed", "A")]
    [InlineData("power in R1", "power in R1", "W")]
    [InlineData("power delivered by Feed", "power delivered by Feed", "W")]
    [InlineData("energy in C1", "energy in C1", "J")]
    [InlineData("energy in M1", "energy in M1", "J")]
    [InlineData("energy delivered by Feed", "energy delivered by Feed", "J")]
    [InlineData("I^2t through L1", "I²t through L1", "A²s")]
    [InlineData("rate of change of voltage across C1", "rate of change of voltage across C1", "V/s")]
    [InlineData("rate of change of current through L1", "rate of change of current through L1", "A/s")]
    [InlineData("rise time of voltage of a", "rise time of voltage of a", "s")]
    [InlineData("front time of voltage of a", "front time of voltage of a", "s")]
    [InlineData("time to half-value of voltage of a", "time to half-value of voltage of a", "s")]
    [InlineData("overshoot of voltage of a", "overshoot of voltage of a", "%")]
    [InlineData("settling time of voltage of a within 2 %", "settling time of voltage of a within 2 %", "s")]
    [InlineData("ring frequency of voltage of a", "ring frequency of voltage of a", "Hz")]
    [InlineData("time of peak of voltage of a", "time of peak of voltage of a", "s")]
    [InlineData("time after which voltage of a stays below 60 V",
        "time after which voltage of a stays below 60 V", "s")]
    public void A_quantity_is_named_in_its_own_words(string written, string name, string unit)
    {
        var observation = Assert.Single(Checking.Circuit(Plant + "observe " + written).Observations);

        Assert.Equal((name, unit), (observation.Name, observation.Unit));
    }

    [Fact]
    public void A_label_replaces_the_name() =>
        Assert.Equal("inrush",
            Assert.Single(Checking.Circuit(Plant + "observe current through L1 as \"inrush\"").Observations)
                .Name);

    [Fact]
    public void Nothing_observed_means_every_node_voltage() =>
        Assert.Equal(["voltage of a", "voltage of DC+"], Checking.Circuit(Plant)
            .Observations.Select(o => o.Name));

    [Fact]
    public void Two_windows_of_one_quantity_stand_side_by_side_with_a_label() =>
        Assert.Equal(2, Checking.Circuit(
            Plant + "observe voltage of a\nobserve voltage of a as \"later\" from 1 s").Observations.Length);

    [Theory]
    [InlineData("voltage of a at most 1.1 kV because \"its rating\"", "voltage of a at most 1.1 kV", null,
        1100.0)]
    [InlineData("voltage of a at least 5 V", "voltage of a at least 5 V", 5.0, null)]
    [InlineData("current through L1 between -5 A and 200 A from 0 s to 2 s",
        "current through L1 between -5 A and 200 A from 0 s to 2 s", -5.0, 200.0)]
    [InlineData("voltage of a at most 60 V in magnitude from 5 s after K1 opens",
        "voltage of a at most 60 V in magnitude from 5 s after K1 opens", -60.0, 60.0)]
    [InlineData("voltage of a at most 60 V from when K1 closes",
        "voltage of a at most 60 V from when K1 closes", null, 60.0)]
    [InlineData("rate of change of voltage across K1 at most 500 V/µs",
        "rate of change of voltage across K1 at most 500 V/µs", null, 5e8)]
    [InlineData("I²t through L1 at most 71.9·10³ A²s", "I²t through L1 at most 71.9·10³ A²s", null, 71900.0)]
    [InlineData("overshoot of voltage of a at most 5 %", "overshoot of voltage of a at most 5 %", null, 5.0)]
    public void A_requirement_is_stated_in_normalised_words(string written, string statement, double? lower,
        double? upper)
    {
        var requirement = Assert.Single(Checking.Circuit(Plant + "require " + written).Requirements);

        Assert.Equal(statement, requirement.Statement);
        Assert.Equal(new Limits(lower, upper), requirement.Bound);
    }

    [Fact]
    public void Settling_keeps_its_target_band_and_time()
    {
        var requirement = Assert.Single(Checking.Circuit(
            Plant + "require settling of voltage of a to 540 V within 2 % by 600 ms").Requirements);

        Assert.Equal("settling of voltage of a to 540 V within 2 % by 600 ms", requirement.Statement);
        Assert.Equal(new SettlesTo(540, 0.02, new Instant(0.6, null)), requirement.Bound);
    }
}
