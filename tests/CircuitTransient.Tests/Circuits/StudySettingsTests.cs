namespace CircuitTransient.Tests.Circuits;

/// <summary>What a file says once for the whole circuit.</summary>
public class StudySettingsTests
{
    [Fact]
    public void A_study_longer_than_a_terasecond_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:7: error: a study of 10 Ts is longer than a terasecond
              until 1e13 s
                    ^^^^^^
              → end it earlier; the slowest time constant is a guide
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                until 1e13 s
                """));

    [Fact]
    public void A_study_that_ends_at_its_start_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:7: error: the study would end at 0 s, and it starts at 0 s
              until 0 s
                    ^^^
              → give an end after 0 s
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                until 0 s
                """));

    [Fact]
    public void An_end_given_twice_is_refused() =>
        Assert.Equal(
            """
            plant.cause:4:1: error: the end of the study is given twice
              until 2 s
              ^^^^^^^^^
              → line 3 has it already; leave one of them out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at a : 1 kΩ
                until 1 s
                until 2 s
                """));

    [Fact]
    public void A_file_without_a_part_is_refused() =>
        Assert.Equal(
            """
            plant.cause:1:1: error: this file holds no circuit: there is no part in it
              circuit "Nothing yet"
              ^
              → start with `source Feed at a : 10 V` and `resistor R1 at a : 1 kΩ`
            """,
            Checking.Messages(
                """
                circuit "Nothing yet"
                until 1 s
                """));

    [Fact]
    public void The_end_stands_outside_blocks() =>
        Assert.Equal(
            """
            plant.cause:4:1: error: this speaks of the whole circuit and cannot stand inside a block
              until 1 s
              ^^^^^^^^^
              → move it above the `repeat` or `assembly`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                repeat 2 as k
                resistor R[k] at a : 1 kΩ
                until 1 s
                end
                """));
}
