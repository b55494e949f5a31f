
namespace CircuitTransient.Tests.Studies.Scans;

public class ScanPlanTests
{
    private const string Plant = """
        value Rd : 100 Ω
        source    Grid from g to ground : sine of 10 V at 50 Hz phase 30°
        switch    K1 from g to a : open, closes at 2 ms
        resistor  R1 from a to b : 1 kΩ
        resistor  R2 from a to b : Rd
        capacitor C1 from b to ground : 1 µF
        until 40 ms
        """;

    [Fact]
    public void Steps_are_equal_and_reach_both_ends() =>
        Assert.Equal([100, 400, 700, 1000], Values("--part", "R1 from 100 Ω to 1 kΩ in 3 steps"));

    [Fact]
    public void Steps_a_decade_are_equal_factors()
    {
        var values = Values("--part", "R1 from 10 Ω to 1 kΩ in 2 steps a decade");

        Assert.Equal([10, Math.Sqrt(1000), 100, Math.Sqrt(1e5), 1000], values.Select(v => Math.Round(v, 10)),
            (a, b) => Math.Abs(a - b) < 1e-9);
    }

    [Fact]
    public void The_last_step_of_a_width_is_as_long_as_the_range_leaves_it() =>
        Assert.Equal([0, 4e-3, 8e-3, 10e-3], Values("--event", "K1 closes from 0 s to 10 ms in 4 ms steps"));

    [Fact]
    public void Preferred_values_are_those_in_the_range() =>
        Assert.Equal([100, 220, 470, 1000], Values("--part", "R1 from 90 Ω to 1 kΩ in E3"));

    [Fact]
    public void An_angle_is_written_in_degrees_and_kept_in_radians()
    {
        var axis = Scanning.Plan(Plant, ("--phase", "Grid from -90° to 90° in 45° steps")).Value!.Axes[0];

        Assert.Equal(5, axis.Values.Length);
        Assert.Equal(-Math.PI / 4, axis.Values[1], 1e-15);
        Assert.Equal("-45.00°", axis.Say(axis.Values[1]));
    }

    [Theory]
    [InlineData("--part", "R1 from 1 kΩ to 100 Ω",
        "--part:1:9: error: the range runs backwards\n  R1 from 1 kΩ to 100 Ω\n          ^^^^^^^^^^^^^\n"
        + "  → write `from 100 Ω to 1 kΩ`")]
    [InlineData("--part", "R1 from 1 kΩ to 1 kΩ",
        "--part:1:9: error: the range is empty: it begins and ends at `1 kΩ`\n  R1 from 1 kΩ to 1 kΩ\n"
        + "          ^^^^^^^^^^^^\n  → write two different values")]
    [InlineData("--part", "C1 from 0 F to 1 µF",
        "--part:1:9: error: the range reaches a capacitance of zero, at which `C1` is no such part\n"
        + "  C1 from 0 F to 1 µF\n          ^^^\n  → begin above zero, such as at `1.000 nF`")]
    [InlineData("--part", "R1 from 10 to 1 kΩ",
        "--part:1:9: error: `10` has no unit; `R1` is in Ω\n  R1 from 10 to 1 kΩ\n          ^^\n"
        + "  → write `10 Ω`")]
    [InlineData("--part", "R1 from 10 V to 1 kΩ",
        "--part:1:9: error: `10 V` does not fit `R1`, which is in Ω\n  R1 from 10 V to 1 kΩ\n          ^^^^\n"
        + "  → the circuit file has 1.000 kΩ")]
    [InlineData("--phase", "Grid from 0 to 90°",
        "--phase:1:11: error: `0` has no unit; `phase of Grid` is in degrees\n  Grid from 0 to 90°\n"
        + "            ^\n  → write `0°`")]
    [InlineData("--part", "R1 from 1 Ω to 1 kΩ in 100000 steps",
        "--part:1:24: error: 100001 points are more than the 100000 that a scan takes\n"
        + "  R1 from 1 Ω to 1 kΩ in 100000 steps\n                         ^^^^^^^^^^^^\n"
        + "  → take wider steps: what lies between two points is searched too")]
    [InlineData("--part", "R1 from -1 kΩ to -1 Ω in 10 steps a decade",
        "--part:1:9: error: steps a decade are equal factors, which never leave or pass zero\n"
        + "  R1 from -1 kΩ to -1 Ω in 10 steps a decade\n          ^^^^^\n"
        + "  → begin above zero, or write `in 50 steps`")]
    [InlineData("--part", "R1 from 101 Ω to 109 Ω in E12",
        "--part:1:4: error: no value of E12 lies in the range\n  R1 from 101 Ω to 109 Ω in E12\n"
        + "     ^^^^^^^^^^^^^^^^^^^^^^^^^^\n  → take a wider range or a finer series")]
    [InlineData("--part", "R1",
        "--part:1:1: error: over which range is not said\n  R1\n  ^^\n"
        + "  → write `R1 from 500.0 Ω to 2.000 kΩ`")]
    [InlineData("--part", "R9 from 1 Ω to 2 Ω",
        "--part:1:1: error: there is no part `R9`\n  R9 from 1 Ω to 2 Ω\n  ^^\n  → did you mean `R1`?")]
    [InlineData("--event", "K1 closes from -1 ms to 5 ms",
        "--event:1:16: error: an event before t = 0 is before the study\n  K1 closes from -1 ms to 5 ms\n"
        + "                 ^^^^^\n  → begin at `0 s`")]
    [InlineData("--event", "K1 closes from 0 s to 50 ms",
        "--event:1:23: error: the study ends at 40.00 ms, before the event\n"
        + "  K1 closes from 0 s to 50 ms\n                        ^^^^^\n  → end the range by then")]
    [InlineData("--scatter", "1 ms",
        "--scatter:1:1: error: which event scatters is not said\n  1 ms\n  ^^^^\n"
        + "  → write `Kmain closes by 1 ms`")]
    public void A_range_that_cannot_be_scanned_is_said(string option, string words, string message) =>
        Assert.Equal(message, Scanning.Messages(Scanning.Plan(Plant, (option, words)).Diagnostics));

    [Fact]
    public void A_map_of_a_million_points_is_refused_with_the_figure()
    {
        var plan = Scanning.Plan(
            Plant, ("--part", "R1 from 1 Ω to 2 Ω in 999 steps"),
            ("--part", "C1 from 1 µF to 2 µF in 999 steps"));

        Assert.Equal(
            "1000 × 1000 points are 1000000, more than the 100000 that a scan takes",
            Assert.Single(plan.Diagnostics).Message);
    }

    [Fact]
    public void A_value_scanned_against_itself_is_said()
    {
        var plan = Scanning.Plan(Plant, ("--part", "R1 from 1 Ω to 2 Ω"), ("--part", "R1 from 2 Ω to 3 Ω"));

        Assert.Equal("`R1` is scanned twice", Assert.Single(plan.Diagnostics).Message);
    }

    private static double[] Values(string option, string words) =>
        [.. Scanning.Plan(Plant, (option, words)).Value!.Axes[0].Values];
}
