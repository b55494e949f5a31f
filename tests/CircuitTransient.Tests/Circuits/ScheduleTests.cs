using CircuitTransient.Circuits;

namespace CircuitTransient.Tests.Circuits;

/// <summary>What is known of instants before anything is solved.</summary>
public class ScheduleTests
{
    private static readonly Circuit Scheduled = Checking.Circuit(
        """
        source Feed at a : 10 V
        resistor R1 at b : 1 kΩ
        switch K1 from a to b : open, closes at 10 ms, opens at 50 ms after K1 closes
        switch K2 from a to b : open, closes when K1 opens, opens at 5 ms after K2 closes at next current zero
        switch K3 from a to b : open, closes at 1 ms after K2 opens, opens when voltage of b falls below 1 V
        """);

    [Theory]
    [InlineData("K1", 0, 0.010)]
    [InlineData("K1", 1, 0.060)]
    [InlineData("K2", 0, 0.060)]
    public void Delays_add_up_along_the_events_they_wait_for(string name, int index, double seconds) =>
        Assert.Equal(seconds,
            Schedule.Resolve(Scheduled.Part<Switch>(name).Events[index], Scheduled.Parts)!.Value, 1e-15);

    [Theory]
    [InlineData("K2", 1)]
    [InlineData("K3", 0)]
    [InlineData("K3", 1)]
    public void What_waits_for_a_current_or_a_level_is_not_known(string name, int index) =>
        Assert.Null(Schedule.Resolve(Scheduled.Part<Switch>(name).Events[index], Scheduled.Parts));

    [Fact]
    public void Events_keep_their_cut_and_their_condition()
    {
        var k2 = Scheduled.Part<Switch>("K2");
        var k3 = Scheduled.Part<Switch>("K3");

        Assert.Equal(0.0, k2.Events[1].CutAtMost);
        Assert.Equal(new WhenCrosses(new VoltageBetween(2, 0), Rises: false, 1, InMagnitude: false, null),
            k3.Events[1].Trigger);
    }
}
