namespace CircuitTransient.Tests.Circuits;

/// <summary>Switches: their events, order and instants.</summary>
public class SwitchTests
{
    [Fact]
    public void A_closed_switch_that_closes_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:33: error: `K1` closes, but it is closed from the start
              switch K1 from a to b : closed, closes at 1 ms
                                              ^^^^^^^^^^^^^^
              → let it start `open`, or write `opens` here
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : closed, closes at 1 ms
                """));

    [Fact]
    public void A_switch_that_closes_twice_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:47: error: `K1` closes twice in a row
              switch K1 from a to b : open, closes at 1 ms, closes at 2 ms
                                                            ^^^^^^^^^^^^^^
              → put an event that opens it between the two
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 1 ms, closes at 2 ms
                """));

    [Fact]
    public void Events_out_of_order_are_refused() =>
        Assert.Equal(
            """
            plant.cause:3:47: error: `K1` opens at 1 ms, which is not after its event before at 2 ms
              switch K1 from a to b : open, closes at 2 ms, opens at 1 ms
                                                            ^^^^^^^^^^^^^
              → put its events in the order of time
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 2 ms, opens at 1 ms
                """));

    [Fact]
    public void A_switch_that_never_acts_is_asked_about() =>
        Assert.Equal(
            """
            plant.cause:3:8: warning: `K1` never acts: it stays closed
              switch K1 from a to b : closed
                     ^^
              → add `opens at 1 ms`, or leave the switch out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : closed
                """));

    [Fact]
    public void A_switch_that_acts_after_the_end_is_asked_about() =>
        Assert.Equal(
            """
            plant.cause:3:31: warning: `K1` closes at 2 s, after the study ends at 1 s
              switch K1 from a to b : open, closes at 2 s
                                            ^^^^^^^^^^^^^
              → end the study later, such as `until 4 s`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 2 s
                until 1 s
                """));

    [Fact]
    public void Switches_that_wait_for_each_other_are_refused_once() =>
        Assert.Equal(
            """
            plant.cause:3:31: error: a ring of waits: K1 closes → K2 closes → K1 closes
              switch K1 from a to b : open, closes at 1 ms after K2 closes
                                            ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → give one of these events a time
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 1 ms after K2 closes
                switch K2 from a to b : open, closes at 1 ms after K1 closes
                """));

    [Fact]
    public void A_switch_that_waits_for_its_own_later_event_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:31: error: a ring of waits: K1 closes → K1 opens → K1 closes
              switch K1 from a to b : open, closes at 1 ms after K1 opens, opens at 5 ms
                                            ^^^^^^^^^^^^^^^^^^^^^^^^^^^^^
              → give one of these events a time
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 1 ms after K1 opens, opens at 5 ms
                """));

    [Fact]
    public void A_ring_of_waits_may_pass_through_the_order_of_one_switch() =>
        Assert.Equal(
            """
            plant.cause:3:30: error: a ring of waits: A closes → B opens → B closes → A opens → A closes
              switch A from a to b : open, closes when B opens, opens at 1 s
                                           ^^^^^^^^^^^^^^^^^^^
              → give one of these events a time
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch A from a to b : open, closes when B opens, opens at 1 s
                switch B from a to b : open, closes when A opens, opens at 2 s
                """));

    [Fact]
    public void Only_a_switch_closes() =>
        Assert.Equal(
            """
            plant.cause:3:52: error: `R1` is a resistor; only a switch closes
              switch K1 from a to b : open, closes at 1 ms after R1 closes
                                                                 ^^
              → name a switch
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 1 ms after R1 closes
                """));

    [Fact]
    public void An_event_that_never_comes_is_not_waited_for() =>
        Assert.Equal(
            """
            plant.cause:4:41: error: `K1` never opens
              switch K2 from a to b : open, closes at 1 ms after K1 opens
                                                      ^^^^^^^^^^^^^^^^^^^
              → add `opens at …` to `K1`, or give a time
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 1 ms
                switch K2 from a to b : open, closes at 1 ms after K1 opens
                """));

    [Fact]
    public void An_event_that_comes_twice_says_no_one_instant() =>
        Assert.Equal(
            """
            plant.cause:4:38: error: `K1` closes 2 times, so `after K1 closes` says no one instant
              switch K2 from a to b : open, closes when K1 closes
                                                   ^^^^^^^^^^^^^^
              → give the time itself
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 1 ms, opens at 2 ms, closes at 3 ms
                switch K2 from a to b : open, closes when K1 closes
                """));

    [Fact]
    public void An_instant_before_the_start_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:41: error: `-1 ms` lies before the start of the study
              switch K1 from a to b : open, closes at -1 ms
                                                      ^^^^^
              → it starts at 0 s; `charged to`, `carrying` and `start settled` say what was before
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at -1 ms
                """));

    [Fact]
    public void A_condition_on_an_unknown_node_is_refused() =>
        Assert.Equal(
            """
            plant.cause:3:56: error: there is no node `bas`
              switch K1 from a to bus : open, closes when voltage of bas rises above 5 V
                                                                     ^^^
              → did you mean `bus`?
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at bus : 1 kΩ
                switch K1 from a to bus : open, closes when voltage of bas rises above 5 V
                """));

    [Fact]
    public void A_condition_has_the_unit_of_its_quantity() =>
        Assert.Equal(
            """
            plant.cause:3:68: error: `5 A` is a current; a voltage in volts is expected here
              switch K1 from a to b : open, closes when voltage of b rises above 5 A
                                                                                 ^^^
              → if the number is right, write `5 V`
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes when voltage of b rises above 5 A
                """));

    [Fact]
    public void Only_an_opening_waits_for_its_own_current() =>
        Assert.Equal(
            """
            plant.cause:3:46: error: `K1` closes here; only an opening waits for its own current
              switch K1 from a to b : open, closes at 1 ms at next current zero
                                                           ^^^^^^^^^^^^^^^^^^^^
              → leave these words out
            """,
            Checking.Messages(
                """
                source Feed at a : 10 V
                resistor R1 at b : 1 kΩ
                switch K1 from a to b : open, closes at 1 ms at next current zero
                """));
}
