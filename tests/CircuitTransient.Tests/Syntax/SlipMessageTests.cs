namespace CircuitTransient.Tests.Syntax;

/// <summary>Slips whose way out can be pasted.</summary>
public class SlipMessageTests
{
    [Theory]
    [InlineData(
        "resistor R at b : 1.200,5 Ω",
        """
        a.cause:1:19: error: `1.200,5` has both a comma and a point; the point is the decimal mark, \
        and nothing parts thousands
          resistor R at b : 1.200,5 Ω
                            ^^^^^^^
          → write `1200.5 Ω`

        """)]
    [InlineData(
        "resistor R at b : 1,200.5 kΩ",
        """
        a.cause:1:19: error: `1,200.5` has both a comma and a point; the point is the decimal mark, \
        and nothing parts thousands
          resistor R at b : 1,200.5 kΩ
                            ^^^^^^^
          → write `1200.5 kΩ`

        """)]
    [InlineData(
        "resistor R at b : 1 Ω, rated 1 kA²s",
        """
        a.cause:1:32: error: `kA²s` is not a unit
          resistor R at b : 1 Ω, rated 1 kA²s
                                         ^^^^
          → `A²s` takes no prefix, which could be squared or not: write `1·10³ A²s`

        """)]
    [InlineData(
        "resistor R at b : 1 Ω, rated 5 mA^2s",
        """
        a.cause:1:32: error: `mA^2s` is not a unit
          resistor R at b : 1 Ω, rated 5 mA^2s
                                         ^^^^^
          → `A²s` takes no prefix, which could be squared or not: write `5·10⁻³ A²s`

        """)]
    [InlineData(
        "resistor R at b : 4.7 K",
        """
        a.cause:1:23: error: `K` is not a unit
          resistor R at b : 4.7 K
                                ^
          → kilo is `k`, and the unit follows it: write `4.7 kΩ` for a resistance

        """)]
    [InlineData(
        "source F at b : impulse of 6 kV 1.2/50",
        """
        a.cause:1:33: error: `1.2/50` has no unit; the front and half-value times are in seconds
          source F at b : impulse of 6 kV 1.2/50
                                          ^^^^^^
          → write `1.2/50 µs`

        """)]
    [InlineData(
        "resistor R9 at b : rated 1 W, 1 kΩ",
        """
        a.cause:1:20: error: `rated` stands where the value should: the value comes first
          resistor R9 at b : rated 1 W, 1 kΩ
                             ^^^^^
          → write `: 1 kΩ, rated 1 W`

        """)]
    [InlineData(
        "capacitor C9 at b : charged to 5 V",
        """
        a.cause:1:21: error: `charged` stands where the value should: the value comes first
          capacitor C9 at b : charged to 5 V
                              ^^^^^^^
          → write `: VALUE, charged to 5 V`

        """)]
    [InlineData(
        "observe voltage of b from 1 ms to 2 ms as \"w\"",
        """
        a.cause:1:40: error: the label stands before the window
          observe voltage of b from 1 ms to 2 ms as "w"
                                                 ^^
          → write `observe voltage of b as "w" from 1 ms to 2 ms`

        """)]
    [InlineData(
        "source F at b : sine of 3 V at 50 Hz, phase 30°",
        """
        a.cause:1:37: error: what belongs to a sine follows it without a comma
          source F at b : sine of 3 V at 50 Hz, phase 30°
                                              ^
          → write `sine of 3 V at 50 Hz phase 30°`

        """)]
    [InlineData(
        "source F at b : 540 V ±10 % + sine of 3 V at 50 Hz",
        """
        a.cause:1:23: error: a tolerance stands behind a constant that is the whole wave
          source F at b : 540 V ±10 % + sine of 3 V at 50 Hz
                                ^^^^^
          → name the value: `value Level : 540 V ±10 %`, and write `Level + sine of 3 V at 50 Hz`

        """)]
    [InlineData(
        "switch K from a to b : open, close at 5 ms, rated 1 kV",
        """
        a.cause:1:30: error: `close` stands where `closes` should
          switch K from a to b : open, close at 5 ms, rated 1 kV
                                       ^^^^^
          → write `closes at 5 ms`

        """)]
    [InlineData(
        "switch K from a to b : closed, open when current through L falls below 1 A",
        """
        a.cause:1:32: error: `open` stands where `opens` should
          switch K from a to b : closed, open when current through L falls below 1 A
                                         ^^^^
          → write `opens when current through L falls below 1 A`

        """)]
    [InlineData(
        "source V at a : sine 325 V 50 Hz",
        """
        a.cause:1:22: error: `325` stands where `of` and the rest of the wave should
          source V at a : sine 325 V 50 Hz
                               ^^^
          → write `sine of 325 V at 50 Hz`

        """)]
    [InlineData(
        "source V at a : cosine 325 V at 50 Hz phase 30°",
        """
        a.cause:1:24: error: `325` stands where `of` and the rest of the wave should
          source V at a : cosine 325 V at 50 Hz phase 30°
                                 ^^^
          → write `cosine of 325 V at 50 Hz phase 30°`

        """)]
    [InlineData(
        "source V at a : pulse 24 V from 1 ms to 3 ms",
        """
        a.cause:1:23: error: `24` stands where `of` and the rest of the wave should
          source V at a : pulse 24 V from 1 ms to 3 ms
                                ^^
          → write `rectangular pulse of 24 V from 1 ms to 3 ms`

        """)]
    [InlineData(
        "resistor R at a : 10 Ω tolerance 5 %, rated 1 W",
        """
        a.cause:1:24: error: `tolerance` is left over behind what the statement says
          resistor R at a : 10 Ω tolerance 5 %, rated 1 W
                                 ^^^^^^^^^
          → write `±5 %`

        """)]
    [InlineData(
        "value X : 10 Ω tolerance 5 %",
        """
        a.cause:1:16: error: `tolerance` is left over behind what the statement says
          value X : 10 Ω tolerance 5 %
                         ^^^^^^^^^
          → write `±5 %`

        """)]
    [InlineData(
        "require energy in R at most 1 J after 1 ms",
        """
        a.cause:1:33: error: a window starts `from` an instant, not `after` one
          require energy in R at most 1 J after 1 ms
                                          ^^^^^
          → write `from 1 ms`

        """)]
    public void A_slip_is_answered_with_the_edit(string text, string message) =>
        Assert.Equal(message.Replace("\\\n", "", StringComparison.Ordinal), Reading.Messages(text));

    [Fact]
    public void What_is_offered_is_read() =>
        Assert.Equal("", Reading.Messages(
            """
            value Level : 540 V ±10 %
            source F at a : Level + sine of 3 V at 50 Hz phase 30°
            source G at b : impulse of 6 kV 1.2/50 µs
            resistor R at a : 1200.5 Ω, rated 1·10³ A²s, rated 5·10⁻³ A²s
            observe voltage of b as "w" from 1 ms to 2 ms
            """));
}
