namespace CircuitTransient.Tests.Circuits;

/// <summary>The waves of sources.</summary>
public class WaveTests
{
    [Fact]
    public void A_source_without_a_unit_is_offered_two() =>
        Assert.Equal(
            """
            plant.cause:1:20: error: `5` has no unit; a source is in volts or amperes
              source Feed at a : 5
                                 ^
              → write `5 V` or `5 A`
            """,
            Checking.Messages(
                """
                source Feed at a : 5
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_source_in_ohms_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:20: error: `5 Ω` is a resistance; a source is in volts or amperes
              source Feed at a : 5 Ω
                                 ^^^
              → what is written here must come out in volts or amperes
            """,
            Checking.Messages(
                """
                source Feed at a : 5 Ω
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void Terms_of_one_wave_have_one_unit() =>
        Assert.Equal(
            """
            plant.cause:1:34: error: `5 A` is a current; a voltage in volts is expected here
              source Feed at a : 5 V + step of 5 A at 2 s
                                               ^^^
              → if the number is right, write `5 V`
            """,
            Checking.Messages(
                """
                source Feed at a : 5 V + step of 5 A at 2 s
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_step_happens_at_a_time() =>
        Assert.Equal(
            """
            plant.cause:1:35: error: `2 V` is a voltage; a time in seconds is expected here
              source Feed at a : step of 5 V at 2 V
                                                ^^^
              → if the number is right, write `2 s`
            """,
            Checking.Messages(
                """
                source Feed at a : step of 5 V at 2 V
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void Pulses_wider_than_their_period_are_refused() =>
        Assert.Equal(
            """
            plant.cause:1:45: error: pulses 3 ms wide do not fit a period of 2 ms
              source Feed at a : pulse train of 5 V width 3 ms every 2 ms from 0 s count 5
                                                          ^^^^
              → the width is more than zero and less than the period
            """,
            Checking.Messages(
                """
                source Feed at a : pulse train of 5 V width 3 ms every 2 ms from 0 s count 5
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_train_of_a_million_pulses_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:76: error: this pulse train has 2·10⁶ edges; the most is 100 000
              source Feed at a : pulse train of 5 V width 1 ms every 2 ms from 0 s count 1000000
                                                                                         ^^^^^^^
              → end the train with the study
            """,
            Checking.Messages(
                """
                source Feed at a : pulse train of 5 V width 1 ms every 2 ms from 0 s count 1000000
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_broken_count_of_pulses_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:76: error: `2.5` is not a number of pulses
              source Feed at a : pulse train of 5 V width 1 ms every 2 ms from 0 s count 2.5
                                                                                         ^^^
              → write a whole number of one or more
            """,
            Checking.Messages(
                """
                source Feed at a : pulse train of 5 V width 1 ms every 2 ms from 0 s count 2.5
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_ramp_that_ends_before_it_starts_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:20: error: this ramp ends at 1 s, which is not after its start at 2 s
              source Feed at a : ramp of 5 V from 2 s to 1 s
                                 ^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → give the earlier time first
            """,
            Checking.Messages(
                """
                source Feed at a : ramp of 5 V from 2 s to 1 s
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_phase_without_a_unit_is_offered_two() =>
        Assert.Equal(
            """
            plant.cause:1:47: error: `30` has no unit; a phase is in degrees or radians
              source Feed at a : sine of 5 V at 50 Hz phase 30
                                                            ^^
              → write `30°` or `30 rad`
            """,
            Checking.Messages(
                """
                source Feed at a : sine of 5 V at 50 Hz phase 30
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_negative_frequency_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:35: error: a frequency is zero or more
              source Feed at a : sine of 5 V at -50 Hz
                                                ^^^^^^
              → turn the sign of the sine instead
            """,
            Checking.Messages(
                """
                source Feed at a : sine of 5 V at -50 Hz
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_sine_that_ends_before_it_starts_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:56: error: this wave ends at 1 s, which is not after its start at 2 s
              source Feed at a : sine of 5 V at 50 Hz from 2 s until 1 s
                                                                     ^^^
              → let it end later
            """,
            Checking.Messages(
                """
                source Feed at a : sine of 5 V at 50 Hz from 2 s until 1 s
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_time_constant_of_zero_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:36: error: a time constant is more than zero, not `0 s`
              source Feed at a : decay of 5 V in 0 s
                                                 ^^^
              → write a longer time
            """,
            Checking.Messages(
                """
                source Feed at a : decay of 5 V in 0 s
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_ratio_no_double_exponential_reaches_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:36: error: no double exponential has a half-value time 2.5 times its front
              source Feed at a : impulse of 5 kV 8/20 µs
                                                 ^^^^^^^
              → the least is 3.47, both times by IEC 60060-1; use `straight lines` instead
            """,
            Checking.Messages(
                """
                source Feed at a : impulse of 5 kV 8/20 µs
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_current_of_that_ratio_is_refused_by_its_own_definition() =>
        Assert.Equal(
            """
            plant.cause:1:36: error: no double exponential has a half-value time 2.5 times its front
              source Feed at a : impulse of 5 kA 8/20 µs
                                                 ^^^^^^^
              → the least is 3.8047, the front as 1.25 times 10–90 %; use `straight lines` instead
            """,
            Checking.Messages(
                """
                source Feed at a : impulse of 5 kA 8/20 µs
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void Points_out_of_order_are_refused() =>
        Assert.Equal(
            """
            plant.cause:1:57: error: this point at 1 s comes after one at 2 s
              source Feed at a : straight lines (0 s, 0 V) (2 s, 1 V) (1 s, 2 V)
                                                                      ^^^^^^^^^^
              → put the points in the order of time
            """,
            Checking.Messages(
                """
                source Feed at a : straight lines (0 s, 0 V) (2 s, 1 V) (1 s, 2 V)
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void Three_points_at_one_instant_are_refused() =>
        Assert.Equal(
            """
            plant.cause:1:68: error: three points stand at 1 s
              source Feed at a : straight lines (0 s, 0 V) (1 s, 1 V) (1 s, 2 V) (1 s, 3 V)
                                                                                 ^^^^^^^^^^
              → two points at one instant make a jump; a third means nothing
            """,
            Checking.Messages(
                """
                source Feed at a : straight lines (0 s, 0 V) (1 s, 1 V) (1 s, 2 V) (1 s, 3 V)
                resistor R1 at a : 1 kΩ
                """));

    [Fact]
    public void A_wave_does_not_wait_for_the_answer() =>
        Assert.Equal(
            """
            plant.cause:1:35: error: a wave cannot wait for an event whose instant the answer decides
              source Feed at a : step of 5 V at 1 ms after K1 closes
                                                ^^^^^^^^^^^^^^^^^^^^
              → give the wave a time, or let the switch act at one
            """,
            Checking.Messages(
                """
                source Feed at a : step of 5 V at 1 ms after K1 closes
                resistor R1 at a : 1 kΩ
                switch K1 from a to b : open, closes when voltage of a rises above 1 V
                resistor R2 at b : 1 kΩ
                """));

    [Fact]
    public void A_front_too_short_to_matter_is_a_step() =>
        Assert.Equal(
            """
            plant.cause:1:36: error: a front this much shorter than the tail is a step
              source Feed at a : impulse of 5 kV 1e-9/50 s
                                                 ^^^^
              → write `decay of 5 kV in 72.1348 s`
            """,
            Checking.Messages(
                """
                source Feed at a : impulse of 5 kV 1e-9/50 s
                resistor R1 at a : 1 kΩ
                """));
}
